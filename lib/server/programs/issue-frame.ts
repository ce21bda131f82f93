import { sql, type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { currentFrameIssue, type FrameIssue, geometryOf } from '@/db/queries/frames';
import { type Database } from '@/db/schema/database';
import { AppError, fieldError } from '@/lib/errors';
import { changeFromFormer, changedPlace } from '@/lib/frames/issue-change';
import { NO_POSE, type Pose } from '@/lib/frames/pose';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { formerInWords, stateStep } from './frame-step';

export interface IssueFrame {
  readonly person: Person;
  readonly programId: string;
  /** The newest issue that the person saw; 0 before the first. */
  readonly base: number;
  readonly title: string;
  readonly geometry: AirframeGeometry;
  /** ISO date. */
  readonly validFrom: string;
  readonly reason: string;
  /** How the frame of the issue before lies in this one: r = o + R P r_former; null for the first issue, and only for it. */
  readonly former: Pose | null;
  /** Takes the reference points of the issue before it over: the same points of the aircraft, their places converted. */
  readonly carryPoints: boolean;
}

/**
 * Makes the next frame issue of a program; earlier ones stay as they are, with what refers to them. Returns its number.
 * @throws AppError conflict when another issue was made since `base`, invalid-input for a date before that of the issue before and where
 * a later issue does not say how that one lies in it.
 */
export async function issueFrame(db: Db, input: IssueFrame): Promise<number> {
  const { person, programId, title, geometry, validFrom, reason } = input;
  return db.transaction().execute(async (trx) => {
    await sql`select pg_advisory_xact_lock(hashtextextended(${`frame:${programId}`}, 0))`.execute(trx);
    const before = await currentFrameIssue(trx, programId);
    if ((before?.number ?? 0) !== input.base)
      throw new AppError(
        'conflict',
        `Frame issue ${before?.number ?? 0} was made meanwhile. Nothing was saved: look at it first.`,
      );
    if (before && validFrom < before.valid_from)
      throw fieldError(
        'valid_from',
        `Issue ${before.number} is valid from ${before.valid_from}: not earlier.`,
      );
    if (before && input.former === null)
      throw fieldError('former_x', `Say how the frame of issue ${before.number} lies in the new one.`);
    const number = input.base + 1;
    const id = newId();
    await trx
      .insertInto('frame_issues')
      .values({
        id,
        program_id: programId,
        number,
        title,
        axis_x: geometry.axes[0],
        axis_y: geometry.axes[1],
        axis_z: geometry.axes[2],
        lemac: [...geometry.lemac],
        mac: geometry.mac,
        span: geometry.span,
        length: geometry.length,
        lateral_plane: geometry.lateralPlane,
        incidence: geometry.incidence,
        reference: [...geometry.reference],
        valid_from: validFrom,
        reason,
        created_by: person.userId,
      })
      .execute();
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'frame.issued',
      subject: `frame issue ${number}`,
      detail: { number, title, reason, ...(before ? { former: formerInWords(input.former) } : {}) },
    });
    if (before === undefined || input.former === null) return number;
    await stateStep(trx, { issueId: id, former: input.former, person });
    if (input.carryPoints) await carryPoints(trx, input, before, { id, number });
    return number;
  });
}

async function carryPoints(
  trx: Transaction<Database>,
  { person, programId, geometry, former }: IssueFrame,
  from: FrameIssue,
  issue: { readonly id: string; readonly number: number },
): Promise<void> {
  const points = await trx
    .selectFrom('reference_points')
    .select(['code', 'title', 'place'])
    .where('frame_issue_id', '=', from.id)
    .orderBy('code')
    .execute();
  const change = changeFromFormer(geometryOf(from).axes, former ?? NO_POSE, geometry.axes);
  for (const { place, ...point } of points) {
    const [x = NaN, y = NaN, z = NaN] = place;
    await trx
      .insertInto('reference_points')
      .values({
        ...point,
        place: [...changedPlace(change, [x, y, z])],
        frame_issue_id: issue.id,
        created_by: person.userId,
      })
      .execute();
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'reference-point.added',
      subject: point.code,
      detail: { code: point.code, frameIssue: issue.number },
    });
  }
}
