import { Banner } from '@/components/ui/banner';
import { type FormState } from '@/lib/form-state';

/** What became of a form, at its top: nothing before it was sent. */
export function FormAnswer({ state }: { readonly state: FormState<unknown> }) {
  if (state.status === 'idle' || state.message === null) return null;
  return state.status === 'done' ? (
    <Banner severity="done" live>
      <p>{state.message}</p>
    </Banner>
  ) : (
    <Banner severity="blocker" word="Failed" live>
      <p>{state.message}</p>
    </Banner>
  );
}
