import { type ReactNode } from 'react';

/** An empty place says what belongs here and offers the first step. */
export function EmptyPlace({
  title,
  children,
  action,
}: {
  readonly title: string;
  readonly children: ReactNode;
  readonly action?: ReactNode;
}) {
  return (
    <div className="grid justify-items-start gap-3 border border-dashed border-ink-2 px-4 py-6 sm:px-6">
      <p className="text-lead font-semibold">{title}</p>
      <div className="measure grid gap-2 text-ink-2">{children}</div>
      {action ? <div className="mt-1 flex flex-wrap items-center gap-3">{action}</div> : null}
    </div>
  );
}
