import type pg from 'pg';
import { type Updateable } from 'kysely';
import { type Db } from '@/db/client';
import { claimImport, findImport, type Import } from '@/db/queries/lists';
import { type ImportsTable } from '@/db/schema/lists';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type Problem } from '@/lib/ingest/problem';
import { recordEvent } from '@/lib/server/audit/record-event';
import { log } from '@/lib/server/log';
import { ImportCancelled, progressTeller } from './import-progress';
import { publishRevision } from './publish-revision';
import { readImport } from './read-import';
import { type RevisionWriter } from './revision-writer';
import { revisionOfSameFile } from './same-file';

export interface ImportServices {
  readonly pool: pg.Pool;
  readonly db: Db;
  readonly openObject: (sha256: string) => Promise<AsyncIterable<Uint8Array>>;
}

/** The file holds problems: nothing of it is stored, the list keeps the revision it had. */
class WrongFile extends Error {
  constructor(
    readonly problems: readonly Problem[],
    readonly counts: Readonly<Record<string, number>>,
  ) {
    super('the file holds problems');
  }
}

class AlreadyHandled extends Error {}

/** The file is the revision in force. */
class SameFile extends Error {
  constructor(readonly revisionId: string) {
    super('the file is the revision in force');
  }
}

/**
 * Reads the stored file of an import and makes it the list's next revision, whole or not at all. Safe to run again after a crash
 * at any moment: an import that has ended is left alone, and two runs of one import cannot both commit. One that is called off
 * stores nothing; one whose file is the revision in force makes no other.
 */
export async function importFile(services: ImportServices, importId: string): Promise<void> {
  const { db, pool } = services;
  const found = await findImport(db, importId);
  if (found === undefined) throw new Error(`there is no import ${importId}`);
  if (!(await begin(db, importId))) return;
  const list = await db
    .selectFrom('lists')
    .selectAll()
    .where('id', '=', found.list_id)
    .executeTakeFirstOrThrow();
  const author = { userId: found.created_by, address: 'job' };
  try {
    await publishRevision(
      pool,
      {
        list: { id: list.id, programId: list.program_id, code: list.code, frameIssueId: list.frame_issue_id },
        declarations: list.declarations,
        origin: 'file',
        reason: found.reason,
        file: { sha256: found.file_sha256, name: found.file_name },
        author,
        prepare: async (trx) => {
          await claimImport(trx, importId);
          if (!(await isOpen(trx, importId))) throw new AlreadyHandled();
          const same = await revisionOfSameFile(trx, list, found);
          if (same !== null) throw new SameFile(same);
        },
      },
      async (writer) => {
        await readInto(services, found, list.declarations, writer);
        return writer.rows;
      },
      (trx, made, rows) =>
        endImport(trx, importId, { state: 'done', revision_id: made.id, rows_done: rows, of_rows: rows }),
    );
  } catch (error) {
    if (error instanceof AlreadyHandled || error instanceof ImportCancelled) return;
    if (error instanceof SameFile) await keepAsItIs(db, importId, error.revisionId);
    else if (error instanceof WrongFile) await failImport(db, found, error);
    else throw error;
  }
}

/** False when it has ended already. */
async function begin(db: Db, importId: string): Promise<boolean> {
  const begun = await db
    .updateTable('imports')
    .set({ state: 'running', rows_done: 0, started_at: new Date(), touched_at: new Date() })
    .where('id', '=', importId)
    .where('state', 'in', ['waiting', 'running'])
    .executeTakeFirst();
  return begun.numUpdatedRows === 1n;
}

/** @throws AlreadyHandled when it has ended otherwise meanwhile. */
async function endImport(db: Db, importId: string, end: Updateable<ImportsTable>): Promise<void> {
  const ended = await db
    .updateTable('imports')
    .set({ ...end, finished_at: new Date(), touched_at: new Date() })
    .where('id', '=', importId)
    .where('state', 'in', ['waiting', 'running'])
    .executeTakeFirst();
  if (ended.numUpdatedRows !== 1n) throw new AlreadyHandled();
}

async function keepAsItIs(db: Db, importId: string, revisionId: string): Promise<void> {
  const { rows } = await db
    .selectFrom('list_revisions')
    .select('rows')
    .where('id', '=', revisionId)
    .executeTakeFirstOrThrow();
  await unlessHandled(
    endImport(db, importId, {
      state: 'done',
      revision_id: revisionId,
      unchanged: true,
      rows_done: rows,
      of_rows: rows,
    }),
  );
}

async function unlessHandled(ending: Promise<void>): Promise<void> {
  try {
    await ending;
  } catch (error) {
    if (!(error instanceof AlreadyHandled)) throw error;
  }
}

async function isOpen(trx: Db, importId: string): Promise<boolean> {
  const row = await trx
    .selectFrom('imports')
    .select('state')
    .where('id', '=', importId)
    .executeTakeFirstOrThrow();
  return row.state === 'waiting' || row.state === 'running';
}

async function readInto(
  services: ImportServices,
  found: Pick<Import, 'id' | 'file_sha256'>,
  declarations: ListDeclarations,
  writer: RevisionWriter,
): Promise<void> {
  const tell = progressTeller(services.db, found.id);
  const reading = await readImport(services, found, declarations, {
    onComponent: (component) => writer.add(component),
    onBlock: (block) => writer.addBlock(block),
    onProgress: ({ rows }) => tell(rows),
  });
  if (reading.problems.length > 0) throw new WrongFile(reading.problems, reading.problemCounts);
}

async function failImport(
  db: Db,
  found: Pick<Import, 'id' | 'created_by' | 'file_name'> & { program_id: string; list_code: string },
  wrong: WrongFile,
): Promise<void> {
  const count = Object.values(wrong.counts).reduce((sum, one) => sum + one, 0);
  const refused = db.transaction().execute(async (trx) => {
    await endImport(trx, found.id, {
      state: 'failed',
      problems: JSON.stringify(wrong.problems),
      problem_counts: JSON.stringify(wrong.counts),
    });
    await recordEvent(trx, {
      scope: found.program_id,
      actor: { userId: found.created_by, address: 'job' },
      kind: 'import.failed',
      subject: found.list_code,
      detail: { list: found.list_code, file: found.file_name, problems: count },
    });
  });
  await unlessHandled(refused);
  log.info({ import: found.id, problems: count }, 'import refused');
}
