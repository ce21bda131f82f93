import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findConfiguration, subtotalsOf } from '@/db/queries/configurations';
import { groupBreakdownOf, groupChangesOf, groupsInLists } from '@/db/queries/settings';
import { pageOfView } from '@/db/queries/list-rows';
import { listViewOf } from '@/lib/contracts/list-view';
import { filterOf, rowReader } from '@/lib/server/lists/row-view';
import { revisionGroups } from '@/lib/server/lists/revision-groups';
import { declarations } from '@/tests/support/mass';
import { type GroupChange } from '@/lib/groups/breakdown';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { evaluate } from '@/lib/server/configurations/roll-up-configuration';
import { changeGroups } from '@/lib/server/programs/change-groups';
import { setAllowance } from '@/lib/server/programs/set-allowance';
import { stateLimit } from '@/lib/server/programs/set-limit';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

/* Invented rows. */
const ROWS = `item,group,mass,x,y,z,ixx,iyy,izz,maturity
spar,Wing/Spars,120,6.4,0,1.2,90,8,95,E
nose ribs,Wing/Nose,30,6,0,1.2,9,1,9,E
shell,Body,900,6.6,0,1.4,500,4200,4300,C
`;

const IN_SI = declarations({ axes: ['aft', 'right', 'up'] });

let test: ProgramUnderTest;
let revision: { id: string; number: number };

beforeAll(async () => {
  test = await programUnderTest();
  revision = await reviseList(test, test.crew.weights, 'all', ROWS);
  await createConfiguration(test.db, {
    person: test.crew.weights,
    programId: test.program.id,
    buildCode: 'design',
    code: 'one',
    title: 'One',
  });
});
afterAll(() => test.close());

const change = (...changes: GroupChange[]) =>
  changeGroups(test.db, { person: test.crew.weights, programId: test.program.id, changes });
const added = (path: string): GroupChange => ({ kind: 'added', path, to: null, code: null });
const moved = (path: string, to: string): GroupChange => ({ kind: 'moved', path, to, code: null });

async function evaluated() {
  const configuration = await findConfiguration(test.db, test.program.id, 'one');
  if (configuration === undefined) throw new Error('there is a configuration');
  const { result, findings } = await evaluate(test.db, configuration);
  const [empty] = result.conditions;
  if (empty === undefined) throw new Error('it has a condition');
  return { groups: empty.rollUp.groups, findings, result };
}
const unknown = async () =>
  (await evaluated()).findings
    .filter(({ rule }) => rule === 'unknown-group')
    .map(({ rows, message }) => ({ rows, message }));

describe('a breakdown of groups', () => {
  it('misses nothing while it is empty', async () => {
    expect(await unknown()).toEqual([]);
  });

  it('is warned of at roll-up where it lacks a group, at once when it changes, with the groups', async () => {
    await change(added('Wing'), added('Wing/Spars'), added('Wing/Nose'));
    expect(await unknown()).toEqual([
      { rows: ['Body'], message: '1 row is in a group that the breakdown does not have: Body.' },
    ]);
    await change(added('Body'));
    expect(await unknown()).toEqual([]);
  });

  it('keeps who did what and when, all of a change or nothing of it', async () => {
    await expect(change(added('Tail'), added('Wing'))).rejects.toMatchObject({ code: 'conflict' });
    const changes = await groupChangesOf(test.db, test.program.id);
    expect(changes.map(({ number, kind, path, author }) => [number, kind, path, author])).toEqual([
      [1, 'added', 'Wing', 'weights'],
      [2, 'added', 'Wing/Spars', 'weights'],
      [3, 'added', 'Wing/Nose', 'weights'],
      [4, 'added', 'Body', 'weights'],
    ]);
    for (const { changed_at: at } of changes) expect(Date.now() - at.getTime()).toBeLessThan(600_000);
  });

  it('renamed, is how rows are rolled up from then on, and no stored row or subtotal changes', async () => {
    const stored = await subtotalsOf(test.db, [revision.id], test.frameIssueId);
    const before = await evaluated();
    await change(moved('Wing/Nose', 'Wing/Leading edge'), moved('Wing', 'Mainplane'));
    const after = await evaluated();
    expect(after.groups.map(({ group }) => group)).toEqual([
      'Body',
      'Mainplane/Leading edge',
      'Mainplane/Spars',
    ]);
    expect(after.groups.map(({ basic }) => basic.mass)).toEqual([900, 30, 120]);
    expect(after.result.conditions[0]?.rollUp.basic).toEqual(before.result.conditions[0]?.rollUp.basic);
    expect(await unknown()).toEqual([]);
    expect(await subtotalsOf(test.db, [revision.id], test.frameIssueId)).toEqual(stored);
    const rows = await test.db
      .selectFrom('mass_rows')
      .select(['item', 'group_path'])
      .orderBy('item')
      .execute();
    expect(rows.map((row) => row.group_path)).toEqual(['Wing/Nose', 'Body', 'Wing/Spars']);
    const groups = await revisionGroups(test.db, revision.id);
    const found = async (group: string): Promise<unknown[]> => {
      const filter = filterOf({ ...listViewOf(new URLSearchParams({ group })) }, [], groups);
      const page = { offset: 0, limit: 10 };
      const order = { column: 'position', descending: false } as const;
      const { rows: inView } = await pageOfView(test.db, revision.id, filter, order, page);
      return inView.map(rowReader(IN_SI, groups)).map(({ cells }) => [cells.item, cells.group]);
    };
    expect(await found('Mainplane')).toEqual([
      ['spar', 'Mainplane/Spars'],
      ['nose ribs', 'Mainplane/Leading edge'],
    ]);
    expect(await found('Mainplane/Leading edge')).toEqual([['nose ribs', 'Mainplane/Leading edge']]);
    expect(await found('Wing')).toEqual([]);
    expect((await groupsInLists(test.db, test.program.id)).map(({ group }) => group)).toEqual([
      'Body',
      'Wing/Nose',
      'Wing/Spars',
    ]);
  });

  it('reads allowances and limits that were stated under a former name by the present one, and says which rule applies', async () => {
    const about = { person: test.crew.chief, programId: test.program.id };
    await setAllowance(test.db, {
      ...about,
      group: 'Mainplane',
      maturity: 'E',
      fraction: 0.1,
      source: 'a plan',
    });
    await stateLimit(test.db, {
      ...about,
      id: null,
      limit: {
        kind: 'allocation',
        quantity: 'mass',
        sense: 'at-most',
        value: 160,
        group: 'Mainplane',
        condition: null,
        source: 'a plan',
        sourceDate: '2026-01-05',
        from: '2026-01-05',
        until: null,
      },
    });
    await change(moved('Mainplane', 'Wing'));
    const { groups, result, findings } = await evaluated();
    expect(groups.map(({ group, predicted }) => [group, Number(predicted.mass.toFixed(9))])).toEqual([
      ['Body', 900],
      ['Wing/Leading edge', 33],
      ['Wing/Spars', 132],
    ]);
    expect(result.limits?.map(({ group }) => group)).toEqual(['Wing']);
    expect(findings.filter(({ rule }) => rule.startsWith('beyond-'))).toMatchObject([
      { rule: 'beyond-allocation', severity: 'note', rows: ['Wing'] },
    ]);
  });

  it('is asked of every row at import, by any name that a group has had', async () => {
    await reviseList(
      test,
      test.crew.weights,
      'late',
      `item,group,mass,x,y,z\nold name,Mainplane/Spars,1,6,0,1\nnew name,Wing/Leading edge,1,6,0,1\nstrange,Wing/Noze,1,6,0,1\nnone,,1,6,0,1\n`,
    );
    const { findings } = await test.db
      .selectFrom('list_revisions')
      .innerJoin('lists', 'lists.id', 'list_revisions.list_id')
      .select('findings')
      .where('lists.code', '=', 'late')
      .executeTakeFirstOrThrow();
    expect(findings.filter(({ rule }) => rule === 'unknown-group')).toMatchObject([
      { severity: 'warning', rows: ['strange'], count: 1 },
    ]);
  });

  it('is refused to alter, by the word of PostgreSQL', async () => {
    const denied = { message: expect.stringContaining('permission denied') as string };
    await expect(test.db.updateTable('group_changes').set({ path: 'x' }).execute()).rejects.toMatchObject(
      denied,
    );
    await expect(test.db.deleteFrom('group_changes').execute()).rejects.toMatchObject(denied);
    expect((await groupBreakdownOf(test.db, test.program.id)).has('Wing/Leading edge')).toBe(true);
  });

  it('takes two changes at once one after the other', async () => {
    await Promise.all(['Tail', 'Fin', 'Nacelle'].map((path) => change(added(path))));
    const changes = await groupChangesOf(test.db, test.program.id);
    expect(changes.map(({ number }) => number)).toEqual(changes.map((_, index) => index + 1));
  });
});
