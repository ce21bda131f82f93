import { type Db } from '@/db/client';
import { findSubmission, lockBaselines } from '@/db/queries/baselines';
import { AppError } from '@/lib/errors';
import { recordEvent } from '@/lib/server/audit/record-event';
import { mailPeople } from './mail-people';
import { refusalOf } from './refusals';
import { type DecideSubmission } from './sign-submission';

/**
 * Returns a submission to whoever submitted it, with the reasons.
 * @throws AppError conflict when it is decided already.
 */
export async function returnSubmission(
  db: Db,
  input: DecideSubmission & { readonly reason: string },
): Promise<void> {
  const { person, program, submissionId, reason } = input;
  try {
    await db.transaction().execute(async (trx) => {
      await lockBaselines(trx, program.id);
      const submission = await findSubmission(trx, program.id, submissionId);
      if (submission === undefined) throw new AppError('not-found', 'There is no such submission.');
      if (submission.decision !== null)
        throw new AppError(
          'conflict',
          `This submission was ${submission.decision === 'approved' ? 'signed' : 'returned'} by ${submission.decider ?? 'someone'} already.`,
        );
      await trx
        .insertInto('decisions')
        .values({ submission_id: submissionId, decision: 'returned', reason, decided_by: person.userId })
        .execute();
      await recordEvent(trx, {
        scope: program.id,
        actor: person,
        kind: 'baseline.returned',
        subject: submission.title,
        detail: { submission: submissionId, title: submission.title, reason },
      });
      await mailPeople(trx, {
        programId: program.id,
        roles: [],
        userIds: [submission.submitted_by],
        except: person.userId,
        isDecision: true,
        subject: `${program.title}: "${submission.title}" was returned`,
        blocks: [
          { kind: 'heading', text: `"${submission.title}" was returned` },
          { kind: 'paragraph', text: `Reasons: ${reason}` },
          {
            kind: 'link',
            label: 'Open the submission',
            path: `/programs/${program.code}/baselines/submissions/${submissionId}`,
          },
        ],
      });
    });
  } catch (error) {
    throw refusalOf(error);
  }
}
