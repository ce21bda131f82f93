import { type Transaction, sql } from 'kysely';
import pg from 'pg';
import { type Database } from '@/db/schema/database';
import { AppError } from '@/lib/errors';
import { fingerprintKey } from './fingerprint';
import { type ListRows } from './row-store';

export type Patience = 'as-long-as-it-takes' | 'a-moment';

/**
 * Holds a list for the length of the transaction, so that no other revision of it is written meanwhile, and says how far its rows
 * reach. @throws AppError conflict when that takes more than a moment and the caller has no more patience.
 */
export async function holdList(
  trx: Transaction<Database>,
  listId: string,
  patience: Patience,
): Promise<ListRows> {
  const limit = patience === 'a-moment' ? '4s' : '0';
  await sql`select set_config('lock_timeout', ${limit}, true)`.execute(trx);
  try {
    await sql`select pg_advisory_xact_lock(hashtextextended(${`list:${listId}`}, 0))`.execute(trx);
  } catch (error) {
    if (!(error instanceof pg.DatabaseError) || error.code !== LOCK_NOT_AVAILABLE) throw error;
    throw new AppError(
      'conflict',
      'A file is being read into this list right now. Nothing was saved, and your edits are still here. Wait until it is done, ' +
        'then look at what it changed.',
      { cause: error },
    );
  }
  await sql`select set_config('lock_timeout', '0', true)`.execute(trx);
  const { list_no, fingerprint_key, last_row, last_end } = await trx
    .selectFrom('lists')
    .leftJoin('list_revisions', (join) =>
      join
        .onRef('list_revisions.list_id', '=', 'lists.id')
        .onRef('list_revisions.number', '=', 'lists.last_revision'),
    )
    .select(['list_no', 'fingerprint_key', 'last_row', 'last_end'])
    .where('lists.id', '=', listId)
    .executeTakeFirstOrThrow();
  return {
    listNo: list_no,
    lastRow: last_row ?? 0,
    lastEnd: last_end ?? 0,
    key: fingerprintKey(fingerprint_key),
  };
}

const LOCK_NOT_AVAILABLE = '55P03';
