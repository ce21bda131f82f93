import { sql } from 'kysely';
import { type Db } from '@/db/client';
import { fromNumbers } from '@/lib/mass/account';
import { type Category, type ChangeStatus, type Maturity } from '@/lib/mass/component';
import { type Subtotal } from '@/lib/mass/subtotals';
import { type UncertaintySubtotal } from '@/lib/mass/uncertainty/book';
import { fromNumbers as uncertaintyFrom } from '@/lib/mass/uncertainty/sums';

export type StoredSubtotal = Subtotal & {
  readonly revisionId: string;
  readonly uncertainty: UncertaintySubtotal;
};

/** Subtotals kept in memory at most, some 2.5 kB each. */
const KEPT = 24_000;

/** Of revisions that exist: they never change. The one used longest ago comes first. */
const kept = new Map<string, readonly StoredSubtotal[]>();
let keptCount = 0;

/**
 * The subtotals of a list revision in the frame issue that it is stated in, in the order of their keys. What has been read once is
 * kept, as much as `KEPT` allows.
 */
export async function storedSubtotals(
  db: Db,
  revisionIds: readonly string[],
): Promise<ReadonlyMap<string, readonly StoredSubtotal[]>> {
  const found = new Map<string, readonly StoredSubtotal[]>();
  for (const id of revisionIds) {
    const known = kept.get(id);
    if (known === undefined) continue;
    found.set(id, known);
    kept.delete(id);
    kept.set(id, known);
  }
  const missing = revisionIds.filter((id) => !found.has(id));
  for (const [id, parts] of missing.length === 0 ? [] : await readSubtotals(db, missing)) {
    found.set(id, parts);
    keep(id, parts);
  }
  return found;
}

function keep(id: string, parts: readonly StoredSubtotal[]): void {
  if (kept.has(id)) return;
  kept.set(id, parts);
  keptCount += parts.length;
  for (const [oldest, its] of kept) {
    if (keptCount <= KEPT) return;
    kept.delete(oldest);
    keptCount -= its.length;
  }
}

interface Row {
  readonly revision_id: string;
  readonly group_path: string;
  readonly category: Category;
  readonly maturity: Maturity | '';
  readonly status: ChangeStatus;
  readonly rows: number;
  readonly pieces: number;
  readonly memo_rows: number;
  readonly numbers: Buffer;
}

const ARRAYS = [
  'basic',
  'stated_predicted',
  'unstated_basic',
  'basic_uncertainty',
  'stated_predicted_uncertainty',
  'unstated_basic_uncertainty',
] as const;

/** Arrays come as PostgreSQL holds them: as text, reading their digits takes several times as long as all the rest. */
async function readSubtotals(
  db: Db,
  revisionIds: readonly string[],
): Promise<ReadonlyMap<string, readonly StoredSubtotal[]>> {
  const numbers = sql.join(
    ARRAYS.map((name) => sql`array_send(${sql.ref(`s.${name}`)})`),
    sql` || `,
  );
  const { rows } = await sql<Row>`
    select s.revision_id, group_path, category, maturity, status, s.rows, s.pieces, s.memo_rows, ${numbers} as numbers
    from revision_subtotals s
    join list_revisions v on v.id = s.revision_id and v.frame_issue_id = s.frame_issue_id
    where s.revision_id = any(${revisionIds})
    order by s.revision_id, group_path, category, maturity, status
  `.execute(db);
  const read = new Map<string, StoredSubtotal[]>();
  for (const row of rows) {
    const parts = read.get(row.revision_id) ?? [];
    read.set(row.revision_id, parts);
    parts.push(subtotalOf(row));
  }
  return read;
}

function subtotalOf(row: Row): StoredSubtotal {
  const key = {
    group: row.group_path,
    category: row.category,
    maturity: row.maturity === '' ? null : row.maturity,
    status: row.status,
  };
  const [basic, stated, unstated, ...uncertainties] = arraysOf(row.numbers);
  const part = (numbers: number[] | undefined): number[] => numbers ?? [];
  return {
    revisionId: row.revision_id,
    ...key,
    rows: row.rows,
    pieces: row.pieces,
    memoRows: row.memo_rows,
    basic: fromNumbers(part(basic)),
    statedPredicted: fromNumbers(part(stated)),
    unstatedBasic: fromNumbers(part(unstated)),
    uncertainty: {
      ...key,
      basic: uncertaintyFrom(part(uncertainties[0])),
      statedPredicted: uncertaintyFrom(part(uncertainties[1])),
      unstatedBasic: uncertaintyFrom(part(uncertainties[2])),
    },
  };
}

/** float8[] one after another: dimensions, nulls, type, length, lower bound, then each element with its length in front. */
function arraysOf(bytes: Buffer): number[][] {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const arrays: number[][] = [];
  for (let at = 0; at < bytes.length;) {
    const length = view.getInt32(at + 12);
    const numbers = new Array<number>(length);
    for (let k = 0; k < length; k += 1) numbers[k] = view.getFloat64(at + 24 + 12 * k);
    arrays.push(numbers);
    at += 20 + 12 * length;
  }
  return arrays;
}
