import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type GroupChange, GroupBreakdown } from '@/lib/groups/breakdown';
import { groupChoices, pathsToAdd } from '@/lib/groups/choices';
import { groupProblem } from '@/lib/groups/problems';
import { USUAL_GROUPS } from '@/lib/groups/usual-groups';
import { Placement } from '@/lib/mass/place';
import { NO_GROWTH, renamedGroups, rollUp } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { aComponent, declarations, geometry, properties } from '@/tests/support/mass';

const added = (path: string, code: string | null = null): GroupChange => ({
  kind: 'added',
  path,
  to: null,
  code,
});
const moved = (path: string, to: string): GroupChange => ({ kind: 'moved', path, to, code: null });
const removed = (path: string): GroupChange => ({ kind: 'removed', path, to: null, code: null });

/** Takes what the tree takes; throws at the first that it refuses. */
function made(...changes: readonly GroupChange[]): GroupChange[] {
  const done: GroupChange[] = [];
  for (const change of changes) {
    const problem = groupProblem(done, change);
    if (problem !== null) throw new Error(problem);
    done.push(change);
  }
  return done;
}
const tree = (...changes: readonly GroupChange[]) => new GroupBreakdown(made(...changes));
const WING = [added('Wing', '10'), added('Wing/Spars'), added('Wing/Nose'), added('Tail', '20')];

describe('a breakdown of groups', () => {
  it('stands in the order of its codes, then of its names, what is below a group after it', () => {
    const nodes = tree(
      added('Zulu', '05'),
      added('Zulu/b'),
      added('Zulu/a'),
      added('Alpha'),
      added('Beta', '10'),
    ).nodes();
    expect(nodes.map(({ path }) => path)).toEqual(['Zulu', 'Zulu/a', 'Zulu/b', 'Beta', 'Alpha']);
  });

  it('counts in codes: 10.2 stands before 10.10', () => {
    const codes = ['10.10', '10', '9', '10.2', 'A2', 'A10'];
    const nodes = tree(...codes.map((code) => added(`Group ${code}`, code))).nodes();
    expect(nodes.map(({ code }) => code)).toEqual(['9', '10', '10.2', '10.10', 'A2', 'A10']);
  });

  it('reads a path that rows have said since before a rename as what it is called now, whatever is below it too', () => {
    const now = tree(...WING, moved('Wing/Nose', 'Wing/Leading edge'), moved('Wing', 'Mainplane'));
    expect(now.present('Wing/Nose')).toBe('Mainplane/Leading edge');
    expect(now.present('Wing/Nose/Ribs')).toBe('Mainplane/Leading edge/Ribs');
    expect(now.present('Wing/Leading edge')).toBe('Mainplane/Leading edge');
    expect(now.present('Mainplane/Spars')).toBe('Mainplane/Spars');
    expect(now.present('Wing tips')).toBe('Wing tips');
    expect(now.nodes().map(({ path, code }) => [path, code])).toEqual([
      ['Mainplane', '10'],
      ['Mainplane/Leading edge', null],
      ['Mainplane/Spars', null],
      ['Tail', '20'],
    ]);
  });

  it('knows a path by any name it has had, and misses one that it lacks; an empty one misses none', () => {
    const now = tree(...WING, moved('Wing', 'Mainplane'), removed('Mainplane/Nose'));
    expect(['Wing', 'Wing/Spars', 'Mainplane', 'Ungrouped'].map((path) => now.isUnknown(path))).toEqual([
      false,
      false,
      false,
      false,
    ]);
    expect(['Wing/Nose', 'Mainplane/Ribs', 'wing'].map((path) => now.isUnknown(path))).toEqual([
      true,
      true,
      true,
    ]);
    expect(new GroupBreakdown([]).isUnknown('Anything')).toBe(false);
  });

  it('takes a name back by another rename', () => {
    const now = tree(...WING, moved('Wing', 'Mainplane'), moved('Mainplane', 'Wing'));
    expect([now.present('Wing'), now.present('Mainplane/Spars')]).toEqual(['Wing', 'Wing/Spars']);
  });

  it.each([
    ['a group that is there', [...WING, added('Wing')], 'already'],
    ['one below a group that is not', [...WING, added('Body/Floor')], 'no group Body'],
    ['a code twice', [...WING, added('Body', '20')], 'has the code 20'],
    ['a move onto another group', [...WING, moved('Tail', 'Wing')], 'do not become one'],
    ['a move below itself', [...WING, moved('Wing', 'Wing/Spars/Wing')], 'below itself'],
    ['a move below what is not there', [...WING, moved('Wing', 'Body/Wing')], 'no group Body'],
    ['taking away what has groups below it', [...WING, removed('Wing')], 'Wing/Nose'],
    ['a move of what is gone', [...WING, removed('Tail'), moved('Tail', 'Fin')], 'no group Tail'],
    [
      'a new group by the former name of another',
      [...WING, moved('Wing', 'Mainplane'), added('Wing')],
      'former name of Mainplane',
    ],
    [
      'a move to the former name of another',
      [...WING, moved('Wing', 'Mainplane'), moved('Tail', 'Wing')],
      'former name',
    ],
  ] as const)('refuses %s, and says why', (_, changes, words) => {
    expect(() => made(...changes)).toThrow(words);
  });

  it('leads every name that a group ever had to that group alone, whatever was done to the tree', () => {
    const names = ['a', 'b', 'c'];
    const step = fc.record({
      kind: fc.constantFrom<GroupChange['kind']>('added', 'moved', 'moved', 'removed'),
      from: fc.nat(20),
      above: fc.nat(20),
      name: fc.constantFrom(...names),
    });
    let moves = 0;
    fc.assert(
      fc.property(fc.array(step, { minLength: 5, maxLength: 40 }), (steps) => {
        const done: GroupChange[] = [];
        // Kept beside it by identity: a group is an object, its path is worked out from the groups above it.
        interface Kept {
          name: string;
          above: Kept | null;
        }
        const pathOf = ({ name, above }: Kept): string =>
          above === null ? name : `${pathOf(above)}/${name}`;
        let kept: Kept[] = [];
        const said: { readonly path: string; readonly group: Kept }[] = [];
        for (const { kind, from, above, name } of steps) {
          const group = kept[from % Math.max(1, kept.length)];
          const parent = [null, ...kept][above % (kept.length + 1)] ?? null;
          if (kind !== 'added' && group === undefined) continue;
          const target = parent === null ? name : `${pathOf(parent)}/${name}`;
          const change: GroupChange = {
            kind,
            path: kind === 'added' || group === undefined ? target : pathOf(group),
            to: kind === 'moved' ? target : null,
            code: null,
          };
          if (groupProblem(done, change) !== null) continue;
          done.push(change);
          if (kind === 'added') kept.push({ name, above: parent });
          else if (kind === 'removed') kept = kept.filter((one) => one !== group);
          else if (group) {
            group.name = name;
            group.above = parent;
            moves += 1;
          }
          // Rows may say any path that a group has at this moment.
          for (const one of kept) said.push({ path: pathOf(one), group: one });
        }
        const now = new GroupBreakdown(done);
        expect(
          now
            .nodes()
            .map(({ path }) => path)
            .sort(),
        ).toEqual(kept.map(pathOf).sort());
        for (const { path, group } of said)
          if (kept.includes(group)) expect(now.present(path)).toBe(pathOf(group));
      }),
      { numRuns: 500 },
    );
    expect(moves).toBeGreaterThan(200);
  });
});

describe('choices of groups', () => {
  it('are the tree, then what only rows have, by the names of today', () => {
    const now = tree(...WING, moved('Wing', 'Mainplane'));
    expect(groupChoices(now, ['Wing/Spars', 'Wing/Ribs/Left', 'Body'])).toEqual([
      'Mainplane',
      'Mainplane/Nose',
      'Mainplane/Spars',
      'Tail',
      'Body',
      'Mainplane/Ribs',
      'Mainplane/Ribs/Left',
    ]);
    expect(pathsToAdd(now, ['Mainplane/Ribs/Left', 'Body'])).toEqual([
      'Body',
      'Mainplane/Ribs',
      'Mainplane/Ribs/Left',
    ]);
  });

  it('offered as a start are top groups with codes of their own', () => {
    expect(() => made(...USUAL_GROUPS.map(({ path, code }) => added(path, code)))).not.toThrow();
    for (const { path } of USUAL_GROUPS) expect(path).not.toContain('/');
  });
});

describe('a stored result under the names of a later one', () => {
  const book = new SubtotalBook(new Placement(declarations(), geometry()));
  [
    { item: 'a', group: 'Wing/Spars', mass: 10, position: [1, 0, 0] as const },
    { item: 'b', group: 'Mainplane/Spars', mass: 5, position: [4, 0, 0] as const },
    { item: 'c', group: 'Body', mass: 7 },
  ].forEach((row) => book.add(aComponent({ maturity: 'C', ...row })));
  const total = rollUp(book.subtotals(), [], geometry(), NO_GROWTH);

  it('has each group by its new name, those that come to have one name as one, with their mass and CG', () => {
    const since = tree(...WING, moved('Wing', 'Mainplane'));
    const renamed = renamedGroups(total.groups, geometry(), (group) => since.present(group));
    expect(renamed.map(({ group, rows, basic }) => [group, rows, basic.mass])).toEqual([
      ['Body', 1, 7],
      ['Mainplane/Spars', 2, 15],
    ]);
    // Two masses of 10 and 5 kg at 1 and 4 m: the lever rule.
    expect(properties(renamed[1]?.basic ?? { properties: null }).cg[0]).toBeCloseTo(2, 12);
    expect(renamed[1]?.byMaturity).toEqual({ E: 0, C: 15, A: 0, none: 0 });
  });

  it('is as it was where nothing was renamed', () => {
    expect(renamedGroups(total.groups, geometry(), (group) => group)).toEqual(total.groups);
  });
});
