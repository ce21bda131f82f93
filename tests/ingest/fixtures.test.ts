import { describe, expect, it } from 'vitest';
import { listDeclarationsSchema } from '@/lib/contracts/list-declarations';
import { readOperatingPoints } from '@/lib/ingest/operating-points';
import { type Problem } from '@/lib/ingest/problem';
import { readRotors } from '@/lib/ingest/rotors';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { rpm } from '@/lib/units/convert';
import { INERTIA_UNITS } from '@/lib/units/table';
import { declare, fixtureBytes, fixtureExpectation, fixtureNames, inPieces, readList } from './support';

/** A problem as a fixture expects it: `says` is part of its message. */
interface ExpectedProblem extends Omit<Problem, 'message'> {
  readonly says: string;
}

interface ValidList {
  readonly about: string;
  readonly declarations: unknown;
  readonly rows: number;
  readonly unknownColumns?: readonly string[];
  readonly expect?: Readonly<Record<string, object>>;
  readonly lines?: Readonly<Record<string, number>>;
}

interface InvalidFile {
  readonly about: string;
  readonly declarations: { readonly inertia_unit?: string };
  readonly problems: readonly ExpectedProblem[];
  readonly undeclared?: string;
  readonly reads?: 'rotors' | 'points';
}

function matchProblems(found: readonly Problem[], expected: readonly ExpectedProblem[]): void {
  expect(found.map(({ kind, line, column, found: text }) => ({ kind, line, column, found: text }))).toEqual(
    expected.map(({ kind, line, column, found: text }) => ({ kind, line, column, found: text })),
  );
  found.forEach(({ message }, index) => {
    expect(message).toContain(expected[index]?.says);
    expect(message).toMatch(/^[A-Z`a-z].*\.$/u);
  });
}

describe('a right mass list', () => {
  const folder = 'lists/valid';
  it.each(fixtureNames(folder))('%s is read whole, without a problem', async (name) => {
    const wanted = fixtureExpectation<ValidList>(folder, name);
    const read = await readList(fixtureBytes(folder, name), declare(wanted.declarations));
    expect(read.problems).toEqual([]);
    expect(read.problemCounts).toEqual({});
    expect(read.rows).toBe(wanted.rows);
    expect(read.components).toHaveLength(wanted.rows);
    expect(read.unknownColumns).toEqual(wanted.unknownColumns ?? []);
    expect(read.lines).toMatchObject(wanted.lines ?? {});
    for (const [item, members] of Object.entries(wanted.expect ?? {})) {
      expect(read.components.find((component) => component.item === item)).toMatchObject(members);
    }
  });
});

describe('a wrong mass list', () => {
  const folder = 'lists/invalid';
  const names = fixtureNames(folder);
  const incomplete = names.filter(
    (name) => fixtureExpectation<InvalidFile>(folder, name).undeclared !== undefined,
  );

  it.each(names.filter((name) => !incomplete.includes(name)))('%s gives its problems', async (name) => {
    const wanted = fixtureExpectation<InvalidFile>(folder, name);
    const { problems, problemCounts } = await readList(
      fixtureBytes(folder, name),
      declare(wanted.declarations),
    );
    expect(wanted.problems.length).toBeGreaterThan(0);
    matchProblems(problems, wanted.problems);
    const counts = new Map<string, number>();
    for (const { kind } of wanted.problems) counts.set(kind, (counts.get(kind) ?? 0) + 1);
    expect(problemCounts).toEqual(Object.fromEntries(counts));
  });

  it.each(incomplete)('%s is refused by its declarations', async (name) => {
    const { declarations, undeclared: member } = fixtureExpectation<InvalidFile>(folder, name);
    const { error } = listDeclarationsSchema.safeParse(declarations);
    expect(error?.issues.map(({ path }) => path.join('.'))).toEqual([member]);
  });

  it('is never read with a unit that nobody declared', async () => {
    const bytes = fixtureBytes('lists/invalid', 'undeclared-unit');
    const undeclared = { ...declare(), inertiaUnit: undefined } as unknown as ListDeclarations;
    await expect(readList(bytes, undeclared)).rejects.toThrow('inertia_unit');
  });
});

describe('files of rotating parts', () => {
  const unitOf = (text: string | undefined) => {
    const unit = INERTIA_UNITS.find((known) => known === text);
    if (unit === undefined) throw new Error('the fixture declares no inertia_unit');
    return { inertiaUnit: unit };
  };

  it.each(fixtureNames('rotors/invalid'))('%s gives its problems', async (name) => {
    const { declarations, problems, reads } = fixtureExpectation<InvalidFile>('rotors/invalid', name);
    const bytes = inPieces(fixtureBytes('rotors/invalid', name));
    const read =
      reads === 'points'
        ? await readOperatingPoints(bytes)
        : await readRotors(bytes, unitOf(declarations.inertia_unit));
    matchProblems(read.problems, problems);
  });

  it.each(['arrows', 'angles-semicolon'])('%s is read whole, without a problem', async (name) => {
    const wanted = fixtureExpectation<{
      declarations: { inertia_unit: string };
      expect: object[];
      unknownColumns?: string[];
    }>('rotors/valid', name);
    const bytes = inPieces(fixtureBytes('rotors/valid', name));
    const read = await readRotors(bytes, unitOf(wanted.declarations.inertia_unit));
    expect(read.problems).toEqual([]);
    expect(read.rotors).toEqual(wanted.expect);
    expect(read.unknownColumns).toEqual(wanted.unknownColumns ?? []);
  });

  it('operating points are read whole, speeds in rad/s', async () => {
    interface Point {
      code: string;
      title: string;
      rpm: Record<string, number>;
      rpmSigma: Record<string, number | null>;
    }
    const wanted = fixtureExpectation<{ expect: Point[] }>('rotors/valid', 'operating-points');
    const read = await readOperatingPoints(inPieces(fixtureBytes('rotors/valid', 'operating-points')));
    expect(read.problems).toEqual([]);
    const rounded = (speed: number): number => Number(rpm(speed).toPrecision(12));
    const points = read.points.map(({ code, title, speeds }) => ({
      code,
      title,
      rpm: Object.fromEntries(speeds.map(({ shaft, speed }) => [shaft, rounded(speed)])),
      rpmSigma: Object.fromEntries(
        speeds.map(({ shaft, sigma }) => [shaft, sigma === null ? null : rounded(sigma)]),
      ),
    }));
    expect(points).toEqual(wanted.expect);
  });
});
