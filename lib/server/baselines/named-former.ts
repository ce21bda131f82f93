import { type Db } from '@/db/client';
import { resultOfSubmission } from '@/db/queries/baseline-history';
import { groupsRenamedBetween } from '@/db/queries/settings';
import { renamedResult } from '@/lib/groups/renamed-result';
import { type ConfigurationResult } from '@/lib/loading/configuration';

/** The stored result of a submission, its groups by the names that they had when a later one was submitted. */
export async function namedFormer(db: Db, formerId: string, laterId: string): Promise<ConfigurationResult> {
  const [former, later] = await Promise.all([whenSubmitted(db, formerId), whenSubmitted(db, laterId)]);
  const [result, since] = await Promise.all([
    resultOfSubmission(db, formerId),
    groupsRenamedBetween(db, former.program_id, former.submitted_at, later.submitted_at),
  ]);
  return renamedResult(result, since);
}

function whenSubmitted(db: Db, id: string) {
  return db
    .selectFrom('submissions')
    .select(['program_id', 'submitted_at'])
    .where('id', '=', id)
    .executeTakeFirstOrThrow();
}
