'use client';

import { useSearchParams } from 'next/navigation';
import { useCallback, useState } from 'react';

/** A part that is picked, and how far it is moved along the airframe's axes as it was typed. */
export interface Picked {
  readonly key: string | null;
  readonly by: readonly [string, string, string];
}

const MOVES = ['dx', 'dy', 'dz'] as const;

/** What is picked, kept in the address through the History API: the page is not asked for again. */
export function usePicked(): readonly [Picked, (next: Picked) => void] {
  const params = useSearchParams();
  const [picked, setPicked] = useState<Picked>(() => ({
    key: params.get('pick'),
    by: [params.get('dx') ?? '', params.get('dy') ?? '', params.get('dz') ?? ''],
  }));
  const change = useCallback((next: Picked) => {
    setPicked(next);
    const query = new URLSearchParams(window.location.search);
    for (const name of ['pick', ...MOVES]) query.delete(name);
    if (next.key !== null) {
      query.set('pick', next.key);
      MOVES.forEach((name, k) => {
        const text = next.by[k] ?? '';
        if (text.trim() !== '') query.set(name, text.trim());
      });
    }
    const { pathname, hash } = window.location;
    window.history.replaceState(
      null,
      '',
      `${pathname}${query.size === 0 ? '' : `?${query.toString()}`}${hash}`,
    );
  }, []);
  return [picked, change];
}
