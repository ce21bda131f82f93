import { type Task } from 'graphile-worker';
import { z } from 'zod';
import { serverDb, writerPool } from '@/lib/server/database';
import { giveUpImport } from '@/lib/server/lists/give-up-import';
import { importFile } from '@/lib/server/lists/import-file';
import { openObject } from '@/lib/server/storage/open-object';

const payloadSchema = z.object({ importId: z.string() });

/** Reads the file of one import into its list. A failure of the store or the database is tried again by the queue. */
export const importListTask: Task = async (payload, { job }) => {
  const { importId } = payloadSchema.parse(payload);
  try {
    await importFile(
      { pool: writerPool(), db: serverDb(), openObject: (sha256) => openObject(sha256) },
      importId,
    );
  } catch (error) {
    if (job.attempts >= job.max_attempts) await giveUpImport(serverDb(), importId);
    throw error;
  }
};
