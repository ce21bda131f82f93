'use client';

import { useEffect, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';

export interface KeyLine {
  /** Keys as printed on them, pressed together or one of them. */
  readonly keys: readonly string[];
  readonly does: string;
}

const EVERYWHERE: readonly KeyLine[] = [
  { keys: ['?'], does: 'Show this list' },
  { keys: ['Tab'], does: 'Go to the next control; with Shift, to the one before' },
  { keys: ['Escape'], does: 'Close what lies on top' },
];

export const TABLE_KEYS: readonly KeyLine[] = [
  { keys: ['Up', 'Down', 'Left', 'Right'], does: 'Move in a table' },
  { keys: ['Home', 'End'], does: 'First or last column; with Ctrl, first or last row' },
  { keys: ['Page Up', 'Page Down'], does: 'One screen of rows' },
  { keys: ['Shift + Up', 'Down', 'Left', 'Right'], does: 'Select cells' },
  { keys: ['Ctrl + A'], does: 'Select all cells' },
  { keys: ['Ctrl + C'], does: 'Copy the selected cells in full precision' },
  { keys: ['Enter'], does: 'Open the row' },
];

/** The keys of a page, behind a button and the `?` key. `keys` adds those of the page to those that work everywhere. */
export function KeyHelp({ keys = [] }: { readonly keys?: readonly KeyLine[] }) {
  const [open, setOpen] = useState(false);
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (event.key !== '?' || event.ctrlKey || event.metaKey || event.altKey || isTyping(event.target))
        return;
      event.preventDefault();
      setOpen(true);
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, []);
  return (
    <>
      <Button kind="quiet" onClick={() => setOpen(true)} aria-keyshortcuts="?">
        Keys
      </Button>
      <Dialog open={open} onOpenChange={setOpen} title="Keys">
        <dl className="grid border-t border-rule">
          {[...EVERYWHERE, ...keys].map((line) => (
            <div key={line.does} className="grid gap-x-4 border-b border-rule py-1 sm:grid-cols-[240px_1fr]">
              <dt className="flex flex-wrap gap-1">
                {line.keys.map((key) => (
                  <kbd key={key} className="border border-ink-2 px-1 text-note">
                    {key}
                  </kbd>
                ))}
              </dt>
              <dd>{line.does}</dd>
            </div>
          ))}
        </dl>
      </Dialog>
    </>
  );
}

function isTyping(target: EventTarget | null): boolean {
  if (!(target instanceof HTMLElement)) return false;
  return target.isContentEditable || ['INPUT', 'TEXTAREA', 'SELECT'].includes(target.tagName);
}
