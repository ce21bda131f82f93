import { type Db } from '@/db/client';
import { findBaseline, findSubmission } from '@/db/queries/baselines';
import { AppError } from '@/lib/errors';

/** One side of a comparison. */
export interface Side {
  readonly submissionId: string;
  /** `Baseline 2`, or `Submission "..."`. */
  readonly name: string;
  readonly number: number | null;
}

type Asked = string | readonly string[] | undefined;

/**
 * The sides that an address names: `from` a baseline's number, or nothing; `to` a number, or `submission` an id.
 * @throws AppError not-found when a side that is named is not there, or none is named to compare.
 */
export async function loadSides(
  db: Db,
  programId: string,
  asked: { readonly from?: Asked; readonly to?: Asked; readonly submission?: Asked },
): Promise<{ before: Side | null; after: Side }> {
  const before = asked.from === undefined ? null : await signedSide(db, programId, asked.from);
  if (typeof asked.submission !== 'string')
    return { before, after: await signedSide(db, programId, asked.to) };
  const submission = await findSubmission(db, programId, asked.submission);
  if (submission === undefined) throw new AppError('not-found', 'There is no such submission.');
  const after = { submissionId: submission.id, name: `Submission "${submission.title}"`, number: null };
  return { before, after };
}

async function signedSide(db: Db, programId: string, number: Asked): Promise<Side> {
  const baseline =
    typeof number === 'string' && /^[1-9]\d{0,8}$/.test(number)
      ? await findBaseline(db, programId, Number(number))
      : undefined;
  if (baseline === undefined) throw new AppError('not-found', 'There is no such baseline in this program.');
  return {
    submissionId: baseline.submission_id,
    name: `Baseline ${baseline.number}`,
    number: baseline.number,
  };
}
