import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { type Transaction, sql } from 'kysely';
import { type Database } from '@/db/schema/database';
import { type AuditDetails, type AuditKind } from '@/lib/audit/events';
import { type Actor } from '@/lib/server/actor';

/** The scope of events that belong to no program. */
export const SITE_SCOPE = 'site';
export const FIRST_HASH = '0'.repeat(64);

export interface AuditEntry {
  readonly scope: string;
  readonly number: number;
  readonly at: Date;
  readonly userId: string | null;
  readonly address: string;
  readonly kind: string;
  readonly subject: string;
  readonly detail: unknown;
  readonly previousHash: string;
}

/** SHA-256 over the canonical JSON (RFC 8785) of the entry, the hash of the entry before it included. */
export function hashEntry(entry: AuditEntry): string {
  const text = canonicalize({ ...entry, at: entry.at.toISOString() });
  if (text === undefined) throw new TypeError('an audit entry must be JSON');
  return createHash('sha256').update(text).digest('hex');
}

/**
 * Adds one event to the chain of `scope` (a program's id, or `SITE_SCOPE`) inside the caller's transaction, so that the change
 * and its record stand or fall together. Events of one scope are written one after another.
 */
export async function recordEvent<K extends AuditKind>(
  trx: Transaction<Database>,
  event: { scope: string; actor: Actor; kind: K; subject: string; detail: AuditDetails[K] },
): Promise<void> {
  await sql`select pg_advisory_xact_lock(hashtextextended(${`audit:${event.scope}`}, 0))`.execute(trx);
  const last = await trx
    .selectFrom('audit_heads')
    .select(['number', 'hash'])
    .where('scope', '=', event.scope)
    .executeTakeFirst();
  const clock = await sql<{ at: Date }>`select date_trunc('milliseconds', clock_timestamp()) as at`.execute(
    trx,
  );
  const at = clock.rows[0]?.at;
  if (at === undefined) throw new Error('the database told no time');
  const entry: AuditEntry = {
    scope: event.scope,
    number: (last?.number ?? 0) + 1,
    at,
    userId: event.actor.userId,
    address: event.actor.address,
    kind: event.kind,
    subject: event.subject,
    // jsonb drops what JSON has no word for; hash what will be read back.
    detail: JSON.parse(JSON.stringify(event.detail)) as unknown,
    previousHash: last?.hash ?? FIRST_HASH,
  };
  const hash = hashEntry(entry);
  await trx
    .insertInto('audit_events')
    .values({
      scope: entry.scope,
      number: entry.number,
      at: entry.at,
      user_id: entry.userId,
      address: entry.address,
      kind: entry.kind,
      subject: entry.subject,
      detail: JSON.stringify(entry.detail),
      previous_hash: entry.previousHash,
      hash,
    })
    .execute();
  await trx
    .insertInto('audit_heads')
    .values({ scope: entry.scope, number: entry.number, hash })
    .onConflict((conflict) => conflict.column('scope').doUpdateSet({ number: entry.number, hash }))
    .execute();
}
