import { type Kysely, sql } from 'kysely';

/**
 * How files of other headings are read: mappings that a list remembers by its headings, the one that an import went by and what it
 * left out (all three insert-only), and files that are stored and wait for a mapping.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table list_mappings (
      id text primary key,
      list_id text not null references lists,
      headings_sha256 text not null check (headings_sha256 ~ '^[0-9a-f]{64}$'),
      mapping jsonb not null,
      created_by text not null references users,
      created_at timestamptz not null default now()
    );
    create index on list_mappings (list_id, headings_sha256, created_at desc);

    create table import_mappings (
      import_id text primary key references imports,
      mapping_id text not null references list_mappings,
      mapping jsonb not null,
      accept_totals boolean not null,
      created_at timestamptz not null default now()
    );

    create table import_readings (
      import_id text primary key references imports,
      left_out jsonb not null,
      totals jsonb not null,
      created_at timestamptz not null default now()
    );

    create table pending_uploads (
      id text primary key,
      list_id text not null references lists,
      file_sha256 text not null references stored_files,
      file_name text not null,
      bytes bigint not null,
      lines integer not null,
      reason text not null,
      created_by text not null references users,
      created_at timestamptz not null default now(),
      import_id text references imports,
      dropped_at timestamptz,
      check (import_id is null or dropped_at is null)
    );
    create index on pending_uploads (list_id, created_at desc) where import_id is null and dropped_at is null;
  `.execute(db);
}
