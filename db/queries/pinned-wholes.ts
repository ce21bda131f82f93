import { sql } from 'kysely';
import { type Db } from '@/db/client';
import { type Account } from '@/lib/mass/account';
import { type Category } from '@/lib/mass/component';

export interface PinnedWhole {
  readonly configuration: string;
  readonly configuration_title: string;
  readonly condition: string;
  readonly condition_title: string;
  readonly categories: readonly Category[];
  readonly account: Account;
}

/**
 * The conditions of the configurations in a frame issue that pin a list revision, each with its account without growth, by roll-ups
 * that are up to date: only those are sure to hold the revision.
 */
export async function wholesWithRevision(
  db: Db,
  revisionId: string,
  frameIssueId: string,
): Promise<PinnedWhole[]> {
  const { rows } = await sql<PinnedWhole>`
    select configurations.code as configuration, configurations.title as configuration_title,
      shown.value->>'code' as condition, shown.value->>'title' as condition_title,
      shown.value->'categories' as categories, shown.value->'rollUp'->'basicAccount' as account
    from configuration_lists
    join configurations on configurations.id = configuration_lists.configuration_id
    join lateral (
      select result from roll_ups
      where configuration_id = configurations.id and configuration_version = configurations.version
      order by created_at desc limit 1
    ) as latest on true
    cross join lateral jsonb_array_elements(latest.result->'conditions') with ordinality as shown (value, place)
    where configuration_lists.revision_id = ${revisionId} and configurations.frame_issue_id = ${frameIssueId}
    order by configurations.code, shown.place
  `.execute(db);
  return rows;
}
