'use client';

import { useCallback, useSyncExternalStore } from 'react';

/** 28 px, or 44 px under a finger. */
export function useRowHeight(): number {
  return useMedia('(pointer: coarse)') ? 44 : 28;
}

/** True while the page is being put on paper. */
export function usePrinting(): boolean {
  return useMedia('print');
}

function useMedia(query: string): boolean {
  const subscribe = useCallback(
    (changed: () => void) => {
      const list = window.matchMedia(query);
      list.addEventListener('change', changed);
      return () => list.removeEventListener('change', changed);
    },
    [query],
  );
  return useSyncExternalStore(
    subscribe,
    () => window.matchMedia(query).matches,
    () => false,
  );
}
