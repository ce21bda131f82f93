import { type Metadata } from 'next';
import { PasswordResetRequestForm } from '@/components/account/password-reset-forms';
import { PageFrame } from '@/components/shell/page-frame';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { requestPasswordResetAction } from './actions';

export const metadata: Metadata = { title: 'Set a new password' };

export default function PasswordResetRequestPage() {
  return (
    <PageFrame width="narrow">
      <PageHead
        title="Set a new password"
        lead="We send a link to your mail address; the new password is set there."
        above={<TextLink href="/sign-in">Sign in</TextLink>}
      />
      <PasswordResetRequestForm action={requestPasswordResetAction} />
    </PageFrame>
  );
}
