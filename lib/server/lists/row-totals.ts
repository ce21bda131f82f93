import { type Db } from '@/db/client';
import { basicSubtotalsOf } from '@/db/queries/basic-subtotals';
import { type RowFilter, type RowSums, sumRows } from '@/db/queries/list-rows';
import { type RowTotals } from '@/lib/contracts/list-rows';
import { listToAirframe } from '@/lib/frames/pose';
import { lateralIndex } from '@/lib/frames/reflection';
import { type AirframeVec, type ListVec } from '@/lib/frames/tags';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { pathsUp } from '@/lib/mass/allowances';
import { isMirrored } from '@/lib/mass/place';
import { type GroupTotal, groupBranches, NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { applyMat, transpose } from '@/lib/numerics/mat3';
import { addVec, scaleVec, subVec } from '@/lib/numerics/vec3';
import { fromSi } from '@/lib/units/convert';
import { revisionGroups } from './revision-groups';

export interface ListTotals {
  readonly whole: RowTotals;
  /** Every group and every group above one, in the order of their paths. */
  readonly groups: readonly (RowTotals & { readonly group: string })[];
}

export interface InFrame {
  readonly declarations: ListDeclarations;
  readonly geometry: AirframeGeometry;
}

/** Columns by whose values the stored subtotals are kept apart. */
const KEPT_APART = ['group', 'category', 'maturity'] as const;
type KeptApart = (typeof KEPT_APART)[number];

/** The same column where the stored subtotals tell its values apart. */
export function keptApart(column: string): KeptApart | undefined {
  return KEPT_APART.find((one) => one === column);
}

/** Totals of a revision and of its groups of today from the stored subtotals, basic (without growth): no row is read. */
export async function totalsOfRevision(
  db: Db,
  revisionId: string,
  frameIssueId: string,
  frame: InFrame,
  by: KeptApart = 'group',
): Promise<ListTotals> {
  const { present } = await revisionGroups(db, revisionId);
  const stored = await basicSubtotalsOf(db, revisionId, frameIssueId);
  const subtotals = stored.map((part) => ({
    ...part,
    group: by === 'group' ? present(part.group) : (part[by] ?? ''),
  }));
  const approved = rollUp(subtotals, [], frame.geometry, NO_GROWTH);
  const waiting = new Map<string, number>();
  let allWaiting = 0;
  for (const part of subtotals) {
    if (part.status === 'approved') continue;
    allWaiting += part.rows;
    for (const path of pathsUp(part.group)) waiting.set(path, (waiting.get(path) ?? 0) + part.rows);
  }
  const totals = (
    total: Pick<GroupTotal, 'rows' | 'pieces' | 'memoRows' | 'basic'>,
    waitingRows: number,
  ): RowTotals => ({
    rows: total.rows,
    pieces: total.pieces,
    mass: fromSi(total.basic.mass, frame.declarations.massUnit),
    cg: total.basic.properties === null ? null : inListUnits(total.basic.properties.cg, frame),
    memoRows: total.memoRows,
    waitingRows,
  });
  const branches = by === 'group' ? groupBranches(approved.groups, frame.geometry) : approved.groups;
  return {
    whole: totals(approved, allWaiting),
    groups: branches.map((branch) => ({
      group: branch.group,
      ...totals(branch, waiting.get(branch.group) ?? 0),
    })),
  };
}

/** Totals of the rows that a filter leaves in, summed in the database. */
export async function totalsOfView(
  db: Db,
  revisionId: string,
  filter: RowFilter,
  frame: InFrame,
): Promise<RowTotals> {
  return totalsOfSums(await sumRows(db, revisionId, filter, nearOf(frame)), frame);
}

/** The point about which first moments are summed: the reference in list axes, m. */
export function nearOf(frame: InFrame): ListVec {
  return toList(frame.geometry.reference, frame);
}

/**
 * Sums of rows as totals. A mirror image has its piece's place but for the lateral coordinate, so pairs need no more than their own
 * first moment.
 */
export function totalsOfSums(sums: Iterable<RowSums>, frame: InFrame): RowTotals {
  const { declarations, geometry } = frame;
  const matrix = matrixOf(frame);
  const lateral = lateralIndex(geometry.axes);
  const across = geometry.lateralPlane - geometry.reference[lateral];
  let [rows, pieces, mass, memoRows, waitingRows] = [0, 0, 0, 0, 0];
  let first: AirframeVec = [0, 0, 0];
  for (const sum of sums) {
    const own = applyMat(matrix, [sum.px, sum.py, sum.pz]);
    const mirrored = isMirrored(sum, declarations);
    const both = (k: 0 | 1 | 2): number => (k === lateral ? 2 * sum.mass * across : 2 * own[k]);
    first = addVec(first, mirrored ? [both(0), both(1), both(2)] : own);
    rows += sum.rows;
    pieces += mirrored ? 2 * sum.pieces : sum.pieces;
    mass += mirrored ? 2 * sum.mass : sum.mass;
    memoRows += sum.memo;
    waitingRows += sum.waiting;
  }
  return {
    rows,
    pieces,
    mass: fromSi(mass, declarations.massUnit),
    cg: mass > 0 ? inListUnits(addVec(geometry.reference, scaleVec(1 / mass, first)), frame) : null,
    memoRows,
    waitingRows,
  };
}

function matrixOf({ declarations, geometry }: InFrame) {
  return listToAirframe(declarations.axes, declarations.pose, geometry.axes);
}

/** A place in the airframe, m, as the list states places: the inverse of o + R P r. */
function toList(place: AirframeVec, frame: InFrame): ListVec {
  return applyMat(transpose(matrixOf(frame)), subVec(place, frame.declarations.pose.origin));
}

function inListUnits(place: AirframeVec, frame: InFrame): [number, number, number] {
  const [x, y, z] = toList(place, frame);
  const { lengthUnit } = frame.declarations;
  return [fromSi(x, lengthUnit), fromSi(y, lengthUnit), fromSi(z, lengthUnit)];
}
