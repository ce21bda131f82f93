import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { listPeople } from '@/db/queries/people';
import { readSession, startSession } from '@/lib/server/auth/session';
import { changePassword } from '@/lib/server/people/change-password';
import { endAllSessions } from '@/lib/server/people/end-all-sessions';
import { makeAdmin } from '@/lib/server/people/make-admin';
import { setPersonDisabled } from '@/lib/server/people/set-disabled';
import { signIn } from '@/lib/server/people/sign-in';
import { ADDRESS, makePerson, type PeopleUnderTest, peopleUnderTest } from '../../support/people';

const PASSWORD = 'correct horse battery';
let test: PeopleUnderTest;

beforeAll(async () => {
  test = await peopleUnderTest();
});
afterAll(() => test.close());

async function signedIn(email: string) {
  const userId = await makePerson(test.db, { email, password: PASSWORD });
  return { person: { userId, address: ADDRESS }, session: await startSession(test.pool, userId, ADDRESS) };
}

describe('a changed password', () => {
  it('ends every session', async () => {
    const { person, session } = await signedIn('ann@skerry.example');
    await changePassword(test.db, { person, current: PASSWORD, next: 'another long password' });
    expect(await readSession(test.pool, session)).toBeNull();
  });

  it('needs the present one, and changes nothing without it', async () => {
    const { person, session } = await signedIn('bob@skerry.example');
    await expect(
      changePassword(test.db, { person, current: 'guess', next: 'another long password' }),
    ).rejects.toMatchObject({ code: 'invalid-input', errors: [{ pointer: '/currentPassword' }] });
    expect(await readSession(test.pool, session)).not.toBeNull();
    expect(await signIn(test.db, { email: 'bob@skerry.example', password: PASSWORD, address: ADDRESS })).toBe(
      person.userId,
    );
  });

  it('cannot be guessed at from a session left open', async () => {
    const { person } = await signedIn('cat@skerry.example');
    const guess = () => changePassword(test.db, { person, current: 'guess', next: 'another long password' });
    for (let i = 0; i < 10; i += 1) await expect(guess()).rejects.toMatchObject({ code: 'invalid-input' });
    await expect(guess()).rejects.toMatchObject({ code: 'too-many-requests' });
  });
});

it('ends all sessions of a person, and no one else’s, at sign-out everywhere', async () => {
  const dan = await signedIn('dan@skerry.example');
  const eve = await signedIn('eve@skerry.example');
  await endAllSessions(test.db, { person: dan.person, email: 'dan@skerry.example' });
  expect(await readSession(test.pool, dan.session)).toBeNull();
  expect(await readSession(test.pool, eve.session)).not.toBeNull();
});

describe('disabling', () => {
  it('ends the sessions at once, and can be taken back', async () => {
    const admin = await signedIn('admin@skerry.example');
    const fay = await signedIn('fay@skerry.example');
    const set = (disabled: boolean) =>
      setPersonDisabled(test.db, { person: admin.person, userId: fay.person.userId, disabled });
    await set(true);
    expect(await readSession(test.pool, fay.session)).toBeNull();
    await expect(set(true)).rejects.toMatchObject({ code: 'conflict' });
    await set(false);
    expect(await signIn(test.db, { email: 'fay@skerry.example', password: PASSWORD, address: ADDRESS })).toBe(
      fay.person.userId,
    );
    const kinds = await test.db
      .selectFrom('audit_events')
      .select('kind')
      .where('subject', '=', fay.person.userId)
      .where('user_id', '=', admin.person.userId)
      .orderBy('number')
      .execute();
    expect(kinds.map(({ kind }) => kind)).toEqual(['user.disabled', 'user.enabled']);
  });

  it('is not for oneself', async () => {
    const { person } = await signedIn('self@skerry.example');
    await expect(
      setPersonDisabled(test.db, { person, userId: person.userId, disabled: true }),
    ).rejects.toMatchObject({ code: 'conflict' });
  });
});

it('makes an administrator from the command line, with a link to choose a password, once', async () => {
  const path = await makeAdmin(test.db, { email: 'first@skerry.example', name: 'First' });
  expect(path).toMatch(/^\/invitation\/[A-Za-z0-9_-]{43}$/);
  expect(await makeAdmin(test.db, { email: 'ann@skerry.example', name: 'Ann' })).toBeNull();
  const people = await listPeople(test.db);
  expect(
    people
      .filter((one) => one.admin)
      .map((one) => one.email)
      .sort(),
  ).toEqual(['ann@skerry.example', 'first@skerry.example']);
  expect(people.find((one) => one.email === 'first@skerry.example')).toMatchObject({
    joined: false,
    programs: 0,
  });
});
