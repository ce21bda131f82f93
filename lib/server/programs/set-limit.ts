import { sql, type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { groupBreakdownOf, limitsOf, type StatedLimit } from '@/db/queries/settings';
import { type Database } from '@/db/schema/database';
import { AppError, fieldError } from '@/lib/errors';
import { type Limit } from '@/lib/loading/limits';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { currentFrameIssue } from '@/db/queries/frames';

export interface StateLimit {
  readonly person: Person;
  readonly programId: string;
  /** The limit that this one replaces; null states a further one. */
  readonly id: string | null;
  /** Of a place in airframe axes: it is in those of the frame issue in force. */
  readonly limit: Omit<Limit, 'frameIssue'>;
}

/**
 * States a limit of a program, or changes one.
 * @throws AppError invalid-input for limits that leave nothing between them, not-found for one that is gone.
 */
export async function stateLimit(db: Db, input: StateLimit): Promise<string> {
  const { person, programId, limit } = input;
  return db.transaction().execute(async (trx) => {
    const known = await lockLimits(trx, programId);
    const before = input.id === null ? null : oneOf(known, input.id);
    const breakdown = await groupBreakdownOf(trx, programId);
    assertRoomBetween(
      known
        .filter(({ id }) => id !== input.id)
        .map((one) => ({ ...one, group: breakdown.present(one.group) })),
      limit,
    );
    const isPlace = limit.quantity === 'cgx' || limit.quantity === 'cgy' || limit.quantity === 'cgz';
    const issue = isPlace ? await currentFrameIssue(trx, programId) : undefined;
    if (isPlace && issue === undefined)
      throw fieldError('quantity', 'State the airframe frame first: a place means nothing without its axes.');
    const content = {
      quantity: limit.quantity,
      sense: limit.sense,
      kind: limit.kind,
      value: limit.value,
      group_path: limit.group,
      condition_code: limit.condition,
      // A place whose value stays was stated in the issue of its day: 8.2 m from another datum would be another limit.
      ...(isPlace && before?.quantity === limit.quantity && before.value === limit.value
        ? {}
        : { frame_issue_id: issue?.id ?? null }),
      source: limit.source,
      source_date: limit.sourceDate,
      valid_from: limit.from,
      valid_until: limit.until,
      created_by: person.userId,
    };
    const id = input.id ?? newId();
    if (before === null)
      await trx
        .insertInto('limits')
        .values({ id, program_id: programId, ...content })
        .execute();
    else
      await trx
        .updateTable('limits')
        .set({ ...content, created_at: sql`now()` })
        .where('id', '=', id)
        .execute();
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'limit.set',
      subject: limit.quantity,
      detail: { ...limit, before: before?.value ?? null },
    });
    return id;
  });
}

/** Takes a limit away. @throws AppError not-found when there is none. */
export async function removeLimit(
  db: Db,
  { person, programId, id }: Pick<StateLimit, 'person' | 'programId'> & { readonly id: string },
): Promise<void> {
  await db.transaction().execute(async (trx) => {
    const { quantity, value, sense, group, condition } = oneOf(await lockLimits(trx, programId), id);
    await trx.deleteFrom('limits').where('program_id', '=', programId).where('id', '=', id).execute();
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'limit.removed',
      subject: quantity,
      detail: { quantity, before: value, sense, group, condition },
    });
  });
}

function oneOf(known: readonly StatedLimit[], id: string): StatedLimit {
  const found = known.find((limit) => limit.id === id);
  if (found === undefined) throw new AppError('not-found', 'This limit is not set any more.');
  return found;
}

/** Two of one kind about the same figure at the same time must leave something between them. */
function assertRoomBetween(known: readonly Limit[], limit: Omit<Limit, 'frameIssue'>): void {
  const opposite = known.find(
    (one) =>
      one.kind === limit.kind &&
      one.quantity === limit.quantity &&
      one.sense !== limit.sense &&
      one.group === limit.group &&
      (one.condition === null || limit.condition === null || one.condition === limit.condition) &&
      (one.until === null || limit.from <= one.until) &&
      (limit.until === null || one.from <= limit.until) &&
      (limit.sense === 'at-least' ? limit.value >= one.value : limit.value <= one.value),
  );
  if (opposite === undefined) return;
  const words = opposite.sense === 'at-most' ? 'below the most' : 'above the least';
  throw fieldError(
    'value',
    `It must lie ${words} that is allowed of the same by ${opposite.source}: nothing would be left between the two.`,
  );
}

async function lockLimits(trx: Transaction<Database>, programId: string): Promise<StatedLimit[]> {
  await sql`select pg_advisory_xact_lock(hashtextextended(${`limits:${programId}`}, 0))`.execute(trx);
  return limitsOf(trx, programId);
}
