import { type Metadata } from 'next';
import { redirect } from 'next/navigation';
import { SignInForm } from '@/components/account/sign-in-form';
import { PageFrame } from '@/components/shell/page-frame';
import { Banner } from '@/components/ui/banner';
import { PageHead } from '@/components/ui/section';
import { ownPath } from '@/lib/server/http/own-path';
import { currentUser } from '@/lib/server/http/page';
import { signInAction } from './actions';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage({ searchParams }: PageProps<'/sign-in'>) {
  const { next, after } = await searchParams;
  const path = ownPath(typeof next === 'string' ? next : undefined);
  if (await currentUser()) redirect(path);
  return (
    <PageFrame width="narrow">
      <PageHead
        title="Sign in"
        lead="Mass and inertia baselines of aircraft programs, from the component mass list to the simulator."
      />
      {after === 'password' ? (
        <Banner severity="done">
          <p>The password is set, and every session was ended. Sign in with it.</p>
        </Banner>
      ) : null}
      <SignInForm action={signInAction} next={path} />
      <p className="measure text-ink-2">
        Accounts are made by invitation. If you need one, ask a chief engineer of your program.
      </p>
    </PageFrame>
  );
}
