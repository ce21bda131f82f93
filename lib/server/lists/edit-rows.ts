import type pg from 'pg';
import { type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { ownColumnsOf } from '@/db/queries/list-rows';
import { findRevision, type List, type ListRevision } from '@/db/queries/lists';
import { type Database } from '@/db/schema/database';
import { type EditProblem, type RowEdit, type SavedEdits } from '@/lib/contracts/list-edits';
import { AppError } from '@/lib/errors';
import { massListWriter, type MassListWriter } from '@/lib/export/mass-list';
import { LIST_COLUMNS } from '@/lib/ingest/mass-list/columns';
import { readMassList } from '@/lib/ingest/mass-list';
import { type Problem } from '@/lib/ingest/problem';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type Person } from '@/lib/server/actor';
import { checkEdits } from './check-edits';
import { type EditedRow, editedRows, editSet, type EditSet } from './edited-rows';
import { publishRevision } from './publish-revision';
import { type RevisionWriter } from './revision-writer';

export interface EditRows {
  readonly person: Person;
  readonly list: List;
  readonly baseRevision: number;
  readonly reason: string;
  readonly edits: readonly RowEdit[];
  /** What must stand or fall with the revision. */
  readonly settle?: (trx: Transaction<Database>) => Promise<void>;
}

class WrongEdits extends Error {
  constructor(
    readonly problems: readonly EditProblem[],
    readonly count: number,
  ) {
    super('the edits hold problems');
  }
}

/**
 * Makes the next revision of a list from a stated one and a set of edits. The whole list goes through the checks of an import;
 * rows that were not edited are stored as they were, to the last bit. The revision keeps what its base declares and its frame
 * issue, so that figures mean what they meant when they were edited; only the marking is the list's present one. `pool` must not be the one that `db`
 * draws on: a revision being written holds a connection of the first while it reads by the second.
 * @throws AppError conflict, naming who made it, when the list has a newer revision than the stated one.
 */
export async function editRows(services: { pool: pg.Pool; db: Db }, input: EditRows): Promise<SavedEdits> {
  const { pool, db } = services;
  const { list, person, reason } = input;
  const base = await findRevision(db, list.id, input.baseRevision);
  if (base === undefined)
    throw new AppError('not-found', `The list ${list.code} has no revision ${input.baseRevision}.`);
  const wrong = await checkEdits(db, base, input.edits);
  if (wrong.length > 0) return { status: 'problems', problems: wrong, count: wrong.length };
  const declarations: ListDeclarations = { ...base.declarations, marking: list.marking };
  try {
    const made = await publishRevision(
      pool,
      {
        list: { id: list.id, programId: list.program_id, code: list.code, frameIssueId: base.frame_issue_id },
        declarations,
        origin: 'edit',
        reason,
        file: null,
        author: person,
        patience: 'a-moment',
      },
      async (writer, trx) => {
        await holdNewest(trx, list, base);
        await writeEdited(db, base, declarations, editSet(input.edits), writer);
      },
      async (trx) => input.settle?.(trx),
    );
    return { status: 'saved', revision: made.number };
  } catch (error) {
    if (!(error instanceof WrongEdits)) throw error;
    return { status: 'problems', problems: [...error.problems], count: error.count };
  }
}

/** Holds the list, so that no revision comes between; refuses if one has come already. */
async function holdNewest(trx: Transaction<Database>, list: List, base: ListRevision): Promise<void> {
  const { last_revision: newest } = await trx
    .selectFrom('lists')
    .select('last_revision')
    .where('id', '=', list.id)
    .forUpdate()
    .executeTakeFirstOrThrow();
  if (newest === base.number) return;
  const { author } = await trx
    .selectFrom('list_revisions')
    .innerJoin('users', 'users.id', 'list_revisions.created_by')
    .select('users.name as author')
    .where('list_id', '=', list.id)
    .where('number', '=', newest)
    .executeTakeFirstOrThrow();
  throw new AppError(
    'conflict',
    `${author} made revision ${newest} after you began from revision ${base.number}. Nothing was saved, and your edits are still ` +
      `here. Look at what revision ${newest} changed, then make your edits from it.`,
  );
}

async function writeEdited(
  db: Db,
  base: ListRevision,
  declarations: ListDeclarations,
  edits: EditSet,
  writer: RevisionWriter,
): Promise<void> {
  const lines = massListWriter(declarations, ownColumns(await ownColumnsOf(db, base.id), edits));
  const rows = (): AsyncGenerator<EditedRow> => editedRows(db, base.id, edits, lines);
  // Rows on their way through the reader, in their order.
  const underway: EditedRow[] = [];
  const reading = await readMassList(asFile(lines.header, rows(), underway), declarations, {
    onComponent: (component) => {
      let row = underway.shift();
      while (row !== undefined && row.item !== component.item) row = underway.shift();
      if (row === undefined) throw new Error(`the row ${component.item} came from nowhere`);
      return writer.add(row.stored ?? component);
    },
  });
  if (reading.problems.length === 0) return;
  const count = Object.values(reading.problemCounts).reduce((sum, one) => sum + one, 0);
  throw new WrongEdits(await placed(reading.problems, lines, rows()), count);
}

function ownColumns(stored: readonly string[], edits: EditSet): string[] {
  const contract = new Set<string>(LIST_COLUMNS);
  const edited = [...edits.changed.values(), ...edits.added].flatMap((fields) => Object.keys(fields));
  return [...new Set([...stored, ...edited.filter((name) => !contract.has(name))])];
}

const BLOCK = 64 * 1024;

async function* asFile(
  header: string,
  rows: AsyncIterable<EditedRow>,
  underway: EditedRow[],
): AsyncGenerator<Uint8Array> {
  const encoder = new TextEncoder();
  let block = header;
  for await (const row of rows) {
    underway.push(row);
    block += row.text;
    if (block.length < BLOCK) continue;
    yield encoder.encode(block);
    block = '';
  }
  if (block !== '') yield encoder.encode(block);
}

/** Problems by the row they are in instead of by the line of a file that nobody sees. */
async function placed(
  problems: readonly Problem[],
  { header }: MassListWriter,
  rows: AsyncIterable<EditedRow>,
): Promise<EditProblem[]> {
  const wanted = new Set(problems.map(({ line }) => line));
  const items = new Map<number, string>();
  let line = 1 + lineBreaks(header);
  for await (const row of rows) {
    if (wanted.has(line)) items.set(line, row.item);
    line += lineBreaks(row.text);
  }
  return problems.map(({ kind, line: at, column, found, message }) => ({
    item: at === null ? null : (items.get(at) ?? null),
    column,
    found,
    message: kind === 'no-rows' ? 'No row would be left. A list needs at least one.' : message,
  }));
}

function lineBreaks(text: string): number {
  return text.match(/\r\n|\r|\n/g)?.length ?? 0;
}
