import { type Db } from '@/db/client';
import { findSubmission, revisionsOfSubmission, submissionState } from '@/db/queries/baselines';
import {
  baselineBefore,
  leftOutOf,
  nextBaselineNumber,
  rotorsOfSubmission,
} from '@/db/queries/baseline-history';
import { compareResults } from '@/lib/baselines/compare';
import { signingObstacles } from '@/lib/baselines/signing';
import { AppError } from '@/lib/errors';
import { type MemberRole } from '@/lib/permissions';
import { formerInWords, formerResultIn } from './former-result';
import { countPairs, revisionPairs } from './revision-changes';

/**
 * A submission as its reviewer needs it: what is in it, what changed against the baseline that it would supersede (or did), and
 * whether this person may sign it.
 * @throws AppError not-found
 */
export async function loadReview(
  db: Db,
  input: {
    readonly programId: string;
    readonly submissionId: string;
    readonly reader: { readonly userId: string; readonly role: MemberRole | null };
  },
) {
  const { programId, submissionId, reader } = input;
  const submission = await findSubmission(db, programId, submissionId);
  if (submission === undefined) throw new AppError('not-found', 'There is no such submission.');
  const [revisions, rotors, newest, nextNumber] = await Promise.all([
    revisionsOfSubmission(db, submissionId),
    rotorsOfSubmission(db, submissionId),
    baselineBefore(db, submission.build_id, submission.decided_at),
    nextBaselineNumber(db, programId),
  ]);
  const former = newest !== null && !newest.withdrawn ? newest : null;
  const [formerResult, leftOut, lists] = await Promise.all([
    former && formerResultIn(db, former.submission_id, submission.frame_issue_id, submission.id),
    leftOutOf(
      db,
      revisions.map((revision) => revision.revision_id),
    ),
    revisionPairs(db, former?.submission_id ?? null, submissionId).then((pairs) => countPairs(db, pairs)),
  ]);
  const state = submissionState(submission);
  return {
    submission,
    state,
    revisions,
    rotors,
    leftOut,
    /** The build's newest baseline; withdrawn, it is nothing to compare with. */
    newest,
    former,
    nextNumber,
    comparison: compareResults(formerResult?.result ?? null, submission.result),
    /** What was converted to compare, in words; null where nothing was. */
    formerConverted: formerResult && former && formerInWords(`Baseline ${former.number}`, formerResult),
    lists,
    obstacles: signingObstacles({
      ...reader,
      state,
      submittedBy: submission.submitted_by,
      revisions,
      rotors,
    }),
  };
}
