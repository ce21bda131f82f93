import { type Metadata } from 'next';
import { findMailLink } from '@/db/queries/people';
import { InvitationForm } from '@/components/account/invitation-form';
import { PageFrame } from '@/components/shell/page-frame';
import { Banner } from '@/components/ui/banner';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { hashSecret } from '@/lib/server/auth/secret';
import { serverDb } from '@/lib/server/database';
import { acceptInvitationAction } from './actions';

export const metadata: Metadata = { title: 'Invitation' };

/** Looking at the link consumes nothing; joining does. */
export default async function InvitationPage({ params }: PageProps<'/invitation/[secret]'>) {
  const { secret } = await params;
  const invited = await findMailLink(serverDb(), hashSecret(secret), 'invitation', new Date());
  return (
    <PageFrame width="narrow">
      <PageHead
        title="Join Polhode"
        {...(invited
          ? { lead: `You were invited under ${invited.email}. Choose a password, and you are in.` }
          : {})}
      />
      {invited ? (
        <InvitationForm
          action={acceptInvitationAction}
          secret={secret}
          email={invited.email}
          name={invited.name}
        />
      ) : (
        <Banner severity="warning" title="This invitation no longer works">
          <p>
            It has been used, replaced by a newer one, or has run out after 7 days. If you have joined,{' '}
            <TextLink href="/sign-in">sign in</TextLink>; if not, ask a chief engineer of your program or an
            administrator for a new one.
          </p>
        </Banner>
      )}
    </PageFrame>
  );
}
