import { type Kysely, sql } from 'kysely';

/**
 * Rows once per list instead of once per revision. A list numbers its row versions and its ends without gaps, and a revision says
 * how many of each belong to it; the unique numbers leave no place for a further row or end in a revision that exists. The rows of the
 * revisions that exist are converted, and `mass_rows` becomes a view that tells them by revision as before.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    alter table mass_rows rename to old_mass_rows;
    alter table old_mass_rows rename constraint mass_rows_pkey to old_mass_rows_pkey;

    alter table lists add column list_no integer generated always as identity;
    alter table lists add unique (list_no);
    alter table lists add column fingerprint_key uuid not null default gen_random_uuid();

    create table row_versions (
      list_no integer not null,
      row_no integer not null check (row_no >= 1),
      sort_key bigint not null,
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
      growth double precision,
      fingerprint uuid,
      quantity integer not null,
      pair boolean not null,
      item text not null,
      part_number text,
      part_revision text,
      description text,
      group_path text not null,
      category text not null,
      parent text,
      counting text not null,
      maturity text,
      source text,
      source_date text,
      note text,
      change_ref text,
      status text not null,
      sigma double precision[],
      extra jsonb,
      primary key (list_no, row_no)
    );
    create index on row_versions (list_no, sort_key);
    create index on row_versions (list_no, item);

    create table row_ends (
      list_no integer not null,
      end_no integer not null check (end_no >= 1),
      row_no integer not null,
      primary key (list_no, end_no),
      unique (list_no, row_no) include (end_no)
    );

    alter table list_revisions
      add column last_row integer,
      add column last_end integer,
      add column content_format smallint not null default 1;
    alter table list_revisions alter column content_format drop default;
    alter table list_revisions disable trigger list_revisions_insert_only;
  `.execute(db);
  await convert(db);
  await sql`
    alter table list_revisions enable trigger list_revisions_insert_only;
    alter table list_revisions
      alter column last_row set not null,
      alter column last_end set not null,
      add check (rows = last_row - last_end);
    drop table old_mass_rows;

    create view mass_rows as
      select v.id as revision_id, r.sort_key as position, r.*
      from list_revisions v
      join lists l on l.id = v.list_id
      join row_versions r on r.list_no = l.list_no and r.row_no <= v.last_row
      where not exists (
        select from row_ends e where e.list_no = r.list_no and e.row_no = r.row_no and e.end_no <= v.last_end
      );
  `.execute(db);
  await guard(db);
}

/** What a row says. */
const VALUES = [
  'item',
  'part_number',
  'part_revision',
  'description',
  'group_path',
  'category',
  'parent',
  'counting',
  'quantity',
  'mass',
  'x',
  'y',
  'z',
  'ixx',
  'iyy',
  'izz',
  'ixy',
  'ixz',
  'iyz',
  'yaw',
  'pitch',
  'roll',
  'pair',
  'maturity',
  'growth',
  'sigma',
  'source',
  'source_date',
  'note',
  'change_ref',
  'status',
  'extra',
];

/**
 * Revision after revision of each list. A row is kept that has the item and the values of one in force and the same rank among such
 * rows; those are in order by themselves. Where a gap between kept rows is too small for what comes between, none is kept.
 */
async function convert(db: Kysely<unknown>): Promise<void> {
  const values = (of: string) => sql.raw(VALUES.map((name) => `${of}.${name}`).join(', '));
  await sql`
    create function convert_revision(the_list integer, revision text, before_row integer, before_end integer, keep boolean)
    returns boolean language plpgsql as $$
    begin
      drop table if exists step;
      create temp table step as
      with alive as (
        select r.* from row_versions r where r.list_no = the_list
          and not exists (select from row_ends e where e.list_no = r.list_no and e.row_no = r.row_no)
      ), same as (
        select n.position, a.row_no, a.sort_key,
          rank() over (order by n.position) as new_rank, rank() over (order by a.sort_key) as old_rank
        from old_mass_rows n join alive a on a.item = n.item
        where keep and n.revision_id = revision and (${values('n')}) is not distinct from (${values('a')})
      ), placed as (
        select n.position, s.row_no as kept, s.sort_key as kept_key,
          coalesce(max(s.sort_key) over (order by n.position), 0) as low,
          min(s.sort_key) over (order by n.position desc) as high
        from old_mass_rows n left join same s on s.position = n.position and s.new_rank = s.old_rank
        where n.revision_id = revision
      ), numbered as (
        select *, row_number() over (partition by low, kept is null order by position) as nth,
          count(*) over (partition by low, kept is null) as run
        from placed
      )
      select position, kept, high is not null and kept is null and high - low <= run as crowded,
        coalesce(kept_key, case when high is null then low + nth * 16777216 else low + (high - low) * nth / (run + 1) end)
          as sort_key
      from numbered;

      if exists (select from step where crowded) then
        return false;
      end if;
      insert into row_ends (list_no, end_no, row_no)
        select the_list, before_end + row_number() over (order by r.row_no), r.row_no
        from row_versions r
        where r.list_no = the_list
          and not exists (select from row_ends e where e.list_no = r.list_no and e.row_no = r.row_no)
          and not exists (select from step s where s.kept = r.row_no);
      insert into row_versions (list_no, row_no, sort_key, ${sql.raw(VALUES.join(', '))})
        select the_list, before_row + row_number() over (order by n.position), s.sort_key, ${values('n')}
        from step s join old_mass_rows n on n.revision_id = revision and n.position = s.position
        where s.kept is null;
      update list_revisions set
        last_row = before_row + (select count(*) from step where kept is null),
        last_end = (select coalesce(max(end_no), 0) from row_ends where list_no = the_list)
      where id = revision;
      return true;
    end $$;

    do $$
    declare
      v record;
      reached record;
    begin
      for v in select r.id, r.number, l.list_no from list_revisions r join lists l on l.id = r.list_id
        order by l.list_no, r.number
      loop
        select coalesce(max(r.last_row), 0) as last_row, coalesce(max(r.last_end), 0) as last_end into reached
          from list_revisions r join lists l on l.id = r.list_id where l.list_no = v.list_no and r.number < v.number;
        if not convert_revision(v.list_no, v.id, reached.last_row, reached.last_end, true) then
          perform convert_revision(v.list_no, v.id, reached.last_row, reached.last_end, false);
        end if;
      end loop;
      drop table if exists step;
    end $$;

    drop function convert_revision;
  `.execute(db);
}

/** Insert-only as before; and a revision is what its numbers say, or it is refused. */
async function guard(db: Kysely<unknown>): Promise<void> {
  for (const table of ['row_versions', 'row_ends']) {
    await sql`
      create trigger ${sql.id(`${table}_insert_only`)} before update or delete on ${sql.table(table)}
        for each row execute function refuse_change()
    `.execute(db);
    await sql`
      create trigger ${sql.id(`${table}_no_truncate`)} before truncate on ${sql.table(table)}
        for each statement execute function refuse_change()
    `.execute(db);
  }
  await sql`
    create function check_revision() returns trigger language plpgsql as $$
    declare
      the_list integer;
      before record;
    begin
      select list_no into the_list from lists where id = new.list_id;
      select coalesce(max(number), 0) as number, coalesce(max(last_row), 0) as last_row, coalesce(max(last_end), 0) as last_end
        into before from list_revisions where list_id = new.list_id;
      if new.number <> before.number + 1 then
        raise exception 'revision numbers have no gaps: % after %', new.number, before.number
          using errcode = 'check_violation', constraint = 'list_revisions_no_gaps';
      end if;
      if new.last_row < before.last_row or new.last_end < before.last_end
        or (select count(*) from row_versions where list_no = the_list and row_no > before.last_row)
          <> new.last_row - before.last_row
        or coalesce((select max(row_no) from row_versions where list_no = the_list), 0) <> new.last_row
        or (select count(*) from row_ends where list_no = the_list and end_no > before.last_end and row_no between 1 and before.last_row)
          <> new.last_end - before.last_end
        or coalesce((select max(end_no) from row_ends where list_no = the_list), 0) <> new.last_end
      then
        raise exception 'the rows of revision % are not as many as it says', new.number
          using errcode = 'check_violation', constraint = 'list_revisions_whole';
      end if;
      return new;
    end $$;
    create trigger check_revision before insert on list_revisions for each row execute function check_revision();
  `.execute(db);
}
