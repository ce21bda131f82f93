'use client';

import { usePathname, useSearchParams } from 'next/navigation';
import { useCallback, useMemo, useState } from 'react';
import { rangeOf, rangeText, type Region } from '@/lib/three-views/region';

const KEYS = ['x', 'y', 'z'] as const;

export function regionFromParams(params: Pick<URLSearchParams, 'get'>): Region {
  return [rangeOf(params.get('x')), rangeOf(params.get('y')), rangeOf(params.get('z'))];
}

/** `params` with this region in it, metres whatever the units shown. */
export function paramsWithRegion(params: URLSearchParams, region: Region): URLSearchParams {
  const next = new URLSearchParams(params);
  KEYS.forEach((key, k) => {
    const text = rangeText(region[k] ?? null);
    if (text === null) next.delete(key);
    else next.set(key, text);
  });
  return next;
}

/** The region that is brushed, kept in the address; the page is not asked for again. */
export function useRegion(): readonly [Region, (region: Region) => void] {
  const params = useSearchParams();
  const path = usePathname();
  const asked = useMemo(() => regionFromParams(params), [params]);
  // The router hands the new address on in its own time; until then what was just drawn is shown.
  const [ahead, setAhead] = useState({ params, region: asked });
  const change = useCallback(
    (region: Region) => {
      setAhead({ params, region });
      const query = paramsWithRegion(new URLSearchParams(window.location.search), region).toString();
      window.history.replaceState(null, '', query ? `${path}?${query}` : path);
    },
    [params, path],
  );
  return [ahead.params === params ? ahead.region : asked, change];
}
