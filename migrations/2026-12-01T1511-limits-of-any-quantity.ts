import { type Kysely, sql } from 'kysely';

/**
 * Limits of mass, CG and inertia, of the aircraft or a group, in one condition or in every one, from a day on and up to a day.
 * Those of before become limits of the whole aircraft in every condition, in force since the day they were set.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    alter table limits drop constraint limits_quantity_check;
    alter table limits drop constraint limits_program_id_quantity_key;
    alter table limits
      add column sense text,
      add column group_path text not null default '',
      add column condition_code text,
      add column frame_issue_id text references frame_issues,
      add column valid_from date,
      add column valid_until date;
    update limits set
      sense = case quantity when 'cg-forward-percent-mac' then 'at-least' else 'at-most' end,
      quantity = case quantity when 'mass-maximum' then 'mass' else 'percentMac' end,
      valid_from = (created_at at time zone 'utc')::date;
    alter table limits
      alter column sense set not null,
      alter column valid_from set not null,
      alter column group_path drop default,
      add check (sense in ('at-least', 'at-most')),
      add check (quantity in ('mass', 'percentMac', 'cgx', 'cgy', 'cgz', 'ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz')),
      add check ((quantity in ('cgx', 'cgy', 'cgz')) = (frame_issue_id is not null)),
      add check (valid_until is null or valid_until >= valid_from);
    create index on limits (program_id);
  `.execute(db);
}
