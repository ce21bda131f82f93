import { sql } from 'kysely';
import { type Db } from '@/db/client';
import { GroupBreakdown } from '@/lib/groups/breakdown';
import { inForce, type Limit, LIMIT_QUANTITIES, type LimitQuantity } from '@/lib/loading/limits';

/** A limit with its key and who stated it. */
export type StatedLimit = Limit & { readonly id: string; readonly author: string };

/** The frame issues of a program, newest first, with who made each. */
export function frameIssuesOf(db: Db, programId: string) {
  return db
    .selectFrom('frame_issues')
    .innerJoin('users', 'users.id', 'frame_issues.created_by')
    .selectAll('frame_issues')
    .select('users.name as author')
    .where('program_id', '=', programId)
    .orderBy('number', 'desc')
    .execute();
}

/** The named points of a frame issue in the order of their codes. */
export function referencePointsOf(db: Db, frameIssueId: string) {
  return db
    .selectFrom('reference_points')
    .selectAll()
    .where('frame_issue_id', '=', frameIssueId)
    .orderBy('code')
    .execute();
}

/** The builds of a program, the default one first. */
export function buildsOf(db: Db, programId: string) {
  return db
    .selectFrom('builds')
    .innerJoin('users', 'users.id', 'builds.created_by')
    .selectAll('builds')
    .select('users.name as author')
    .where('program_id', '=', programId)
    .orderBy('is_default', 'desc')
    .orderBy('builds.created_at')
    .execute();
}

/** Every limit of a program, in force or not: quantity by quantity, the whole aircraft first. */
export async function limitsOf(db: Db, programId: string): Promise<StatedLimit[]> {
  const rows = await db
    .selectFrom('limits')
    .innerJoin('users', 'users.id', 'limits.created_by')
    .leftJoin('frame_issues', 'frame_issues.id', 'limits.frame_issue_id')
    .selectAll('limits')
    .select(['users.name as author', 'frame_issues.number as frame_issue_number'])
    .where('limits.program_id', '=', programId)
    .orderBy('limits.group_path')
    .orderBy('limits.valid_from')
    .orderBy('limits.value')
    .execute();
  const rank = (quantity: LimitQuantity): number => LIMIT_QUANTITIES.indexOf(quantity);
  return rows
    .map((row) => ({
      id: row.id,
      author: row.author,
      kind: row.kind,
      quantity: row.quantity,
      sense: row.sense,
      value: row.value,
      group: row.group_path,
      condition: row.condition_code,
      frameIssue: row.frame_issue_number,
      source: row.source,
      sourceDate: row.source_date,
      from: row.valid_from,
      until: row.valid_until,
    }))
    .sort((a, b) => (a.group < b.group ? -1 : a.group > b.group ? 1 : rank(a.quantity) - rank(b.quantity)));
}

/** The limits in force today (UTC), groups by the names they have today. */
export async function limitsInForce(db: Db, programId: string): Promise<Limit[]> {
  const [limits, day, groups] = await Promise.all([
    limitsOf(db, programId),
    today(db),
    groupBreakdownOf(db, programId),
  ]);
  return limits
    .filter((limit) => inForce(limit, day))
    .map(({ id: _id, author: _author, ...limit }) => ({ ...limit, group: groups.present(limit.group) }));
}

/** ISO date, UTC, by the clock of the database. */
export async function today(db: Db): Promise<string> {
  const { rows } = await sql<{ day: string }>`select (now() at time zone 'utc')::date::text as day`.execute(
    db,
  );
  return rows[0]?.day ?? '';
}

export function growthAllowancesOf(db: Db, programId: string) {
  return db
    .selectFrom('growth_allowances')
    .selectAll()
    .where('program_id', '=', programId)
    .orderBy('group_path')
    .orderBy('maturity')
    .execute();
}

/** What was done to a program's breakdown of groups, oldest first, with who did it. */
export function groupChangesOf(db: Db, programId: string) {
  return db
    .selectFrom('group_changes')
    .innerJoin('users', 'users.id', 'group_changes.changed_by')
    .select([
      'group_changes.number',
      'group_changes.kind',
      'group_changes.path',
      'group_changes.to_path as to',
      'group_changes.code',
      'group_changes.changed_at',
      'users.name as author',
    ])
    .where('program_id', '=', programId)
    .orderBy('number')
    .execute();
}

/** What was done to the breakdown after one time and up to another: by it names of then are those of later. */
export async function groupsRenamedBetween(
  db: Db,
  programId: string,
  after: Date,
  upTo: Date,
): Promise<GroupBreakdown> {
  const changes = await groupChangesOf(db, programId);
  return new GroupBreakdown(changes.filter(({ changed_at: at }) => at > after && at <= upTo));
}

/** The breakdown as it stands today, or as it stood at a time. */
export async function groupBreakdownOf(
  db: Db,
  programId: string,
  at: Date | null = null,
): Promise<GroupBreakdown> {
  const changes = await groupChangesOf(db, programId);
  return new GroupBreakdown(changes.filter((change) => at === null || change.changed_at <= at));
}

/** The group paths of the newest revisions of a program's lists, as their rows have them, with the number of counted rows. */
export async function groupsInLists(
  db: Db,
  programId: string,
): Promise<{ readonly list: string; readonly group: string; readonly rows: number }[]> {
  return db
    .selectFrom('lists')
    .innerJoin('list_revisions', (join) =>
      join
        .onRef('list_revisions.list_id', '=', 'lists.id')
        .onRef('list_revisions.number', '=', 'lists.last_revision'),
    )
    .innerJoin('revision_subtotals', (join) =>
      join
        .onRef('revision_subtotals.revision_id', '=', 'list_revisions.id')
        .onRef('revision_subtotals.frame_issue_id', '=', 'list_revisions.frame_issue_id'),
    )
    .select((eb) => [
      'lists.code as list',
      'revision_subtotals.group_path as group',
      eb.cast<number>(eb.fn.sum('revision_subtotals.rows'), 'integer').as('rows'),
    ])
    .where('lists.program_id', '=', programId)
    .groupBy(['lists.code', 'revision_subtotals.group_path'])
    .orderBy('lists.code')
    .orderBy('revision_subtotals.group_path')
    .execute();
}

/** The conditions that a program's configurations have, each code once. */
export function conditionCodesOf(db: Db, programId: string) {
  return db
    .selectFrom('conditions')
    .innerJoin('configurations', 'configurations.id', 'conditions.configuration_id')
    .select((eb) => ['conditions.code', eb.fn.min('conditions.title').as('title')])
    .where('configurations.program_id', '=', programId)
    .groupBy('conditions.code')
    .orderBy('conditions.code')
    .execute();
}
