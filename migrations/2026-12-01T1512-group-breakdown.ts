import { type Kysely, sql } from 'kysely';

/** The breakdown of a program's groups as what was done to it, one after another. Insert-only: the tree of today follows from it. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table group_changes (
      program_id text not null references programs,
      number integer not null check (number >= 1),
      kind text not null check (kind in ('added', 'moved', 'recoded', 'removed')),
      path text not null check (path <> ''),
      to_path text check (to_path <> ''),
      code text,
      changed_by text not null references users,
      changed_at timestamptz not null default date_trunc('milliseconds', now()),
      primary key (program_id, number),
      check ((kind = 'moved') = (to_path is not null)),
      check (kind in ('added', 'recoded') or code is null)
    );
    create trigger group_changes_insert_only before update or delete on group_changes
      for each row execute function refuse_change();
    create trigger group_changes_no_truncate before truncate on group_changes
      for each statement execute function refuse_change();
  `.execute(db);
}
