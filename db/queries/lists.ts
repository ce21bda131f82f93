import { type Selectable, sql } from 'kysely';
import { type Db } from '@/db/client';
import { type ListsTable, type ListRevisionsTable, type ImportsTable } from '@/db/schema/lists';

export type List = Selectable<ListsTable>;
export type ListRevision = Selectable<ListRevisionsTable>;
export type Import = Selectable<ImportsTable>;

export function findList(db: Db, programId: string, code: string): Promise<List | undefined> {
  return db
    .selectFrom('lists')
    .selectAll()
    .where('program_id', '=', programId)
    .where('code', '=', code)
    .executeTakeFirst();
}

export function findRevision(db: Db, listId: string, number: number): Promise<ListRevision | undefined> {
  return db
    .selectFrom('list_revisions')
    .selectAll()
    .where('list_id', '=', listId)
    .where('number', '=', number)
    .executeTakeFirst();
}

/** The revisions of a list, newest first, with who made each. */
export function revisionsOfList(db: Db, listId: string) {
  return db
    .selectFrom('list_revisions')
    .innerJoin('users', 'users.id', 'list_revisions.created_by')
    .selectAll('list_revisions')
    .select('users.name as author')
    .where('list_id', '=', listId)
    .orderBy('number', 'desc')
    .execute();
}

/** The lists of a program in the order of their codes, each with its newest revision and its newest import. */
export async function listsOfProgram(db: Db, programId: string) {
  return db
    .selectFrom('lists')
    .leftJoin('list_revisions as revision', (join) =>
      join.onRef('revision.list_id', '=', 'lists.id').onRef('revision.number', '=', 'lists.last_revision'),
    )
    .leftJoin('users', 'users.id', 'revision.created_by')
    .leftJoinLateral(
      (eb) =>
        eb
          .selectFrom('imports')
          .select(['imports.id as id', 'imports.state as state'])
          .whereRef('imports.list_id', '=', 'lists.id')
          .orderBy('imports.created_at', 'desc')
          .limit(1)
          .as('import'),
      (join) => join.onTrue(),
    )
    .select([
      'lists.id',
      'lists.code',
      'lists.title',
      'lists.marking',
      'lists.declarations',
      'lists.last_revision as number',
      'revision.id as revision_id',
      'revision.rows',
      'revision.memo_rows',
      'revision.pieces',
      'revision.findings',
      'revision.reason',
      'revision.created_at as revised_at',
      'users.name as author',
      'import.id as import_id',
      'import.state as import_state',
    ])
    .where('lists.program_id', '=', programId)
    .orderBy('lists.code')
    .execute();
}

/** How many imports of this person are waiting or running. */
export async function openImportsOf(db: Db, userId: string): Promise<number> {
  const { count } = await db
    .selectFrom('imports')
    .select((eb) => eb.fn.countAll<number>().as('count'))
    .where('created_by', '=', userId)
    .where('state', 'in', ['waiting', 'running'])
    .executeTakeFirstOrThrow();
  return count;
}

/** An import with its list and program, or undefined. */
export function findImport(db: Db, id: string) {
  return db
    .selectFrom('imports')
    .innerJoin('lists', 'lists.id', 'imports.list_id')
    .innerJoin('programs', 'programs.id', 'lists.program_id')
    .leftJoin('list_revisions', 'list_revisions.id', 'imports.revision_id')
    .selectAll('imports')
    .select([
      'lists.code as list_code',
      'lists.title as list_title',
      'lists.program_id',
      'programs.code as program_code',
      'list_revisions.number as revision_number',
    ])
    .where('imports.id', '=', id)
    .executeTakeFirst();
}

/** The newest import of a list: its state and file; null before the first. */
export async function findNewestImport(
  db: Db,
  listId: string,
): Promise<Pick<Import, 'id' | 'state' | 'file_name'> | null> {
  const found = await db
    .selectFrom('imports')
    .select(['id', 'state', 'file_name'])
    .where('list_id', '=', listId)
    .orderBy('created_at', 'desc')
    .limit(1)
    .executeTakeFirst();
  return found ?? null;
}

/** The name of the person who made a revision. */
export async function findRevisionAuthor(db: Db, revisionId: string): Promise<string> {
  const { name } = await db
    .selectFrom('list_revisions')
    .innerJoin('users', 'users.id', 'list_revisions.created_by')
    .select('users.name')
    .where('list_revisions.id', '=', revisionId)
    .executeTakeFirstOrThrow();
  return name;
}

/**
 * Waits for the right to work on an import, for the length of the transaction. Whoever held it has finished, or is dead and its
 * transaction gone; giving up at once would take the last breath of a dead process for work under way.
 */
export async function claimImport(trx: Db, id: string): Promise<void> {
  await sql`select pg_advisory_xact_lock(hashtextextended(${`import:${id}`}, 0))`.execute(trx);
}
