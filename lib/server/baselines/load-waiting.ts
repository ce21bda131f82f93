import { type Db } from '@/db/client';
import { type submissionsOfProgram } from '@/db/queries/baselines';
import { baselineBefore, issueOfSubmission, resultOfSubmission } from '@/db/queries/baseline-history';
import { compareResults } from '@/lib/baselines/compare';
import { formerResultIn } from './former-result';

type ListedSubmission = Awaited<ReturnType<typeof submissionsOfProgram>>[number];

/** What changes with each submission that waits, in its first condition, against its build's current baseline. */
export function loadWaiting(db: Db, waiting: readonly ListedSubmission[]) {
  return Promise.all(
    waiting.map(async (submission) => {
      const newest = await baselineBefore(db, submission.build_id, null);
      const former = newest !== null && !newest.withdrawn ? newest : null;
      const [result, formerResult] = await Promise.all([
        resultOfSubmission(db, submission.id),
        former &&
          formerResultIn(db, former.submission_id, await issueOfSubmission(db, submission.id), submission.id),
      ]);
      const [change] = compareResults(formerResult?.result ?? null, result).conditions;
      return { submission, former, change: change ?? null };
    }),
  );
}

export type WaitingSubmission = Awaited<ReturnType<typeof loadWaiting>>[number];
