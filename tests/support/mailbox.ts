import { setTimeout as delay } from 'node:timers/promises';
import { type Mail } from '@/lib/server/fakes/mail/mailbox';

function mailboxUrl(to: string): string {
  const url = process.env['POLHODE_TEST_MAILBOX'];
  if (!url) throw new Error('No mailbox: only tests in tests/server, db, api and browser have one.');
  return `${url}/api/mails?to=${encodeURIComponent(to)}`;
}

/** What has arrived for `to`, newest first. */
export async function mailsTo(to: string): Promise<Mail[]> {
  const response = await fetch(mailboxUrl(to));
  return (await response.json()) as Mail[];
}

/** The newest mail to `to` whose subject contains `subject`, as soon as it is there; fails after ten seconds. */
export async function waitForMail(to: string, subject = ''): Promise<Mail> {
  const until = Date.now() + 10_000;
  for (;;) {
    const mail = (await mailsTo(to)).find((candidate) => candidate.subject.includes(subject));
    if (mail) return mail;
    if (Date.now() > until) throw new Error(`No mail to ${to} with "${subject}" in its subject.`);
    await delay(50);
  }
}

/** Empties the mailbox of one address. */
export async function clearMails(to: string): Promise<void> {
  await fetch(mailboxUrl(to), { method: 'DELETE' });
}

/** The first link in a mail's text part. */
export function linkIn(mail: Mail): string {
  const link = /https?:\/\/\S+/.exec(mail.text)?.[0];
  if (!link) throw new Error(`No link in "${mail.subject}".`);
  return link;
}
