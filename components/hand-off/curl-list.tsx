import { CopyButton } from '@/components/ui/copy-button';
import { type CurlLine, tokenLine } from './curl-lines';

/** Lines to paste into a shell, the token's first. */
export function CurlList({ lines }: { readonly lines: readonly CurlLine[] }) {
  const first = { does: 'Once in a shell, with a token of yours', line: tokenLine('paste the token here') };
  return (
    <ol className="grid gap-4">
      {[first, ...lines].map((each) => (
        <li key={each.does} className="min-w-0">
          <CurlLineItem {...each} />
        </li>
      ))}
    </ol>
  );
}

/** One line with what it does. */
export function CurlLineItem({ does, line }: CurlLine) {
  return (
    <div className="grid min-w-0 gap-1">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <span>{does}</span>
        <CopyButton words="Copy line" text={line} />
      </div>
      <Line line={line} />
    </div>
  );
}

/** As it is pasted; it wraps on screen only. */
export function Line({ line }: { readonly line: string }) {
  return (
    <code data-line className="block border-l-2 border-rule bg-sheet px-3 py-1 wrap-anywhere select-all">
      {line}
    </code>
  );
}
