import { type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { type Database } from '@/db/schema/database';

interface KeyOfUser {
  readonly userId: string;
  readonly key: string;
}

interface Kept {
  readonly requestHash: string;
  readonly result: unknown;
}

/** What a key stands for, if it was first used after `since`. */
export function findKept(db: Db, { userId, key }: KeyOfUser, since: Date): Promise<Kept | undefined> {
  return db
    .selectFrom('idempotency_keys')
    .select(['request_hash as requestHash', 'result'])
    .where('user_id', '=', userId)
    .where('key', '=', key)
    .where('created_at', '>', since)
    .executeTakeFirst();
}

/**
 * Takes a key for the rest of the transaction; false if it is in use since `since`. While another transaction holds it, waits for
 * that one's end.
 */
export async function reserveKey(
  trx: Transaction<Database>,
  { userId, key }: KeyOfUser,
  requestHash: string,
  since: Date,
): Promise<boolean> {
  await trx
    .deleteFrom('idempotency_keys')
    .where('user_id', '=', userId)
    .where('key', '=', key)
    .where('created_at', '<=', since)
    .execute();
  const { numInsertedOrUpdatedRows } = await trx
    .insertInto('idempotency_keys')
    .values({ user_id: userId, key, request_hash: requestHash, result: 'null' })
    .onConflict((conflict) => conflict.columns(['user_id', 'key']).doNothing())
    .executeTakeFirstOrThrow();
  return numInsertedOrUpdatedRows === 1n;
}

/** Keeps a result under a key that this transaction has reserved. */
export async function keepResult(
  trx: Transaction<Database>,
  { userId, key }: KeyOfUser,
  result: unknown,
): Promise<void> {
  await trx
    .updateTable('idempotency_keys')
    .set({ result: JSON.stringify(result) })
    .where('user_id', '=', userId)
    .where('key', '=', key)
    .execute();
}
