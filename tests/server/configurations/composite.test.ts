import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findConfiguration, latestRollUp, pinnedRevisions } from '@/db/queries/configurations';
import { changedSince } from '@/components/configurations/changed-since';
import { type Sym3 } from '@/lib/numerics/sym3';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { pinRevisions } from '@/lib/server/configurations/pin-revisions';
import { reachConfiguration } from '@/lib/server/configurations/reach-configuration';
import { rollUpConfiguration } from '@/lib/server/configurations/roll-up-configuration';
import { saveCondition } from '@/lib/server/configurations/save-condition';
import { takeRevision } from '@/lib/server/configurations/take-revision';
import { setAllowance } from '@/lib/server/programs/set-allowance';
import { threeBodies } from '@/tests/references/solids';
import { properties, relativeDifference } from '@/tests/support/mass';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

/*
 * C6. Three bodies with full tensors, one of them turned by 30 degrees about z. Source: made for this project and worked by two
 * independent engines (PyKDL 1.5.1 agrees to 3e-15; MuJoCo gives the same mass and moment): see tests/references/solids.ts. The
 * list is written in body axes, forward right down, the airframe counts aft, right, up: only the axes words tie them together.
 */
const HEADER = 'item,group,mass,x,y,z,ixx,iyy,izz,ixy,ixz,iyz,yaw,maturity';
const IN_BODY_AXES = { axes: 'forward,right,down', products: 'negative' } as const;

const line = (index: number, sign: 1 | -1 = 1, item = `B-${index + 1}`): string => {
  const body = threeBodies.bodies[index];
  if (body === undefined) throw new Error(`there is no body ${index}`);
  const tensor = body.tensor.map((element) => sign * element);
  return [item, `Bodies/${index}`, sign * body.mass, ...body.place, ...tensor, body.yawDegrees, 'C'].join(
    ',',
  );
};
const file = (...lines: string[]): string => [HEADER, ...lines, ''].join('\n');

let test: ProgramUnderTest;
const author = () => test.crew.weights;
const reach = (code: string) => reachConfiguration(test.db, test.program.id, code);

beforeAll(async () => {
  test = await programUnderTest();
  await reviseList(test, author(), 'bodies', file(line(0), line(1), line(2)), IN_BODY_AXES);
});
afterAll(() => test.close());

async function create(code: string): Promise<void> {
  await createConfiguration(test.db, {
    person: author(),
    programId: test.program.id,
    buildCode: 'design',
    code,
    title: `The ${code}`,
  });
}

async function rolledUp(code: string) {
  await rollUpConfiguration(test.db, { person: author(), configuration: await reach(code) });
  const stored = await latestRollUp(test.db, (await reach(code)).id);
  if (stored === undefined) throw new Error('nothing was stored');
  return stored;
}

const elements = ([xx, yy, zz, xy, xz, yz]: readonly number[]): Sym3 => ({
  xx: xx ?? NaN,
  yy: yy ?? NaN,
  zz: zz ?? NaN,
  xy: xy ?? NaN,
  xz: xz ?? NaN,
  yz: yz ?? NaN,
});

describe('the three-body composite from list to stored result', () => {
  it('has the mass, CG, tensor about the CG and principal moments that two other engines give', async () => {
    await create('composite');
    const { result } = await rolledUp('composite');
    const [empty] = result.conditions;
    const { basic, pieces } = empty?.rollUp ?? {};
    if (basic === undefined) throw new Error('there is no condition');
    const found = properties(basic);
    expect(pieces).toBe(3);
    expect(basic.mass).toBeCloseTo(threeBodies.mass, 12);
    const [x, y, z] = threeBodies.cg;
    // Airframe axes: aft, right, up.
    [-x, y, -z].forEach((part, index) => expect(found.cg[index]).toBeCloseTo(part, 12));
    expect(relativeDifference(found.tensor, elements(threeBodies.aboutCg))).toBeLessThan(1e-12);
    // Shown products are positive integrals: minus the elements.
    expect(found.inertia.ixy).toBeCloseTo(-threeBodies.aboutCg[3], 11);
    expect(found.inertia.ixz).toBeCloseTo(-threeBodies.aboutCg[4], 11);
    expect(found.inertia.iyz).toBeCloseTo(-threeBodies.aboutCg[5], 11);
    const moments = [...found.principal.moments].sort((a, b) => a - b);
    threeBodies.principal.forEach((moment, index) => expect(moments[index]).toBeCloseTo(moment, 10));
    // The test program's chord: leading edge at station 6, 2 m long. CG in % of it by its definition.
    expect(found.percentMac).toBeCloseTo((100 * (-x - 6)) / 2, 9);
  });

  it('with one body taken off by an adjustment is what the other two are alone', async () => {
    const removal = [HEADER, line(1, -1, 'B-2 off'), ''].join('\n');
    await reviseList(test, author(), 'taken-off', removal, { ...IN_BODY_AXES, kind: 'adjustments' });
    await reviseList(test, author(), 'two', file(line(0), line(2)), IN_BODY_AXES);
    await create('removed');
    await create('alone');
    const pin = async (code: string, revisions: Record<string, number>) => {
      const configuration = await reach(code);
      const { version } = configuration;
      await pinRevisions(test.db, { person: author(), configuration, version, revisions, rotors: null });
    };
    await pin('removed', { bodies: 1, 'taken-off': 1 });
    await pin('alone', { two: 1 });
    const [removed, alone] = [await rolledUp('removed'), await rolledUp('alone')].map(({ result }) => {
      const [empty] = result.conditions;
      if (empty === undefined) throw new Error('there is no condition');
      return empty.rollUp.basic;
    });
    if (removed === undefined || alone === undefined) throw new Error('both were rolled up');
    expect(removed.mass).toBeCloseTo(12, 12);
    expect(removed.mass).toBeCloseTo(alone.mass, 12);
    properties(alone).cg.forEach((part, index) =>
      expect(properties(removed).cg[index]).toBeCloseTo(part, 12),
    );
    expect(relativeDifference(properties(removed).tensor, properties(alone).tensor)).toBeLessThan(1e-12);
  });

  it('with an item on board moves by the lever rule, and the item does not grow', async () => {
    await create('loaded');
    const configuration = await reach('loaded');
    await pinRevisions(test.db, {
      person: author(),
      configuration,
      version: configuration.version,
      revisions: { bodies: 1 },
      rotors: null,
    });
    const items = [{ name: 'Case', category: 'payload', mass: 17, place: [4, 0, 0] }] as const;
    const pinned = await reach('loaded');
    await saveCondition(test.db, {
      person: author(),
      configuration: pinned,
      version: pinned.version,
      condition: { code: 'loaded', title: 'With a case', categories: ['empty'], items },
    });
    await setAllowance(test.db, {
      person: test.crew.chief,
      programId: test.program.id,
      group: '',
      maturity: 'C',
      fraction: 0.1,
      source: 'for the test',
    });
    const { result } = await rolledUp('loaded');
    const loaded = result.conditions.find(({ code }) => code === 'loaded')?.rollUp;
    if (loaded === undefined) throw new Error('there is no such condition');
    expect(loaded.basic.mass).toBeCloseTo(34, 12);
    // Two equal masses: the CG is half-way.
    expect(properties(loaded.basic).cg[0]).toBeCloseTo((4 - threeBodies.cg[0]) / 2, 12);
    expect(loaded.predicted.mass).toBeCloseTo(1.1 * 17 + 17, 12);
    expect(loaded.groups.map(({ group }) => group)).toEqual(['Bodies/0', 'Bodies/1', 'Bodies/2']);
  });
});

describe('a configuration', () => {
  it('refuses a change against a version that is no longer the newest, and keeps what it had', async () => {
    await create('raced');
    const seen = await reach('raced');
    const change = (revisions: Record<string, number>, person = author()) =>
      pinRevisions(test.db, { person, configuration: seen, version: seen.version, revisions, rotors: null });
    await change({ bodies: 1 });
    await expect(change({ two: 1 }, test.crew.weights2)).rejects.toMatchObject({ code: 'conflict' });
    const pins = await pinnedRevisions(test.db, seen.id);
    expect(pins.map(({ list_code, number }) => [list_code, number])).toEqual([['bodies', 1]]);
    expect((await reach('raced')).version).toBe(seen.version + 1);
  });

  it('stays on its revision when a newer one comes, until someone takes it; then it says that it has changed', async () => {
    await create('steady');
    const before = await reach('steady');
    await pinRevisions(test.db, {
      person: author(),
      configuration: before,
      version: before.version,
      revisions: { bodies: 1 },
      rotors: null,
    });
    const first = await rolledUp('steady');
    await reviseList(test, author(), 'bodies', file(line(0), line(2)), IN_BODY_AXES);
    const [pin] = await pinnedRevisions(test.db, before.id);
    expect([pin?.number, pin?.newest]).toEqual([1, 2]);
    const again = await rolledUp('steady');
    expect(again.input_sha256).toBe(first.input_sha256);

    const configuration = await reach('steady');
    await takeRevision(test.db, {
      person: author(),
      configuration,
      version: configuration.version,
      list: 'bodies',
      revision: 2,
    });
    const now = { version: (await reach('steady')).version, allowances: again.result.allowances };
    const then = { version: again.configuration_version, allowances: again.result.allowances };
    expect(changedSince(then, now)).toEqual(['The configuration was changed once.']);
    const last = await rolledUp('steady');
    expect(last.result.conditions[0]?.rollUp.basic.mass).toBeCloseTo(12, 12);
    expect(last.input_sha256).not.toBe(first.input_sha256);
  });

  it('says so when a growth allowance was changed after its roll-up', async () => {
    await create('grown');
    const stored = await rolledUp('grown');
    const then = { version: stored.configuration_version, allowances: stored.result.allowances };
    const version = (await reach('grown')).version;
    expect(changedSince(then, { version, allowances: { ...then.allowances, C: 0.2 } })).toEqual([
      "The program's growth allowance was changed for maturity C.",
    ]);
  });

  it('refuses a revision that a list does not have', async () => {
    const configuration = await reach('raced');
    await expect(
      takeRevision(test.db, {
        person: author(),
        configuration,
        version: configuration.version,
        list: 'bodies',
        revision: 99,
      }),
    ).rejects.toMatchObject({ code: 'invalid-input' });
  });

  it('is not found under a code that the program does not have', async () => {
    expect(await findConfiguration(test.db, test.program.id, 'nothing')).toBeUndefined();
    await expect(reach('nothing')).rejects.toMatchObject({ code: 'not-found' });
  });
});
