import { type Db } from '@/db/client';
import { subtotalsOf } from '@/db/queries/configurations';
import { type ListRevision } from '@/db/queries/lists';
import { type MassResult } from '@/lib/mass/result';
import { type GroupTotal, groupBranches, NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { geometryOfRevision } from './reach-list';

/** One group, or the whole list under '', in two revisions; null where a revision has nothing in it. */
export interface GroupChange {
  readonly group: string;
  readonly before: GroupSide | null;
  readonly after: GroupSide | null;
}

export interface GroupSide extends Pick<GroupTotal, 'rows' | 'memoRows'> {
  readonly basic: MassResult;
}

export interface GroupComparison {
  readonly whole: GroupChange;
  /** Groups, with those above them, whose mass, place, tensor or number of rows differ; in the order of their paths. */
  readonly groups: readonly GroupChange[];
}

/**
 * What the way from one revision of a list to another did to mass, CG and tensor, basic: the whole and by group, from the stored
 * subtotals, both in the frame issue of `after`. CG and tensor of a group are its own.
 */
export async function compareGroups(
  db: Db,
  before: Pick<ListRevision, 'id' | 'frame_issue_id'>,
  after: Pick<ListRevision, 'id' | 'frame_issue_id'>,
): Promise<GroupComparison> {
  const geometry = await geometryOfRevision(db, after);
  const [old, now] = await Promise.all(
    [before, after].map(async ({ id }) => {
      const total = rollUp(await subtotalsOf(db, [id], after.frame_issue_id), [], geometry, NO_GROWTH);
      const branches = groupBranches(total.groups, geometry);
      return { whole: total, groups: new Map(branches.map((branch) => [branch.group, branch])) };
    }),
  );
  if (old === undefined || now === undefined) throw new Error('two revisions are compared');
  const paths = [...new Set([...old.groups.keys(), ...now.groups.keys()])].sort();
  const groups = paths.map((group) => change(group, old.groups.get(group), now.groups.get(group)));
  return { whole: change('', old.whole, now.whole), groups: groups.filter(differs) };
}

function change(group: string, before: GroupSide | undefined, after: GroupSide | undefined): GroupChange {
  return { group, before: before ?? null, after: after ?? null };
}

function differs({ before, after }: GroupChange): boolean {
  if (before === null || after === null) return true;
  return JSON.stringify(told(before)) !== JSON.stringify(told(after));
}

function told({ rows, memoRows, basic: { mass, properties } }: GroupSide): unknown {
  return [rows, memoRows, mass, properties?.cg, properties?.inertia];
}
