import { type Db } from '@/db/client';
import { type PlacedFilter, largestRows, restByCells } from '@/db/queries/placed-rows';
import { type Category } from '@/lib/mass/component';
import { placementIn } from '@/lib/mass/converted-placement';
import { pictureBounds } from '@/lib/three-views/bounds';
import { ON_BOARD, groupKeys, topGroup } from '@/lib/three-views/group-key';
import { markRadius, radiusOfOne } from '@/lib/three-views/mark-size';
import { type LeftOut, type Picture, type PictureRow, piecesOf } from '@/lib/three-views/picture';
import { placesOf } from '@/lib/three-views/places';
import { type SourceCondition, type ViewsSource } from './sources';

/** Rows drawn as marks of their own; the lighter ones beyond are drawn together, cell by cell. */
export const MOST_ROWS = 3000;

/** What of a condition is shown; null and '' leave all in. */
export interface PictureFilter {
  /** A list's code, or ON_BOARD. */
  readonly list: string | null;
  readonly group: string;
  readonly category: Category | null;
}

const ALL: PictureFilter = { list: null, group: '', category: null };

interface Loaded {
  readonly rows: readonly PictureRow[];
  readonly inCells: LeftOut['inCells'];
}

/** The picture of a condition. Its bounds and the size of its marks are those of the whole condition, whatever the filter. */
export async function loadPicture(
  db: Db,
  source: ViewsSource,
  condition: SourceCondition,
  filter: PictureFilter,
  most = MOST_ROWS,
): Promise<Picture> {
  const { geometry, revisions, points } = source;
  const whole = await load(db, source, condition, ALL, most);
  const asked = isAll(filter) ? whole : await load(db, source, condition, filter, most);
  const pieces = piecesOf(whole.rows);
  const size = Math.max(geometry.length, geometry.span) || 20;
  const ofOne = radiusOfOne(
    pieces.map(({ mass }) => mass),
    0.042 * size,
  );
  const cg = condition.basic.properties?.cg ?? null;
  const bounds = pictureBounds(
    pieces.map(({ place, mass }) => ({ place, radius: markRadius(mass, ofOne) })),
    cg === null ? [] : [cg],
    geometry,
  );
  return {
    geometry,
    bounds,
    radiusOfOne: ofOne,
    groups: keysOf(source, condition),
    lists: revisions.map(({ code, title, number }) => ({ code, title, revision: number })),
    rows: asked.rows,
    total: { mass: condition.basic.mass, cg },
    points,
    left: {
      ...uncounted(source, condition),
      inCells: asked.inCells,
      uncategorised:
        filter.category === null ? 0 : condition.items.filter(({ category }) => category === null).length,
    },
  };
}

const isAll = ({ list, group, category }: PictureFilter): boolean =>
  list === null && group === '' && category === null;

async function load(
  db: Db,
  { revisions, geometry, groups }: ViewsSource,
  condition: SourceCondition,
  { list, group, category }: PictureFilter,
  most: number,
): Promise<Loaded> {
  const asked: PlacedFilter = {
    revisionIds: revisions.filter(({ code }) => list === null || code === list).map(({ id }) => id),
    categories: condition.categories.filter((one) => category === null || one === category),
    groups: groups.statedIn(group).map((stated) => ({ stated, top: topGroup(groups.present(stated)) })),
  };
  const size = (Math.max(geometry.length, geometry.span) || 20) / 24;
  const heaviest = await largestRows(db, asked, most);
  const cells = heaviest.length < most ? [] : await restByCells(db, asked, most, size);
  const lists = new Map(
    revisions.map(({ id, declarations, conversion }, index) => [
      id,
      { index, placement: placementIn(declarations, conversion) },
    ]),
  );
  const listOf = (revisionId: string) => {
    const known = lists.get(revisionId);
    if (known === undefined) throw new RangeError(`revision ${revisionId} was not asked for`);
    return known;
  };
  const rows = heaviest.map((row): PictureRow => {
    const { index, placement } = listOf(row.revision_id);
    return {
      item: row.item,
      description: row.description,
      list: index,
      group: groups.present(row.group_path),
      category: row.category,
      mass: row.mass,
      places: placesOf({ position: [row.x, row.y, row.z], pair: row.pair }, placement),
      rows: 1,
      cell: false,
    };
  });
  const together = cells.map((cell): PictureRow => {
    const { index, placement } = listOf(cell.revision_id);
    return {
      item: `${cell.rows} lighter rows`,
      description: null,
      list: index,
      group: cell.top_group,
      category: null,
      mass: cell.mass,
      places: placesOf({ position: [cell.x, cell.y, cell.z], pair: cell.pair }, placement),
      rows: cell.rows,
      cell: true,
    };
  });
  const items = condition.items
    .filter(
      (item) =>
        (list === null || list === ON_BOARD) &&
        (group === '' || group === ON_BOARD) &&
        (category === null || item.category === category),
    )
    .map((item): PictureRow => ({
      item: item.name,
      description: null,
      list: null,
      group: ON_BOARD,
      category: item.category,
      mass: item.mass,
      places: [item.position],
      rows: 1,
      cell: false,
    }));
  return {
    rows: [...rows, ...items, ...together],
    inCells:
      together.length === 0
        ? null
        : {
            rows: together.reduce((sum, one) => sum + one.rows, 0),
            mass: together.reduce((sum, one) => sum + one.mass * one.places.length, 0),
            size,
          },
  };
}

/** The same for every condition and filter, but for the items on board, which come last and plain. */
function keysOf({ subtotals }: ViewsSource, { items }: SourceCondition): Picture['groups'] {
  const masses = new Map<string, number>();
  for (const { group, status, basic } of subtotals) {
    if (status !== 'approved') continue;
    const top = topGroup(group);
    masses.set(top, (masses.get(top) ?? 0) + basic.mass);
  }
  const keys = groupKeys(masses);
  if (items.length === 0) return keys;
  const mass = items.reduce((sum, item) => sum + item.mass, 0);
  return [...keys, { group: ON_BOARD, title: 'Items on board', letter: 'i', series: null, mass }];
}

function uncounted(
  { subtotals }: ViewsSource,
  { categories }: SourceCondition,
): Pick<LeftOut, 'memo' | 'waiting' | 'ashore'> {
  const count = (of: (part: ViewsSource['subtotals'][number]) => number): number =>
    subtotals.reduce((sum, part) => sum + of(part), 0);
  return {
    memo: count(({ memoRows }) => memoRows),
    waiting: count(({ status, rows }) => (status === 'approved' ? 0 : rows)),
    ashore: count(({ status, rows, category }) =>
      status === 'approved' && !categories.includes(category) ? rows : 0,
    ),
  };
}
