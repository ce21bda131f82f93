export interface ChartScale {
  readonly from: number;
  readonly to: number;
  readonly ticks: readonly number[];
  /** Share of the length, 0 to 1, at which a value stands. */
  readonly place: (value: number) => number;
  /** Decimals that tell its ticks apart. */
  readonly decimals: number;
}

/** A ruled scale that holds all values, with a few round marks. */
export function chartScale(values: readonly number[], marks = 5): ChartScale {
  const [low, high] = [Math.min(...values), Math.max(...values)];
  const room = high - low || Math.abs(high) * 0.01 || 1;
  const step = roundStep(room / marks);
  const from = Math.floor((low - room * 0.02) / step) * step;
  const to = Math.ceil((high + room * 0.02) / step) * step;
  const count = Math.round((to - from) / step);
  return {
    from,
    to,
    ticks: Array.from({ length: count + 1 }, (_, index) => from + index * step),
    place: (value) => (value - from) / (to - from),
    decimals: Math.max(0, -Math.floor(Math.log10(step) + 1e-9)),
  };
}

/** 1, 2 or 5 times a power of ten, at least `rough`. */
function roundStep(rough: number): number {
  const power = 10 ** Math.floor(Math.log10(rough));
  const share = rough / power;
  return (share <= 1 ? 1 : share <= 2 ? 2 : share <= 5 ? 5 : 10) * power;
}
