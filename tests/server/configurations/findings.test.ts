import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findConfiguration, latestRollUp, rotorRevisionsOf } from '@/db/queries/configurations';
import { findingKey } from '@/lib/baselines/finding-key';
import { type PlacedFinding } from '@/lib/findings/finding';
import { type Rotor } from '@/lib/rotors/rotor';
import { submitConfiguration } from '@/lib/server/baselines/submit-configuration';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { pinRevisions } from '@/lib/server/configurations/pin-revisions';
import { rollUpConfiguration } from '@/lib/server/configurations/roll-up-configuration';
import { reviseRotors } from '@/lib/server/rotors/revise-rotors';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

/* Invented rows. The disc turns about x and carries a propeller. */
const HEAD = 'item,part_number,group,mass,x,y,z,ixx,iyy,izz,maturity,growth_percent';
const LIST = [
  'shell,,Body,900,6.6,0,1.2,500,4200,4300,C,',
  'seat/1,DN-7,Cabin,12,5.1,0.4,1,0.6,0.5,0.4,C,4',
  'seat/2,DN-7,Cabin,12,6.1,0.4,1,0.6,0.5,0.4,C,4',
  'disc,,Plant,40,1.2,0,1.1,3,1.6,1.6,C,',
];
const file = (...rows: string[]): string => `${[HEAD, ...rows].join('\n')}\n`;

const rotor = (said: Partial<Rotor>): Rotor => ({
  rotor: 'propeller',
  polarInertia: 2.9,
  axis: { kind: 'angles', yaw: 0, pitch: 0, sense: 'cw' },
  gearRatio: 1,
  shaft: 'engine',
  component: 'body/disc',
  blades: 4,
  polarInertiaSigma: null,
  group: null,
  note: null,
  ...said,
});
const points = [{ code: 'cruise', title: 'Cruise', speeds: [{ shaft: 'engine', speed: 200, sigma: null }] }];

let test: ProgramUnderTest;
const person = () => test.crew.weights;

beforeAll(async () => {
  test = await programUnderTest();
  await reviseList(test, person(), 'body', file(...LIST));
});
afterAll(() => test.close());

async function reach() {
  const found = await findConfiguration(test.db, test.program.id, 'release');
  if (found === undefined) throw new Error('there is no configuration');
  return found;
}

async function pinned(revisions: Record<string, number>, rotors: number | null) {
  const configuration = await reach();
  const { version } = configuration;
  await pinRevisions(test.db, { person: person(), configuration, version, revisions, rotors });
  return reach();
}

/** Where and what of the findings that are neither on the list of components nor about growth. */
const said = (findings: readonly PlacedFinding[], kind: PlacedFinding['where']['kind'], code: string) =>
  findings
    .filter(({ where, rule }) => where.kind === kind && where.code === code && rule !== 'growth-unknown')
    .map(({ rule, severity, rows }) => [severity, rule, ...rows].join(' '));

async function rolledUp(revisions: Record<string, number>, rotors: number | null): Promise<PlacedFinding[]> {
  await rollUpConfiguration(test.db, { person: person(), configuration: await pinned(revisions, rotors) });
  const stored = await latestRollUp(test.db, (await reach()).id);
  return stored?.findings ?? [];
}

async function revise(base: number, ...rotors: Rotor[]): Promise<string[]> {
  await reviseRotors(test.db, {
    person: person(),
    programId: test.program.id,
    base,
    reason: 'for the test',
    rotors,
    points,
  });
  const [newest] = await rotorRevisionsOf(test.db, test.program.id);
  return (newest?.findings ?? []).map(({ rule }) => rule);
}

describe('The rules on rotating parts', () => {
  it('know the row that carries a rotor, when it is entered and at every roll-up', async () => {
    expect(await revise(0, rotor({}))).toEqual([]);
    expect(await revise(1, rotor({ polarInertia: 3.1 }))).toEqual(['polar-beyond-component']);
    expect(await revise(2, rotor({ component: 'body/disk' }))).toEqual(['rotor-component-missing']);
    await createConfiguration(test.db, {
      person: person(),
      programId: test.program.id,
      buildCode: 'design',
      code: 'release',
      title: 'Release',
    });
    expect(said(await rolledUp({ body: 1 }, 1), 'rotors', '')).toEqual([]);
    expect(said(await rolledUp({ body: 1 }, 2), 'rotors', '')).toEqual([
      'warning polar-beyond-component propeller',
    ]);
  });

  it('judge a configuration by the revision that it pins, not by what was there when the rotors came', async () => {
    const renamed = LIST.map((row) => row.replace('disc', 'disk'));
    await reviseList(test, person(), 'body', file(...renamed));
    expect(said(await rolledUp({ body: 2 }, 1), 'rotors', '')).toEqual([
      'warning rotor-component-missing propeller',
    ]);
    expect(said(await rolledUp({ body: 1 }, 1), 'rotors', '')).toEqual([]);
  });

  it('know the airframe: a shaft given by an arrow, turned outward without a twin', async () => {
    const arrow = { kind: 'arrow', x: -1, y: 0.2, z: 0, hand: 'rh' } as const;
    expect(await revise(3, rotor({ axis: arrow, component: null }))).toEqual([
      'rotor-without-component',
      'shaft-without-twin',
    ]);
  });
});

describe('The rules on removals', () => {
  const removal = (item: string, said: { part?: string; mass?: number; x?: number; growth?: string }) => {
    const { part = 'DN-7', mass = -12, x = 6.1, growth = '4' } = said;
    return [item, part, 'Cabin', mass, x, '0.4,1,-0.6,-0.5,-0.4,C', growth].join(',');
  };
  const adjust = async (...rows: string[]): Promise<string[]> => {
    const { number } = await reviseList(test, person(), 'changes', file(...rows), { kind: 'adjustments' });
    return said(await rolledUp({ body: 1, changes: number }, 1), 'list', 'changes');
  };

  it('say nothing of a removal of just what is there, by its part number or its item', async () => {
    expect(await adjust(removal('C-1', {}))).toEqual([]);
    expect(await adjust(removal('seat/1', { part: '', x: 5.1 }))).toEqual([]);
  });

  it('warn of growth that is not the row’s, of the wrong place and of too much', async () => {
    expect(await adjust(removal('C-1', { growth: '' }))).toEqual(['warning removal-growth-differs C-1']);
    expect(await adjust(removal('C-1', { x: 6.2 }))).toEqual(['warning removal-exceeds-row C-1']);
    expect(await adjust(removal('C-1', { mass: -13 }))).toEqual(['warning removal-exceeds-row C-1']);
  });

  it('note what names no row, and are asked again at submission', async () => {
    expect(await adjust(removal('C-1', { part: 'DN-8', growth: '0' }))).toEqual([
      'note removal-without-row C-1',
    ]);
    await adjust(removal('C-1', { growth: '0' }));
    const configuration = await reach();
    const stored = await latestRollUp(test.db, configuration.id);
    const answers = Object.fromEntries(
      (stored?.findings ?? [])
        .filter(({ rule }) => rule !== 'removal-growth-differs')
        .map((finding) => [findingKey(finding), 'Looked at.']),
    );
    await expect(
      submitConfiguration(test.db, {
        person: person(),
        program: test.program,
        configuration,
        version: configuration.version,
        title: 'Release',
        reason: 'for the test',
        answers,
      }),
    ).rejects.toMatchObject({
      code: 'invalid-input',
      errors: [{ pointer: '/answers/list:changes:removal-growth-differs' }],
    });
  });
});
