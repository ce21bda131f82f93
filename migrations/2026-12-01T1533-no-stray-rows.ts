import { type Kysely, sql } from 'kysely';

/**
 * A transaction that writes rows or ends makes them a revision's by its end, or does not come to its end: stray ones would hold numbers
 * that the next revision needs. A statement notes that it wrote, for nothing is asked row by row; the note is settled and gone at the
 * commit.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table unsettled_rows (note bigint generated always as identity primary key);

    create function note_rows() returns trigger language plpgsql security definer set search_path = public, pg_temp as $$
    begin
      insert into unsettled_rows default values;
      return null;
    end $$;
    create trigger note_rows after insert on row_versions for each statement execute function note_rows();
    create trigger note_rows after insert on row_ends for each statement execute function note_rows();

    create function settle_rows() returns trigger language plpgsql security definer set search_path = public, pg_temp as $$
    begin
      if exists (
          select from lists l
          where coalesce((select max(row_no) from row_versions where list_no = l.list_no), 0)
              <> coalesce((select max(last_row) from list_revisions where list_id = l.id), 0)
            or coalesce((select max(end_no) from row_ends where list_no = l.list_no), 0)
              <> coalesce((select max(last_end) from list_revisions where list_id = l.id), 0)
        )
        or (select max(list_no) from row_versions) > (select max(list_no) from lists)
        or (select max(list_no) from row_ends) > (select max(list_no) from lists)
      then
        raise exception 'rows that belong to no revision are not kept'
          using errcode = 'check_violation', constraint = 'row_versions_not_stray';
      end if;
      delete from unsettled_rows where note = new.note;
      return null;
    end $$;
    create constraint trigger settle_rows after insert on unsettled_rows deferrable initially deferred
      for each row execute function settle_rows();
  `.execute(db);
}
