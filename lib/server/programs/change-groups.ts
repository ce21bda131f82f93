import { type Transaction, sql } from 'kysely';
import { type Db } from '@/db/client';
import { groupChangesOf } from '@/db/queries/settings';
import { type Database } from '@/db/schema/database';
import { AppError } from '@/lib/errors';
import { type GroupChange } from '@/lib/groups/breakdown';
import { groupProblem } from '@/lib/groups/problems';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';

export interface ChangeGroups {
  readonly person: Person;
  readonly programId: string;
  /** In order; all of them or none. */
  readonly changes: readonly GroupChange[];
}

/**
 * Adds to, renames, moves, recodes or removes from a program's breakdown of groups, and keeps every step. The rows of lists stay as
 * they are: what they say is read by the history from then on.
 * @throws AppError conflict for a change that the tree does not take, with the reason.
 */
export async function changeGroups(db: Db, input: ChangeGroups): Promise<void> {
  await db.transaction().execute((trx) => changeGroupsWithin(trx, input));
}

/** The same inside a transaction of the caller's. */
export async function changeGroupsWithin(
  trx: Transaction<Database>,
  { person, programId, changes }: ChangeGroups,
): Promise<void> {
  await sql`select pg_advisory_xact_lock(hashtextextended(${`groups:${programId}`}, 0))`.execute(trx);
  const done: (GroupChange & { readonly number: number })[] = await groupChangesOf(trx, programId);
  for (const change of changes) {
    const problem = groupProblem(done, change);
    if (problem !== null) throw new AppError('conflict', problem);
    const number = (done.at(-1)?.number ?? 0) + 1;
    await trx
      .insertInto('group_changes')
      .values({
        program_id: programId,
        number,
        kind: change.kind,
        path: change.path,
        to_path: change.to,
        code: change.code,
        changed_by: person.userId,
      })
      .execute();
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'groups.changed',
      subject: change.to ?? change.path,
      detail: { change: change.kind, path: change.path, to: change.to, code: change.code },
    });
    done.push({ ...change, number });
  }
}
