import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findList, findRevision } from '@/db/queries/lists';
import { type Finding } from '@/lib/findings/finding';
import { editRows } from '@/lib/server/lists/edit-rows';
import { programUnderTest, type ProgramUnderTest, reviseList } from '@/tests/support/program';

const UNITS = { mass_unit: 'kg', length_unit: 'm', inertia_unit: 'kg.m2' } as const;
const HEAD = 'item,group,mass,x,y,z,ixx,iyy,izz,maturity';
/** Twelve rows of 10 to 21 kg, 186 kg in all. */
const row = (
  i: number,
  said: { mass?: number; y?: number; scale?: number; inertia?: number } = {},
): string => {
  const { mass = 10 + i, y = 0.5 + 0.1 * i, scale = 1, inertia = 1 } = said;
  const at = [5 + 0.1 * i, y, 1 + 0.05 * i].map((part) => part * scale);
  return [`P${i}`, 'Body', mass, ...at, ...[0.4, 0.5, 0.6].map((m) => m * inertia), 'C'].join(',');
};
const csv = (change: (i: number) => string = row): string =>
  `${[HEAD, ...Array.from({ length: 12 }, (_, i) => change(i))].join('\n')}\n`;

let test: ProgramUnderTest;
beforeAll(async () => {
  test = await programUnderTest();
});
afterAll(() => test.close());

async function findingsOf(code: string, number: number): Promise<Finding[]> {
  const list = await findList(test.db, test.program.id, code);
  const revision = await findRevision(test.db, list?.id ?? '', number);
  if (revision === undefined) throw new Error(`no revision ${number} of ${code}`);
  return revision.findings;
}

describe('A new revision is held against the one before', () => {
  it('as a whole: a mass that jumped', async () => {
    await reviseList(test, test.crew.weights, 'jump', csv(), UNITS);
    await reviseList(
      test,
      test.crew.weights,
      'jump',
      csv((i) => row(i, i === 3 ? { mass: 43 } : {})),
      UNITS,
    );
    expect(await findingsOf('jump', 1)).toEqual([]);
    expect(await findingsOf('jump', 2)).toMatchObject([{ rule: 'mass-jump', severity: 'warning' }]);
    expect((await findingsOf('jump', 2))[0]?.message).toMatch(
      /^The list weighs 216 kg, its revision before 186 kg: \+16\.13 %/,
    );
  });

  it('row by row: units of mass, place and moments, and a turned sign', async () => {
    await reviseList(test, test.crew.weights, 'slips', csv(), UNITS);
    const wrong = csv((i) => {
      if (i === 2) return row(i, { mass: 12 / 0.45359237 });
      if (i === 4) return row(i, { inertia: 32.17404856 });
      if (i === 6) return row(i, { y: -1.1 });
      return i === 8 ? row(i, { scale: 1 / 0.3048 }) : row(i);
    });
    await reviseList(test, test.crew.weights, 'slips', wrong, UNITS);
    const findings = await findingsOf('slips', 2);
    const seen = (rule: string) => findings.find((finding) => finding.rule === rule);
    expect(seen('mass-changed-by-unit')).toMatchObject({ rows: ['P2'], severity: 'warning' });
    expect(seen('mass-changed-by-unit')?.message).toMatch(/26\.46 kg, before 12 kg: it looks as if in lb\.$/);
    expect(seen('inertia-changed-by-unit')?.rows).toEqual(['P4']);
    expect(seen('inertia-changed-by-unit')?.message).toMatch(/as if lb\.ft2 had been taken for slug\.ft2\.$/);
    expect(seen('place-changed-by-slip')?.rows).toEqual(['P8']);
    expect(seen('moved-to-other-side')).toMatchObject({ rows: ['P6'], severity: 'note' });
  });

  it('when it is edited too', async () => {
    await reviseList(test, test.crew.weights, 'edited', csv(), UNITS);
    const list = await findList(test.db, test.program.id, 'edited');
    if (list === undefined) throw new Error('no list');
    await editRows(test, {
      person: test.crew.weights,
      list,
      baseRevision: 1,
      reason: 'weighed again',
      edits: [{ kind: 'change', item: 'P5', fields: { mass: '15000' } }],
    });
    const rules = (await findingsOf('edited', 2)).map(({ rule }) => rule);
    expect(rules).toEqual(expect.arrayContaining(['mass-jump', 'mass-changed-by-unit']));
  });

  it('but for its places when it declares another frame', async () => {
    await reviseList(test, test.crew.weights, 'turned', csv(), UNITS);
    const turned: Parameters<typeof reviseList>[4] = { ...UNITS, axes: ['aft', 'left', 'up'] };
    const mirrored = csv((i) => row(i, { y: -0.5 - 0.1 * i, ...(i === 2 ? { mass: 12000 } : {}) }));
    await reviseList(test, test.crew.weights, 'turned', mirrored, turned);
    const rules = (await findingsOf('turned', 2)).map(({ rule }) => rule);
    expect(rules).toContain('mass-changed-by-unit');
    expect(rules).not.toContain('place-changed-by-slip');
  });
});
