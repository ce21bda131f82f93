import { type ReactNode } from 'react';

export interface Definition {
  readonly term: string;
  readonly value: ReactNode;
}

/** Facts about one thing, term at the left, ruled like a form. */
export function DefinitionList({ items }: { readonly items: readonly Definition[] }) {
  return (
    <dl className="grid border-t border-rule">
      {items.map((item) => (
        <div
          key={item.term}
          className="grid gap-x-4 border-b border-rule py-1 sm:grid-cols-[minmax(120px,34%)_1fr]"
        >
          <dt className="text-ink-2">{item.term}</dt>
          <dd className="min-w-0 wrap-anywhere">{item.value}</dd>
        </div>
      ))}
    </dl>
  );
}
