import type pg from 'pg';
import { type Db } from '@/db/client';
import { claimImport, findImport, type Import } from '@/db/queries/lists';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type Problem } from '@/lib/ingest/problem';
import { recordEvent } from '@/lib/server/audit/record-event';
import { log } from '@/lib/server/log';
import { publishRevision } from './publish-revision';
import { readImport } from './read-import';
import { type RevisionWriter } from './revision-writer';

/** Progress is told at most this often. */
const PROGRESS_EVERY_MS = 400;

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

/**
 * Reads the stored file of an import and makes it the list's next revision, whole or not at all. Safe to run again after a crash
 * at any moment: an import that is done or failed is left alone, and two runs of one import cannot both commit.
 */
export async function importFile(services: ImportServices, importId: string): Promise<void> {
  const { db, pool } = services;
  const found = await findImport(db, importId);
  if (found === undefined) throw new Error(`there is no import ${importId}`);
  if (found.state === 'done' || found.state === 'failed') return;
  const list = await db
    .selectFrom('lists')
    .selectAll()
    .where('id', '=', found.list_id)
    .executeTakeFirstOrThrow();
  await db
    .updateTable('imports')
    .set({ state: 'running', rows_done: 0, touched_at: new Date() })
    .where('id', '=', importId)
    .where('state', 'in', ['waiting', 'running'])
    .execute();
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
      },
      async (writer, trx) => {
        await claimImport(trx, importId);
        if (!(await isOpen(trx, importId))) throw new AlreadyHandled();
        await readInto(services, found, list.declarations, writer);
        return writer.rows;
      },
      async (trx, made, rows) => {
        await trx
          .updateTable('imports')
          .set({
            state: 'done',
            revision_id: made.id,
            rows_done: rows,
            of_rows: rows,
            finished_at: new Date(),
            touched_at: new Date(),
          })
          .where('id', '=', importId)
          .execute();
      },
    );
  } catch (error) {
    if (error instanceof AlreadyHandled) return;
    if (!(error instanceof WrongFile)) throw error;
    await failImport(db, found, error);
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

/** Tells the rows done on another connection than the import's own, a few times a second; a telling that fails is only logged. */
function progressTeller(db: Db, importId: string): (rows: number) => void {
  let next = 0;
  let telling = false;
  return (rows) => {
    if (telling || Date.now() < next) return;
    telling = true;
    next = Date.now() + PROGRESS_EVERY_MS;
    db.updateTable('imports')
      .set({ rows_done: rows, touched_at: new Date() })
      .where('id', '=', importId)
      .where('state', '=', 'running')
      .execute()
      .catch((error: unknown) => log.warn({ err: error }, 'could not tell the progress of an import'))
      .finally(() => {
        telling = false;
      });
  };
}

async function failImport(
  db: Db,
  found: Pick<Import, 'id' | 'created_by' | 'file_name'> & { program_id: string; list_code: string },
  wrong: WrongFile,
): Promise<void> {
  const count = Object.values(wrong.counts).reduce((sum, one) => sum + one, 0);
  await db.transaction().execute(async (trx) => {
    await trx
      .updateTable('imports')
      .set({
        state: 'failed',
        problems: JSON.stringify(wrong.problems),
        problem_counts: JSON.stringify(wrong.counts),
        finished_at: new Date(),
        touched_at: new Date(),
      })
      .where('id', '=', found.id)
      .execute();
    await recordEvent(trx, {
      scope: found.program_id,
      actor: { userId: found.created_by, address: 'job' },
      kind: 'import.failed',
      subject: found.list_code,
      detail: { list: found.list_code, file: found.file_name, problems: count },
    });
  });
  log.info({ import: found.id, problems: count }, 'import refused');
}
