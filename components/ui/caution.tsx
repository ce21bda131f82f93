/** The caution of every page with results: what they rest on, and what they are not. Also the API's `caution`. */
export const CAUTION_SENTENCES: readonly string[] = [
  'Results are only as good as the lists behind them.',
  'Nothing here is an approved weight-and-balance report or flight manual.',
  'Loading for flight follows the approved manual, local regulations and licensed or certificated people.',
  'Approval inside the product is a project decision, not an airworthiness approval.',
];

/** On configuration and baseline pages, on screen and in print. */
export function Caution() {
  return (
    <aside
      aria-label="Caution"
      className="keep-together grid gap-x-4 gap-y-1 border-t border-caution pt-2 text-note text-ink-2 sm:grid-cols-[88px_1fr]"
    >
      <p className="font-semibold text-caution">Caution</p>
      <p className="measure">{CAUTION_SENTENCES.join(' ')}</p>
    </aside>
  );
}
