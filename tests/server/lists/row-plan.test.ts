import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { FormerRows } from '@/lib/server/lists/former-rows';
import { RowPlan, SPACING } from '@/lib/server/lists/row-plan';
import { longestIncreasing } from '@/lib/numerics/longest-increasing';

type Row = number | 'fresh';

function formerOf(keys: readonly number[]): FormerRows {
  const former = new FormerRows(keys.length);
  keys.forEach((key, k) => former.add(k + 1, key, Int32Array.from([k, 0, 0, 0])));
  return former;
}

/** The rows in the order of their new keys, and how many stay as they are. */
function planned(keys: readonly number[], rows: readonly Row[], settleAfter: (k: number) => boolean) {
  const placed: { readonly row: string; readonly key: number }[] = [];
  let kept = 0;
  const plan = new RowPlan(formerOf(keys), {
    fresh: (mark, key) => placed.push({ row: `fresh ${mark}`, key }),
    moved: (index, key) => placed.push({ row: `row ${index}`, key }),
    kept: (index) => {
      placed.push({ row: `row ${index}`, key: keys[index] ?? NaN });
      kept += 1;
    },
  });
  rows.forEach((row, k) => {
    if (row === 'fresh') plan.fresh(k);
    else plan.known(row);
    if (settleAfter(k)) plan.settle(false);
  });
  plan.settle(true);
  const order = [...placed].sort((a, b) => a.key - b.key).map(({ row }) => row);
  return { order, kept, keys: placed.map(({ key }) => key) };
}

const nameOf = (row: Row, k: number): string => (row === 'fresh' ? `fresh ${k}` : `row ${row}`);

/** Keys of a former revision, wide or tight, and a new order of some of its rows with fresh ones between. */
const revisions = fc
  .tuple(fc.array(fc.integer({ min: 1, max: 9 }), { maxLength: 25 }), fc.boolean(), fc.boolean())
  .chain(([gaps, isWide, isShuffled]) => {
    let key = 0;
    const keys = gaps.map((gap) => (key += isWide ? gap * SPACING : gap));
    const indices = keys.map((_, k) => k);
    const some = isShuffled
      ? fc.shuffledSubarray(indices)
      : fc.subarray(indices, { minLength: Math.floor(indices.length / 2) });
    return fc.tuple(
      fc.constant(keys),
      fc.tuple(some, fc.array(fc.nat(30), { maxLength: 12 })).map(([known, places]) => {
        const rows: Row[] = [...known];
        for (const place of places) rows.splice(Math.min(place, rows.length), 0, 'fresh');
        return rows;
      }),
      fc.constant(isWide),
    );
  });

describe('The plan of a next revision', () => {
  it('puts every row in the order of the file by keys of its own, whole, in wide gaps and in tight ones', () => {
    fc.assert(
      fc.property(revisions, fc.nat(5), ([keys, rows], every) => {
        const { order, keys: given } = planned(keys, rows, (k) => every > 0 && k % every === 0);
        expect(order).toEqual(rows.map(nameOf));
        expect(new Set(given).size).toBe(rows.length);
        expect(given.every((key) => Number.isSafeInteger(key) && key > 0)).toBe(true);
      }),
      { numRuns: 2_000 },
    );
  });

  it('leaves as many rows untouched as can be while gaps are wide', () => {
    fc.assert(
      fc.property(revisions, ([keys, rows, isWide]) => {
        fc.pre(isWide);
        const known = rows.filter((row) => row !== 'fresh');
        expect(planned(keys, rows, () => false).kept).toBe(longestIncreasing(known).length);
      }),
      { numRuns: 1_000 },
    );
  });

  it('touches nothing else when a row comes in the middle', () => {
    const keys = Array.from({ length: 1000 }, (_, k) => (k + 1) * SPACING);
    const rows: Row[] = keys.map((_, k) => k);
    rows.splice(500, 0, 'fresh');
    expect(planned(keys, rows, () => false)).toMatchObject({ kept: 1000 });
  });

  it('finds room before the same row again and again', () => {
    let keys = [SPACING, 2 * SPACING];
    for (let revision = 0; revision < 60; revision += 1) {
      const rows: Row[] = keys.map((_, k) => k);
      rows.splice(rows.length - 1, 0, 'fresh');
      const made = planned(keys, rows, () => false);
      expect(made.order).toEqual(rows.map(nameOf));
      expect(rows.length - 1 - made.kept).toBeLessThanOrEqual(1);
      keys = [...made.keys].sort((a, b) => a - b);
    }
    expect(keys).toHaveLength(62);
  });

  it('keeps what follows a long stretch of new rows that had to be settled early', () => {
    const keys = Array.from({ length: 200 }, (_, k) => (k + 1) * SPACING);
    const rows: Row[] = [0, ...Array.from({ length: 300 }, () => 'fresh' as const)];
    for (let k = 1; k < 200; k += 1) rows.push(k);
    const made = planned(keys, rows, (k) => k % 100 === 99);
    expect(made.order).toEqual(rows.map(nameOf));
    expect(made.kept).toBe(200);
  });
});
