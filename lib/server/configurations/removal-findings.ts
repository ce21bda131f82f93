import { type Db } from '@/db/client';
import { removalsOf, rowsThatMayBeRemoved, type RemovalRow } from '@/db/queries/removals';
import { type PlacedFinding } from '@/lib/findings/finding';
import { type BookedRow, type Removal } from '@/lib/findings/removals/removal';
import { findingsOnRemovals } from '@/lib/findings/removals/rules';
import { type Maturity } from '@/lib/mass/component';
import { placementIn } from '@/lib/mass/converted-placement';
import { type IssueConversion } from '@/lib/mass/issue-conversion';
import { type Placement } from '@/lib/mass/place';
import { normVec, subVec } from '@/lib/numerics/vec3';

interface Pin {
  readonly list_code: string;
  readonly number: number;
  readonly revision_id: string;
  readonly frame_issue_id: string;
}

interface Placed {
  readonly row: RemovalRow;
  readonly placement: Placement;
  readonly list: string;
}

/**
 * Findings on the approved removals of a configuration's lists of adjustments, each against the row of its item or part number that is
 * nearest to it in the lists of components. Reads the removals and the rows that they may mean, and no other.
 * `conversionFrom` leads from a list's frame issue to the configuration's; `growthOf` is the allowance for rows that state no growth.
 */
export async function removalFindings(
  db: Db,
  pins: readonly Pin[],
  conversionFrom: (frameIssueId: string) => IssueConversion,
  growthOf: (group: string, maturity: Maturity | null) => number,
): Promise<PlacedFinding[]> {
  const lists = await revisionsOf(db, pins, conversionFrom);
  const found: PlacedFinding[] = [];
  for (const { pin, placement } of lists.filter(({ kind }) => kind === 'adjustments')) {
    const removals = await removalsOf(db, pin.revision_id);
    if (removals.length === 0) continue;
    const candidates: Placed[] = [];
    for (const other of lists.filter(({ kind }) => kind === 'components'))
      for (const row of await rowsThatMayBeRemoved(db, other.pin.revision_id, removals))
        candidates.push({ row, placement: other.placement, list: other.pin.list_code });
    const pairs = removals.map((row): Removal => {
      const removal: Placed = { row, placement, list: pin.list_code };
      const from = nearest(removal, candidates);
      return {
        removal: booked(removal, growthOf),
        from: from === null ? null : booked(from, growthOf),
      };
    });
    const where = { kind: 'list', code: pin.list_code, revision: pin.number } as const;
    // The list is named by the place of the finding already.
    found.push(
      ...findingsOnRemovals(pairs).map(({ rows, ...finding }) => ({
        ...finding,
        rows: rows.map((name) => name.slice(pin.list_code.length + 1)),
        where,
      })),
    );
  }
  return found;
}

async function revisionsOf(
  db: Db,
  pins: readonly Pin[],
  conversionFrom: (frameIssueId: string) => IssueConversion,
) {
  if (pins.length === 0) return [];
  const rows = await db
    .selectFrom('list_revisions')
    .select(['id', 'declarations'])
    .where(
      'id',
      'in',
      pins.map((pin) => pin.revision_id),
    )
    .execute();
  return pins.flatMap((pin) => {
    const row = rows.find(({ id }) => id === pin.revision_id);
    if (row === undefined) return [];
    const { declarations } = row;
    return [
      {
        pin,
        kind: declarations.kind,
        placement: placementIn(declarations, conversionFrom(pin.frame_issue_id)),
      },
    ];
  });
}

function nearest(removal: Placed, candidates: readonly Placed[]): Placed | null {
  const { item, partNumber } = removal.row;
  const away = ({ row, placement }: Placed): number =>
    normVec(subVec(placement.place(row), removal.placement.place(removal.row)));
  const named = candidates.filter(
    ({ row }) => row.item === item || (partNumber !== null && row.partNumber === partNumber),
  );
  return named.reduce<Placed | null>(
    (best, one) => (best === null || away(one) < away(best) ? one : best),
    null,
  );
}

function booked(
  { row, placement, list }: Placed,
  growthOf: (group: string, maturity: Maturity | null) => number,
): BookedRow {
  return {
    name: `${list}/${row.item}`,
    growth: row.growth ?? growthOf(row.group, row.maturity),
    account: placement.account(row),
  };
}
