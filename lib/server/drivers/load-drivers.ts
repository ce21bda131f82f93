import { type Db } from '@/db/client';
import { rowsByItem } from '@/db/queries/list-rows';
import { type DriverPart, type Drivers, type DriversAsked } from '@/lib/drivers/drivers';
import { type Account, accountFrom, AccountSum, toNumbersWithRest } from '@/lib/mass/account';
import { type GroupReading } from '@/lib/groups/breakdown';
import { type Category } from '@/lib/mass/component';
import { placementIn } from '@/lib/mass/converted-placement';
import { contributionOf, type Whole, wholeOf } from '@/lib/mass/contributions/contribution';
import { Largest } from '@/lib/mass/contributions/top';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { accountOfItem, groupBranches, NO_GROWTH, type OnBoardItem, rollUp } from '@/lib/mass/roll-up';
import { type Subtotal } from '@/lib/mass/subtotals';
import { componentOf } from '@/lib/server/lists/row-codec';
import { type SourceRevision } from '@/lib/server/three-views/sources';
import { rowAccounts } from './row-accounts';

/** Parts that are sent; the others are counted and summed. */
export const MOST_PARTS = 50;

export interface DriversSource {
  readonly geometry: AirframeGeometry;
  readonly revisions: readonly SourceRevision[];
  readonly subtotals: readonly Subtotal[];
  /** How the groups of rows are read; left out, as the rows state them. */
  readonly groups?: Pick<GroupReading, 'present'>;
  readonly condition: {
    readonly categories: readonly Category[];
    readonly items: readonly OnBoardItem[];
  };
}

const AS_STATED: Pick<GroupReading, 'present'> = { present: (path) => path };

/** Runs over parts: keeps the largest contributions to one number, and the sums of all. */
class Ranking<T> {
  readonly largest = new Largest<T>(MOST_PARTS);
  of = 0;
  sum = 0;
  gross = 0;

  constructor(
    readonly whole: Whole,
    readonly number: DriversAsked['number'],
  ) {}

  add(account: Account, of: T): void {
    const value = contributionOf(account, this.whole)[this.number];
    this.of += 1;
    this.sum += value;
    this.gross += Math.abs(value);
    this.largest.add(value, of);
  }
}

/**
 * What drives one of the ten numbers of a condition, without growth: of everything counted and approved that is on board, the parts
 * that contribute most. Null where there is no mass, and so no CG to contribute to.
 */
export async function loadDrivers(
  db: Db,
  source: DriversSource,
  asked: DriversAsked,
): Promise<Drivers | null> {
  const { geometry, subtotals, condition } = source;
  const { categories, items } = condition;
  const total = rollUp(subtotals, items, geometry, NO_GROWTH, { categories });
  const whole = wholeOf(total.basicAccount, geometry);
  if (whole === null) return null;
  const { parts, of, sum, gross } =
    asked.by === 'rows'
      ? await rankRows(db, source, whole, asked.number)
      : rankGroups(source, total, whole, asked);
  return { ...asked, geometry, whole: toNumbersWithRest(total.basicAccount), parts, of, sum, gross };
}

type Ranked = Pick<Drivers, 'parts' | 'of' | 'sum' | 'gross'>;

type Found = { readonly revision: number; readonly row: string } | { readonly onBoard: OnBoardItem };

async function rankRows(
  db: Db,
  { geometry, revisions, condition, groups = AS_STATED }: DriversSource,
  whole: Whole,
  number: DriversAsked['number'],
): Promise<Ranked> {
  const ranking = new Ranking<Found>(whole, number);
  const wanted = new Set(condition.categories);
  for (const [index, revision] of revisions.entries()) {
    const { items, categories, numbers } = await rowAccounts(db, revision);
    items.forEach((item, row) => {
      const category = categories[row];
      if (category === undefined || !wanted.has(category)) return;
      ranking.add(accountFrom(numbers, 10 * row), { revision: index, row: item });
    });
  }
  for (const item of condition.items) ranking.add(accountOfItem(item, geometry), { onBoard: item });
  const { of, sum, gross } = ranking;
  return {
    parts: await rowParts(db, ranking.largest.all(), { revisions, geometry, groups }),
    of,
    sum,
    gross,
  };
}

/** The rows found, in the order found, as they stand in their lists. */
async function rowParts(
  db: Db,
  found: readonly Found[],
  { revisions, geometry, groups }: Required<Pick<DriversSource, 'revisions' | 'geometry' | 'groups'>>,
): Promise<DriverPart[]> {
  const parts = new Map<string, DriverPart>();
  for (const [index, { id, code, number, declarations, conversion }] of revisions.entries()) {
    const items = found.flatMap((one) => ('onBoard' in one || one.revision !== index ? [] : [one.row]));
    if (items.length === 0) continue;
    const placement = placementIn(declarations, conversion);
    for (const row of await rowsByItem(db, id, items)) {
      const { pieces, image } = placement.parts(componentOf(row));
      parts.set(`${index} ${row.item}`, {
        key: `${code}/${row.item}`,
        name: row.item,
        description: row.description,
        group: groups.present(row.group_path),
        list: { code, revision: number },
        rows: 1,
        pieces: toNumbersWithRest(pieces),
        image: image && toNumbersWithRest(image),
      });
    }
  }
  return found.flatMap((one) => {
    if ('onBoard' in one) return [itemPart(one.onBoard, geometry)];
    const part = parts.get(`${one.revision} ${one.row}`);
    return part === undefined ? [] : [part];
  });
}

function itemPart(item: OnBoardItem, geometry: AirframeGeometry): DriverPart {
  return {
    key: `.${item.name}`,
    name: item.name,
    description: null,
    group: null,
    list: null,
    rows: 1,
    pieces: toNumbersWithRest(accountOfItem(item, geometry)),
    image: null,
  };
}

function rankGroups(
  { geometry, condition }: DriversSource,
  { groups }: ReturnType<typeof rollUp>,
  whole: Whole,
  { number, by }: DriversAsked,
): Ranked {
  const shown =
    by === 'groups' ? groups : groupBranches(groups, geometry).filter(({ group }) => !group.includes('/'));
  const parts: DriverPart[] = shown
    .filter(({ rows }) => rows > 0)
    .map(({ group, rows, basicAccount }) => ({
      key: group,
      name: group,
      description: null,
      group: null,
      list: null,
      rows,
      pieces: toNumbersWithRest(basicAccount),
      image: null,
    }));
  const onBoard = new AccountSum();
  for (const item of condition.items) onBoard.add(accountOfItem(item, geometry));
  if (condition.items.length > 0)
    parts.push({
      key: '.on-board',
      name: 'Items on board',
      description: null,
      group: null,
      list: null,
      rows: condition.items.length,
      pieces: toNumbersWithRest(onBoard.account),
      image: null,
    });
  const ranking = new Ranking<DriverPart>(whole, number);
  for (const part of parts) ranking.add(accountFrom(part.pieces, 0), part);
  const { of, sum, gross, largest } = ranking;
  return { parts: largest.all(), of, sum, gross };
}
