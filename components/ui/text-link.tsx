import Link from 'next/link';
import { type ReactNode } from 'react';

export const LINK_CLASS = 'text-spin underline decoration-1 underline-offset-2 hover:decoration-2';

/** A link inside text or a table. `external` leaves the product. */
export function TextLink({
  href,
  children,
  external = false,
}: {
  readonly href: string;
  readonly children: ReactNode;
  readonly external?: boolean;
}) {
  if (external) {
    return (
      <a href={href} rel="noreferrer" className={LINK_CLASS}>
        {children}
      </a>
    );
  }
  return (
    <Link href={href} className={LINK_CLASS}>
      {children}
    </Link>
  );
}
