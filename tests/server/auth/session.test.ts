import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { endSession, endSessions, readSession, sessionCookie, startSession } from '@/lib/server/auth/session';
import { ADDRESS, makePerson, type PeopleUnderTest, peopleUnderTest } from '../../support/people';

let test: PeopleUnderTest;
let ann: string;

beforeAll(async () => {
  test = await peopleUnderTest();
  ann = await makePerson(test.db, { email: 'ann@skerry.example', name: 'Ann' });
});
afterAll(() => test.close());

const start = () => startSession(test.pool, ann, ADDRESS);
const read = (secret: string) => readSession(test.pool, secret);
const HOUR = 3_600_000;

async function age(by: { started?: number; expires?: number }): Promise<void> {
  const now = Date.now();
  await test.db
    .updateTable('sessions')
    .set({
      ...(by.started === undefined ? {} : { started_at: new Date(now - by.started) }),
      ...(by.expires === undefined ? {} : { expires_at: new Date(now + by.expires) }),
    })
    .where('user_id', '=', ann)
    .execute();
}

describe('a session', () => {
  it('tells who signed in, and is stored as a hash only', async () => {
    const secret = await start();
    expect(await read(secret)).toEqual({ id: ann, email: 'ann@skerry.example', name: 'Ann', admin: false });
    const rows = await test.db.selectFrom('sessions').selectAll().where('user_id', '=', ann).execute();
    expect(rows.map((row) => row.address)).toContain(ADDRESS);
    expect(JSON.stringify(rows)).not.toContain(secret);
    expect(await read(rows[0]?.id ?? '')).toBeNull();
  });

  it('has 256 bits of its own, new at every sign-in', async () => {
    const [one, two] = [await start(), await start()];
    expect(one).not.toBe(two);
    expect(Buffer.from(one, 'base64url')).toHaveLength(32);
  });

  it('ends when it has not been used for its idle time', async () => {
    const secret = await start();
    await age({ expires: -1000 });
    expect(await read(secret)).toBeNull();
  });

  it('is prolonged by use', async () => {
    const secret = await start();
    await age({ expires: HOUR });
    expect(await read(secret)).not.toBeNull();
    const { expires_at: until } = await test.db
      .selectFrom('sessions')
      .select('expires_at')
      .where('user_id', '=', ann)
      .orderBy('expires_at', 'desc')
      .executeTakeFirstOrThrow();
    expect(until.getTime()).toBeGreaterThan(Date.now() + 7 * HOUR);
  });

  it('ends seven days after sign-in, however much it is used', async () => {
    const secret = await start();
    await age({ started: 7 * 24 * HOUR - 60_000, expires: 8 * HOUR });
    expect(await read(secret)).not.toBeNull();
    await age({ started: 7 * 24 * HOUR + 60_000, expires: 8 * HOUR });
    expect(await read(secret)).toBeNull();
    await age({ started: 0 });
    expect(await read(secret)).toBeNull();
  });

  it('ends at sign-out, and with all others when all are ended', async () => {
    const [one, two, three] = [await start(), await start(), await start()];
    await endSession(test.pool, one);
    expect(await read(one)).toBeNull();
    expect(await read(two)).not.toBeNull();
    await test.db.transaction().execute((trx) => endSessions(trx, ann));
    expect(await read(two)).toBeNull();
    expect(await read(three)).toBeNull();
  });

  it('ends when its owner is disabled', async () => {
    const bob = await makePerson(test.db, { email: 'bob@skerry.example' });
    const secret = await startSession(test.pool, bob, ADDRESS);
    await test.db.updateTable('users').set({ disabled_at: new Date() }).where('id', '=', bob).execute();
    expect(await read(secret)).toBeNull();
  });
});

describe('the cookie', () => {
  it('is bound to its host and to https where the application is reached by https', () => {
    const { name, options } = sessionCookie('https://polhode.example');
    expect(name).toMatch(/^__Host-/);
    expect(options).toMatchObject({ secure: true, httpOnly: true, sameSite: 'lax', path: '/' });
  });

  it('works on plain http, where browsers refuse that prefix', () => {
    const { name, options } = sessionCookie('http://127.0.0.1:3000');
    expect(name).not.toMatch(/^__/);
    expect(options).toMatchObject({ secure: false, httpOnly: true });
  });
});
