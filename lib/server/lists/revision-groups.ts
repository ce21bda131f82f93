import { type Db } from '@/db/client';
import { groupBreakdownOf } from '@/db/queries/settings';
import { groupReading, type GroupReading } from '@/lib/groups/breakdown';

/** How the group paths that a revision's rows state are read today. No row is read. */
export async function revisionGroups(db: Db, revisionId: string): Promise<GroupReading> {
  const [{ program_id: programId }, stated] = await Promise.all([
    db
      .selectFrom('list_revisions')
      .innerJoin('lists', 'lists.id', 'list_revisions.list_id')
      .select('lists.program_id')
      .where('list_revisions.id', '=', revisionId)
      .executeTakeFirstOrThrow(),
    db
      .selectFrom('revision_subtotals')
      .select('group_path')
      .distinct()
      .where('revision_id', '=', revisionId)
      .execute(),
  ]);
  return groupReading(
    await groupBreakdownOf(db, programId),
    stated.map(({ group_path: path }) => path),
  );
}
