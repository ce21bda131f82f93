import type pg from 'pg';
import { type Db } from '@/db/client';
import { findRevision, type List } from '@/db/queries/lists';
import { AppError } from '@/lib/errors';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type Person } from '@/lib/server/actor';
import { publishRevision } from './publish-revision';
import { componentOf } from './row-codec';
import { storedRows } from './stored-rows';

export interface RestoreRevision {
  readonly person: Person;
  readonly list: List;
  /** The revision to bring back. */
  readonly number: number;
  /** The newest revision that the person knows of. */
  readonly newest: number;
  readonly reason: string;
}

/**
 * Brings an old revision of a list back as its next one: its rows, declarations and frame issue as they were, under the list's present
 * marking; the rules on rows look at it anew. `pool` must not be the one that `db` draws on, as for `editRows`.
 * @throws AppError not-found, or conflict when it is the newest or the list has moved on.
 */
export async function restoreRevision(
  { pool, db }: { readonly pool: pg.Pool; readonly db: Db },
  { person, list, number, newest, reason }: RestoreRevision,
): Promise<number> {
  const old = await findRevision(db, list.id, number);
  if (old === undefined) throw new AppError('not-found', `The list ${list.code} has no revision ${number}.`);
  if (number === newest) throw new AppError('conflict', `Revision ${number} is in force already.`);
  const declarations: ListDeclarations = { ...old.declarations, marking: list.marking };
  const made = await publishRevision(
    pool,
    {
      list: { id: list.id, programId: list.program_id, code: list.code, frameIssueId: old.frame_issue_id },
      declarations,
      origin: 'restored',
      restoredFrom: number,
      reason,
      file: null,
      author: person,
      patience: 'a-moment',
      prepare: async (trx) => {
        const { last_revision } = await trx
          .selectFrom('lists')
          .select('last_revision')
          .where('id', '=', list.id)
          .executeTakeFirstOrThrow();
        if (last_revision === newest) return;
        throw new AppError(
          'conflict',
          `The list has a revision ${last_revision} now. Nothing was changed. Look at what it changed, then decide again.`,
        );
      },
    },
    async (writer) => {
      for await (const row of storedRows(db, old.id)) {
        const catchingUp = writer.add(componentOf(row));
        if (catchingUp !== undefined) await catchingUp;
      }
    },
    async () => undefined,
  );
  return made.number;
}
