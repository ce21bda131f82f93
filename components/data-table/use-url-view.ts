'use client';

import { usePathname, useSearchParams } from 'next/navigation';
import { useCallback, useMemo } from 'react';
import { paramsWithView, type TableView, viewFromParams } from '@/components/data-table/view';

/**
 * The table's view kept in the address. Opening a row is a step that Back undoes; filters and order replace the address. Goes
 * through the History API, so the page is not asked for again.
 */
export function useUrlView(): readonly [TableView, (view: TableView) => void] {
  const params = useSearchParams();
  const path = usePathname();
  const view = useMemo(() => viewFromParams(params), [params]);
  const change = useCallback(
    (next: TableView) => {
      const query = paramsWithView(new URLSearchParams(window.location.search), next).toString();
      const address = query ? `${path}?${query}` : path;
      if (next.open !== view.open && next.open !== null) window.history.pushState(null, '', address);
      else window.history.replaceState(null, '', address);
    },
    [path, view.open],
  );
  return [view, change];
}
