import { type Selectable, sql } from 'kysely';
import { type Db } from '@/db/client';
import { type BaselinesTable, type SubmissionsTable } from '@/db/schema/baselines';
import { type BaselineState, baselineState, type SubmissionState } from '@/lib/baselines/states';

export type Submission = Selectable<SubmissionsTable>;
export type Baseline = Selectable<BaselinesTable>;

const submissions = (db: Db) =>
  db
    .selectFrom('submissions')
    .innerJoin('builds', 'builds.id', 'submissions.build_id')
    .innerJoin('configurations', 'configurations.id', 'submissions.configuration_id')
    .innerJoin('users as submitter', 'submitter.id', 'submissions.submitted_by')
    .leftJoin('decisions', 'decisions.submission_id', 'submissions.id')
    .leftJoin('users as decider', 'decider.id', 'decisions.decided_by')
    .leftJoin('baselines', 'baselines.submission_id', 'submissions.id')
    .select([
      'submissions.id',
      'submissions.title',
      'submissions.reason',
      'submissions.submitted_by',
      'submissions.submitted_at',
      'submissions.configuration_version',
      'configurations.code as configuration_code',
      'builds.id as build_id',
      'builds.code as build_code',
      'builds.title as build_title',
      'submitter.name as submitter',
      'decisions.decision',
      'decisions.reason as decision_reason',
      'decisions.decided_at',
      'decider.name as decider',
      'baselines.number as baseline_number',
    ]);

/** The submissions of a program, newest first, without their results. */
export function submissionsOfProgram(db: Db, programId: string) {
  return submissions(db)
    .where('submissions.program_id', '=', programId)
    .orderBy('submissions.submitted_at', 'desc')
    .execute();
}

/** One submission with its results, findings and answers. */
export function findSubmission(db: Db, programId: string, id: string) {
  return submissions(db)
    .select([
      'submissions.program_id',
      'submissions.configuration_id',
      'submissions.frame_issue_id',
      'submissions.rotor_revision_id',
      'submissions.marking',
      'submissions.result',
      'submissions.findings',
      'submissions.answers',
      'submissions.input_sha256',
    ])
    .where('submissions.program_id', '=', programId)
    .where('submissions.id', '=', id)
    .executeTakeFirst();
}

export function submissionState(row: { readonly decision: 'approved' | 'returned' | null }): SubmissionState {
  return row.decision ?? 'submitted';
}

/** The list revisions of a submission in the order of their lists' codes. */
export function revisionsOfSubmission(db: Db, submissionId: string) {
  return db
    .selectFrom('submission_revisions')
    .innerJoin('lists', 'lists.id', 'submission_revisions.list_id')
    .innerJoin('list_revisions', 'list_revisions.id', 'submission_revisions.revision_id')
    .innerJoin('frame_issues as stated', 'stated.id', 'list_revisions.frame_issue_id')
    .innerJoin('users', 'users.id', 'list_revisions.created_by')
    .select([
      'lists.id as list_id',
      'lists.code as list_code',
      'lists.title as list_title',
      'list_revisions.id as revision_id',
      'list_revisions.number',
      'list_revisions.rows',
      'list_revisions.frame_issue_id',
      'stated.number as frame_issue_number',
      'stated.title as frame_issue_title',
      'list_revisions.declarations',
      'list_revisions.marking',
      'list_revisions.content_sha256',
      'list_revisions.file_sha256',
      'list_revisions.reason',
      'list_revisions.created_by',
      'list_revisions.created_at',
      'users.name as author',
    ])
    .where('submission_revisions.submission_id', '=', submissionId)
    .orderBy('lists.code')
    .execute();
}

const baselines = (db: Db) =>
  db
    .selectFrom('baselines')
    .innerJoin('builds', 'builds.id', 'baselines.build_id')
    .innerJoin('users as signer', 'signer.id', 'baselines.signed_by')
    .leftJoin('supersessions', (join) =>
      join
        .onRef('supersessions.program_id', '=', 'baselines.program_id')
        .onRef('supersessions.number', '=', 'baselines.number'),
    )
    .leftJoin('withdrawals', (join) =>
      join
        .onRef('withdrawals.program_id', '=', 'baselines.program_id')
        .onRef('withdrawals.number', '=', 'baselines.number'),
    )
    .leftJoin('users as withdrawer', 'withdrawer.id', 'withdrawals.withdrawn_by')
    .select([
      'baselines.program_id',
      'baselines.number',
      'baselines.build_id',
      'baselines.submission_id',
      'baselines.title',
      'baselines.supersedes',
      'baselines.digest',
      'baselines.signed_at',
      'signer.name as signer',
      'builds.code as build_code',
      'builds.title as build_title',
      'supersessions.superseded_by',
      'withdrawals.reason as withdrawal_reason',
      'withdrawals.withdrawn_at',
      'withdrawer.name as withdrawer',
    ]);

type StateMarks = { readonly superseded_by: number | null; readonly withdrawn_at: Date | null };

export function stateOfBaseline(row: StateMarks): BaselineState {
  return baselineState({ superseded: row.superseded_by !== null, withdrawn: row.withdrawn_at !== null });
}

/** The signed baselines of a program, newest first, without their documents. */
export async function baselinesOfProgram(db: Db, programId: string) {
  const rows = await baselines(db)
    .where('baselines.program_id', '=', programId)
    .orderBy('baselines.number', 'desc')
    .execute();
  return rows.map((row) => ({ ...row, state: stateOfBaseline(row) }));
}

/** One signed baseline with its document, or undefined. */
export async function findBaseline(db: Db, programId: string, number: number) {
  const row = await baselines(db)
    .select('baselines.document')
    .where('baselines.program_id', '=', programId)
    .where('baselines.number', '=', number)
    .executeTakeFirst();
  return row && { ...row, state: stateOfBaseline(row) };
}

/**
 * The newest signed baseline of a build, whatever its state: when it was withdrawn there is no current one, and an older number never
 * takes its place.
 */
export async function newestBaseline(db: Db, buildId: string) {
  const row = await baselines(db)
    .select('baselines.document')
    .where('baselines.build_id', '=', buildId)
    .orderBy('baselines.number', 'desc')
    .limit(1)
    .executeTakeFirst();
  return row && { ...row, state: stateOfBaseline(row) };
}

/** Serialises what gives out numbers or decides in one program, for the length of the transaction. */
export async function lockBaselines(trx: Db, programId: string): Promise<void> {
  await sql`select pg_advisory_xact_lock(hashtextextended(${`baselines:${programId}`}, 0))`.execute(trx);
}
