import { createDb, createPool } from '@/db/client';
import { startRunner } from '@/lib/server/jobs/runner';
import { TASKS } from '@/lib/server/jobs/task-list';
import { env } from '@/lib/server/env';

// A process that runs the queue of DATABASE_URL until it is killed.
const databaseUrl = env().DATABASE_URL;
const pool = createPool(databaseUrl, 6, (error) => {
  throw error;
});
await startRunner({ databaseUrl, pool, db: createDb(pool), tasks: TASKS });
