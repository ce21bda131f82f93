import { type Transaction, sql } from 'kysely';
import { type Db } from '@/db/client';
import { findSubmission, lockBaselines, newestBaseline, revisionsOfSubmission } from '@/db/queries/baselines';
import { type ProgramFrames, programFrames } from '@/db/queries/program-frames';
import { type Database } from '@/db/schema/database';
import { CAUTION } from '@/lib/baselines/caution';
import { handoffDocument } from '@/lib/baselines/handoff-document';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { canonicalText, digestOf } from './digest';
import { mailPeople } from './mail-people';
import { refusalOf } from './refusals';

export interface DecideSubmission {
  readonly person: Person;
  readonly program: { readonly id: string; readonly code: string; readonly title: string };
  readonly submissionId: string;
}

export interface SignSubmission extends DecideSubmission {
  /** What the signer was shown that the signature does; absent where nobody was shown anything. */
  readonly seen?: { readonly number: number; readonly supersedes: number | null };
}

type SubmissionFound = NonNullable<Awaited<ReturnType<typeof findSubmission>>>;

/**
 * Signs a submission: decision, number, document, digest, supersession, trail and mails in one transaction. The caller has just
 * checked the signer's password.
 * @throws AppError conflict when it is decided already or would do other than was seen, forbidden for one's own submission or revisions.
 */
export async function signSubmission(
  db: Db,
  input: SignSubmission,
): Promise<{ number: number; digest: string }> {
  try {
    return await db.transaction().execute((trx) => sign(trx, input));
  } catch (error) {
    throw refusalOf(error);
  }
}

async function sign(
  trx: Transaction<Database>,
  input: SignSubmission,
): Promise<{ number: number; digest: string }> {
  const { person, program, submissionId, seen } = input;
  await lockBaselines(trx, program.id);
  const submission = await findSubmission(trx, program.id, submissionId);
  if (submission === undefined) throw new AppError('not-found', 'There is no such submission.');
  if (submission.decision !== null)
    throw new AppError(
      'conflict',
      `This submission was ${submission.decision === 'approved' ? 'signed' : 'returned'} by ${submission.decider ?? 'someone'} already.`,
    );
  const number = (await lastNumber(trx, program.id)) + 1;
  const former = await newestBaseline(trx, submission.build_id);
  const supersedes = former && former.state === 'current' ? former.number : null;
  if (seen && (seen.number !== number || seen.supersedes !== supersedes))
    throw new AppError(
      'conflict',
      `Baselines were signed or withdrawn since this page was loaded: this would be baseline ${number} now and supersede ` +
        `${supersedes === null ? 'none' : `baseline ${supersedes}`}. Nothing was signed. Load the page again and look at what changes.`,
    );
  const clock = await sql<{ at: Date }>`select date_trunc('milliseconds', now()) as at`.execute(trx);
  const at = clock.rows[0]?.at;
  if (at === undefined) throw new Error('the database told no time');
  await trx
    .insertInto('decisions')
    .values({ submission_id: submissionId, decision: 'approved', decided_by: person.userId, decided_at: at })
    .execute();
  const text = canonicalText(
    await documentOf(trx, program.code, submission, { person, number, supersedes, at }),
  );
  const digest = digestOf(text);
  await trx
    .insertInto('baselines')
    .values({
      program_id: program.id,
      number,
      build_id: submission.build_id,
      submission_id: submissionId,
      title: submission.title,
      supersedes,
      document: text,
      digest,
      signed_by: person.userId,
      signed_at: at,
    })
    .execute();
  await recordEvent(trx, {
    scope: program.id,
    actor: person,
    kind: 'baseline.signed',
    subject: `baseline ${number}`,
    detail: { submission: submissionId, title: submission.title, number, digest },
  });
  if (supersedes !== null) {
    await trx
      .insertInto('supersessions')
      .values({ program_id: program.id, number: supersedes, superseded_by: number, at })
      .execute();
    await recordEvent(trx, {
      scope: program.id,
      actor: person,
      kind: 'baseline.superseded',
      subject: `baseline ${supersedes}`,
      detail: { number: supersedes, by: number },
    });
  }
  await tell(trx, input, submission, { number, supersedes, digest });
  return { number, digest };
}

async function lastNumber(trx: Transaction<Database>, programId: string): Promise<number> {
  const { last } = await trx
    .selectFrom('baselines')
    .select((eb) => eb.fn.max('number').as('last'))
    .where('program_id', '=', programId)
    .executeTakeFirstOrThrow();
  return last ?? 0;
}

async function documentOf(
  trx: Transaction<Database>,
  programCode: string,
  submission: SubmissionFound,
  made: { person: Person; number: number; supersedes: number | null; at: Date },
) {
  const frames = await programFrames(trx, submission.program_id);
  const issue = frames.issue(submission.frame_issue_id);
  const points = await trx
    .selectFrom('reference_points')
    .select(['code', 'place'])
    .where('frame_issue_id', '=', submission.frame_issue_id)
    .orderBy('code')
    .execute();
  const revisions = await revisionsOfSubmission(trx, submission.id);
  const signer = await trx
    .selectFrom('users')
    .select('name')
    .where('id', '=', made.person.userId)
    .executeTakeFirstOrThrow();
  return handoffDocument({
    program: programCode,
    baseline: made.number,
    build: submission.build_code,
    title: submission.title,
    supersedes: made.supersedes,
    marking: submission.marking,
    submitted: { at: submission.submitted_at.toISOString(), by: submission.submitter },
    approved: { at: made.at.toISOString(), by: signer.name },
    frameIssue: `${issue.number}: ${issue.title}`,
    referencePoints: points.map(({ code, place: [x = NaN, y = NaN, z = NaN] }) => ({
      code,
      place: [x, y, z],
    })),
    result: submission.result,
    findings: submission.findings,
    answers: submission.answers,
    sources: revisions.map((revision) => ({
      list: revision.list_code,
      revision: revision.number,
      contentSha256: revision.content_sha256,
      fileSha256: revision.file_sha256,
      rows: revision.rows,
      converted: convertedFrom(frames, revision.frame_issue_id, submission.frame_issue_id),
    })),
  });
}

function convertedFrom(frames: ProgramFrames, statedIn: string, issueId: string) {
  if (statedIn === issueId) return null;
  const { number, title } = frames.issue(statedIn);
  return { frameIssue: `${number}: ${title}`, change: frames.conversion(statedIn, issueId).change };
}

async function tell(
  trx: Transaction<Database>,
  { person, program }: SignSubmission,
  submission: SubmissionFound,
  { number, supersedes, digest }: { number: number; supersedes: number | null; digest: string },
): Promise<void> {
  const instead = supersedes === null ? '' : ` It supersedes baseline ${supersedes}.`;
  await mailPeople(trx, {
    programId: program.id,
    roles: ['simulation'],
    userIds: [submission.submitted_by],
    except: person.userId,
    isDecision: true,
    subject: `${program.title}: baseline ${number} is signed`,
    blocks: [
      { kind: 'heading', text: `Baseline ${number}, "${submission.title}", is signed` },
      { kind: 'paragraph', text: `Program ${program.title}, build ${submission.build_title}.${instead}` },
      { kind: 'paragraph', text: `Digest: ${digest}` },
      {
        kind: 'link',
        label: `Open baseline ${number}`,
        path: `/programs/${program.code}/baselines/${number}`,
      },
      { kind: 'paragraph', text: CAUTION },
    ],
  });
}
