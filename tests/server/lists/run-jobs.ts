import { createDb, createPool } from '@/db/client';
import { env } from '@/lib/server/env';
import { startRunner } from '@/lib/server/jobs/runner';
import { TASKS } from '@/lib/server/jobs/task-list';
import { importFile } from '@/lib/server/lists/import-file';
import { openObject } from '@/lib/server/storage/open-object';

// A process that runs the queue of DATABASE_URL until it is killed. With `stall` its store stops in the middle of a file.
const databaseUrl = env().DATABASE_URL;
const pool = createPool(databaseUrl, 6, (error) => {
  throw error;
});
const db = createDb(pool);

const STALL_AFTER = 500_000;

async function* stalling(bytes: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  let read = 0;
  for await (const piece of bytes) {
    yield piece;
    read += piece.length;
    if (read > STALL_AFTER) await new Promise(() => undefined);
  }
}

const stalled: typeof TASKS = {
  ...TASKS,
  'import-list': async (payload) => {
    const { importId } = payload as { importId: string };
    await importFile(
      { pool, db, openObject: async (sha256) => stalling(await openObject(sha256)) },
      importId,
    );
  },
};
await startRunner({ databaseUrl, pool, db, tasks: process.argv.includes('stall') ? stalled : TASKS });
