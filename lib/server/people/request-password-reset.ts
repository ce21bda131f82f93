import { type Db } from '@/db/client';
import { enqueue } from '@/lib/server/jobs/enqueue';
import { RATE_POLICIES } from '@/lib/server/rate-limit/policies';
import { takeOrRefuse } from '@/lib/server/rate-limit/take';

/** Queues a mail with a link for a new password. Whether the address is known is looked up by the job, so the answer cannot tell. */
export async function requestPasswordReset(
  db: Db,
  { email, address }: { email: string; address: string },
): Promise<void> {
  await takeOrRefuse(db, RATE_POLICIES.mailAddress, address);
  await takeOrRefuse(db, RATE_POLICIES.mailAccount, email);
  await db
    .transaction()
    .execute((trx) => enqueue(trx, 'send-link-mail', { email, purpose: 'password-reset' }));
}
