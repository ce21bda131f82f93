import { type Kysely, sql } from 'kysely';

/**
 * How each frame issue lies against the one before it, and the issue that each revision of a list or of the rotating parts is stated
 * in. What exists keeps the meaning it had: a revision is stated in the issue of its list, rotating parts in the issue in force when
 * they were made.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table frame_steps (
      frame_issue_id text primary key references frame_issues,
      origin double precision[] not null check (cardinality(origin) = 3),
      turn double precision[] not null check (cardinality(turn) = 3),
      stated_by text not null references users,
      created_at timestamptz not null default now()
    );
    create trigger frame_steps_insert_only before update or delete on frame_steps
      for each row execute function refuse_change();
    create trigger frame_steps_no_truncate before truncate on frame_steps
      for each statement execute function refuse_change();

    alter table list_revisions add column frame_issue_id text references frame_issues;
    alter table list_revisions disable trigger list_revisions_insert_only;
    update list_revisions r set frame_issue_id = l.frame_issue_id from lists l where l.id = r.list_id;
    alter table list_revisions enable trigger list_revisions_insert_only;
    alter table list_revisions alter column frame_issue_id set not null;

    alter table rotor_revisions add column frame_issue_id text references frame_issues;
    alter table rotor_revisions disable trigger rotor_revisions_insert_only;
    update rotor_revisions r set frame_issue_id = (
      select f.id from frame_issues f where f.program_id = r.program_id
      order by f.created_at > r.created_at, case when f.created_at > r.created_at then f.number else -f.number end
      limit 1
    );
    alter table rotor_revisions enable trigger rotor_revisions_insert_only;
  `.execute(db);
}
