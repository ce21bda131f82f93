import { type Kysely, sql } from 'kysely';

/**
 * A list that has just been read is asked for before the database has statistics of it, and one that it has never met counts as one row
 * where it knows the frequent ones: then any index looks as good as another, and a join may look through the whole list for each row of
 * it. Without statistics of the list's number every list is taken for a two-hundredth of the table.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    alter table row_versions alter column list_no set statistics 0;
    alter table row_ends alter column list_no set statistics 0;
  `.execute(db);
}
