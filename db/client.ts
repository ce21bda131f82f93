import { Kysely, PostgresDialect } from 'kysely';
import pg from 'pg';
import { type Database } from './schema/database';

export type Db = Kysely<Database>;

/** int8 as a number: our counts stay far below 2^53, and one beyond it must not pass silently. */
function parseInt8(text: string): number {
  const value = Number(text);
  if (!Number.isSafeInteger(value)) throw new RangeError(`int8 ${text} is beyond the safe integers`);
  return value;
}

/**
 * A pool on `url`. Dates without time stay text (`2026-12-01`), so that no time zone moves them.
 * `onError` hears of connections that the server dropped while idle.
 */
export function createPool(url: string, max: number, onError: (error: Error) => void): pg.Pool {
  const types = {
    getTypeParser: ((oid: number, format?: 'text' | 'binary') => {
      if (format !== 'binary' && oid === 20) return parseInt8;
      if (format !== 'binary' && oid === 1082) return (text: string) => text;
      return pg.types.getTypeParser(oid, format as 'text');
    }) as typeof pg.types.getTypeParser,
  };
  // Enough to sort the keys of 100,000 rows without a file.
  const pool = new pg.Pool({ connectionString: url, max, types, options: '-c work_mem=16MB' });
  pool.on('error', onError);
  pool.on('connect', (client) => client.on('error', onError));
  return pool;
}

export function createDb(pool: pg.Pool): Db {
  return new Kysely<Database>({ dialect: new PostgresDialect({ pool }) });
}

/**
 * A query builder on one connection that the caller has taken from the pool, for work that also speaks COPY on it. It never gives
 * the connection back; the caller does.
 */
export function onClient(client: pg.PoolClient): Db {
  const borrowed = {
    query: client.query.bind(client),
    release: () => undefined,
  };
  const pool = { connect: async () => borrowed, end: async () => undefined };
  return new Kysely<Database>({ dialect: new PostgresDialect({ pool: pool as unknown as pg.Pool }) });
}
