import { type ComponentProps } from 'react';
import { OneButtonForm } from '@/components/forms/one-button-form';
import { PageFrame } from '@/components/shell/page-frame';
import { may } from '@/lib/permissions';
import { type SignedIn } from '@/lib/server/auth/session';
import { signOutAction } from './actions';

type FrameProps = Omit<ComponentProps<typeof PageFrame>, 'person'> & { readonly user: SignedIn };

/** The frame of every page behind sign-in. */
export function WorkspaceFrame({ user, links = [], ...rest }: FrameProps) {
  const admin = may('people.keep', { admin: user.admin, role: null });
  return (
    <PageFrame
      {...rest}
      links={admin ? [...links, { href: '/admin', words: 'Administration' }] : links}
      person={{
        name: user.name,
        href: '/account',
        signOut: (
          <OneButtonForm action={signOutAction} fields={{}} words="Sign out" pendingWords="Signing out" />
        ),
      }}
    />
  );
}
