import { type Transaction, sql } from 'kysely';
import { type Db } from '@/db/client';
import { groupBreakdownOf } from '@/db/queries/settings';
import { type Database } from '@/db/schema/database';
import { AppError } from '@/lib/errors';
import { type Maturity } from '@/lib/mass/component';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';

interface AllowanceChange {
  readonly person: Person;
  readonly programId: string;
  /** A group path by the name it has today; '' for the program's own. */
  readonly group: string;
  readonly maturity: Maturity;
}

export interface SetAllowance extends AllowanceChange {
  /** A fraction of mass. */
  readonly fraction: number;
  readonly source: string;
}

/** Sets the mass growth allowance of a maturity, for the program or one group, for rows that state none of their own. */
export async function setAllowance(db: Db, input: SetAllowance): Promise<void> {
  const { person, programId, group, maturity, fraction, source } = input;
  await db.transaction().execute(async (trx) => {
    const before = await takeAway(trx, input);
    await trx
      .insertInto('growth_allowances')
      .values({ program_id: programId, group_path: group, maturity, fraction, source })
      .execute();
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'allowance.set',
      subject: nameOf(input),
      detail: { maturity, ...(group === '' ? {} : { group }), fraction, before },
    });
  });
}

/** Takes an allowance away: the next rule up the path counts again. @throws AppError not-found when there is none. */
export async function removeAllowance(db: Db, input: AllowanceChange): Promise<void> {
  const { person, programId, group, maturity } = input;
  await db.transaction().execute(async (trx) => {
    const before = await takeAway(trx, input);
    if (before === null) throw new AppError('not-found', 'This allowance is not set any more.');
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'allowance.removed',
      subject: nameOf(input),
      detail: { maturity, group, before },
    });
  });
}

const nameOf = ({ group, maturity }: AllowanceChange): string =>
  group === '' ? maturity : `${maturity}, ${group}`;

/** Deletes what is set for a group, under whatever name it was set; the fraction it had, or null. */
async function takeAway(trx: Transaction<Database>, input: AllowanceChange): Promise<number | null> {
  const { programId, group, maturity } = input;
  await sql`select pg_advisory_xact_lock(hashtextextended(${`allowances:${programId}`}, 0))`.execute(trx);
  const breakdown = await groupBreakdownOf(trx, programId);
  const rows = await trx
    .selectFrom('growth_allowances')
    .select(['group_path', 'fraction'])
    .where('program_id', '=', programId)
    .where('maturity', '=', maturity)
    .execute();
  const set = rows.filter(({ group_path: path }) => (path === '' ? '' : breakdown.present(path)) === group);
  for (const { group_path: path } of set)
    await trx
      .deleteFrom('growth_allowances')
      .where('program_id', '=', programId)
      .where('maturity', '=', maturity)
      .where('group_path', '=', path)
      .execute();
  return set[0]?.fraction ?? null;
}
