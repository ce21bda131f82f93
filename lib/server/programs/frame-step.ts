import { type Transaction, sql } from 'kysely';
import { type Db } from '@/db/client';
import { programFrames } from '@/db/queries/program-frames';
import { type Database } from '@/db/schema/database';
import { AppError } from '@/lib/errors';
import { type Pose } from '@/lib/frames/pose';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { degreesAsTyped } from '@/lib/units/convert';

/** How a former frame lies, for the trail: m, and degrees. */
export function formerInWords(former: Pose | null): string {
  if (former === null) return 'not stated';
  const turn = [former.yaw, former.pitch, former.roll].map(degreesAsTyped);
  const at = `its datum at ${former.origin.join(', ')} m`;
  return turn.every((angle) => angle === 0) ? at : `${at}, turned by yaw, pitch, roll ${turn.join(', ')} deg`;
}

export async function stateStep(
  trx: Transaction<Database>,
  step: { readonly issueId: string; readonly former: Pose; readonly person: Person },
): Promise<void> {
  const { issueId, former, person } = step;
  await trx
    .insertInto('frame_steps')
    .values({
      frame_issue_id: issueId,
      origin: [...former.origin],
      turn: [former.yaw, former.pitch, former.roll],
      stated_by: person.userId,
    })
    .execute();
}

/**
 * Says how the frame of the issue before lies in an issue that was made without saying so. It is said once: what was converted by it
 * stays as it was.
 * @throws AppError not-found for an issue that is not there or is the first, conflict where it is stated already.
 */
export async function stateFormerFrame(
  db: Db,
  input: {
    readonly person: Person;
    readonly programId: string;
    readonly number: number;
    readonly former: Pose;
  },
): Promise<void> {
  const { person, programId, number, former } = input;
  await db.transaction().execute(async (trx) => {
    await sql`select pg_advisory_xact_lock(hashtextextended(${`frame:${programId}`}, 0))`.execute(trx);
    const { issues } = await programFrames(trx, programId);
    const issue = issues.find((one) => one.number === number);
    if (issue === undefined || issue === issues.at(-1))
      throw new AppError('not-found', 'There is no such frame issue with one before it.');
    if (issue.former !== null)
      throw new AppError('conflict', `Frame issue ${number} says how the one before lies in it already.`);
    await stateStep(trx, { issueId: issue.id, former, person });
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'frame.related',
      subject: `frame issue ${number}`,
      detail: { number, former: formerInWords(former) },
    });
  });
}
