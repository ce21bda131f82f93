import { type Kysely, sql } from 'kysely';

/**
 * What is published takes in nothing more: subtotals come before their revision and in its transaction, and what a submission holds
 * comes with it.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function check_subtotals() returns trigger language plpgsql as $$
    begin
      if exists (select from added a join list_revisions v on v.id = a.revision_id) then
        raise exception 'a revision that exists takes no further subtotals'
          using errcode = 'check_violation', constraint = 'revision_subtotals_closed';
      end if;
      return null;
    end $$;
    create trigger check_subtotals after insert on revision_subtotals referencing new table as added
      for each statement execute function check_subtotals();

    create function check_submission_revision() returns trigger language plpgsql as $$
    begin
      if not exists (select from submissions where id = new.submission_id and xmin = pg_current_xact_id()::xid) then
        raise exception 'a submission takes no further revisions'
          using errcode = 'check_violation', constraint = 'submission_revisions_closed';
      end if;
      return new;
    end $$;
    create trigger check_submission_revision before insert on submission_revisions
      for each row execute function check_submission_revision();
  `.execute(db);
}
