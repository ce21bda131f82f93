import { type Severity, SeverityWord } from '@/components/ui/severity';
import { type BaselineState, type SubmissionState } from '@/lib/baselines/states';

const WORDS: Readonly<
  Record<BaselineState | SubmissionState, { readonly severity: Severity; readonly word: string }>
> = {
  current: { severity: 'done', word: 'Current' },
  superseded: { severity: 'note', word: 'Superseded' },
  withdrawn: { severity: 'blocker', word: 'Withdrawn' },
  submitted: { severity: 'warning', word: 'To decide' },
  returned: { severity: 'note', word: 'Returned' },
  approved: { severity: 'done', word: 'Signed' },
};

/** The state of a submission or a baseline, by mark and word. */
export function StateWord({ state }: { readonly state: BaselineState | SubmissionState }) {
  return <SeverityWord {...WORDS[state]} />;
}
