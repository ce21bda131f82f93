import { sql, type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { type Database } from '@/db/schema/database';
import { type LimitKind, type LimitQuantity } from '@/db/schema/programs';
import { AppError, fieldError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';

interface LimitChange {
  readonly person: Person;
  readonly programId: string;
  readonly quantity: LimitQuantity;
}

export interface SetLimit extends LimitChange {
  readonly kind: LimitKind;
  /** Per cent of the mean chord, or kg. */
  readonly value: number;
  readonly source: string;
  /** ISO date. */
  readonly sourceDate: string;
}

/** Sets a limit of a program, or changes it. @throws AppError invalid-input for CG limits that leave nothing between them. */
export async function setLimit(db: Db, input: SetLimit): Promise<void> {
  const { person, programId, quantity, kind, value, source, sourceDate } = input;
  await db.transaction().execute(async (trx) => {
    const known = await lockLimits(trx, programId);
    const limits = new Map([...known, [quantity, value]]);
    const forward = limits.get('cg-forward-percent-mac');
    const aft = limits.get('cg-aft-percent-mac');
    if (forward !== undefined && aft !== undefined && forward >= aft)
      throw fieldError(
        'value',
        `The forward limit, ${forward} % MAC, must lie ahead of the aft limit, ${aft} % MAC.`,
      );
    const content = { kind, value, source, source_date: sourceDate, created_by: person.userId };
    await trx
      .insertInto('limits')
      .values({ id: newId(), program_id: programId, quantity, ...content })
      .onConflict((conflict) =>
        conflict.columns(['program_id', 'quantity']).doUpdateSet({ ...content, created_at: sql`now()` }),
      )
      .execute();
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'limit.set',
      subject: quantity,
      detail: { quantity, value, before: known.get(quantity) ?? null, source },
    });
  });
}

/** Takes a limit away. @throws AppError not-found when there is none. */
export async function removeLimit(db: Db, { person, programId, quantity }: LimitChange): Promise<void> {
  await db.transaction().execute(async (trx) => {
    const before = (await lockLimits(trx, programId)).get(quantity);
    if (before === undefined) throw new AppError('not-found', 'This limit is not set any more.');
    await trx
      .deleteFrom('limits')
      .where('program_id', '=', programId)
      .where('quantity', '=', quantity)
      .execute();
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'limit.removed',
      subject: quantity,
      detail: { quantity, before },
    });
  });
}

async function lockLimits(
  trx: Transaction<Database>,
  programId: string,
): Promise<ReadonlyMap<LimitQuantity, number>> {
  await sql`select pg_advisory_xact_lock(hashtextextended(${`limits:${programId}`}, 0))`.execute(trx);
  const rows = await trx
    .selectFrom('limits')
    .select(['quantity', 'value'])
    .where('program_id', '=', programId)
    .execute();
  return new Map(rows.map((row) => [row.quantity, row.value]));
}
