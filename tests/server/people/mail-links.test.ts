import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findMailLink } from '@/db/queries/people';
import { readSession, startSession } from '@/lib/server/auth/session';
import { hashSecret } from '@/lib/server/auth/secret';
import { sendLinkMailTask } from '@/lib/server/jobs/tasks/send-link-mail';
import { acceptInvitation } from '@/lib/server/people/accept-invitation';
import { invitePerson } from '@/lib/server/people/invite-person';
import { prepareLinkMail } from '@/lib/server/people/link-mail';
import { requestPasswordReset } from '@/lib/server/people/request-password-reset';
import { resetPassword } from '@/lib/server/people/reset-password';
import { signIn } from '@/lib/server/people/sign-in';
import { linkIn, waitForMail } from '../../support/mailbox';
import { ADDRESS, makePerson, type PeopleUnderTest, peopleUnderTest, queuedJobs } from '../../support/people';

const PASSWORD = 'correct horse battery';
const HELPERS = undefined as never;
let test: PeopleUnderTest;

beforeAll(async () => {
  test = await peopleUnderTest();
});
afterAll(() => test.close());

/** The secret of the link that a mail of this purpose to the person would carry. */
async function secretFor(email: string, purpose: 'invitation' | 'password-reset'): Promise<string> {
  const mail = await prepareLinkMail(test.db, { email, purpose });
  const link = mail?.blocks.find((block) => block.kind === 'link');
  if (link?.kind !== 'link') throw new Error(`no link for ${email}`);
  return link.path.split('/').at(-1) ?? '';
}

const accept = (secret: string) =>
  acceptInvitation(test.db, { secret, name: 'New Person', password: PASSWORD, address: ADDRESS });
const reset = (secret: string, password = 'another long password') =>
  resetPassword(test.db, { secret, password, address: ADDRESS });

describe('an invitation', () => {
  it('is queued with the person in one transaction, and its secret is not in the queue', async () => {
    const admin = await makePerson(test.db, { email: 'admin@skerry.example', admin: true });
    const person = { userId: admin, address: ADDRESS };
    const invited = { email: 'new@skerry.example', name: 'New', admin: false };
    await invitePerson(test.db, { person, ...invited });
    expect(await queuedJobs(test.pool, 'send-link-mail')).toEqual([
      { email: 'new@skerry.example', purpose: 'invitation' },
    ]);
    await expect(invitePerson(test.db, { person, ...invited })).rejects.toMatchObject({
      code: 'invalid-input',
      errors: [{ pointer: '/email' }],
    });
    expect(await queuedJobs(test.pool, 'send-link-mail')).toHaveLength(1);
  });

  it('arrives as a mail whose link begins with APP_URL, and lets its reader in', async () => {
    await sendLinkMailTask({ email: 'new@skerry.example', purpose: 'invitation' }, HELPERS);
    const link = linkIn(await waitForMail('new@skerry.example', 'invited'));
    expect(link).toMatch(/^http:\/\/polhode\.example\/invitation\/[A-Za-z0-9_-]{43}$/);
    const secret = link.split('/').at(-1) ?? '';
    const userId = await accept(secret);
    expect(await signIn(test.db, { email: 'new@skerry.example', password: PASSWORD, address: ADDRESS })).toBe(
      userId,
    );
    await expect(accept(secret)).rejects.toMatchObject({ code: 'gone' });
  });

  it('is taken by exactly one of many who follow it at once', async () => {
    await makePerson(test.db, { email: 'race@skerry.example' });
    const secret = await secretFor('race@skerry.example', 'invitation');
    const tries = await Promise.allSettled(Array.from({ length: 8 }, () => accept(secret)));
    expect(tries.filter((one) => one.status === 'fulfilled')).toHaveLength(1);
    for (const one of tries)
      if (one.status === 'rejected') expect(one.reason).toMatchObject({ code: 'gone' });
  });

  it('is not consumed by looking at it', async () => {
    await makePerson(test.db, { email: 'look@skerry.example' });
    const secret = await secretFor('look@skerry.example', 'invitation');
    for (let i = 0; i < 3; i += 1) {
      const found = await findMailLink(test.db, hashSecret(secret), 'invitation', new Date());
      expect(found?.email).toBe('look@skerry.example');
    }
    await expect(accept(secret)).resolves.toEqual(expect.any(String));
  });

  it('does not work as a password reset, nor once it has run out, nor after a newer one', async () => {
    await makePerson(test.db, { email: 'old@skerry.example' });
    const first = await secretFor('old@skerry.example', 'invitation');
    await expect(reset(first)).rejects.toMatchObject({ code: 'gone' });
    const second = await secretFor('old@skerry.example', 'invitation');
    await expect(accept(first)).rejects.toMatchObject({ code: 'gone' });
    await test.db
      .updateTable('mail_links')
      .set({ expires_at: new Date(Date.now() - 1000) })
      .where('token_hash', '=', hashSecret(second))
      .execute();
    await expect(accept(second)).rejects.toMatchObject({ code: 'gone' });
  });

  it('is stored as a hash only', async () => {
    await makePerson(test.db, { email: 'hash@skerry.example' });
    const secret = await secretFor('hash@skerry.example', 'invitation');
    expect(JSON.stringify(await test.db.selectFrom('mail_links').selectAll().execute())).not.toContain(
      secret,
    );
  });
});

describe('a password reset', () => {
  it('is asked for in the same way for every address, known or not', async () => {
    await requestPasswordReset(test.db, { email: 'nobody@skerry.example', address: ADDRESS });
    const jobs = await queuedJobs(test.pool, 'send-link-mail');
    expect(jobs).toContainEqual({ email: 'nobody@skerry.example', purpose: 'password-reset' });
    expect(
      await prepareLinkMail(test.db, { email: 'nobody@skerry.example', purpose: 'password-reset' }),
    ).toBeNull();
  });

  it('sets the password, ends every session and every link, and is told by mail', async () => {
    const ann = await makePerson(test.db, { email: 'ann@skerry.example', password: PASSWORD });
    const session = await startSession(test.pool, ann, ADDRESS);
    const secret = await secretFor('ann@skerry.example', 'password-reset');
    await reset(secret);
    expect(await readSession(test.pool, session)).toBeNull();
    await expect(reset(secret)).rejects.toMatchObject({ code: 'gone' });
    await expect(
      signIn(test.db, { email: 'ann@skerry.example', password: PASSWORD, address: ADDRESS }),
    ).rejects.toMatchObject({ code: 'invalid-input' });
    expect(
      await signIn(test.db, {
        email: 'ann@skerry.example',
        password: 'another long password',
        address: ADDRESS,
      }),
    ).toBe(ann);
    expect(await queuedJobs(test.pool, 'send-mail')).toContainEqual(
      expect.objectContaining({ to: 'ann@skerry.example', subject: 'Your Polhode password was changed' }),
    );
  });

  it('is mailed three times in a quarter of an hour at most', async () => {
    const ask = () => requestPasswordReset(test.db, { email: 'often@skerry.example', address: ADDRESS });
    for (let i = 0; i < 3; i += 1) await ask();
    await expect(ask()).rejects.toMatchObject({ code: 'too-many-requests' });
  });
});
