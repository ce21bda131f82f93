import { type Db } from '@/db/client';
import { findPersonByEmail, type LinkPurpose } from '@/db/queries/people';
import { type MailBlock } from '@/lib/server/email/blocks';
import { makeMailLink } from './mail-links';

interface LinkMail {
  readonly to: string;
  readonly subject: string;
  readonly blocks: readonly MailBlock[];
}

/**
 * Makes the link and the message around it. Null where none is due: nobody has the address, or they have been disabled. Someone
 * who has not joined and asks for a new password gets the invitation again, and nobody who has joined is invited.
 */
export async function prepareLinkMail(
  db: Db,
  { email, purpose }: { email: string; purpose: LinkPurpose },
): Promise<LinkMail | null> {
  const person = await findPersonByEmail(db, email);
  if (!person || person.disabledAt !== null) return null;
  if (purpose === 'invitation' && person.passwordHash !== null) return null;
  const due: LinkPurpose = person.passwordHash === null ? 'invitation' : 'password-reset';
  const path = await db
    .transaction()
    .execute((trx) => makeMailLink(trx, { userId: person.id, purpose: due }));
  return due === 'invitation' ? invitation(person.email, path) : passwordReset(person.email, path);
}

function invitation(to: string, path: string): LinkMail {
  return {
    to,
    subject: 'You are invited to Polhode',
    blocks: [
      { kind: 'heading', text: 'You are invited to Polhode' },
      {
        kind: 'paragraph',
        text: 'Polhode keeps mass and inertia baselines of aircraft programs, from the component mass list to the simulator.',
      },
      { kind: 'link', label: 'Choose your password', path },
      { kind: 'paragraph', text: 'The link works once, within 7 days.' },
    ],
  };
}

function passwordReset(to: string, path: string): LinkMail {
  return {
    to,
    subject: 'Set a new Polhode password',
    blocks: [
      { kind: 'heading', text: 'Set a new password' },
      { kind: 'paragraph', text: 'Someone, most likely you, asked for a new password for this address.' },
      { kind: 'link', label: 'Set a new password', path },
      {
        kind: 'paragraph',
        text: 'The link works once, within an hour. If you did not ask, do nothing: your password stays as it is.',
      },
    ],
  };
}
