import { sql } from 'kysely';
import { type Db } from '@/db/client';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type RowChange, type RowFigures } from '@/lib/findings/context';
import { type Subtotal } from '@/lib/mass/subtotals';
import { subtotalsOf } from './configurations';
import { framesWithIssue } from './program-frames';
import { type RowRange } from './revision-rows';

/** What a new revision is held against: the newest one so far, its declarations and its subtotals, both in the issue of the new one. */
export interface FormerRevision {
  readonly id: string;
  readonly declarations: ListDeclarations;
  readonly subtotals: readonly Subtotal[];
}

/**
 * Null for the first revision of a list, and where nobody knows how the issue that the former one is stated in lies against that of
 * the new one.
 */
export async function formerRevision(
  db: Db,
  listId: string,
  frameIssueId: string,
): Promise<FormerRevision | null> {
  const found = await db
    .selectFrom('list_revisions')
    .select(['id', 'declarations', 'frame_issue_id'])
    .where('list_id', '=', listId)
    .orderBy('number', 'desc')
    .limit(1)
    .executeTakeFirst();
  if (found === undefined) return null;
  const { id, declarations, frame_issue_id: issueId } = found;
  if (issueId === frameIssueId)
    return { id, declarations, subtotals: await subtotalsOf(db, [id], frameIssueId) };
  const conversion = (await framesWithIssue(db, frameIssueId)).between(issueId, frameIssueId);
  if (conversion === null) return null;
  return {
    id,
    declarations: conversion.declarations(declarations),
    subtotals: await subtotalsOf(db, [id], frameIssueId),
  };
}

/** Places of two revisions are compared only where both are stated in one frame. */
export function sameFrame(a: ListDeclarations, b: ListDeclarations): boolean {
  const told = ({ axes, pose, extent }: ListDeclarations): string =>
    JSON.stringify([axes, pose.origin, pose.yaw, pose.pitch, pose.roll, extent]);
  return told(a) === told(b);
}

/** At most so many changed rows of a revision are shown to the rules. */
export const SUSPECTS = 20_000;

/**
 * Of the revision that is being written after `before`: the counted rows that have the item of a counted row of `before` and figures
 * that a slip of unit or sign could explain: mass, distance from the list's datum or sum of moments off by at least a fifth, or a
 * coordinate of the other sign. One join of the rows that are not the same in both; what comes back is bounded by `SUSPECTS`, in the
 * order of the list.
 */
export async function suspectChanges(db: Db, before: RowRange): Promise<RowChange[]> {
  interface Pair {
    readonly item: string;
    readonly now: readonly number[];
    readonly before: readonly number[];
  }
  const figures = (of: string) => sql.raw(`array[${FIGURES.map((name) => `${of}.${name}`).join(', ')}]`);
  const apart = (value: (of: 'n' | 'f') => string) =>
    sql.raw(`abs(${value('n')} - ${value('f')}) > 0.16 * greatest(abs(${value('n')}), abs(${value('f')}))`);
  const { rows } = await sql<Pair>`
    select n.item, ${figures('n')} as now, ${figures('f')} as before
    from row_ends e
    join row_versions f on f.list_no = ${before.listNo} and f.row_no = e.row_no
    join row_versions n on n.list_no = ${before.listNo} and n.item = f.item and n.row_no > ${before.lastRow}
    where e.list_no = ${before.listNo} and e.end_no > ${before.lastEnd} and n.counting = 'counted' and f.counting = 'counted'
      and (
        ${apart((of) => `${of}.mass`)}
        or ${apart((of) => `(abs(${of}.x) + abs(${of}.y) + abs(${of}.z))`)}
        or ${apart((of) => `(${of}.ixx + ${of}.iyy + ${of}.izz)`)}
        or n.x * f.x < 0 or n.y * f.y < 0 or n.z * f.z < 0
      )
    order by n.sort_key
    limit ${SUSPECTS}
  `.execute(db);
  return rows.map(({ item, ...pair }) => ({
    item,
    now: figuresOf(pair.now),
    before: figuresOf(pair.before),
  }));
}

const FIGURES = ['mass', 'x', 'y', 'z', 'ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const;

function figuresOf(numbers: readonly number[]): RowFigures {
  const at = (name: (typeof FIGURES)[number]): number => numbers[FIGURES.indexOf(name)] ?? NaN;
  return {
    mass: at('mass'),
    position: [at('x'), at('y'), at('z')],
    moments: {
      ixx: at('ixx'),
      iyy: at('iyy'),
      izz: at('izz'),
      ixy: at('ixy'),
      ixz: at('ixz'),
      iyz: at('iyz'),
    },
  };
}
