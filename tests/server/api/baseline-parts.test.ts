import Papa from 'papaparse';
import { type z } from 'zod';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { GET as momentumGet } from '@/app/api/v1/programs/[program]/baselines/[number]/angular-momentum/route';
import { GET as conditionGet } from '@/app/api/v1/programs/[program]/baselines/[number]/conditions/[condition]/route';
import { GET as csvGet } from '@/app/api/v1/programs/[program]/baselines/[number]/csv/route';
import { GET as documentGet } from '@/app/api/v1/programs/[program]/baselines/[number]/route';
import { angularMomentumEndpoint } from '@/lib/contracts/api/angular-momentum';
import { baselineConditionEndpoint } from '@/lib/contracts/api/baseline-condition';
import { baselineCsvEndpoint } from '@/lib/contracts/api/baseline-csv';
import { baselineDocumentSchema, baselineEndpoint } from '@/lib/contracts/api/baseline-document';
import { withdrawBaseline } from '@/lib/server/baselines/withdraw-baseline';
import { fromSi, radiansPerSecond } from '@/lib/units/convert';
import { expectConverted } from '@/tests/baselines/converted';
import { programUnderTest, type ProgramUnderTest } from '@/tests/support/program';
import { CRUISE_RPM, fillProgram, signed } from '@/tests/support/signed';
import { type Role, tokensOf } from './baseline-tokens';
import { callerOfEndpoint, documentedStatuses, restoreQuotas, sorted, useUpQuota } from './calls';

const whole = callerOfEndpoint(baselineEndpoint, documentGet);
const condition = callerOfEndpoint(baselineConditionEndpoint, conditionGet);
const csv = callerOfEndpoint(baselineCsvEndpoint, csvGet);
const momentum = callerOfEndpoint(angularMomentumEndpoint, momentumGet);
const PARTS = [
  ['a condition', baselineConditionEndpoint, condition],
  ['the CSV file', baselineCsvEndpoint, csv],
  ['angular momentum', angularMomentumEndpoint, momentum],
] as const;

let test: ProgramUnderTest;
let tokens: Record<Role, string>;
let document: z.output<typeof baselineDocumentSchema>;

beforeAll(async () => {
  test = await programUnderTest();
  await fillProgram(test);
  await signed(test, { code: 'first', title: 'First account' });
  await signed(test, { code: 'second', title: 'As weighed', build: 'as-built' });
  tokens = await tokensOf(test);
  document = baselineDocumentSchema.parse((await whole.call(asked())).body);
});
afterAll(() => test.close());

type Asked = Readonly<Record<string, string>>;
interface More {
  readonly number?: string;
  readonly condition?: string;
  readonly token?: string;
  readonly etag?: string;
}

function asked(query: Asked = {}, more: More = {}) {
  const { number = 'current', condition = 'ferry', token = tokens.simulation, etag } = more;
  return {
    params: { program: test.program.code, number, condition },
    query,
    token,
    ...(etag === undefined ? {} : { headers: { 'If-None-Match': etag } }),
  };
}

/** What each part needs besides the baseline. */
const needs = (endpoint: { readonly operationId: string }): Asked =>
  endpoint === angularMomentumEndpoint ? { point: 'cruise' } : {};

describe('a condition', () => {
  it('is the very member of the document, under its head', async () => {
    const { body } = await condition.call(asked());
    const { program, baseline, build, state, title, digest, marking, caution, conventions, conditions } =
      document;
    const head = { program, baseline, build, state, title, digest, marking, caution, conventions };
    expect(body).toEqual({ ...head, condition: conditions[1] });
  });

  it('comes in US units', async () => {
    const [si, us] = [await condition.call(asked()), await condition.call(asked({ units: 'us' }))];
    expectConverted(si.body, us.body, { all: false });
  });

  it('that there is not is answered with those that there are', async () => {
    const { status, body } = await condition.call(asked({}, { condition: 'take-off' }));
    expect([status, body['detail']]).toEqual([404, 'Baseline 1 has these conditions: empty, ferry.']);
  });
});

type Condition = Pick<(typeof document)['conditions'][number], 'cg' | 'inertia'>;
type Six = Readonly<Record<'ixx' | 'iyy' | 'izz' | 'ixy' | 'ixz' | 'iyz', number>>;

const moments = (prefix: string, { ixx, iyy, izz, ixy, ixz, iyz }: Six) =>
  Object.fromEntries(
    Object.entries({ ixx, iyy, izz, ixy, ixz, iyz }).map(([name, value]) => [
      `${prefix}${name}_kg_m2`,
      value,
    ]),
  );

function flat(prefix: string, { cg, inertia }: Condition): Record<string, number | undefined> {
  if (cg === undefined || inertia === undefined) throw new Error('a condition has a CG and moments');
  return {
    [`${prefix}cg_x_m`]: cg.airframe.x,
    [`${prefix}cg_y_m`]: cg.airframe.y,
    [`${prefix}cg_z_m`]: cg.airframe.z,
    [`${prefix}cg_percent_mac`]: cg.percentMac,
    ...moments(prefix, inertia),
  };
}

describe('the CSV file', () => {
  const read = async (query: Asked = {}, more: More = {}) => {
    const { text } = await csv.call(asked(query, more));
    const { data, errors } = Papa.parse<string[]>(text, { delimiter: ',', newline: '\r\n' });
    expect(errors).toEqual([]);
    expect(data.at(-1)).toEqual(['']);
    const [head = [], ...rows] = data.slice(0, -1);
    expect(rows.every((row) => row.length === head.length)).toBe(true);
    return rows.map((row) => Object.fromEntries(head.map((name, at) => [name, row[at]])));
  };

  it('has one row per condition whose numbers are those of the document, in full', async () => {
    const rows = await read();
    expect(rows.map((row) => row['condition'])).toEqual(['empty', 'ferry']);
    document.conditions.forEach((condition, at) => {
      const numbers = Object.fromEntries(
        Object.entries(rows[at] ?? {}).map(([name, text]) => [name, Number(text)]),
      );
      const { mass, radiiOfGyration, sigma, predicted } = condition;
      if (radiiOfGyration === undefined || sigma === undefined) throw new Error('a member is missing');
      expect(numbers).toMatchObject({
        mass_kg: mass,
        ...flat('', condition),
        radius_of_gyration_x_m: radiiOfGyration.x,
        radius_of_gyration_z_m: radiiOfGyration.z,
        sigma_mass_kg: sigma.mass,
        sigma_cg_y_m: sigma.cg.y,
        ...moments('sigma_', sigma.inertia),
        sigma_mass_share: sigma.massShare,
        predicted_mass_kg: predicted.mass,
        ...flat('predicted_', predicted),
        baseline: 1,
      });
      expect(predicted.mass).toBeGreaterThan(mass);
    });
  });

  it('states signs, axes, marking, digest and caution in every row', async () => {
    for (const row of await read())
      expect(row).toMatchObject({
        products: 'positive integral',
        cg_axes: 'airframe, from the datum; x aft, y right, z up',
        inertia_axes: 'body, origin at the CG; x forward, y right, z down',
        marking: 'Proprietary, "Skerry"',
        digest: document.digest,
        state: 'current',
        caution: document.caution,
      });
  });

  it('gives a spreadsheet no formula to run', async () => {
    const [, ferry] = await read();
    expect(ferry?.['title']).toBe("'=Ferry, with a spare engine");
  });

  it('comes in US units, which its columns name', async () => {
    const [[si], [us]] = [await read(), await read({ units: 'us' })];
    expect(Number(us?.['mass_lb'])).toBe(fromSi(Number(si?.['mass_kg']), 'lb'));
    expect(Number(us?.['cg_x_in'])).toBe(fromSi(Number(si?.['cg_x_m']), 'in'));
    expect(Number(us?.['ixz_slug_ft2'])).toBe(fromSi(Number(si?.['ixz_kg_m2']), 'slug.ft2'));
    expect(us?.['cg_percent_mac']).toBe(si?.['cg_percent_mac']);
    expect(Object.keys(us ?? {}).filter((name) => /_(kg|m|kg_m2)$/.test(name))).toEqual([]);
  });
});

const shafts = (rpm: Readonly<Record<string, number | string>>): Asked =>
  Object.fromEntries(Object.entries(rpm).map(([shaft, speed]) => [`shaft.${shaft}`, String(speed)]));

describe('angular momentum', () => {
  it('at an operating point is the very member of the document, with its standard deviation', async () => {
    const { body } = await momentum.call(asked({ point: 'cruise' }));
    const [point] = document.operatingPoints;
    const { code, ...members } = point ?? { code: null };
    expect(code).toBe('cruise');
    expect(Object.keys(members).sort()).toEqual(['angularMomentum', 'gyroMatrix', 'rotors', 'sigma']);
    expect(body).toMatchObject({ operatingPoint: 'cruise', digest: document.digest, ...members });
  });

  it('at the speeds of an operating point equals that of the point to the last digit', async () => {
    const atPoint = await momentum.call(asked({ point: 'cruise' }));
    const atSpeeds = await momentum.call(asked(shafts(CRUISE_RPM)));
    expect(atSpeeds.body).toEqual({ ...atPoint.body, operatingPoint: null });
  });

  it('follows the speeds: one shaft stopped leaves the other, turned back it is the opposite', async () => {
    const at = async (rpm: Record<string, number>) =>
      (await momentum.call(asked(shafts(rpm)))).body['angularMomentum'] as { hx: number };
    // h = I n w e by definition: 5.3 kg.m2 at a tenth of 12001 rpm, 1 deg right and 2 deg up of straight forward.
    const hx = 5.3 * 0.1 * radiansPerSecond(12_001) * Math.cos(Math.PI / 180) * Math.cos(Math.PI / 90);
    expect((await at({ 'left engine': 0, 'right engine': 12_001 })).hx).toBeCloseTo(hx, 9);
    expect((await at({ 'left engine': 0, 'right engine': -12_001 })).hx).toBeCloseTo(-hx, 9);
  });

  it('comes in US units', async () => {
    const [si, us] = [
      await momentum.call(asked({ point: 'cruise' })),
      await momentum.call(asked({ point: 'cruise', units: 'us' })),
    ];
    expectConverted(si.body, us.body, { all: false });
    expect((us.body['sigma'] as { hx: number }).hx).toBeLessThan((si.body['sigma'] as { hx: number }).hx);
  });

  const missing = 'Give the speed of this shaft in rpm, or name a point instead.';
  it.each([
    [
      'neither point nor speeds',
      {},
      [
        ['shaft.left engine', missing],
        ['shaft.right engine', missing],
      ],
    ],
    ['a shaft without a speed', shafts({ 'left engine': 1 }), [['shaft.right engine', missing]]],
    [
      'a shaft that there is not',
      shafts({ ...CRUISE_RPM, apu: 1 }),
      [['shaft.apu', 'Shafts: left engine, right engine.']],
    ],
    [
      'a speed that is no number',
      shafts({ ...CRUISE_RPM, 'left engine': '12,5' }),
      [['shaft.left engine', 'Write the speed in rpm as a number with a decimal point.']],
    ],
    [
      'a speed beyond all shafts',
      shafts({ ...CRUISE_RPM, 'left engine': '1e999' }),
      [['shaft.left engine', 'The speed is beyond 1e7 rpm.']],
    ],
    ['an unknown point', { point: 'idle' }, [['point', 'Operating points of this baseline: cruise.']]],
    [
      'both',
      { point: 'cruise', ...shafts(CRUISE_RPM) },
      [['point', 'Give either an operating point or shaft speeds.']],
    ],
    ['a mistyped parameter', { points: 'cruise' }, [['points', 'There is no such parameter here.']]],
    ['a parameter of the documentation taken by its word', { 'shaft.NAME': '1' }, expect.anything()],
  ])('refuses %s and names the parameters', async (_what, query, errors) => {
    const { status, body } = await momentum.call(asked(query as Asked));
    const found = body['errors'] as { parameter: string; message: string }[];
    expect([status, found.map(({ parameter, message }) => [parameter, message])]).toEqual([422, errors]);
  });
});

describe.each(PARTS)('%s', (_name, endpoint, { call }) => {
  it('has an ETag of its own by units, and answers 304 to it', async () => {
    const query = needs(endpoint);
    const [si, us] = [await call(asked(query)), await call(asked({ ...query, units: 'us' }))];
    const tag = si.headers.get('etag') ?? '';
    expect(tag).toMatch(/^"[\w-]+"$/);
    const document = (await whole.call(asked())).headers.get('etag');
    expect(new Set([tag, us.headers.get('etag'), document]).size).toBe(3);
    const again = await call(asked(query, { etag: tag }));
    expect([again.status, again.text]).toEqual([304, '']);
  });

  it('is read by members of the program with a token for it, and by nobody else', async () => {
    const query = needs(endpoint);
    for (const [role, status] of [
      ['weights', 200],
      ['chief', 200],
      ['outsider', 404],
      ['admin', 404],
      ['limited', 404],
      ['unscoped', 403],
    ] as const)
      expect([role, (await call(asked(query, { token: tokens[role] }))).status]).toEqual([role, status]);
    expect((await call({ params: asked().params })).status).toBe(401);
    await useUpQuota(test);
    expect((await call(asked(query))).status).toBe(429);
    await restoreQuotas(test);
  });

  it('refuses units and parameters that there are not', async () => {
    for (const [parameter, value] of [
      ['units', 'metric'],
      ['fuels', '1'],
    ] as const) {
      const { status, body } = await call(asked({ ...needs(endpoint), [parameter]: value }));
      expect([status, body['errors']]).toMatchObject([422, [{ parameter }]]);
    }
  });
});

it('every part of a withdrawn baseline says so: 410 as current, its state and another ETag under its number', async () => {
  const numbered = PARTS.map(
    ([, endpoint, { call }]) =>
      () =>
        call(asked(needs(endpoint), { number: '2' })),
  );
  const before = await Promise.all(numbered.map((call) => call()));
  const { db, program, crew } = test;
  await withdrawBaseline(db, { person: crew.chief, program, number: 2, reason: 'scales out of date' });
  const after = await Promise.all(numbered.map((call) => call()));
  after.forEach(({ status, headers, text }, at) => {
    expect([status, text.includes('withdrawn')]).toEqual([200, true]);
    expect(headers.get('etag')).not.toBe(before[at]?.headers.get('etag'));
  });
  for (const [, endpoint, { call }] of PARTS) {
    expect((await call(asked({ ...needs(endpoint), build: 'as-built' }))).status).toBe(410);
    expect((await call(asked(needs(endpoint), { number: '77' }))).status).toBe(404);
  }
});

it.each(PARTS)('%s has given every answer that it is documented with', (_name, endpoint, { seen }) => {
  expect(sorted(seen)).toEqual(documentedStatuses(endpoint));
});
