import { type Kysely, sql } from 'kysely';

/** Imports that can be called off, that say how long they take, and that may find their file to be the revision in force. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    alter table imports
      add column started_at timestamptz,
      add column unchanged boolean not null default false,
      drop constraint imports_state_check,
      add constraint imports_state_check check (state in ('waiting', 'running', 'done', 'failed', 'cancelled'));

    alter table list_revisions
      add column restored_from integer,
      drop constraint list_revisions_origin_check,
      add constraint list_revisions_origin_check check (origin in ('file', 'edit', 'restored')),
      add check ((origin = 'restored') = (restored_from is not null));
  `.execute(db);
}
