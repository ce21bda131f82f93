import Link from 'next/link';
import { type ComponentProps, type ReactNode } from 'react';
import { buttonClass, type ButtonKind } from '@/components/ui/button-style';

type ButtonProps = ComponentProps<'button'> & { readonly kind?: ButtonKind };

/** A verb with its object. One primary button on a page. `type` is `button` unless said. */
export function Button({ kind = 'secondary', className, type = 'button', ...rest }: ButtonProps) {
  return <button {...rest} type={type} className={buttonClass(kind, className)} />;
}

interface ButtonLinkProps {
  readonly href: string;
  readonly kind?: ButtonKind;
  readonly children: ReactNode;
  /** For a file that is downloaded, not a page. */
  readonly download?: boolean;
}

/** Looks like a button and goes to a page. */
export function ButtonLink({ href, kind = 'secondary', children, download = false }: ButtonLinkProps) {
  if (download) {
    return (
      <a href={href} download className={buttonClass(kind)}>
        {children}
      </a>
    );
  }
  return (
    <Link href={href} className={buttonClass(kind)}>
      {children}
    </Link>
  );
}
