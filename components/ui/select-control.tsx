'use client';

import { type ComponentProps, useEffect, useRef } from 'react';
import { classes } from '@/components/ui/classes';
import { CONTROL_CLASS } from '@/components/ui/field';

/** A native select in our dress. Give it a label: SelectField does. */
export function SelectControl({ className, ...select }: ComponentProps<'select'>) {
  const control = useRef<HTMLSelectElement>(null);
  // React resets a form after its action, and the browser then takes a select back to what it was first rendered with: without
  // this, a refused form would show, and send, another choice than the one that `value` states.
  useEffect(() => {
    if (select.value === undefined) return;
    for (const option of control.current?.options ?? []) option.defaultSelected = option.selected;
  }, [select.value]);
  return (
    <div className="relative">
      <select
        {...select}
        ref={control}
        className={classes(CONTROL_CLASS, 'appearance-none pr-7', className)}
      />
      <svg
        width="8"
        height="8"
        viewBox="0 0 8 8"
        aria-hidden="true"
        className="pointer-events-none absolute inset-y-0 right-2.5 my-auto fill-none stroke-current"
      >
        <path d="M1 2.5 4 6 7 2.5" strokeWidth="1.5" />
      </svg>
    </div>
  );
}
