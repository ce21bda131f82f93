import { Banner } from '@/components/ui/banner';
import { Day } from '@/components/ui/day';
import { TextLink } from '@/components/ui/text-link';
import { type BaselineState } from '@/lib/baselines/states';

interface StateBannerProps {
  readonly state: BaselineState;
  readonly number: number;
  /** Where the baselines of the program are. */
  readonly home: string;
  readonly supersededBy: number | null;
  readonly withdrawn: { readonly by: string; readonly at: Date; readonly reason: string } | null;
}

/** What later events say of a signed baseline; nothing while it is the current one. */
export function StateBanner({ state, number, home, supersededBy, withdrawn }: StateBannerProps) {
  const next =
    supersededBy === null ? null : (
      <p>
        It was superseded by{' '}
        <TextLink href={`${home}/${supersededBy}`}>{`baseline ${supersededBy}`}</TextLink>.
      </p>
    );
  if (withdrawn !== null)
    return (
      <Banner severity="blocker" word="Withdrawn" title={`Do not use baseline ${number} any longer`}>
        <p>
          Withdrawn by {withdrawn.by} on <Day at={withdrawn.at} />. Reason: {withdrawn.reason}
        </p>
        {next}
      </Banner>
    );
  if (state === 'superseded')
    return (
      <Banner
        severity="warning"
        word="Superseded"
        title={`Baseline ${number} is not the current one of its build`}
      >
        {next}
      </Banner>
    );
  return null;
}
