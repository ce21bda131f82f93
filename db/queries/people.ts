import { type Transaction } from 'kysely';
import { type Db } from '../client';
import { type Database } from '../schema/database';
import { type MailWish } from '../schema/people';

export interface PersonRow {
  readonly id: string;
  readonly email: string;
  readonly name: string;
  readonly passwordHash: string | null;
  readonly admin: boolean;
  readonly disabledAt: Date | null;
}

const PERSON = [
  'id',
  'email',
  'name',
  'password_hash as passwordHash',
  'is_admin as admin',
  'disabled_at as disabledAt',
] as const;

export function findPersonByEmail(db: Db, email: string): Promise<PersonRow | undefined> {
  return db.selectFrom('users').select(PERSON).where('email', '=', email).executeTakeFirst();
}

export function findPerson(db: Db, id: string): Promise<PersonRow | undefined> {
  return db.selectFrom('users').select(PERSON).where('id', '=', id).executeTakeFirst();
}

export async function mailWishOf(db: Db, id: string): Promise<MailWish> {
  const { wish } = await db
    .selectFrom('users')
    .select('mail_wish as wish')
    .where('id', '=', id)
    .executeTakeFirstOrThrow();
  return wish;
}

export interface PersonInDirectory {
  readonly id: string;
  readonly email: string;
  readonly name: string;
  readonly admin: boolean;
  readonly joined: boolean;
  readonly disabledAt: Date | null;
  readonly programs: number;
  readonly lastSeen: Date | null;
}

/** Everybody, by name, with how many programs they belong to and when a session of theirs last began. */
export function listPeople(db: Db): Promise<PersonInDirectory[]> {
  return db
    .selectFrom('users')
    .select((eb) => [
      'id',
      'email',
      'name',
      'is_admin as admin',
      eb('password_hash', 'is not', null).as('joined'),
      'disabled_at as disabledAt',
      eb
        .selectFrom('program_members')
        .whereRef('program_members.user_id', '=', 'users.id')
        .select((inner) => inner.fn.countAll<number>().as('count'))
        .$asScalar()
        .$notNull()
        .as('programs'),
      eb
        .selectFrom('sessions')
        .whereRef('sessions.user_id', '=', 'users.id')
        .select((inner) => inner.fn.max('started_at').as('last'))
        .$asScalar()
        .as('lastSeen'),
    ])
    .orderBy('name')
    .orderBy('email')
    .$narrowType<{ joined: boolean }>()
    .execute();
}

/** Adds a person without a password, or returns the one who has this address. `added` tells which. */
export async function insertPersonOnce(
  trx: Transaction<Database>,
  person: { id: string; email: string; name: string; admin: boolean },
): Promise<{ id: string; email: string; name: string; added: boolean; disabledAt: Date | null }> {
  const added = await trx
    .insertInto('users')
    .values({ id: person.id, email: person.email, name: person.name, is_admin: person.admin })
    .onConflict((conflict) => conflict.column('email').doNothing())
    .returning(['id', 'email', 'name', 'disabled_at as disabledAt'])
    .executeTakeFirst();
  if (added) return { ...added, added: true };
  const known = await trx
    .selectFrom('users')
    .select(['id', 'email', 'name', 'disabled_at as disabledAt'])
    .where('email', '=', person.email)
    .executeTakeFirstOrThrow();
  return { ...known, added: false };
}

export async function setPassword(
  trx: Transaction<Database>,
  id: string,
  passwordHash: string,
): Promise<void> {
  await trx.updateTable('users').set({ password_hash: passwordHash }).where('id', '=', id).execute();
}

export async function setName(trx: Transaction<Database>, id: string, name: string): Promise<void> {
  await trx.updateTable('users').set({ name }).where('id', '=', id).execute();
}

/** Sets or clears the mark; false when it already stood that way. */
export async function setDisabled(
  trx: Transaction<Database>,
  id: string,
  disabledAt: Date | null,
): Promise<boolean> {
  const result = await trx
    .updateTable('users')
    .set({ disabled_at: disabledAt })
    .where('id', '=', id)
    .where('disabled_at', disabledAt === null ? 'is not' : 'is', null)
    .executeTakeFirst();
  return result.numUpdatedRows === 1n;
}

export type LinkPurpose = 'invitation' | 'password-reset';

/** A new link for a person; links of the same purpose that they had before no longer work. */
export async function replaceMailLink(
  trx: Transaction<Database>,
  link: { tokenHash: string; userId: string; purpose: LinkPurpose; expiresAt: Date },
): Promise<void> {
  await trx
    .deleteFrom('mail_links')
    .where('user_id', '=', link.userId)
    .where('purpose', '=', link.purpose)
    .execute();
  await trx
    .insertInto('mail_links')
    .values({
      token_hash: link.tokenHash,
      user_id: link.userId,
      purpose: link.purpose,
      expires_at: link.expiresAt,
      used_at: null,
    })
    .execute();
}

/** The person behind a link that still works. Looking consumes nothing. */
export function findMailLink(
  db: Db,
  tokenHash: string,
  purpose: LinkPurpose,
  now: Date,
): Promise<{ userId: string; email: string; name: string } | undefined> {
  return db
    .selectFrom('mail_links')
    .innerJoin('users', 'users.id', 'mail_links.user_id')
    .select(['users.id as userId', 'users.email', 'users.name'])
    .where('token_hash', '=', tokenHash)
    .where('purpose', '=', purpose)
    .where('used_at', 'is', null)
    .where('expires_at', '>', now)
    .where('users.disabled_at', 'is', null)
    .executeTakeFirst();
}

/** Takes a link out of use and returns whose it was; of several at once exactly one gets it. */
export async function consumeMailLink(
  trx: Transaction<Database>,
  tokenHash: string,
  purpose: LinkPurpose,
  now: Date,
): Promise<string | null> {
  const taken = await trx
    .updateTable('mail_links')
    .set({ used_at: now })
    .where('token_hash', '=', tokenHash)
    .where('purpose', '=', purpose)
    .where('used_at', 'is', null)
    .where('expires_at', '>', now)
    .returning('user_id')
    .executeTakeFirst();
  return taken?.user_id ?? null;
}
