import { sql, type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { currentFrameIssue } from '@/db/queries/frames';
import { type Database } from '@/db/schema/database';
import { AppError, fieldError } from '@/lib/errors';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';

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
  /** Takes the reference points of the issue before it over, with the places they have: the datum has not moved. */
  readonly carryPoints: boolean;
}

/**
 * Makes the next frame issue of a program; earlier ones stay as they are, with what refers to them. Returns its number.
 * @throws AppError conflict when another issue was made since `base`, invalid-input for a date before that of the issue before.
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
      detail: { number, title, reason },
    });
    if (before && input.carryPoints) await carryPoints(trx, input, before.id, { id, number });
    return number;
  });
}

async function carryPoints(
  trx: Transaction<Database>,
  { person, programId }: IssueFrame,
  from: string,
  issue: { readonly id: string; readonly number: number },
): Promise<void> {
  const points = await trx
    .selectFrom('reference_points')
    .select(['code', 'title', 'place'])
    .where('frame_issue_id', '=', from)
    .orderBy('code')
    .execute();
  for (const point of points) {
    await trx
      .insertInto('reference_points')
      .values({ ...point, frame_issue_id: issue.id, created_by: person.userId })
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
