import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { GET as listGet } from '@/app/api/v1/programs/[program]/baselines/route';
import { GET } from '@/app/api/v1/programs/[program]/baselines/[number]/route';
import { findBaseline } from '@/db/queries/baselines';
import { baselineEndpoint } from '@/lib/contracts/api/baseline-document';
import { baselineListEndpoint } from '@/lib/contracts/api/baseline-list';
import { type ConfigurationResult } from '@/lib/loading/configuration';
import { evaluate } from '@/lib/server/configurations/roll-up-configuration';
import { withdrawBaseline } from '@/lib/server/baselines/withdraw-baseline';
import { type Role, tokensOf } from './baseline-tokens';
import { expectConverted } from '@/tests/baselines/converted';
import { properties } from '@/tests/support/mass';
import { programUnderTest, type ProgramUnderTest } from '@/tests/support/program';
import { fillProgram, signed, submitted } from '@/tests/support/signed';
import { callerOfEndpoint, documentedStatuses, restoreQuotas, sorted, useUpQuota } from './calls';

const list = callerOfEndpoint(baselineListEndpoint, listGet);
const one = callerOfEndpoint(baselineEndpoint, GET);

let test: ProgramUnderTest;
let tokens: Record<Role, string>;
let engine: ConfigurationResult;
const digests: string[] = [];

beforeAll(async () => {
  test = await programUnderTest();
  await fillProgram(test);
  const first = await signed(test, { code: 'first', title: 'First account' });
  const second = await signed(test, { code: 'second', title: 'Radar moved' });
  const third = await signed(test, { code: 'third', title: 'As weighed', build: 'as-built' });
  digests.push(first.digest, second.digest, third.digest);
  await submitted(test, { code: 'fourth', title: 'Nobody has signed this' });
  ({ result: engine } = await evaluate(test.db, second.configuration));
  tokens = await tokensOf(test);
});
afterAll(() => test.close());

const get = (
  number: string,
  { query, headers, token = tokens.simulation }: Partial<Parameters<typeof one.call>[0]> = {},
) =>
  one.call({
    params: { program: test.program.code, number },
    token,
    ...(query === undefined ? {} : { query }),
    ...(headers === undefined ? {} : { headers }),
  });

const getList = (query: Record<string, string> = {}, token = tokens.simulation) =>
  list.call({ params: { program: test.program.code }, query, token });

const etagOf = async (number: string, query: Record<string, string> = {}): Promise<string> =>
  (await get(number, { query })).headers.get('etag') ?? '';

/** RFC 8785 by its own words: members in the order of their UTF-16 code units, no blanks, texts and numbers as ECMAScript writes them. */
function canonicalByHand(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(canonicalByHand).join(',')}]`;
  if (typeof value !== 'object' || value === null) return JSON.stringify(value);
  const names = Object.keys(value).sort();
  const members = value as Record<string, unknown>;
  return `{${names.map((name) => `${JSON.stringify(name)}:${canonicalByHand(members[name])}`).join(',')}}`;
}

const sha256 = (text: string | undefined): string =>
  `sha256:${createHash('sha256')
    .update(text ?? '', 'utf8')
    .digest('hex')}`;

describe('GET baselines', () => {
  it('lists what is signed, newest first, with its state, and nothing that waits', async () => {
    const { status, body } = await getList();
    expect(status).toBe(200);
    const entry = (baseline: number, build: string, state: string, title: string) => ({
      baseline,
      build,
      state,
      title,
      digest: digests[baseline - 1],
      approved: { at: expect.any(String) as string, by: 'chief' },
    });
    expect(body['baselines']).toEqual([
      entry(3, 'as-built', 'current', 'As weighed'),
      entry(2, 'design', 'current', 'Radar moved'),
      entry(1, 'design', 'superseded', 'First account'),
    ]);
  });

  it.each([
    [{ build: 'design' }, [2, 1]],
    [{ state: 'current' }, [3, 2]],
    [{ build: 'design', state: 'superseded' }, [1]],
    [{ build: 'ferry' }, []],
  ])('with %o leaves the others out', async (query, numbers) => {
    const { body } = await getList(query);
    expect((body['baselines'] as { baseline: number }[]).map(({ baseline }) => baseline)).toEqual(numbers);
  });

  it.each([
    [{ build: 'desing' }, 'build', 'Builds of this program: design, as-built, ferry.'],
    [{ state: 'signed' }, 'state', expect.any(String)],
    [{ page: '2' }, 'page', 'There is no such parameter here.'],
  ])('refuses %o and names the parameter', async (query, parameter, message) => {
    const { status, body } = await getList(query as Record<string, string>);
    expect([status, body['errors']]).toEqual([422, [{ parameter, message }]]);
  });
});

describe('GET a baseline in SI', () => {
  it('is the stored text byte for byte, with digest and state before it', async () => {
    const stored = await findBaseline(test.db, test.program.id, 2);
    const { text } = await get('2');
    const head = `{"digest":"${digests[1]}","state":"current",`;
    expect(text.startsWith(head)).toBe(true);
    expect(`{${text.slice(head.length)}`).toBe(stored?.document);
  });

  it('has a digest that anyone can recompute from the answer', async () => {
    const { body } = await get('2');
    const { digest, state, ...document } = body;
    expect(state).toBe('current');
    expect(sha256(canonicalize(document))).toBe(digest);
    expect(sha256(canonicalByHand(document))).toBe(digest);
  });

  it("has the engine's numbers to the last digit", async () => {
    const { body } = await get('2');
    const conditions = body['conditions'] as Record<string, never>[];
    expect(conditions.map(({ code }) => code)).toEqual(['empty', 'ferry']);
    engine.conditions.forEach(({ rollUp, uncertainty }, index) => {
      const condition: unknown = conditions[index];
      const basic = properties(rollUp.basic);
      const predicted = properties(rollUp.predicted);
      const { ixx, iyy, izz, ixy, ixz, iyz } = basic.inertia;
      expect(Math.min(...[ixy, ixz, iyz].map(Math.abs))).toBeGreaterThan(1);
      expect(condition).toMatchObject({
        basis: 'basic',
        mass: rollUp.basic.mass,
        predictedMass: rollUp.predicted.mass,
        cg: {
          airframe: { x: basic.cg[0], y: basic.cg[1], z: basic.cg[2] },
          percentMac: basic.percentMac,
        },
        inertia: {
          ixx,
          iyy,
          izz,
          ixy,
          ixz,
          iyz,
          tensor: [
            [ixx, -ixy, -ixz],
            [-ixy, iyy, -iyz],
            [-ixz, -iyz, izz],
          ],
        },
        principal: { moments: basic.principal.moments, axes: basic.principal.axes },
        radiiOfGyration: basic.radii,
        predicted: {
          mass: rollUp.predicted.mass,
          cg: { airframe: { x: predicted.cg[0], y: predicted.cg[1], z: predicted.cg[2] } },
          inertia: { ixx: predicted.inertia.ixx, ixz: predicted.inertia.ixz, iyz: predicted.inertia.iyz },
        },
        sigma: {
          mass: uncertainty.basic.mass,
          cg: uncertainty.basic.properties?.cg,
          massShare: uncertainty.basic.massShare,
        },
      });
    });
    const points = body['operatingPoints'] as unknown[];
    expect(points).toHaveLength(1);
    engine.operatingPoints.forEach(({ code, momentum }, index) => {
      const [hx, hy, hz] = momentum.total;
      expect(points[index]).toMatchObject({
        code,
        angularMomentum: { hx, hy, hz },
        gyroMatrix: [
          [0, -hz, hy],
          [hz, 0, -hx],
          [-hy, hx, 0],
        ],
      });
    });
  });

  it('says where it comes from: submitter, signer, marking, sources, the baseline before it', async () => {
    const { body } = await get('2');
    expect(body).toMatchObject({
      format: 1,
      program: test.program.code,
      baseline: 2,
      build: 'design',
      title: 'Radar moved',
      supersedes: 1,
      marking: 'Proprietary, "Skerry"',
      caution: expect.stringContaining('flight manual') as string,
      submitted: { by: 'weights' },
      approved: { by: 'chief' },
      sources: [
        { list: 'body', revision: 1, rows: 1 },
        { list: 'wing', revision: 1, rows: 3 },
      ],
    });
  });
});

describe('GET a baseline in US units', () => {
  it('converts every number with a unit once, and nothing else', async () => {
    const [si, us] = [await get('2'), await get('2', { query: { units: 'us' } })];
    expectConverted(si.body, us.body);
    expect([us.body['digest'], us.body['state']]).toEqual([si.body['digest'], 'current']);
  });

  it('refuses other systems', async () => {
    const { status, body } = await get('2', { query: { units: 'imperial' } });
    expect([status, body['errors']]).toMatchObject([422, [{ parameter: 'units' }]]);
  });
});

describe('which baseline it is', () => {
  it('current is the newest of the default build, or of the build named', async () => {
    expect((await get('current')).body).toMatchObject({ baseline: 2, build: 'design' });
    expect((await get('current', { query: { build: 'as-built' } })).body).toMatchObject({ baseline: 3 });
  });

  it('a superseded one is there under its number and says so', async () => {
    expect((await get('1')).body).toMatchObject({ baseline: 1, state: 'superseded', supersedes: null });
  });

  it.each([
    ['4', {}, 'There is no such baseline. Name a number, or current.'],
    ['02', {}, 'There is no such baseline. Name a number, or current.'],
    ['newest', {}, 'There is no such baseline. Name a number, or current.'],
    ['9999999999', {}, 'There is no such baseline. Name a number, or current.'],
    ['2', { build: 'as-built' }, 'Baseline 2 is of the build design, not of as-built.'],
    ['current', { build: 'ferry' }, 'No baseline of the build Ferry is signed yet.'],
    ['current', { build: 'desing' }, 'There is no such build.'],
  ])('%s with %o is not found', async (number, query, detail) => {
    const { status, body } = await get(number, { query: query as Record<string, string> });
    expect([status, body['detail']]).toEqual([404, detail]);
  });
});

describe('who may read it', () => {
  it.each(['simulation', 'weights', 'chief'] as const)('the %s engineer', async (role) => {
    expect((await get('2', { token: tokens[role] })).status).toBe(200);
    expect((await getList({}, tokens[role])).status).toBe(200);
  });

  it.each([
    ['someone outside the program', 'outsider', 404],
    ['an administrator who is no member', 'admin', 404],
    ['a member with a token for another program', 'limited', 404],
    ['a member with a token for uploads', 'unscoped', 403],
  ] as const)('not %s', async (_who, role, status) => {
    expect((await get('2', { token: tokens[role] })).status).toBe(status);
    expect((await getList({}, tokens[role])).status).toBe(status);
  });

  it('nobody without a token', async () => {
    const params = { program: test.program.code };
    expect((await one.call({ params: { ...params, number: '2' } })).status).toBe(401);
    expect((await list.call({ params })).status).toBe(401);
  });

  it('nobody whose quota is used up', async () => {
    await useUpQuota(test);
    expect([(await get('2')).status, (await getList()).status]).toEqual([429, 429]);
    await restoreQuotas(test);
  });
});

describe('its ETag', () => {
  it('is strong, differs by baseline and units, and is the same for a name and a number', async () => {
    const si = await etagOf('2');
    expect(si).toMatch(/^"[\w-]+"$/);
    const others = [await etagOf('1'), await etagOf('3'), await etagOf('2', { units: 'us' })];
    expect(new Set([si, ...others]).size).toBe(4);
    expect(await etagOf('current')).toBe(si);
    expect((await get('2')).headers.get('cache-control')).toBe('private, no-cache');
  });

  it('answers 304 without a body where If-None-Match names it: alone, in a list, weak, or by *', async () => {
    const etag = await etagOf('2');
    for (const named of [etag, `"older", ${etag}`, `"with,comma",W/${etag}`, `W/${etag}`, '*']) {
      const { status, headers, text } = await get('2', { headers: { 'If-None-Match': named } });
      expect([named, status, text, headers.get('etag')]).toEqual([named, 304, '', etag]);
      expect(headers.get('cache-control')).toBe('private, no-cache');
      expect(headers.get('ratelimit')).toContain('r=');
    }
  });

  it('answers in full where it names others', async () => {
    const etag = await etagOf('2');
    for (const named of ['"older"', etag.slice(1, -1), `"a,*,b"`, `"${etag.slice(1, -2)}"`, ''])
      expect((await get('2', { headers: { 'If-None-Match': named } })).status).toBe(200);
    const us = await get('2', { query: { units: 'us' }, headers: { 'If-None-Match': etag } });
    expect(us.status).toBe(200);
  });
});

describe('a withdrawn baseline', () => {
  it('answers 410 as current, even to a client that holds it, and keeps its number with its state', async () => {
    const before = await etagOf('3');
    const { db, program, crew } = test;
    await withdrawBaseline(db, { person: crew.chief, program, number: 3, reason: 'scales out of date' });
    const build = { build: 'as-built' };
    const gone = await get('current', { query: build, headers: { 'If-None-Match': before } });
    expect([gone.status, gone.body['detail']]).toEqual([
      410,
      'Baseline 3, the newest of the build As built, was withdrawn: scales out of date',
    ]);
    const numbered = await get('3', { headers: { 'If-None-Match': before } });
    expect([numbered.status, numbered.body['state']]).toEqual([200, 'withdrawn']);
    expect(numbered.headers.get('etag')).not.toBe(before);
    expect(numbered.body['digest']).toBe(digests[2]);
    expect(((await getList(build)).body['baselines'] as object[])[0]).toMatchObject({ state: 'withdrawn' });
  });

  it('never lets an older number take its place', async () => {
    const { db, program, crew } = test;
    await withdrawBaseline(db, { person: crew.chief, program, number: 2, reason: 'radar weighed twice' });
    expect((await get('current')).status).toBe(410);
    expect((await get('1')).body).toMatchObject({ state: 'superseded' });
  });

  it('is followed by the next one signed', async () => {
    const { number } = await signed(test, { code: 'fifth', title: 'Radar weighed once' });
    expect((await get('current')).body).toMatchObject({
      baseline: number,
      state: 'current',
      supersedes: null,
    });
  });
});

it('has given every answer that the list and the document are documented with', () => {
  expect(sorted(list.seen)).toEqual(documentedStatuses(baselineListEndpoint));
  expect(sorted(one.seen)).toEqual(documentedStatuses(baselineEndpoint));
});
