'use client';

import { keepPreviousData, useQueries, useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { ask } from '@/components/lists/ask';
import { type Line } from '@/components/data-table/lines';
import {
  type ListRow,
  rowPageSchema,
  ROWS_PER_PAGE,
  type RowTotals,
  rowTotalsSchema,
} from '@/lib/contracts/list-rows';

/** Rows known by their item; those on their way by their place. */
export const rowIdOf = (row: ListRow): string => String(row.cells.item ?? '');

interface RowPages {
  readonly lines: readonly Line<ListRow>[];
  readonly loaded: readonly ListRow[];
  /** Rows in the view; null until the first page is here. */
  readonly total: number | null;
  readonly failure: { readonly message: string; readonly retry: () => void } | null;
  readonly onWindow: (first: number, last: number) => void;
}

/** The rows of a view, loaded a page at a time as they come into sight. */
export function useRowPages(from: string, query: string): RowPages {
  const [sight, setSight] = useState({ query, first: 0, last: 0 });
  const { first, last } = sight.query === query ? sight : { first: 0, last: 0 };
  const pages = useMemo(() => pagesIn(first, last), [first, last]);
  const answers = useQueries({
    queries: pages.map((page) => ({
      queryKey: ['rows', from, query, page],
      queryFn: ({ signal }: { signal: AbortSignal }) =>
        ask(`${from}/rows?${withOffset(query, page * ROWS_PER_PAGE)}`, rowPageSchema, { signal }),
      staleTime: Infinity,
    })),
    combine: (results) => ({
      data: results.map((result) => result.data),
      failed: results.find((result) => result.error !== null),
    }),
  });
  const [kept, setKept] = useState<Kept>({ query, total: null, rows: new Map() });
  const current = kept.query === query ? kept : { query, total: null, rows: new Map<number, ListRow>() };
  const next = withPages(current, answers.data);
  if (next !== kept) setKept(next);

  const { total, rows } = next;
  const lines = useMemo(
    () =>
      Array.from({ length: total ?? 0 }, (_, index): Line<ListRow> => {
        const row = rows.get(index);
        return row === undefined
          ? { kind: 'waiting', id: `waiting ${index}` }
          : { kind: 'row', row, id: rowIdOf(row) };
      }),
    [total, rows],
  );
  const loaded = useMemo(() => [...rows.values()], [rows]);
  const { failed } = answers;
  return {
    lines,
    loaded,
    total,
    failure:
      failed === undefined || failed.error === null
        ? null
        : { message: failed.error.message, retry: () => void failed.refetch() },
    onWindow: useMemo(
      () => (from: number, to: number) =>
        setSight((before) =>
          before.query === query && samePages(before, { first: from, last: to })
            ? before
            : { query, first: from, last: to },
        ),
      [query],
    ),
  };
}

interface Kept {
  readonly query: string;
  readonly total: number | null;
  readonly rows: ReadonlyMap<number, ListRow>;
}

type Page = { readonly offset: number; readonly total: number; readonly rows: readonly ListRow[] };

/** `kept` itself when the pages bring nothing new. */
function withPages(kept: Kept, pages: readonly (Page | undefined)[]): Kept {
  const fresh = pages.filter(
    (page) =>
      page !== undefined &&
      (kept.total !== page.total || page.rows.some((row, at) => kept.rows.get(page.offset + at) !== row)),
  );
  if (fresh.length === 0) return kept;
  const rows = new Map(kept.rows);
  let { total } = kept;
  for (const page of fresh) {
    if (page === undefined) continue;
    total = page.total;
    page.rows.forEach((row, at) => rows.set(page.offset + at, row));
  }
  return { query: kept.query, total, rows };
}

function pagesIn(first: number, last: number): number[] {
  const from = Math.floor(first / ROWS_PER_PAGE);
  const to = Math.floor(Math.max(first, last - 1) / ROWS_PER_PAGE);
  return Array.from({ length: to - from + 1 }, (_, index) => from + index);
}

type Sight = { readonly first: number; readonly last: number };

function samePages(a: Sight, b: Sight): boolean {
  return pagesIn(a.first, a.last).join() === pagesIn(b.first, b.last).join();
}

function withOffset(query: string, offset: number): string {
  const params = new URLSearchParams(query);
  params.set('offset', String(offset));
  return params.toString();
}

/** Totals over a view; of the whole list they are at hand already. */
export function useRowTotals(from: string, query: string, whole: RowTotals, filtered: boolean) {
  const { data, error } = useQuery({
    queryKey: ['totals', from, query],
    queryFn: ({ signal }) => ask(`${from}/totals?${query}`, rowTotalsSchema, { signal }),
    enabled: filtered,
    staleTime: Infinity,
    placeholderData: keepPreviousData,
  });
  return { totals: filtered ? (data ?? null) : whole, error: filtered ? error : null };
}
