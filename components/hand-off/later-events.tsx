import { StateBanner } from '@/components/baselines/state-banner';
import { type BaselineState } from '@/lib/baselines/states';

interface LaterEventsProps {
  readonly baseline: {
    readonly number: number;
    readonly state: BaselineState;
    readonly superseded_by: number | null;
    readonly withdrawn_at: Date | null;
    readonly withdrawer: string | null;
    readonly withdrawal_reason: string | null;
  };
  /** The program's pages. */
  readonly home: string;
}

/** Whether a baseline was superseded or withdrawn since it was signed, by whom and why. */
export function LaterEvents({ baseline, home }: LaterEventsProps) {
  const { number, state, superseded_by, withdrawn_at, withdrawer, withdrawal_reason } = baseline;
  const withdrawn =
    withdrawn_at === null
      ? null
      : { by: withdrawer ?? 'a chief engineer', at: withdrawn_at, reason: withdrawal_reason ?? '' };
  return (
    <StateBanner
      state={state}
      number={number}
      home={`${home}/baselines`}
      supersededBy={superseded_by}
      withdrawn={withdrawn}
    />
  );
}
