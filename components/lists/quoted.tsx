import { Fragment } from 'react';

/** A sentence in which what stands between backticks is quoted as it is in the file. */
export function Quoted({ text }: { readonly text: string }) {
  return text.split('`').map((part, index) =>
    index % 2 === 1 ? (
      <code key={index} className="bg-hover px-0.5 wrap-anywhere">
        {part}
      </code>
    ) : (
      <Fragment key={index}>{part}</Fragment>
    ),
  );
}
