import { type ComponentProps } from 'react';
import { classes } from '@/components/ui/classes';
import { CONTROL_CLASS } from '@/components/ui/field';

/** A native select in our dress. Give it a label: SelectField does. */
export function SelectControl({ className, ...select }: ComponentProps<'select'>) {
  return (
    <div className="relative">
      <select {...select} className={classes(CONTROL_CLASS, 'appearance-none pr-7', className)} />
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
