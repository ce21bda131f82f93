import { type Metadata } from 'next';
import { findMailLink } from '@/db/queries/people';
import { PasswordResetForm } from '@/components/account/password-reset-forms';
import { PageFrame } from '@/components/shell/page-frame';
import { Banner } from '@/components/ui/banner';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { hashSecret } from '@/lib/server/auth/secret';
import { serverDb } from '@/lib/server/database';
import { resetPasswordAction } from './actions';

export const metadata: Metadata = { title: 'Set a new password' };

/** Looking at the link consumes nothing; setting the password does. */
export default async function PasswordResetPage({ params }: PageProps<'/password-reset/[secret]'>) {
  const { secret } = await params;
  const owner = await findMailLink(serverDb(), hashSecret(secret), 'password-reset', new Date());
  return (
    <PageFrame width="narrow">
      <PageHead
        title="Set a new password"
        {...(owner ? { lead: `For ${owner.email}. Every session of this account ends when it is set.` } : {})}
      />
      {owner ? (
        <PasswordResetForm action={resetPasswordAction} secret={secret} />
      ) : (
        <Banner severity="warning" title="This link no longer works">
          <p>
            It has been used, replaced by a newer one, or has run out after an hour.{' '}
            <TextLink href="/password-reset">Ask for a new link</TextLink>.
          </p>
        </Banner>
      )}
    </PageFrame>
  );
}
