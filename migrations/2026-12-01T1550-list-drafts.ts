import { type Kysely, sql } from 'kysely';

/**
 * Edits of a list that are not a revision yet: at most one draft a person and list, kept row by row. The key of a row may be longer
 * than an index takes, so its digest stands for it.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table list_drafts (
      id text primary key,
      list_id text not null references lists,
      user_id text not null references users,
      base_revision integer not null,
      version integer not null check (version >= 1),
      created_at timestamptz not null default now(),
      changed_at timestamptz not null default now(),
      unique (list_id, user_id),
      foreign key (list_id, base_revision) references list_revisions (list_id, number)
    );
    create index on list_drafts (user_id);

    create table list_draft_edits (
      draft_id text not null references list_drafts on delete cascade,
      key_digest uuid not null generated always as (md5(key)::uuid) stored,
      key text not null check (key <> ''),
      edit jsonb not null check (edit ->> 'kind' in ('change', 'remove', 'add')),
      primary key (draft_id, key_digest)
    );
  `.execute(db);
}
