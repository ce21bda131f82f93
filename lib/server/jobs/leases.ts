import { randomInt } from 'node:crypto';
import { setTimeout as delay } from 'node:timers/promises';
import { type WorkerUtils } from 'graphile-worker';
import { sql } from 'kysely';
import pg from 'pg';
import { type Db } from '@/db/client';

/** Namespace of our advisory locks, so that they meet nobody else's. */
const LEASES = 0x504f4c48;

/**
 * A lease that lives as long as this process: an advisory lock on a connection of its own. PostgreSQL lets it go the moment the
 * process is gone, however it went, so that others can tell its workers from living ones. A connection that the server
 * drops is made again with the same lease; `onLoss` hears of it.
 */
export async function takeLease(databaseUrl: string, onLoss: (error: Error) => void): Promise<Lease> {
  const lease = randomInt(1, 2 ** 31 - 1);
  let released = false;
  let client = await hold(databaseUrl, lease);
  const watch = (): void => {
    client.once('error', (error) => {
      if (released) return;
      onLoss(error);
      void retake();
    });
  };
  const retake = async (): Promise<void> => {
    while (!released) {
      try {
        client = await hold(databaseUrl, lease);
        watch();
        return;
      } catch (error) {
        onLoss(error instanceof Error ? error : new Error(String(error)));
        await delay(1000);
      }
    }
  };
  watch();
  return {
    number: lease,
    release: async () => {
      released = true;
      await client.end();
    },
  };
}

export interface Lease {
  readonly number: number;
  readonly release: () => Promise<void>;
}

async function hold(databaseUrl: string, lease: number): Promise<pg.Client> {
  const client = new pg.Client({ connectionString: databaseUrl, keepAlive: true });
  await client.connect();
  await client.query('select pg_advisory_lock($1, $2)', [LEASES, lease]);
  return client;
}

export async function registerWorker(db: Db, workerId: string, lease: number): Promise<void> {
  await db.insertInto('job_workers').values({ worker_id: workerId, lease }).execute();
}

/**
 * Gives the jobs of workers whose process is gone back to the queue: those whose lease is free, and any that hold a job for a
 * minute without ever having been registered. Returns how many such workers there were.
 */
export async function releaseDeadWorkers(db: Db, utils: WorkerUtils): Promise<number> {
  const dead = await db.connection().execute(async (one) => {
    const rows = await one.selectFrom('job_workers').select(['worker_id', 'lease']).execute();
    const found: string[] = [];
    for (const { worker_id, lease } of rows) {
      const held = await sql<{
        free: boolean;
      }>`select pg_try_advisory_lock(${LEASES}, ${lease}) as free`.execute(one);
      if (held.rows[0]?.free !== true) continue;
      found.push(worker_id);
      await sql`select pg_advisory_unlock(${LEASES}, ${lease})`.execute(one);
    }
    const strangers = await sql<{ worker_id: string }>`
      select distinct locked_by as worker_id from graphile_worker.jobs
      where locked_at < now() - interval '1 minute' and locked_by not in (select worker_id from job_workers)
    `.execute(one);
    return [...found, ...strangers.rows.map((row) => row.worker_id)];
  });
  if (dead.length === 0) return 0;
  await utils.forceUnlockWorkers(dead);
  await db.deleteFrom('job_workers').where('worker_id', 'in', dead).execute();
  return dead.length;
}
