import { type Transaction } from 'kysely';
import { type Database } from '@/db/schema/database';
import { type JobPayloads } from '@/lib/server/jobs/payloads';
import { enqueue } from '@/lib/server/jobs/enqueue';

/** Queues one message in the caller's transaction: it is sent, and tried again, only if the transaction commits. */
export async function queueMail(trx: Transaction<Database>, mail: JobPayloads['send-mail']): Promise<void> {
  await enqueue(trx, 'send-mail', mail);
}
