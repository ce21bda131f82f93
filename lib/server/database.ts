import type pg from 'pg';
import { type Db, createDb, createPool } from '@/db/client';
import { env } from './env';
import { log } from './log';

interface Opened {
  readonly pool: pg.Pool;
  readonly db: Db;
}

// Kept on globalThis: the framework may load this module more than once in a process, and there must be one pool.
const holder = globalThis as typeof globalThis & { polhodeDatabase?: Opened; polhodeWriters?: pg.Pool };

const connectionLost = (error: Error): void => log.warn({ err: error }, 'database connection lost');

function opened(): Opened {
  if (holder.polhodeDatabase === undefined) {
    const pool = createPool(env().DATABASE_URL, 12, connectionLost);
    holder.polhodeDatabase = { pool, db: createDb(pool) };
  }
  return holder.polhodeDatabase;
}

/** This process's connections to PostgreSQL as the application's role. */
export const serverPool = (): pg.Pool => opened().pool;
export const serverDb = (): Db => opened().db;

/**
 * Connections for revisions that are being written. A writer holds one and reads by another, so it must never wait for one of its
 * own kind: from the common pool, as many writers as it has connections would wait for each other for good.
 */
export const writerPool = (): pg.Pool =>
  (holder.polhodeWriters ??= createPool(env().DATABASE_URL, 4, connectionLost));
