'use client';

import { usePathname, useSearchParams } from 'next/navigation';
import { useCallback, useMemo, useState } from 'react';
import { paramsWithView, type TableView, viewFromParams } from '@/components/data-table/view';

/**
 * The table's view kept in the address. Opening a row is a step that Back undoes; filters and order replace the address. Goes
 * through the History API, so the page is not asked for again.
 */
export function useUrlView(): readonly [TableView, (view: TableView) => void] {
  const params = useSearchParams();
  const path = usePathname();
  const asked = useMemo(() => viewFromParams(params), [params]);
  // The router hands the new address on in its own time; until then what was just chosen is shown.
  const [ahead, setAhead] = useState({ params, view: asked });
  const view = ahead.params === params ? ahead.view : asked;
  const change = useCallback(
    (next: TableView) => {
      setAhead({ params, view: next });
      const query = paramsWithView(new URLSearchParams(window.location.search), next).toString();
      const address = query ? `${path}?${query}` : path;
      if (next.open !== view.open && next.open !== null) window.history.pushState(null, '', address);
      else window.history.replaceState(null, '', address);
    },
    [params, path, view.open],
  );
  return [view, change];
}
