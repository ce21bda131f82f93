import { type Kysely, sql } from 'kysely';

/** A growth allowance belongs to a maturity and a group path; '' is the program's own, which every one set before becomes. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    alter table growth_allowances add column group_path text not null default '';
    alter table growth_allowances alter column group_path drop default;
    alter table growth_allowances drop constraint growth_allowances_pkey;
    alter table growth_allowances add primary key (program_id, group_path, maturity);
  `.execute(db);
}
