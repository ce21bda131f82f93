import { type Db } from '@/db/client';
import { groupBreakdownOf } from '@/db/queries/settings';

/** How the group paths that a revision's rows state are read today. */
export interface RevisionGroups {
  /** The path that a stated one has today. */
  readonly present: (path: string) => string;
  /** The paths, as rows state them, that are today in a group or below it. */
  readonly statedIn: (group: string) => readonly string[];
}

/** Reads the breakdown of the revision's program, and the paths that its rows state. No row is read. */
export async function revisionGroups(db: Db, revisionId: string): Promise<RevisionGroups> {
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
  const breakdown = await groupBreakdownOf(db, programId);
  return {
    present: (path) => breakdown.present(path),
    statedIn: (group) =>
      stated.map(({ group_path: path }) => path).filter((path) => breakdown.isIn(path, group)),
  };
}
