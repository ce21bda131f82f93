import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { PUT } from '@/app/api/v1/programs/[program]/lists/[list]/route';
import { findList } from '@/db/queries/lists';
import { saveListEndpoint } from '@/lib/contracts/api/lists';
import { newId } from '@/lib/server/ids';
import { programUnderTest, type ProgramUnderTest } from '@/tests/support/program';
import { callerOfEndpoint, documentedStatuses, restoreQuotas, sorted, tokenOf, useUpQuota } from './calls';

const { call, seen } = callerOfEndpoint(saveListEndpoint, PUT);
const WING = { title: 'Wing structure', mass_unit: 'lb', length_unit: 'in', inertia_unit: 'lb.in2' };

let test: ProgramUnderTest;
let token: string;
beforeAll(async () => {
  test = await programUnderTest();
  token = await tokenOf(test, test.crew.weights, ['lists:write']);
});
afterAll(() => test.close());

const put = (body: unknown, params: Partial<{ program: string; list: string }> = {}, by = token) =>
  call({
    token: by,
    params: { program: test.program.code, list: 'wing', ...params },
    body: typeof body === 'string' ? body : JSON.stringify(body),
  });

describe('PUT lists', () => {
  it('creates a list with the defaults that are left out', async () => {
    const { status, body } = await put(WING);
    expect(status).toBe(201);
    expect(body).toEqual({
      program: test.program.code,
      list: 'wing',
      ...WING,
      products: 'positive',
      axes: ['aft', 'right', 'up'],
      frame: { origin: { x: 0, y: 0, z: 0 }, yaw: 0, pitch: 0, roll: 0 },
      kind: 'components',
      extent: 'whole',
      uncertainty: '1sigma',
      marking: null,
    });
  });

  it('changes it when it exists, and keeps places in SI', async () => {
    const { status, body } = await put({
      ...WING,
      title: 'Wing',
      marking: 'Proprietary',
      frame: { origin: { x: 100 } },
    });
    expect([status, body['title']]).toEqual([200, 'Wing']);
    const list = await findList(test.db, test.program.id, 'wing');
    expect(list).toMatchObject({ title: 'Wing', marking: 'Proprietary', frame_issue_id: test.frameIssueId });
    expect(list?.declarations.pose.origin).toEqual([2.54, 0, 0]);
  });

  it('names the frame issue that it is stated in, and says it back', async () => {
    const { status, body } = await put({ ...WING, frame_issue: 1 });
    expect([status, body['frame_issue']]).toEqual([200, 1]);
  });

  it.each([
    ['no title', { ...WING, title: undefined }, '/title'],
    ['no unit of mass', { ...WING, mass_unit: undefined }, '/mass_unit'],
    ['a unit that there is not', { ...WING, length_unit: 'yd' }, '/length_unit'],
    ['axes that do not span space', { ...WING, axes: ['aft', 'forward', 'up'] }, '/axes'],
    ['an angle that is text', { ...WING, frame: { yaw: '90' } }, '/frame/yaw'],
    ['a mistyped member', { ...WING, product: 'negative' }, ''],
    ['a frame issue that there is not', { ...WING, frame_issue: 9 }, '/frame_issue'],
    ['a mistyped member of the frame', { ...WING, frame: { jaw: 90 } }, '/frame'],
  ])('refuses %s, with its JSON pointer', async (_what, body, pointer) => {
    const answer = await put(body);
    expect([answer.status, answer.body['errors']]).toMatchObject([422, [{ pointer }]]);
  });

  it('refuses a code that could not stand in an address', async () => {
    const { status, body } = await put(WING, { list: 'Wing%20List' });
    expect([status, body['errors']]).toMatchObject([422, [{ parameter: 'list' }]]);
  });

  it('tells apart a body that is no JSON, of another type, too long, or of unknown length', async () => {
    const params = { program: test.program.code, list: 'wing' };
    expect((await put('{"title": ')).status).toBe(400);
    const csv = await call({ token, params, body: 'x', headers: { 'Content-Type': 'text/csv' } });
    expect(csv.status).toBe(415);
    expect((await put({ ...WING, title: 'x'.repeat(1024 * 1024) })).status).toBe(413);
    const stream = new Blob(['{}']).stream() as ReadableStream<Uint8Array>;
    const chunked = await call({ token, params, body: stream, headers: { 'Transfer-Encoding': 'chunked' } });
    expect(chunked.status).toBe(411);
  });

  it('is for weights engineers of the program with a token of the scope', async () => {
    const { crew } = test;
    expect((await put(WING, {}, await tokenOf(test, crew.weights, ['baselines:read']))).status).toBe(403);
    const formerly = await tokenOf(test, crew.weights2, ['lists:write']);
    await test.db
      .updateTable('program_members')
      .set({ role: 'simulation' })
      .where('user_id', '=', crew.weights2.userId)
      .execute();
    const refused = await put(WING, {}, formerly);
    expect([refused.status, refused.body['type']]).toEqual([403, 'urn:polhode:problem:forbidden']);
    expect((await put(WING, { program: 'no-such-program' })).status).toBe(404);
    expect((await call({ params: { program: test.program.code, list: 'wing' }, body: '{}' })).status).toBe(
      401,
    );
  });

  it('answers 409 in a program without an airframe frame', async () => {
    const bare = { id: newId(), code: 'bare', title: 'Bare', created_by: test.crew.admin.userId };
    await test.db.insertInto('programs').values(bare).execute();
    const member = { program_id: bare.id, role: 'weights' as const, added_by: test.crew.admin.userId };
    await test.db
      .insertInto('program_members')
      .values({ ...member, user_id: test.crew.weights.userId })
      .execute();
    expect((await put(WING, { program: 'bare' })).status).toBe(409);
  });

  it('is refused when the quota is used up', async () => {
    await useUpQuota(test);
    expect((await put(WING)).status).toBe(429);
    await restoreQuotas(test);
  });

  it('has given every answer that it documents', () => {
    expect(sorted(seen)).toEqual(documentedStatuses(saveListEndpoint));
  });
});
