import { type ReactNode } from 'react';

/** Fields under each other, 16 px apart, no wider than a line of text. */
export function FormGrid({ children }: { readonly children: ReactNode }) {
  return <div className="grid max-w-160 gap-4">{children}</div>;
}

/** Fields that are read together, side by side where there is room. */
export function FieldRow({ children }: { readonly children: ReactNode }) {
  return <div className="grid items-start gap-4 sm:auto-cols-fr sm:grid-flow-col">{children}</div>;
}
