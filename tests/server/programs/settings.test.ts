import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { currentFrameIssue, geometryOf } from '@/db/queries/frames';
import { allowancesOf } from '@/db/queries/configurations';
import {
  buildsOf,
  growthAllowancesOf,
  limitsInForce,
  limitsOf,
  referencePointsOf,
} from '@/db/queries/settings';
import { formerOfForm, frameIssueSchema, geometryOfForm } from '@/lib/contracts/frame-issue';
import { limitInSi, limitSchema } from '@/lib/contracts/program-settings';
import { type ProgramAction } from '@/lib/permissions';
import { requireProgramAction } from '@/lib/server/http/access';
import { addBuild } from '@/lib/server/programs/add-build';
import { addReferencePoint } from '@/lib/server/programs/add-reference-point';
import { issueFrame } from '@/lib/server/programs/issue-frame';
import { changeGroups } from '@/lib/server/programs/change-groups';
import { removeAllowance, setAllowance } from '@/lib/server/programs/set-allowance';
import { removeLimit, stateLimit, type StateLimit } from '@/lib/server/programs/set-limit';
import { addPerson, type ProgramUnderTest, programUnderTest } from '@/tests/support/program';

let test: ProgramUnderTest;
beforeAll(async () => {
  test = await programUnderTest();
});
afterAll(() => test.close());

const trail = async () => {
  const rows = await test.db
    .selectFrom('audit_events')
    .select(['kind', 'detail'])
    .where('scope', '=', test.program.id)
    .orderBy('number')
    .execute();
  return rows;
};
const here = () => ({ person: test.crew.chief, programId: test.program.id });

const FORM = {
  base: '1',
  title: 'Second issue',
  axis_x: 'aft',
  axis_y: 'left',
  axis_z: 'up',
  length_unit: 'in',
  lemac_x: '100',
  lemac_y: '0',
  lemac_z: '10',
  mac: '40',
  span: '400',
  length: '300',
  lateral_plane: '0',
  incidence: '-1.5',
  reference_x: '',
  reference_y: '',
  reference_z: '',
  valid_from: '2026-06-01',
  reason: 'stations renumbered',
} as const;

describe('reference points', () => {
  it('lie in the frame issue in force, each code once', async () => {
    const point = { ...here(), code: 'MRC', title: 'Moment reference', place: [6.5, 0, 1] } as const;
    await addReferencePoint(test.db, point);
    await expect(addReferencePoint(test.db, point)).rejects.toMatchObject({ code: 'invalid-input' });
    const points = await referencePointsOf(test.db, test.frameIssueId);
    expect(points.map(({ code, place }) => ({ code, place }))).toEqual([{ code: 'MRC', place: [6.5, 0, 1] }]);
  });
});

describe('a frame issue', () => {
  it('is refused when another was made since the person looked, and when its axes do not span space', async () => {
    const form = frameIssueSchema.parse(FORM);
    const input = {
      ...here(),
      title: form.title,
      geometry: geometryOfForm(form),
      validFrom: form.valid_from,
      reason: form.reason,
      former: formerOfForm(form),
      carryPoints: false,
    };
    await expect(issueFrame(test.db, { ...input, base: 0 })).rejects.toMatchObject({ code: 'conflict' });
    await expect(issueFrame(test.db, { ...input, base: 1, validFrom: '2026-01-04' })).rejects.toMatchObject({
      code: 'invalid-input',
    });
    expect((await currentFrameIssue(test.db, test.program.id))?.number).toBe(1);
    const flat = frameIssueSchema.safeParse({ ...FORM, axis_z: 'right' });
    expect(flat.error?.issues.map(({ path }) => path)).toEqual([['axis_x']]);
  });

  it('is the next number, in SI to the last digit, about the quarter chord unless said otherwise; the one before stays', async () => {
    const form = frameIssueSchema.parse({ ...FORM, carry_points: 'on' });
    const number = await issueFrame(test.db, {
      ...here(),
      base: form.base,
      title: form.title,
      geometry: geometryOfForm(form),
      validFrom: form.valid_from,
      reason: form.reason,
      former: formerOfForm(form),
      carryPoints: form.carry_points,
    });
    expect(number).toBe(2);
    const issue = await currentFrameIssue(test.db, test.program.id);
    if (issue === undefined) throw new Error('there is an issue');
    const geometry = geometryOf(issue);
    expect(geometry.axes).toEqual(['aft', 'left', 'up']);
    // 1 in = 0.0254 m, exact (NIST SP 811).
    expect(geometry.lemac).toEqual([2.54, 0, 0.254]);
    expect(geometry.mac).toBe(1.016);
    expect(geometry.reference[0]).toBeCloseTo(110 * 0.0254, 14);
    expect(geometry.incidence).toBeCloseTo((-1.5 * Math.PI) / 180, 15);
    const carried = await referencePointsOf(test.db, issue.id);
    // The datum did not move, and butt lines are counted to the left now: 6.5 aft, on the plane of symmetry, 1 up.
    expect(carried.map(({ code, place }) => [code, place.map((part) => part + 0)])).toEqual([
      ['MRC', [6.5, 0, 1]],
    ]);
    const issues = await test.db.selectFrom('frame_issues').select('number').orderBy('number').execute();
    expect(issues).toEqual([{ number: 1 }, { number: 2 }]);
    const kinds = (await trail()).map(({ kind }) => kind);
    expect(kinds.slice(-2)).toEqual(['frame.issued', 'reference-point.added']);
  });

  it('cannot be altered or taken away by the application, by the word of PostgreSQL', async () => {
    const denied = { message: expect.stringContaining('permission denied') as string };
    await expect(test.db.updateTable('frame_issues').set({ mac: 9 }).execute()).rejects.toMatchObject(denied);
    await expect(test.db.deleteFrom('reference_points').execute()).rejects.toMatchObject(denied);
  });
});

describe('builds', () => {
  it('have one default at a time', async () => {
    const build = {
      ...here(),
      code: 'serial-1',
      title: 'Serial 1',
      kind: 'as-built',
      serialFrom: 1,
      serialTo: 3,
      isDefault: true,
    } as const;
    await addBuild(test.db, build);
    const builds = await buildsOf(test.db, test.program.id);
    expect(builds.map(({ code, is_default }) => [code, is_default])).toEqual([
      ['serial-1', true],
      ['design', false],
    ]);
    await expect(addBuild(test.db, build)).rejects.toMatchObject({ code: 'invalid-input' });
    expect((await buildsOf(test.db, test.program.id)).filter((one) => one.is_default)).toHaveLength(1);
  });
});

describe('limits', () => {
  const limit = (
    sense: 'at-least' | 'at-most',
    value: number,
    more: Partial<StateLimit['limit']> = {},
    id: string | null = null,
  ) =>
    stateLimit(test.db, {
      ...here(),
      id,
      limit: {
        quantity: 'percentMac',
        sense,
        kind: 'specification',
        value,
        group: '',
        condition: null,
        source: 'a document',
        sourceDate: '2026-02-03',
        from: '2026-02-03',
        until: null,
        ...more,
      },
    });

  it('leave something between them, and the trail says what they were before', async () => {
    const forward = await limit('at-least', 15);
    const aft = await limit('at-most', 35);
    expect(await limit('at-least', 16, {}, forward)).toBe(forward);
    await expect(limit('at-least', 35, {}, forward)).rejects.toMatchObject({ code: 'invalid-input' });
    await removeLimit(test.db, { ...here(), id: aft });
    await expect(removeLimit(test.db, { ...here(), id: aft })).rejects.toMatchObject({ code: 'not-found' });
    const stands = await limitsOf(test.db, test.program.id);
    expect(stands.map(({ quantity, sense, value }) => [quantity, sense, value])).toEqual([
      ['percentMac', 'at-least', 16],
    ]);
    const told = (await trail()).filter(({ kind }) => kind.startsWith('limit.')).map(({ detail }) => detail);
    expect(told).toMatchObject([
      { value: 15, before: null },
      { value: 35, before: null },
      { value: 16, before: 15 },
      { before: 35 },
    ]);
    await removeLimit(test.db, { ...here(), id: forward });
  });

  it('of another kind, group, condition or time do not stand in each other’s way', async () => {
    const made = [
      await limit('at-most', 30),
      await limit('at-least', 40, { kind: 'target' }),
      await limit('at-least', 40, { group: 'Wing' }),
      await limit('at-least', 40, { quantity: 'mass' }),
    ];
    await expect(limit('at-least', 40, { condition: 'empty' })).rejects.toMatchObject({
      code: 'invalid-input',
    });
    await removeLimit(test.db, { ...here(), id: made[0] ?? '' });
    made[0] = await limit('at-most', 30, { condition: 'take-off', until: '2026-03-31' });
    made.push(await limit('at-least', 40, { condition: 'empty' }));
    made.push(await limit('at-least', 41, { condition: 'take-off', from: '2026-04-01' }));
    for (const id of made) await removeLimit(test.db, { ...here(), id });
  });

  it('of a place are in the axes of the frame issue in force, and count on the days they state only', async () => {
    const id = await limit('at-most', 7.5, { quantity: 'cgx' });
    const past = await limit('at-most', 30, { until: '2026-02-04' });
    const future = await limit('at-most', 30, { from: '2999-01-01' });
    const issue = await currentFrameIssue(test.db, test.program.id);
    const force = await limitsInForce(test.db, test.program.id);
    expect(force.map(({ quantity, frameIssue }) => [quantity, frameIssue])).toEqual([['cgx', issue?.number]]);
    expect(await limitsOf(test.db, test.program.id)).toHaveLength(3);
    for (const one of [id, past, future]) await removeLimit(test.db, { ...here(), id: one });
  });

  it('of a place stay in the issue of their day until their value changes', async () => {
    const id = await limit('at-most', 7.5, { quantity: 'cgx' });
    const issueOf = async () =>
      (await limitsOf(test.db, test.program.id)).find((one) => one.id === id)?.frameIssue;
    const day = await issueOf();
    if (day === undefined || day === null) throw new Error('the limit has an issue');
    const form = frameIssueSchema.parse(FORM);
    await issueFrame(test.db, {
      ...here(),
      base: day,
      title: 'Datum moved',
      geometry: geometryOfForm(form),
      validFrom: '2026-07-01',
      reason: 'datum moved',
      former: formerOfForm(form),
      carryPoints: false,
    });
    await limit('at-most', 7.5, { quantity: 'cgx', source: 'the same, cited rightly' }, id);
    expect(await issueOf()).toBe(day);
    await limit('at-most', 7.6, { quantity: 'cgx' }, id);
    expect(await issueOf()).toBe(day + 1);
    await removeLimit(test.db, { ...here(), id });
  });

  it('read a form in the unit that it names, and refuse one of another quantity', () => {
    const form = {
      id: '',
      quantity: 'ixx',
      sense: 'at-most',
      kind: 'contract',
      group: 'Wing/Spars',
      condition: '',
      value: '12',
      unit: 'slug.ft2',
      source: 'a document',
      source_date: '2026-02-03',
      from: '2026-02-03',
      until: '',
    };
    // 1 slug.ft2 = 0.45359237 x 9.80665 x 0.3048 kg.m2, from the exact factors of NIST SP 811.
    expect(limitInSi(limitSchema.parse(form))).toBeCloseTo(12 * 0.45359237 * 9.80665 * 0.3048, 12);
    const wrong = (changes: Partial<typeof form>) =>
      limitSchema.safeParse({ ...form, ...changes }).error?.issues.map(({ path }) => path[0]);
    expect(wrong({ unit: 'kg' })).toEqual(['unit']);
    expect(wrong({ until: '2026-02-02' })).toEqual(['until']);
    expect(wrong({ group: 'Wing//Spars' })).toEqual(['group']);
    expect(wrong({ group: '', value: '0' })).toEqual(['value']);
  });
});

describe('growth allowances', () => {
  const allowance = (fraction: number, group = '') =>
    setAllowance(test.db, { ...here(), group, maturity: 'E', fraction, source: 'a plan' });

  it('are set per maturity, the trail keeps the one before', async () => {
    await allowance(0.08);
    await allowance(0.05);
    const stands = await growthAllowancesOf(test.db, test.program.id);
    expect(stands.map(({ maturity, fraction }) => [maturity, fraction])).toEqual([['E', 0.05]]);
    expect((await trail()).at(-1)?.detail).toEqual({ maturity: 'E', fraction: 0.05, before: 0.08 });
  });

  it('are set per group as well, and follow the group when it gets another name', async () => {
    await allowance(0.1, 'Wing');
    expect((await trail()).at(-1)?.detail).toEqual({
      maturity: 'E',
      group: 'Wing',
      fraction: 0.1,
      before: null,
    });
    const change = (kind: 'added' | 'moved', path: string, to: string | null) =>
      changeGroups(test.db, { ...here(), changes: [{ kind, path, to, code: null }] });
    await change('added', 'Wing', null);
    await change('moved', 'Wing', 'Mainplane');
    expect((await allowancesOf(test.db, test.program.id)).groups).toEqual([
      { group: 'Mainplane', maturity: 'E', fraction: 0.1 },
    ]);
    await allowance(0.12, 'Mainplane');
    const stands = await growthAllowancesOf(test.db, test.program.id);
    expect(stands.map(({ group_path: path, fraction }) => [path, fraction])).toEqual([
      ['', 0.05],
      ['Mainplane', 0.12],
    ]);
    const chosen = { ...here(), group: 'Mainplane', maturity: 'E' } as const;
    await removeAllowance(test.db, chosen);
    await expect(removeAllowance(test.db, chosen)).rejects.toMatchObject({ code: 'not-found' });
    expect(await allowancesOf(test.db, test.program.id)).toEqual({ E: 0.05, C: 0, A: 0 });
  });
});

describe('who may', () => {
  const ask = (userId: string, action: ProgramAction) =>
    requireProgramAction(test.db, { id: userId, admin: false }, { code: test.program.code }, action);
  const KEPT_BY_CHIEFS = [
    'frame.keep',
    'reference-points.keep',
    'builds.keep',
    'limits.keep',
    'allowances.keep',
  ] as const;

  it.each(KEPT_BY_CHIEFS)('%s: chief engineers; weights engineers read', async (action) => {
    await expect(ask(test.crew.chief.userId, action)).resolves.toMatchObject({ role: 'chief' });
    await expect(ask(test.crew.weights.userId, action)).rejects.toMatchObject({ code: 'forbidden' });
    await expect(ask(test.crew.weights.userId, 'settings.read')).resolves.toMatchObject({ role: 'weights' });
  });

  it.each(['rotors.keep', 'configurations.keep'] as const)(
    '%s: weights engineers; chief engineers read, simulation engineers see neither',
    async (action) => {
      await expect(ask(test.crew.weights.userId, action)).resolves.toMatchObject({ role: 'weights' });
      await expect(ask(test.crew.chief.userId, action)).rejects.toMatchObject({ code: 'forbidden' });
      const read = action === 'rotors.keep' ? 'rotors.read' : 'configurations.read';
      await expect(ask(test.crew.simulation.userId, read)).rejects.toMatchObject({ code: 'forbidden' });
    },
  );

  it('to people outside the program it does not exist', async () => {
    const outsider = await addPerson(test.db, 'outsider', false);
    await expect(ask(outsider.userId, 'configurations.read')).rejects.toMatchObject({ code: 'not-found' });
  });
});
