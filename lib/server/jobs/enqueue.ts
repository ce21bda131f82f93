import { type Transaction, sql } from 'kysely';
import { type Database } from '@/db/schema/database';
import { type JobPayloads } from './payloads';

/**
 * Queues a job in the caller's transaction: it runs only if the transaction commits. Jobs of one `queue` run one at a time, in
 * the order in which they were queued.
 */
export async function enqueue<K extends keyof JobPayloads>(
  trx: Transaction<Database>,
  task: K,
  payload: JobPayloads[K],
  options: { readonly maxAttempts?: number; readonly jobKey?: string; readonly queue?: string } = {},
): Promise<void> {
  await sql`
    select graphile_worker.add_job(
      ${task}, payload => ${JSON.stringify(payload)}::json,
      max_attempts => ${options.maxAttempts ?? 12}::int, job_key => ${options.jobKey ?? null}::text,
      queue_name => ${options.queue ?? null}::text)
  `.execute(trx);
}
