import { type ReactNode } from 'react';

/** The buttons that end a form, the primary one first. */
export function Actions({ children }: { readonly children: ReactNode }) {
  return <div className="no-print flex flex-wrap items-center gap-3">{children}</div>;
}
