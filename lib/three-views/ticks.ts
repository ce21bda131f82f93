export interface Ticks {
  /** Between labelled ticks. */
  readonly step: number;
  /** Every `step`, labelled. */
  readonly labelled: readonly number[];
  /** Those between them. */
  readonly between: readonly number[];
  /** Decimals that tell the labels apart. */
  readonly decimals: number;
}

/** The largest of 1, 2 or 5 times a power of ten that is at most `value` (> 0). */
export function niceBelow(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value));
  const share = value / power;
  const factor = [5, 2].find((each) => share >= each * (1 - 1e-9)) ?? 1;
  return factor * power;
}

/** The smallest of 1, 2 or 5 times a power of ten that is at least `rough` (> 0). */
export function niceStep(rough: number): number {
  const power = 10 ** Math.floor(Math.log10(rough));
  const share = rough / power;
  // A hair above: 0.2 / 0.1 is not quite 2.
  const factor = [1, 2, 5].find((each) => share <= each * (1 + 1e-9)) ?? 10;
  return factor * power;
}

/** Ticks from `from` to `to` (from < to) at multiples of a nice step, about `most` of them labelled. */
export function ticksWithin(from: number, to: number, most: number): Ticks {
  const step = niceStep((to - from) / most);
  const parts = Math.round(step / 10 ** Math.floor(Math.log10(step) + 1e-9)) === 2 ? 4 : 5;
  const fine = step / parts;
  const first = Math.ceil(from / fine - 1e-9);
  const last = Math.floor(to / fine + 1e-9);
  const all = Array.from({ length: last - first + 1 }, (_, index) => first + index);
  return {
    step,
    // (n / parts) * step, not n * fine: whole multiples come out whole.
    labelled: all.filter((n) => n % parts === 0).map((n) => (n / parts) * step),
    between: all.filter((n) => n % parts !== 0).map((n) => n * fine),
    decimals: Math.max(0, -Math.floor(Math.log10(step) + 1e-9)),
  };
}
