import { Banner } from '@/components/ui/banner';
import { Day } from '@/components/ui/day';
import { TextLink } from '@/components/ui/text-link';
import { type SubmissionState } from '@/lib/baselines/states';

interface DecisionBannerProps {
  readonly state: SubmissionState;
  readonly decider: string | null;
  readonly decidedAt: Date | null;
  readonly reason: string | null;
  readonly baseline: number | null;
  readonly home: string;
}

/** How a submission was decided; nothing while it waits. */
export function DecisionBanner({ state, decider, decidedAt, reason, baseline, home }: DecisionBannerProps) {
  if (state === 'submitted' || decidedAt === null) return null;
  if (state === 'returned')
    return (
      <Banner severity="warning" word="Returned" title={`Returned by ${decider ?? 'a chief engineer'}`}>
        <p>
          <Day at={decidedAt} time />. Reasons: {reason}
        </p>
      </Banner>
    );
  return (
    <Banner
      severity="done"
      word="Signed"
      title={`Signed by ${decider ?? 'a chief engineer'}`}
      action={
        baseline === null ? null : (
          <TextLink href={`${home}/${baseline}`}>{`Open baseline ${baseline}`}</TextLink>
        )
      }
    >
      <p>
        <Day at={decidedAt} time />
      </p>
    </Banner>
  );
}
