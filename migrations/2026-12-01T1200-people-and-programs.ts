import { type Kysely, sql } from 'kysely';

/** People, sessions, programs with their frame, builds, limits and growth allowances, tokens, the audit trail. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table users (
      id text primary key,
      email text not null check (email = lower(email) and email like '%@%'),
      name text not null check (name <> ''),
      password_hash text,
      is_admin boolean not null default false,
      mail_wish text not null default 'all' check (mail_wish in ('all', 'decisions', 'none')),
      disabled_at timestamptz,
      created_at timestamptz not null default now(),
      unique (email)
    );

    create table sessions (
      id text primary key,
      user_id text not null references users on delete cascade,
      expires_at timestamptz not null,
      started_at timestamptz not null default now(),
      address text not null default ''
    );
    create index on sessions (user_id);

    create table mail_links (
      token_hash text primary key,
      user_id text not null references users on delete cascade,
      purpose text not null check (purpose in ('invitation', 'password-reset')),
      expires_at timestamptz not null,
      used_at timestamptz,
      created_at timestamptz not null default now()
    );
    create index on mail_links (user_id);

    create table rate_limits (
      bucket text primary key,
      window_started_at timestamptz not null,
      count integer not null check (count >= 0)
    );

    create table programs (
      id text primary key,
      code text not null unique check (code ~ '^[a-z0-9][a-z0-9-]{0,62}$'),
      title text not null check (title <> ''),
      created_by text not null references users,
      created_at timestamptz not null default now()
    );

    create table program_members (
      program_id text not null references programs,
      user_id text not null references users,
      role text not null check (role in ('chief', 'weights', 'simulation')),
      added_by text not null references users,
      added_at timestamptz not null default now(),
      primary key (program_id, user_id)
    );
    create index on program_members (user_id);

    create table frame_issues (
      id text primary key,
      program_id text not null references programs,
      number integer not null check (number >= 1),
      title text not null,
      axis_x text not null,
      axis_y text not null,
      axis_z text not null,
      lemac double precision[] not null check (cardinality(lemac) = 3),
      mac double precision not null check (mac > 0),
      span double precision not null check (span > 0),
      length double precision not null check (length > 0),
      lateral_plane double precision not null default 0,
      incidence double precision not null default 0 check (abs(incidence) < 0.7853981633974483),
      reference double precision[] not null check (cardinality(reference) = 3),
      valid_from date not null,
      reason text not null,
      created_by text not null references users,
      created_at timestamptz not null default now(),
      unique (program_id, number)
    );

    create table reference_points (
      frame_issue_id text not null references frame_issues,
      code text not null check (code ~ '^[A-Za-z0-9][A-Za-z0-9_-]{0,30}$'),
      title text not null,
      place double precision[] not null check (cardinality(place) = 3),
      created_by text not null references users,
      created_at timestamptz not null default now(),
      primary key (frame_issue_id, code)
    );

    create table builds (
      id text primary key,
      program_id text not null references programs,
      code text not null check (code ~ '^[a-z0-9][a-z0-9-]{0,62}$'),
      title text not null,
      kind text not null check (kind in ('design', 'as-built', 'as-weighed')),
      serial_from integer,
      serial_to integer,
      is_default boolean not null default false,
      created_by text not null references users,
      created_at timestamptz not null default now(),
      unique (program_id, code),
      check (serial_from is null or serial_from >= 1),
      check (serial_to is null or (serial_from is not null and serial_to >= serial_from))
    );
    create unique index builds_one_default on builds (program_id) where is_default;

    create table limits (
      id text primary key,
      program_id text not null references programs,
      quantity text not null check (quantity in ('cg-forward-percent-mac', 'cg-aft-percent-mac', 'mass-maximum')),
      kind text not null check (kind in ('contract', 'specification', 'target', 'allocation')),
      value double precision not null,
      source text not null check (source <> ''),
      source_date date not null,
      created_by text not null references users,
      created_at timestamptz not null default now(),
      unique (program_id, quantity)
    );

    create table growth_allowances (
      program_id text not null references programs,
      maturity text not null check (maturity in ('E', 'C', 'A')),
      fraction double precision not null check (fraction >= 0 and fraction <= 2),
      source text not null,
      primary key (program_id, maturity)
    );

    create table api_tokens (
      id text primary key,
      user_id text not null references users on delete cascade,
      name text not null check (name <> ''),
      token_hash text not null unique,
      hint text not null,
      scopes text[] not null check (cardinality(scopes) >= 1),
      program_ids text[],
      expires_at timestamptz not null,
      last_used_at timestamptz,
      revoked_at timestamptz,
      created_at timestamptz not null default now(),
      check (expires_at <= created_at + interval '366 days')
    );
    create index on api_tokens (user_id);

    create table idempotency_keys (
      user_id text not null references users on delete cascade,
      key text not null check (length(key) between 1 and 255),
      request_hash text not null,
      result jsonb not null,
      created_at timestamptz not null default now(),
      primary key (user_id, key)
    );

    create table audit_events (
      scope text not null,
      number bigint not null check (number >= 1),
      at timestamptz not null,
      user_id text references users,
      address text not null,
      kind text not null,
      subject text not null,
      detail jsonb not null,
      previous_hash text not null,
      hash text not null,
      primary key (scope, number)
    );
    create index on audit_events (scope, at desc);

    create table audit_heads (
      scope text primary key,
      number bigint not null,
      hash text not null
    );
  `.execute(db);
}
