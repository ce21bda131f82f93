'use client';

import { type ReactNode, useEffect, useRef } from 'react';
import { Button } from '@/components/ui/button';

/** What one row says in full, beside the table (below it where there is no room). Escape closes it. */
export function Inspector({
  onClose,
  children,
}: {
  readonly onClose: () => void;
  readonly children: ReactNode;
}) {
  const box = useRef<HTMLElement>(null);
  const close = useRef(onClose);
  // Below the table on a narrow page it would open out of sight.
  useEffect(() => {
    void box.current?.scrollIntoView({ block: 'nearest' });
  }, []);
  useEffect(() => {
    close.current = onClose;
  });
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (event.key === 'Escape' && !event.defaultPrevented) close.current();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, []);
  return (
    <aside
      ref={box}
      aria-label="Row"
      className="relative grid content-start gap-3 lg:max-h-[70vh] lg:overflow-y-auto border-t border-ink-2 pt-2 lg:border-l lg:border-t-0 lg:pt-0 lg:pl-4"
    >
      <div className="flex justify-end">
        <Button kind="quiet" onClick={onClose}>
          Close row
        </Button>
      </div>
      {children}
    </aside>
  );
}
