import { type Db } from '@/db/client';
import { type Maturity } from '@/lib/mass/component';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';

export interface SetAllowance {
  readonly person: Person;
  readonly programId: string;
  readonly maturity: Maturity;
  /** A fraction of mass. */
  readonly fraction: number;
  readonly source: string;
}

/** Sets the mass growth allowance of a maturity, for rows that state none of their own. */
export async function setAllowance(db: Db, input: SetAllowance): Promise<void> {
  const { person, programId, maturity, fraction, source } = input;
  await db.transaction().execute(async (trx) => {
    const before = await trx
      .selectFrom('growth_allowances')
      .select('fraction')
      .where('program_id', '=', programId)
      .where('maturity', '=', maturity)
      .forUpdate()
      .executeTakeFirst();
    await trx
      .insertInto('growth_allowances')
      .values({ program_id: programId, maturity, fraction, source })
      .onConflict((conflict) =>
        conflict.columns(['program_id', 'maturity']).doUpdateSet({ fraction, source }),
      )
      .execute();
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'allowance.set',
      subject: maturity,
      detail: { maturity, fraction, before: before?.fraction ?? null },
    });
  });
}
