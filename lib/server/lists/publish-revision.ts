import type pg from 'pg';
import { type Transaction, sql } from 'kysely';
import { onClient } from '@/db/client';
import { formerRevision } from '@/db/queries/former-revision';
import { findFrameIssue, geometryOf } from '@/db/queries/frames';
import { groupBreakdownOf } from '@/db/queries/settings';
import { type Database } from '@/db/schema/database';
import { type RevisionOrigin } from '@/db/schema/lists';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type Actor } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { CONTENT_FORMAT } from './content-hash';
import { holdList, type Patience } from './hold-list';
import { RevisionWriter } from './revision-writer';

export interface NewRevision {
  readonly list: {
    readonly id: string;
    readonly programId: string;
    readonly code: string;
    readonly frameIssueId: string;
  };
  readonly declarations: ListDeclarations;
  readonly origin: RevisionOrigin;
  /** Number of the revision that a restored one brings back. */
  readonly restoredFrom?: number;
  readonly reason: string;
  readonly file: { readonly sha256: string; readonly name: string } | null;
  readonly author: Actor & { readonly userId: string };
  /** How long to wait while another revision of the list is being written; a person is told soon. */
  readonly patience?: Patience;
  /** Called when the list is held, before anything of it is read; what it throws ends it all. */
  readonly prepare?: (trx: Transaction<Database>) => Promise<void>;
}

/**
 * Makes the next revision of a list in one transaction on a connection of its own: `write` fills it row by row, `settle` adds what
 * must stand or fall with it. When either throws, nothing of it remains. One revision of a list is written at a time, for it is held
 * against the one before.
 */
export async function publishRevision<T>(
  pool: pg.Pool,
  revision: NewRevision,
  write: (writer: RevisionWriter, trx: Transaction<Database>) => Promise<T>,
  settle: (trx: Transaction<Database>, made: { id: string; number: number }, written: T) => Promise<void>,
): Promise<{ id: string; number: number }> {
  const client = await pool.connect();
  let broken: Error | undefined;
  try {
    return await onClient(client)
      .transaction()
      .execute(async (trx) => {
        // A long list takes longer than a page may.
        await sql`set local statement_timeout = 0`.execute(trx);
        const id = newId();
        const { list, declarations, author } = revision;
        const issue = await findFrameIssue(trx, list.frameIssueId);
        const rows = await holdList(trx, list.id, revision.patience ?? 'as-long-as-it-takes');
        await revision.prepare?.(trx);
        const writer = await RevisionWriter.open(client, rows, {
          id,
          frame: { id: issue.id, geometry: geometryOf(issue) },
          declarations,
          former: await formerRevision(trx, list.id, issue.id),
          groups: await groupBreakdownOf(trx, list.programId),
        });
        let written: T;
        try {
          written = await write(writer, trx);
        } catch (error) {
          await writer.abort(error instanceof Error ? error : new Error(String(error)));
          throw error;
        }
        const content = await writer.finish(trx);
        const { last_revision: number } = await trx
          .updateTable('lists')
          .set((eb) => ({ last_revision: eb('last_revision', '+', 1) }))
          .where('id', '=', list.id)
          .returning('last_revision')
          .executeTakeFirstOrThrow();
        await trx
          .insertInto('list_revisions')
          .values({
            id,
            list_id: list.id,
            frame_issue_id: issue.id,
            number,
            declarations: JSON.stringify(declarations),
            marking: declarations.marking,
            origin: revision.origin,
            reason: revision.reason,
            file_sha256: revision.file?.sha256 ?? null,
            file_name: revision.file?.name ?? null,
            restored_from: revision.restoredFrom ?? null,
            content_sha256: content.contentSha256,
            content_format: CONTENT_FORMAT,
            last_row: content.lastRow,
            last_end: content.lastEnd,
            rows: content.rows,
            memo_rows: content.memoRows,
            pieces: content.pieces,
            findings: JSON.stringify(content.findings),
            created_by: author.userId,
          })
          .execute();
        await recordEvent(trx, {
          scope: list.programId,
          actor: author,
          kind: 'list.revised',
          subject: list.code,
          detail: {
            list: list.code,
            number,
            origin: revision.origin,
            reason: revision.reason,
            rows: content.rows,
            contentSha256: content.contentSha256,
          },
        });
        await settle(trx, { id, number }, written);
        return { id, number };
      });
  } catch (error) {
    broken = error instanceof Error ? error : new Error(String(error));
    throw error;
  } finally {
    // A connection in the middle of a failed COPY is not worth saving.
    client.release(broken);
  }
}
