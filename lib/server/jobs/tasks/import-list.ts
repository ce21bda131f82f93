import { type Task } from 'graphile-worker';
import { z } from 'zod';
import { serverDb, serverPool } from '@/lib/server/database';
import { importFile } from '@/lib/server/lists/import-file';
import { openObject } from '@/lib/server/storage/open-object';

const payloadSchema = z.object({ importId: z.string() });

/** Reads the file of one import into its list. A failure of the store or the database is tried again by the queue. */
export const importListTask: Task = async (payload) => {
  const { importId } = payloadSchema.parse(payload);
  await importFile(
    { pool: serverPool(), db: serverDb(), openObject: (sha256) => openObject(sha256) },
    importId,
  );
};
