import { type Kysely, sql } from 'kysely';

/**
 * Submissions, the one decision on each, and what is signed. Everything here is insert-only: no row may be changed or removed by
 * anyone, and what must never happen is refused by a trigger whatever the application believes.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table submissions (
      id text primary key,
      program_id text not null references programs,
      build_id text not null references builds,
      configuration_id text not null references configurations,
      configuration_version integer not null,
      frame_issue_id text not null references frame_issues,
      rotor_revision_id text references rotor_revisions,
      title text not null check (title <> ''),
      reason text not null check (reason <> ''),
      marking text,
      result jsonb not null,
      findings jsonb not null,
      answers jsonb not null,
      input_sha256 text not null,
      submitted_by text not null references users,
      submitted_at timestamptz not null default date_trunc('milliseconds', now())
    );
    create index on submissions (program_id, submitted_at desc);

    create table submission_revisions (
      submission_id text not null references submissions,
      list_id text not null references lists,
      revision_id text not null references list_revisions,
      primary key (submission_id, list_id)
    );

    create table decisions (
      submission_id text primary key references submissions,
      decision text not null check (decision in ('approved', 'returned')),
      reason text not null default '',
      decided_by text not null references users,
      decided_at timestamptz not null default date_trunc('milliseconds', now()),
      check (decision = 'approved' or reason <> '')
    );

    create table baselines (
      program_id text not null references programs,
      number integer not null check (number >= 1),
      build_id text not null references builds,
      submission_id text not null unique references submissions,
      title text not null,
      supersedes integer,
      document text not null,
      digest text not null check (digest ~ '^sha256:[0-9a-f]{64}$'),
      signed_by text not null references users,
      signed_at timestamptz not null,
      primary key (program_id, number),
      foreign key (program_id, supersedes) references baselines
    );
    create index on baselines (build_id, number desc);

    create table supersessions (
      program_id text not null,
      number integer not null,
      superseded_by integer not null,
      at timestamptz not null,
      primary key (program_id, number),
      foreign key (program_id, number) references baselines,
      foreign key (program_id, superseded_by) references baselines,
      check (superseded_by > number)
    );

    create table withdrawals (
      program_id text not null,
      number integer not null,
      reason text not null check (reason <> ''),
      withdrawn_by text not null references users,
      withdrawn_at timestamptz not null default date_trunc('milliseconds', now()),
      primary key (program_id, number),
      foreign key (program_id, number) references baselines
    );

    create function refuse_change() returns trigger language plpgsql as $$
    begin
      raise exception '% is insert-only: % refused', tg_table_name, tg_op using errcode = 'insufficient_privilege';
    end $$;

    create function check_decision() returns trigger language plpgsql as $$
    begin
      if exists (select from submissions where id = new.submission_id and submitted_by = new.decided_by)
        and new.decision = 'approved' then
        raise exception 'nobody signs what they submitted' using errcode = 'check_violation', constraint = 'decisions_not_own';
      end if;
      if new.decision = 'approved' and (
        exists (
          select from submission_revisions s join list_revisions r on r.id = s.revision_id
          where s.submission_id = new.submission_id and r.created_by = new.decided_by)
        or exists (
          select from submissions s join rotor_revisions r on r.id = s.rotor_revision_id
          where s.id = new.submission_id and r.created_by = new.decided_by)
      ) then
        raise exception 'nobody signs a revision they made' using errcode = 'check_violation', constraint = 'decisions_not_author';
      end if;
      if not exists (
        select from submissions s join program_members m on m.program_id = s.program_id
        where s.id = new.submission_id and m.user_id = new.decided_by and m.role = 'chief'
      ) then
        raise exception 'only a chief engineer of the program decides' using errcode = 'check_violation', constraint = 'decisions_chief';
      end if;
      return new;
    end $$;
    create trigger check_decision before insert on decisions for each row execute function check_decision();

    create function check_baseline() returns trigger language plpgsql as $$
    declare
      last integer;
    begin
      select max(number) into last from baselines where program_id = new.program_id;
      if new.number <> coalesce(last, 0) + 1 then
        raise exception 'baseline numbers have no gaps: % after %', new.number, coalesce(last, 0)
          using errcode = 'check_violation', constraint = 'baselines_no_gaps';
      end if;
      if not exists (
        select from decisions d join submissions s on s.id = d.submission_id
        where d.submission_id = new.submission_id and d.decision = 'approved' and d.decided_by = new.signed_by
          and s.program_id = new.program_id and s.build_id = new.build_id
      ) then
        raise exception 'a baseline needs the approval of its submission' using errcode = 'check_violation', constraint = 'baselines_approved';
      end if;
      return new;
    end $$;
    create function check_withdrawal() returns trigger language plpgsql as $$
    begin
      if not exists (
        select from program_members
        where program_id = new.program_id and user_id = new.withdrawn_by and role = 'chief'
      ) then
        raise exception 'only a chief engineer of the program withdraws' using errcode = 'check_violation', constraint = 'withdrawals_chief';
      end if;
      return new;
    end $$;
    create trigger check_withdrawal before insert on withdrawals for each row execute function check_withdrawal();

    create trigger check_baseline before insert on baselines for each row execute function check_baseline();
  `.execute(db);
  for (const table of INSERT_ONLY) {
    await sql`
      create trigger ${sql.id(`${table}_insert_only`)} before update or delete on ${sql.table(table)}
        for each row execute function refuse_change()
    `.execute(db);
    await sql`
      create trigger ${sql.id(`${table}_no_truncate`)} before truncate on ${sql.table(table)}
        for each statement execute function refuse_change()
    `.execute(db);
  }
}

const INSERT_ONLY = [
  'submissions',
  'submission_revisions',
  'decisions',
  'baselines',
  'supersessions',
  'withdrawals',
  'list_revisions',
  'mass_rows',
  'revision_subtotals',
  'rotor_revisions',
  'frame_issues',
  'audit_events',
];
