import { CAUTION } from '@/lib/baselines/caution';

/** On configuration and baseline pages, on screen and in print. */
export function Caution() {
  return (
    <aside
      aria-label="Caution"
      className="keep-together grid gap-x-4 gap-y-1 border-t border-caution pt-2 text-note text-ink-2 sm:grid-cols-[88px_1fr]"
    >
      <p className="font-semibold text-caution">Caution</p>
      <p className="measure">{CAUTION}</p>
    </aside>
  );
}
