import { type Kysely, sql } from 'kysely';

/** How a person has made a list's table for themselves: a name and the query of the page's address. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table list_views (
      id text primary key,
      list_id text not null references lists,
      user_id text not null references users,
      name text not null check (name <> '' and length(name) <= 80),
      query text not null check (length(query) <= 4000),
      created_at timestamptz not null default now(),
      changed_at timestamptz not null default now(),
      unique (list_id, user_id, name)
    );
    create index on list_views (user_id);
  `.execute(db);
}
