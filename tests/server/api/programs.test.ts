import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { GET } from '@/app/api/v1/programs/route';
import { programsEndpoint } from '@/lib/contracts/api/programs';
import { newId } from '@/lib/server/ids';
import { programUnderTest, type ProgramUnderTest } from '@/tests/support/program';
import { callerOfEndpoint, documentedStatuses, restoreQuotas, sorted, tokenOf, useUpQuota } from './calls';

const { call, seen } = callerOfEndpoint(programsEndpoint, GET);

let test: ProgramUnderTest;
let second: { id: string; code: string; title: string };
beforeAll(async () => {
  test = await programUnderTest();
  const { db, crew } = test;
  second = { id: newId(), code: 'second', title: 'Two' };
  const third = { id: newId(), code: 'third', title: 'Three' };
  await db
    .insertInto('programs')
    .values([second, third].map((one) => ({ ...one, created_by: crew.admin.userId })))
    .execute();
  await db
    .insertInto('program_members')
    .values({
      program_id: second.id,
      user_id: crew.weights.userId,
      role: 'weights',
      added_by: crew.admin.userId,
    })
    .execute();
});
afterAll(() => test.close());

const codes = (body: Record<string, unknown>): string[] =>
  (body['programs'] as { program: string }[]).map(({ program }) => program);

describe('GET programs', () => {
  it('lists the programs of its owner with their builds, by title, and no others', async () => {
    const { status, body } = await call({
      token: await tokenOf(test, test.crew.weights, ['baselines:read']),
    });
    expect(status).toBe(200);
    expect(body).toEqual({
      programs: [
        {
          program: test.program.code,
          title: test.program.title,
          builds: [{ build: 'design', title: 'Design', default: true }],
        },
        { program: 'second', title: 'Two', builds: [] },
      ],
    });
  });

  it('lists only those that the token is limited to', async () => {
    const token = await tokenOf(test, test.crew.weights, ['baselines:read'], ['second']);
    expect(codes((await call({ token })).body)).toEqual(['second']);
  });

  it('no longer lists a program that its owner has left', async () => {
    const token = await tokenOf(test, test.crew.weights, ['baselines:read']);
    await test.db
      .deleteFrom('program_members')
      .where('program_id', '=', second.id)
      .where('user_id', '=', test.crew.weights.userId)
      .execute();
    expect(codes((await call({ token })).body)).toEqual([test.program.code]);
  });

  it('needs the scope baselines:read', async () => {
    const { status, headers } = await call({
      token: await tokenOf(test, test.crew.weights, ['lists:write']),
    });
    expect([status, headers.get('www-authenticate')]).toEqual([
      403,
      'Bearer realm="polhode", error="insufficient_scope"',
    ]);
  });

  it('takes no token that is unknown, revoked or run out, and no session cookie', async () => {
    const revoked = await tokenOf(test, test.crew.chief, ['baselines:read']);
    await test.db
      .updateTable('api_tokens')
      .set({ revoked_at: new Date() })
      .where('user_id', '=', test.crew.chief.userId)
      .execute();
    const old = await tokenOf(test, test.crew.chief2, ['baselines:read']);
    await test.db
      .updateTable('api_tokens')
      .set({ expires_at: new Date() })
      .where('user_id', '=', test.crew.chief2.userId)
      .execute();
    for (const token of ['polhode_nobody-has-ever-made-this-one', revoked, old]) {
      expect((await call({ token })).status).toBe(401);
    }
    expect((await call({ headers: { Cookie: 'session=anything' } })).status).toBe(401);
  });

  it('is refused when the quota is used up', async () => {
    const token = await tokenOf(test, test.crew.simulation, ['baselines:read']);
    await call({ token });
    await useUpQuota(test);
    const { status, headers } = await call({ token });
    expect([status, headers.get('ratelimit')]).toMatchObject([429, expect.stringContaining('r=0')]);
    await restoreQuotas(test);
  });

  it('has given every answer that it documents', () => {
    expect(sorted(seen)).toEqual(documentedStatuses(programsEndpoint));
  });
});
