import { type Kysely, sql } from 'kysely';

/** Mass lists with their revisions, rows and subtotals; rotating parts; configurations, conditions and roll-ups. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table stored_files (
      sha256 text primary key check (sha256 ~ '^[0-9a-f]{64}$'),
      bytes bigint not null check (bytes >= 0),
      created_at timestamptz not null default now()
    );

    create table lists (
      id text primary key,
      program_id text not null references programs,
      code text not null check (code ~ '^[a-z0-9][a-z0-9-]{0,62}$'),
      title text not null check (title <> ''),
      frame_issue_id text not null references frame_issues,
      declarations jsonb not null,
      marking text,
      last_revision integer not null default 0,
      created_by text not null references users,
      created_at timestamptz not null default now(),
      unique (program_id, code)
    );

    create table list_revisions (
      id text primary key,
      list_id text not null references lists,
      number integer not null check (number >= 1),
      declarations jsonb not null,
      marking text,
      origin text not null check (origin in ('file', 'edit')),
      reason text not null,
      file_sha256 text references stored_files,
      file_name text,
      content_sha256 text not null check (content_sha256 ~ '^[0-9a-f]{64}$'),
      rows integer not null,
      memo_rows integer not null,
      pieces bigint not null,
      findings jsonb not null,
      created_by text not null references users,
      created_at timestamptz not null default now(),
      unique (list_id, number)
    );

    create table mass_rows (
      revision_id text not null references list_revisions deferrable initially deferred,
      position integer not null,
      line integer,
      item text not null,
      part_number text,
      part_revision text,
      description text,
      group_path text not null,
      category text not null,
      parent text,
      counting text not null,
      quantity integer not null,
      mass double precision not null,
      x double precision not null,
      y double precision not null,
      z double precision not null,
      ixx double precision not null,
      iyy double precision not null,
      izz double precision not null,
      ixy double precision not null,
      ixz double precision not null,
      iyz double precision not null,
      yaw double precision not null,
      pitch double precision not null,
      roll double precision not null,
      pair boolean not null,
      maturity text,
      growth double precision,
      sigma double precision[],
      source text,
      source_date text,
      note text,
      change_ref text,
      status text not null,
      extra jsonb,
      primary key (revision_id, position),
      unique (revision_id, item)
    );

    create table revision_subtotals (
      revision_id text not null references list_revisions deferrable initially deferred,
      frame_issue_id text not null references frame_issues,
      group_path text not null,
      category text not null,
      maturity text not null,
      status text not null,
      rows integer not null,
      pieces bigint not null,
      memo_rows integer not null,
      basic double precision[] not null check (cardinality(basic) = 20),
      stated_predicted double precision[] not null check (cardinality(stated_predicted) = 20),
      unstated_basic double precision[] not null check (cardinality(unstated_basic) = 20),
      basic_uncertainty double precision[] not null check (cardinality(basic_uncertainty) = 57),
      stated_predicted_uncertainty double precision[] not null check (cardinality(stated_predicted_uncertainty) = 57),
      unstated_basic_uncertainty double precision[] not null check (cardinality(unstated_basic_uncertainty) = 57),
      primary key (revision_id, frame_issue_id, group_path, category, maturity, status)
    );

    create table imports (
      id text primary key,
      list_id text not null references lists,
      file_sha256 text not null references stored_files,
      file_name text not null,
      reason text not null,
      state text not null default 'waiting' check (state in ('waiting', 'running', 'done', 'failed')),
      rows_done integer not null default 0,
      of_rows integer,
      revision_id text references list_revisions,
      problems jsonb,
      problem_counts jsonb,
      failure text,
      created_by text not null references users,
      created_at timestamptz not null default now(),
      touched_at timestamptz not null default now(),
      finished_at timestamptz,
      check ((state = 'done') = (revision_id is not null))
    );
    create index on imports (list_id, created_at desc);
    create index on imports (created_by) where state in ('waiting', 'running');

    create table rotor_revisions (
      id text primary key,
      program_id text not null references programs,
      number integer not null check (number >= 1),
      reason text not null,
      rotors jsonb not null,
      points jsonb not null,
      findings jsonb not null,
      file_sha256 text references stored_files,
      file_name text,
      created_by text not null references users,
      created_at timestamptz not null default now(),
      unique (program_id, number)
    );

    create table configurations (
      id text primary key,
      program_id text not null references programs,
      build_id text not null references builds,
      frame_issue_id text not null references frame_issues,
      code text not null check (code ~ '^[a-z0-9][a-z0-9-]{0,62}$'),
      title text not null check (title <> ''),
      rotor_revision_id text references rotor_revisions,
      version integer not null default 1,
      created_by text not null references users,
      created_at timestamptz not null default now(),
      unique (program_id, code)
    );

    create table configuration_lists (
      configuration_id text not null references configurations,
      list_id text not null references lists,
      revision_id text not null references list_revisions,
      primary key (configuration_id, list_id)
    );

    create table conditions (
      id text primary key,
      configuration_id text not null references configurations,
      code text not null check (code ~ '^[a-z0-9][a-z0-9-]{0,62}$'),
      title text not null check (title <> ''),
      position integer not null,
      categories text[] not null default '{empty}',
      unique (configuration_id, code)
    );

    create table condition_items (
      condition_id text not null references conditions on delete cascade,
      position integer not null,
      name text not null check (name <> ''),
      category text not null,
      mass double precision not null,
      place double precision[] not null check (cardinality(place) = 3),
      primary key (condition_id, position)
    );

    create table roll_ups (
      id text primary key,
      configuration_id text not null references configurations,
      configuration_version integer not null,
      input_sha256 text not null,
      result jsonb not null,
      findings jsonb not null,
      created_by text not null references users,
      created_at timestamptz not null default now()
    );
    create index on roll_ups (configuration_id, created_at desc);

    create table job_workers (
      worker_id text primary key,
      lease integer not null,
      started_at timestamptz not null default now()
    );
  `.execute(db);
}
