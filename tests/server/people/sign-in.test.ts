import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { signIn } from '@/lib/server/people/sign-in';
import { makePerson, type PeopleUnderTest, peopleUnderTest } from '../../support/people';

const PASSWORD = 'correct horse battery';
let test: PeopleUnderTest;
let ann: string;
let visitor = 0;

/** Each from an address of its own, so that only the account's limit is met. */
const attempt = (email: string, password: string, address = `192.0.2.${(visitor += 1)}`) =>
  signIn(test.db, { email, password, address });

beforeAll(async () => {
  test = await peopleUnderTest();
  ann = await makePerson(test.db, { email: 'ann@skerry.example', password: PASSWORD });
  await makePerson(test.db, { email: 'invited@skerry.example' });
  const gone = await makePerson(test.db, { email: 'gone@skerry.example', password: PASSWORD });
  await test.db.updateTable('users').set({ disabled_at: new Date() }).where('id', '=', gone).execute();
});
afterAll(() => test.close());

describe('sign-in', () => {
  it('takes the right password, and the trail says who came from where', async () => {
    expect(await attempt('ann@skerry.example', PASSWORD, '192.0.2.200')).toBe(ann);
    const event = await test.db
      .selectFrom('audit_events')
      .selectAll()
      .where('kind', '=', 'user.signed-in')
      .executeTakeFirstOrThrow();
    expect(event).toMatchObject({ user_id: ann, address: '192.0.2.200' });
  });

  it('answers alike to a wrong password, an unknown address, someone not joined and someone disabled', async () => {
    const refused = await Promise.all(
      [
        attempt('ann@skerry.example', 'wrong'),
        attempt('unknown@skerry.example', PASSWORD),
        attempt('invited@skerry.example', PASSWORD),
        attempt('gone@skerry.example', PASSWORD),
      ].map((one) =>
        one.then(
          () => null,
          (error: unknown) => error,
        ),
      ),
    );
    for (const error of refused) {
      expect(error).toMatchObject({
        code: 'invalid-input',
        message: 'No account has this address with this password. Check both, or set a new password by mail.',
        errors: [],
      });
    }
  });

  it('is closed to an account after ten failures, for the right password too, known account or not', async () => {
    await makePerson(test.db, { email: 'target@skerry.example', password: PASSWORD });
    for (const email of ['target@skerry.example', 'nobody@skerry.example']) {
      for (let i = 0; i < 10; i += 1) {
        await expect(attempt(email, 'wrong')).rejects.toMatchObject({ code: 'invalid-input' });
      }
      await expect(attempt(email, PASSWORD)).rejects.toMatchObject({ code: 'too-many-requests' });
    }
  });

  it('does not count what succeeds', async () => {
    for (let i = 0; i < 12; i += 1) expect(await attempt('ann@skerry.example', PASSWORD)).toBe(ann);
  });

  it('is closed to an address that tries many accounts', async () => {
    const one = '198.51.100.1';
    for (let i = 0; i < 60; i += 1) {
      await expect(attempt(`guess${i}@skerry.example`, 'x', one)).rejects.toMatchObject({
        code: 'invalid-input',
      });
    }
    await expect(attempt('ann@skerry.example', PASSWORD, one)).rejects.toMatchObject({
      code: 'too-many-requests',
    });
  });
});
