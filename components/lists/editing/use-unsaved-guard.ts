'use client';

import { useEffect } from 'react';
import { type DraftStore } from '@/components/lists/editing/draft-store';

/** Sends what is typed before the page goes; while it is not sent, the browser asks whether to leave. */
export function useUnsavedGuard(store: DraftStore): void {
  useEffect(() => {
    const onHidden = () => {
      if (document.visibilityState === 'hidden') void store.flush();
    };
    const onLeave = (event: BeforeUnloadEvent) => {
      if (store.get().keeping.state === 'kept') return;
      void store.flush();
      event.preventDefault();
    };
    document.addEventListener('visibilitychange', onHidden);
    window.addEventListener('beforeunload', onLeave);
    return () => {
      document.removeEventListener('visibilitychange', onHidden);
      window.removeEventListener('beforeunload', onLeave);
      void store.flush();
    };
  }, [store]);
}
