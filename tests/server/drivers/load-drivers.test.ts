import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findConfiguration } from '@/db/queries/configurations';
import { wholesWithRevision } from '@/db/queries/pinned-wholes';
import { BY, partOf, wholeAccount } from '@/lib/drivers/drivers';
import { toNumbersWithRest } from '@/lib/mass/account';
import { contributionOf, wholeOf } from '@/lib/mass/contributions/contribution';
import { accountOfPart } from '@/lib/mass/contributions/effects';
import { type NameOfTen, TEN, tenOf } from '@/lib/mass/contributions/ten';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { pinRevisions } from '@/lib/server/configurations/pin-revisions';
import { rollUpConfiguration } from '@/lib/server/configurations/roll-up-configuration';
import { type DriversSource, loadDrivers, MOST_PARTS } from '@/lib/server/drivers/load-drivers';
import { configurationSource, type ViewsSource } from '@/lib/server/three-views/sources';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

/* Invented rows: one list in metres, one in millimetres and turned axes, one of adjustments. */
const WING = `item,group,category,counting,quantity,mass,x,y,z,ixx,iyy,izz,yaw,symmetry
spar,Wing/Spars,empty,counted,1,120,6.4,2.5,1.2,90,2,91,12,pair
rib,Wing/Ribs,empty,counted,6,2,6.8,3.0,1.2,,,,,pair
clip,Wing/Ribs,empty,counted,1,0.5,6.9,3.1,1.2,,,,,
wing,Wing,empty,memo,1,265,6.5,0,1.2,,,,,
oil,Engine,operating,counted,1,9,5,2,1,,,,,
`;
const TAIL = `item,group,mass,x,y,z
fin,Tail/Fin,40,-12500,0,3200
tailplane,Tail/Plane,38,-13000,0,4100
`;
const CHANGES = `item,group,mass,x,y,z,change_ref,status
less spar,Wing/Spars,-3,6.4,2.5,1.2,C-1,approved
less rib,Wing/Ribs,-1,6.8,3,1.2,C-2,pending
`;
const BODY_X_FORWARD = { length_unit: 'mm', axes: 'forward,left,up' } as const;

let test: ProgramUnderTest;
let source: ViewsSource;

beforeAll(async () => {
  test = await programUnderTest();
  const { db, program, crew } = test;
  await reviseList(test, crew.weights, 'wing', WING);
  await reviseList(test, crew.weights, 'tail', TAIL, BODY_X_FORWARD);
  await reviseList(test, crew.weights, 'changes', CHANGES, { kind: 'adjustments' });
  const many = Array.from({ length: 90 }, (_, k) => `bolt-${k},Bolts/${k % 3},${(1 + k) / 100},6,${k},1`);
  await reviseList(test, crew.weights, 'bolts', ['item,group,mass,x,y,z', ...many, ''].join('\n'));
  await createConfiguration(db, {
    person: crew.weights,
    programId: program.id,
    buildCode: 'design',
    code: 'driven',
    title: 'Driven',
  });
  const driven = await findConfiguration(db, program.id, 'driven');
  if (driven === undefined) throw new Error('no configuration');
  await pinRevisions(db, {
    person: crew.weights,
    configuration: driven,
    version: driven.version,
    revisions: { wing: 1, changes: 1, tail: 1, bolts: 1 },
    rotors: null,
  });
  source = await configurationSource(db, program.id, 'driven');
});

afterAll(() => test.close());

const ITEMS = [{ name: 'pilot', mass: 90, position: [3, -0.4, 1] as const }];

const withItems = (): DriversSource => ({
  ...source,
  condition: { categories: ['empty', 'operating'], items: ITEMS },
});

async function drivers(number: NameOfTen, by: (typeof BY)[number], of = withItems()) {
  const found = await loadDrivers(test.db, of, { number, by });
  if (found === null) throw new Error('no mass');
  return found;
}

describe('what drives a condition', () => {
  it('adds up to its ten numbers by rows, by groups and by first-level groups; the levers to nothing', async () => {
    for (const by of BY) {
      for (const number of TEN) {
        const { sum, gross, geometry, ...rest } = await drivers(number, by);
        const ten = tenOf(wholeAccount(rest), geometry);
        const expected = number.length === 1 ? 0 : (ten?.[number] ?? NaN);
        expect(Math.abs(sum - expected), `${number} by ${by}`).toBeLessThan(1e-11 * Math.max(gross, 1));
      }
    }
  });

  it('names the parts in the order of their contributions, largest first without regard to sign', async () => {
    for (const number of TEN) {
      const { parts, whole, geometry } = await drivers(number, 'rows');
      const about = wholeOf(wholeAccount({ whole }), geometry);
      if (about === null) throw new Error('no mass');
      const sizes = parts.map((part) => Math.abs(contributionOf(accountOfPart(partOf(part)), about)[number]));
      expect(sizes.length).toBe(MOST_PARTS);
      // The server ranks with the ten numbers alone, a reader computes with what rounding left out as well.
      sizes
        .slice(1)
        .forEach((size, k) => expect(size).toBeLessThanOrEqual((sizes[k] ?? NaN) * (1 + 1e-9) + 1e-9));
    }
  });

  it('counts the rows that it does not send, memo rows and unapproved adjustments nowhere, items on board as rows', async () => {
    const { parts, of } = await drivers('mass', 'rows');
    expect(of).toBe(4 + 2 + 1 + 90 + 1);
    expect(parts.slice(0, 4).map(({ name }) => name)).toEqual(['spar', 'pilot', 'fin', 'tailplane']);
    const names = parts.map(({ name }) => name);
    expect(names).not.toContain('wing');
    expect(names).not.toContain('less rib');
    expect(names).toContain('less spar');
  });

  it('leaves out the rows of categories that are not on board', async () => {
    const empty = { ...source, condition: { categories: ['empty'] as const, items: [] } };
    const { of, sum } = await drivers('mass', 'rows', empty);
    expect(of).toBe(3 + 2 + 1 + 90);
    const bolts = Array.from({ length: 90 }, (_, k) => (1 + k) / 100).reduce((a, b) => a + b, 0);
    expect(sum).toBeCloseTo(240 + 24 + 0.5 + 78 - 3 + bolts, 9);
  });

  it('gives a pair its image apart, so that it can be moved as a pair', async () => {
    const { parts } = await drivers('ixx', 'rows');
    const spar = parts.find(({ name }) => name === 'spar');
    if (spar === undefined) throw new Error('no spar');
    const { pieces, image } = partOf(spar);
    expect(pieces.first[1]).toBeCloseTo(300, 12);
    expect(image?.first[1]).toBeCloseTo(-300, 12);
    expect(spar).toMatchObject({
      key: 'wing/spar',
      group: 'Wing/Spars',
      list: { code: 'wing', revision: 1 },
    });
  });

  it('has nothing to say of a condition without mass', async () => {
    const none = { ...source, condition: { categories: [], items: [] } };
    expect(await loadDrivers(test.db, none, { number: 'mass', by: 'rows' })).toBeNull();
  });
});

describe('what a list is part of', () => {
  const wholes = (code: string) => {
    const revision = source.revisions.find((one) => one.code === code);
    return wholesWithRevision(test.db, revision?.id ?? '', test.frameIssueId);
  };

  it('is each condition of a configuration that pins it, once that is rolled up, and not when its inputs have changed', async () => {
    const { db, program, crew } = test;
    const driven = () => findConfiguration(db, program.id, 'driven');
    expect(await wholes('wing')).toEqual([]);
    const before = await driven();
    if (before === undefined) throw new Error('no configuration');
    const { result } = await rollUpConfiguration(db, { person: crew.weights, configuration: before });
    const found = await wholes('wing');
    expect(found.map(({ configuration, condition }) => [configuration, condition])).toEqual(
      result.conditions.map(({ code }) => ['driven', code]),
    );
    expect(found.map(({ account }) => toNumbersWithRest(account))).toEqual(
      result.conditions.map(({ rollUp }) => toNumbersWithRest(rollUp.basicAccount)),
    );
    expect(found[0]?.categories).toEqual(result.conditions[0]?.categories);
    await pinRevisions(db, {
      person: crew.weights,
      configuration: before,
      version: before.version,
      revisions: { wing: 1, tail: 1 },
      rotors: null,
    });
    expect(await wholes('wing')).toEqual([]);
  });
});
