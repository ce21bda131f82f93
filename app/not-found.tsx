import { type Metadata } from 'next';
import { PageFrame } from '@/components/shell/page-frame';
import { ButtonLink } from '@/components/ui/button';
import { PageHead } from '@/components/ui/section';

export const metadata: Metadata = { title: 'Nothing at this address' };

export default function NotFound() {
  return (
    <PageFrame width="narrow">
      <PageHead
        title="Nothing at this address"
        lead="Either nothing was ever here, or you are not among those who may see it. A program shows its pages to its members only."
      />
      <div>
        <ButtonLink href="/" kind="primary">
          Go to your programs
        </ButtonLink>
      </div>
    </PageFrame>
  );
}
