/** Percentages of the drawing's width at which things stand, from a scale in %MAC. */
export interface BalanceScale {
  readonly from: number;
  readonly to: number;
  readonly place: (percentMac: number) => number;
  readonly ticks: readonly number[];
}

/** A scale that holds the whole chord, both limits and the CG with its sigma, ruled each 5 %MAC (coarser when it must be long). */
export function balanceScale(points: readonly number[]): BalanceScale {
  const low = Math.min(0, ...points);
  const high = Math.max(100, ...points);
  const step = high - low <= 150 ? 5 : niceStep((high - low) / 25);
  const from = Math.floor(low / step) * step;
  const to = Math.ceil(high / step) * step;
  const ticks = Array.from({ length: Math.round((to - from) / step) + 1 }, (_, index) => from + index * step);
  return { from, to, ticks, place: (percent) => (100 * (percent - from)) / (to - from) };
}

function niceStep(rough: number): number {
  const power = 10 ** Math.floor(Math.log10(rough));
  return (rough / power <= 1 ? 1 : rough / power <= 2 ? 2 : rough / power <= 5 ? 5 : 10) * power;
}

/** Where a CG stands between its limits, in words; `inside` false is beyond a limit. */
export function balanceVerdict(
  cg: number,
  forward: number | null,
  aft: number | null,
): { readonly inside: boolean; readonly words: string } {
  if (forward !== null && cg < forward) {
    return { inside: false, words: `${(forward - cg).toFixed(2)} % MAC ahead of the forward limit` };
  }
  if (aft !== null && cg > aft) {
    return { inside: false, words: `${(cg - aft).toFixed(2)} % MAC behind the aft limit` };
  }
  const margins = [
    forward === null ? '' : `${(cg - forward).toFixed(2)} to the forward limit`,
    aft === null ? '' : `${(aft - cg).toFixed(2)} to the aft limit`,
  ].filter(Boolean);
  return {
    inside: true,
    words: margins.length > 0 ? `Margins in % MAC: ${margins.join(', ')}` : 'No limits are set',
  };
}
