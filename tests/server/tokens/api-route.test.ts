import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { listTokens } from '@/db/queries/tokens';
import { apiProgramRoute, apiRoute } from '@/lib/server/http/api-route';
import { programsInReach } from '@/lib/server/http/token-caller';
import { addMember } from '@/lib/server/programs/add-member';
import { changeMemberRole, removeMember } from '@/lib/server/programs/change-member';
import { makeToken } from '@/lib/server/tokens/make-token';
import { revokeToken } from '@/lib/server/tokens/revoke-token';
import { type ProgramUnderTest, programUnderTest } from '../../support/program';

let test: ProgramUnderTest;
beforeAll(async () => {
  test = await programUnderTest();
});
afterAll(() => test.close());

type Maker = Parameters<typeof makeToken>[1];
const token = (request: Partial<Maker> = {}) =>
  makeToken(test.db, {
    person: test.crew.weights,
    name: 'script',
    scopes: ['lists:write'],
    programs: null,
    days: 30,
    ...request,
  });

const lists = apiProgramRoute(
  { scope: 'lists:write', action: 'lists.keep', maxBytes: 1000 },
  ({ program, caller }) =>
    Promise.resolve(Response.json({ program: program.code, by: caller.person.userId })),
);
const programs = apiRoute({ scope: 'any' }, async ({ caller }) =>
  Response.json((await programsInReach(test.db, caller)).map(({ code }) => code)),
);

async function call(
  route: typeof lists,
  bearer: string | null,
  { program = test.program.code, headers = {} as Record<string, string>, peer = '192.0.2.1' } = {},
): Promise<Response> {
  const request = new Request(`http://polhode.example/api/v1/programs/${program}`, {
    method: 'POST',
    headers: {
      'x-polhode-peer': peer,
      ...(bearer === null ? {} : { authorization: `Bearer ${bearer}` }),
      ...headers,
    },
  });
  return route(request, { params: Promise.resolve({ program }) });
}

describe('a token', () => {
  it('is 256 bits, shown once, and stored as a hash with its last four characters', async () => {
    const made = await token();
    expect(made).toMatch(/^polhode_[A-Za-z0-9_-]{43}$/);
    const stored = await test.db.selectFrom('api_tokens').selectAll().execute();
    expect(JSON.stringify(stored)).not.toContain(made);
    expect((await listTokens(test.db, test.crew.weights.userId))[0]).toMatchObject({
      hint: made.slice(-4),
      programs: null,
      lastUsedAt: null,
      revokedAt: null,
    });
  });

  it('opens what its scope and its owner’s role allow, and tells the rate limit', async () => {
    const response = await call(lists, await token());
    expect(response.status).toBe(200);
    expect(await response.json()).toEqual({ program: test.program.code, by: test.crew.weights.userId });
    expect(response.headers.get('ratelimit-policy')).toBe('"api";q=600;w=60');
    expect(response.headers.get('ratelimit')).toMatch(/^"api";r=\d+;t=\d+$/);
    expect(response.headers.get('cache-control')).toBe('private, no-store');
  });

  it('is the only way in: a session’s cookie is not looked at', async () => {
    const response = await call(lists, null, { headers: { cookie: 'polhode=whatever' } });
    expect(response.status).toBe(401);
    expect(response.headers.get('www-authenticate')).toContain('Bearer');
    expect(response.headers.get('content-type')).toBe('application/problem+json');
  });

  it('stops when it expires, is revoked, or its owner is disabled', async () => {
    const [expired, revoked, owned] = [await token(), await token(), await token()];
    expect((await call(lists, revoked)).status).toBe(200);
    const all = await listTokens(test.db, test.crew.weights.userId);
    const id = (made: string) => all.find(({ hint }) => hint === made.slice(-4))?.id ?? '';
    await test.db
      .updateTable('api_tokens')
      .set({ expires_at: new Date(Date.now() - 1000) })
      .where('id', '=', id(expired))
      .execute();
    await revokeToken(test.db, { person: test.crew.weights, id: id(revoked) });
    expect((await call(lists, expired)).status).toBe(401);
    expect((await call(lists, revoked)).status).toBe(401);
    const disable = (at: Date | null) =>
      test.db
        .updateTable('users')
        .set({ disabled_at: at })
        .where('id', '=', test.crew.weights.userId)
        .execute();
    await disable(new Date());
    expect((await call(lists, owned)).status).toBe(401);
    await disable(null);
    expect((await call(lists, owned)).status).toBe(200);
  });

  it('is revoked by its owner only, once', async () => {
    await token();
    const id = (await listTokens(test.db, test.crew.weights.userId))[0]?.id ?? '';
    await expect(revokeToken(test.db, { person: test.crew.chief, id })).rejects.toMatchObject({
      code: 'not-found',
    });
    await revokeToken(test.db, { person: test.crew.weights, id });
    await expect(revokeToken(test.db, { person: test.crew.weights, id })).rejects.toMatchObject({
      code: 'not-found',
    });
  });

  it('notes its last use, at most once a minute', async () => {
    const made = await token();
    const lastUse = async () => (await listTokens(test.db, test.crew.weights.userId))[0]?.lastUsedAt ?? null;
    expect(await lastUse()).toBeNull();
    await call(programs, made);
    const first = await lastUse();
    expect(first).not.toBeNull();
    await call(programs, made);
    expect(await lastUse()).toEqual(first);
  });

  it('is not made for a scope that no role of its owner carries, nor for a program of others', async () => {
    await expect(token({ person: test.crew.simulation })).rejects.toMatchObject({
      errors: [{ pointer: '/scopes' }],
    });
    await expect(token({ programs: ['elsewhere'] })).rejects.toMatchObject({
      errors: [{ pointer: '/programs' }],
    });
    await expect(token({ person: test.crew.admin, scopes: ['baselines:read'] })).resolves.toEqual(
      expect.any(String),
    );
  });
});

describe('at every call, the owner’s present role', () => {
  it('is asked: a token goes on working only as far as the role does', async () => {
    const { program, crew, db } = test;
    const person = crew.chief;
    const { userId } = crew.weights2;
    const made = await token({ person: crew.weights2, scopes: ['lists:write', 'baselines:read'] });
    expect((await call(lists, made)).status).toBe(200);
    await changeMemberRole(db, { person, programId: program.id, userId, role: 'simulation' });
    expect((await call(lists, made)).status).toBe(403);
    expect(await (await call(programs, made)).json()).toEqual([program.code]);
    await removeMember(db, { person, programId: program.id, userId });
    expect((await call(lists, made)).status).toBe(404);
    expect(await (await call(programs, made)).json()).toEqual([]);
    const back = { email: 'weights2@skerry.example', name: undefined, role: 'weights' as const };
    await addMember(db, { person, program, ...back });
    expect((await call(lists, made)).status).toBe(200);
  });

  it('does not matter where the scope is missing', async () => {
    const response = await call(lists, await token({ scopes: ['baselines:read'] }));
    expect(response.status).toBe(403);
    expect(response.headers.get('www-authenticate')).toContain('insufficient_scope');
  });

  it('does not reach past the programs that the token is limited to, nor into those of others', async () => {
    const { db, crew } = test;
    const id = 'other-program';
    await db
      .insertInto('programs')
      .values({ id, code: 'other', title: 'Other', created_by: crew.admin.userId })
      .execute();
    const made = await token({ programs: [test.program.code] });
    expect((await call(lists, made, { program: 'other' })).status).toBe(404);
    await db
      .insertInto('program_members')
      .values({ program_id: id, user_id: crew.weights.userId, role: 'weights', added_by: crew.admin.userId })
      .execute();
    expect((await call(lists, made, { program: 'other' })).status).toBe(404);
    expect((await call(lists, await token(), { program: 'other' })).status).toBe(200);
    const unknown = (await (await call(lists, made, { program: 'none' })).json()) as { detail: string };
    const others = (await (await call(lists, made, { program: 'other' })).json()) as { detail: string };
    expect(unknown).toEqual(others);
  });
});

it('refuses a body over the declared limit before it reads it', async () => {
  const made = await token();
  expect((await call(lists, made, { headers: { 'content-length': '1001' } })).status).toBe(413);
  expect((await call(lists, made, { headers: { 'transfer-encoding': 'chunked' } })).status).toBe(411);
  expect((await call(lists, null, { headers: { 'content-length': '1001' } })).status).toBe(401);
});

it('shuts out an address that guesses tokens, and no other', async () => {
  const guess = () => call(programs, `polhode_${'x'.repeat(43)}`, { peer: '203.0.113.5' });
  for (let i = 0; i < 30; i += 1) expect((await guess()).status).toBe(401);
  const shut = await guess();
  expect(shut.status).toBe(429);
  expect(Number(shut.headers.get('retry-after'))).toBeGreaterThan(0);
  expect((await call(programs, await token(), { peer: '203.0.113.6' })).status).toBe(200);
});

it('limits the calls of one person over all their tokens', async () => {
  const tight = apiRoute({ scope: 'any', limit: { name: 'tight', quota: 2, windowSeconds: 60 } }, () =>
    Promise.resolve(new Response(null, { status: 204 })),
  );
  const person = test.crew.chief2;
  const made = () => token({ person, scopes: ['baselines:read'] });
  expect((await call(tight, await made())).status).toBe(204);
  expect((await call(tight, await made())).status).toBe(204);
  const third = await call(tight, await made());
  expect(third.status).toBe(429);
  expect(third.headers.get('ratelimit')).toMatch(/^"tight";r=0;t=\d+$/);
  expect(third.headers.get('retry-after')).toMatch(/^\d+$/);
});
