import { type Db } from '@/db/client';
import { sumRows } from '@/db/queries/list-rows';
import { type ListRevision } from '@/db/queries/lists';
import { type RowGroups } from '@/lib/contracts/list-groups';
import { type RowTotals } from '@/lib/contracts/list-rows';
import { type GroupingColumn, isFiltered, type ListView, withoutFilterOn } from '@/lib/contracts/list-view';
import { pathsUp } from '@/lib/mass/allowances';
import { geometryOfRevision } from './reach-list';
import { revisionGroups } from './revision-groups';
import { keptApart, nearOf, totalsOfRevision, totalsOfSums } from './row-totals';
import { filterOf } from './row-view';

/** Values told of one column; of a column with more, those of most mass. */
const MOST_VALUES = 500;

/**
 * The rows of a view by the values of a column, each with mass, CG and share; what the view asks of that very column is left out, so
 * that the other values stay in sight. Where the stored subtotals tell the values apart, no row is read.
 */
export async function loadGroups(
  db: Db,
  revision: ListRevision,
  view: ListView,
  by: GroupingColumn,
): Promise<RowGroups> {
  const frame = { declarations: revision.declarations, geometry: await geometryOfRevision(db, revision) };
  const rest = withoutFilterOn(view, by);
  const kept = keptApart(by);
  // Stored subtotals name no group all of whose rows wait, which only adjustments have.
  if (kept !== undefined && !isFiltered(rest) && frame.declarations.kind === 'components') {
    const { whole, groups } = await totalsOfRevision(db, revision.id, revision.frame_issue_id, frame, kept);
    return {
      of: groups.length,
      groups: groups.map(({ group, ...totals }) => ({
        value: group,
        ...totals,
        share: share(totals, whole),
      })),
      whole,
    };
  }
  const reading = await revisionGroups(db, revision.id);
  const filter = filterOf(rest, revision.findings, reading);
  const most = by === 'group' ? null : MOST_VALUES;
  const sums = await sumRows(db, revision.id, filter, nearOf(frame), { column: by, most });
  const of = sums[0]?.of ?? 0;
  const isCut = most !== null && of > most;
  const whole = totalsOfSums(isCut ? await sumRows(db, revision.id, filter, nearOf(frame)) : sums, frame);
  const values = new Map<string, typeof sums>();
  for (const sum of sums) {
    for (const value of by === 'group' ? pathsUp(reading.present(sum.value)) : [sum.value]) {
      const members = values.get(value);
      if (members === undefined) values.set(value, [sum]);
      else members.push(sum);
    }
  }
  const groups = [...values].map(([value, members]) => {
    const totals = totalsOfSums(members, frame);
    return { value, ...totals, share: share(totals, whole) };
  });
  return {
    of: by === 'group' ? groups.length : of,
    groups: by === 'group' ? groups.sort((a, b) => byPath(a.value, b.value)) : groups,
    whole,
  };
}

function share(part: Pick<RowTotals, 'mass'>, whole: Pick<RowTotals, 'mass'>): number | null {
  return whole.mass > 0 ? part.mass / whole.mass : null;
}

/** A group before what is below it, and what is below it before its neighbours. */
function byPath(a: string, b: string): number {
  const [as, bs] = [a.split('/'), b.split('/')];
  const at = as.findIndex((level, k) => level !== bs[k]);
  if (at < 0) return as.length - bs.length;
  return (as[at] ?? '') < (bs[at] ?? '') ? -1 : 1;
}
