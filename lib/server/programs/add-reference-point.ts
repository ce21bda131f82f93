import { type Db } from '@/db/client';
import { currentFrameIssue } from '@/db/queries/frames';
import { AppError, fieldError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';

export interface AddReferencePoint {
  readonly person: Person;
  readonly programId: string;
  readonly code: string;
  readonly title: string;
  /** Airframe components, m. */
  readonly place: readonly [number, number, number];
}

/**
 * Names a point of the frame issue in force. What an issue holds is never altered: a point that moves is a new issue.
 * @throws AppError conflict before the first frame issue, invalid-input for a code that is taken.
 */
export async function addReferencePoint(db: Db, input: AddReferencePoint): Promise<void> {
  const { person, programId, code, title, place } = input;
  await db.transaction().execute(async (trx) => {
    const issue = await currentFrameIssue(trx, programId);
    if (issue === undefined)
      throw new AppError('conflict', 'Reference points lie in an airframe frame. Issue the frame first.');
    const made = await trx
      .insertInto('reference_points')
      .values({ frame_issue_id: issue.id, code, title, place: [...place], created_by: person.userId })
      .onConflict((conflict) => conflict.columns(['frame_issue_id', 'code']).doNothing())
      .executeTakeFirstOrThrow();
    if (made.numInsertedOrUpdatedRows !== 1n)
      throw fieldError('code', `Frame issue ${issue.number} has a point ${code} already.`);
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'reference-point.added',
      subject: code,
      detail: { code, frameIssue: issue.number },
    });
  });
}
