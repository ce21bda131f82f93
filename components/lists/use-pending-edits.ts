'use client';

import { useCallback, useMemo, useSyncExternalStore } from 'react';
import { type PendingEdits, pendingEditsSchema } from '@/components/lists/edits';

const CHANGED = 'polhode-edits';

function stored(key: string): string | null {
  return window.localStorage.getItem(key);
}

/** What the text says, or nothing where it is not what we wrote. */
function parsed(text: string | null): PendingEdits | null {
  if (text === null) return null;
  const read = pendingEditsSchema.safeParse(jsonOf(text));
  return read.success && read.data.edits.length > 0 ? read.data : null;
}

function jsonOf(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch (error) {
    if (error instanceof SyntaxError) return null;
    throw error;
  }
}

/** The edits of a list that this browser keeps until they are saved or undone, in every tab alike: closing one loses nothing. */
export function usePendingEdits(
  list: string,
): readonly [PendingEdits | null, (edits: PendingEdits | null) => void] {
  const key = `polhode-edits:${list}`;
  const text = useSyncExternalStore(
    subscribe,
    () => stored(key),
    () => null,
  );
  const pending = useMemo(() => parsed(text), [text]);
  const change = useCallback(
    (next: PendingEdits | null) => {
      if (next === null || next.edits.length === 0) window.localStorage.removeItem(key);
      else window.localStorage.setItem(key, JSON.stringify(next));
      window.dispatchEvent(new Event(CHANGED));
    },
    [key],
  );
  return [pending, change];
}

function subscribe(changed: () => void): () => void {
  window.addEventListener('storage', changed);
  window.addEventListener(CHANGED, changed);
  return () => {
    window.removeEventListener('storage', changed);
    window.removeEventListener(CHANGED, changed);
  };
}
