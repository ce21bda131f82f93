'use client';

import { useCallback, useSyncExternalStore } from 'react';
import { flushSync } from 'react-dom';

/** 28 px, or 44 px under a finger. */
export function useRowHeight(): number {
  return useMedia('(pointer: coarse)') ? 44 : 28;
}

let onPaper = false;

/** True while the page is being put on paper. The browser asks for the page right after `beforeprint`, so that event counts first. */
export function usePrinting(): boolean {
  return useSyncExternalStore(
    watchPrinting,
    () => onPaper || window.matchMedia('print').matches,
    () => false,
  );
}

function watchPrinting(changed: () => void): () => void {
  const set = (event: Event) => {
    onPaper = event.type === 'beforeprint';
    flushSync(changed);
  };
  const list = window.matchMedia('print');
  list.addEventListener('change', changed);
  window.addEventListener('beforeprint', set);
  window.addEventListener('afterprint', set);
  return () => {
    list.removeEventListener('change', changed);
    window.removeEventListener('beforeprint', set);
    window.removeEventListener('afterprint', set);
  };
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
