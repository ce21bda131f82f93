import { type Metadata } from 'next';
import { PageFrame } from '@/components/shell/page-frame';
import { ButtonLink } from '@/components/ui/button';
import { PageHead } from '@/components/ui/section';

export const metadata: Metadata = { title: 'Not for your role' };

export default function Forbidden() {
  return (
    <PageFrame width="narrow">
      <PageHead
        title="Not for your role"
        lead="You are signed in, but your role does not open this page. A chief engineer of the program, or an administrator, can change your role."
      />
      <div>
        <ButtonLink href="/" kind="primary">
          Go to your programs
        </ButtonLink>
      </div>
    </PageFrame>
  );
}
