/** Figures beyond these are those of the binary number, not of the value. */
const DOUBLE_FIGURES = 15;

/** The power of ten of the first figure of `value` when it is rounded to `figures` figures: 0.0996 to two is 0.10, so -1. */
function order(value: number, figures: number): number {
  return Number(
    Math.abs(value)
      .toExponential(figures - 1)
      .split('e')[1],
  );
}

/**
 * Decimals of a value such that its last figure stands where the second figure of its σ does (JCGM 100:2008, 7.2.6: at most two
 * figures of an uncertainty, and the value rounded to match). Negative: rounded before the decimal point. Null without a σ.
 */
export function decimalsFromSigma(sigma: number | null): number | null {
  if (sigma === null || !(sigma > 0) || !Number.isFinite(sigma)) return null;
  return 1 - order(sigma, 2);
}

/**
 * How many significant figures of a value its σ leaves meaning in, by the same rule; at most 15. 0 where the value rounds to nothing
 * beside its σ. Null without a σ. For show only: stored values keep all their figures.
 */
export function significantDigits(value: number, sigma: number | null): number | null {
  const decimals = decimalsFromSigma(sigma);
  if (decimals === null) return null;
  const kept = decimals + order(value, DOUBLE_FIGURES) + 1;
  if (value === 0 || kept < 0) return 0;
  // Rounding may carry: 9.9996 to three decimals is 10.000, five figures. With no figure kept, only a half or more rounds up.
  if (kept === 0) return Math.abs(value) >= 0.5 * 10 ** -decimals ? 1 : 0;
  if (kept >= DOUBLE_FIGURES) return DOUBLE_FIGURES;
  return decimals + order(value, kept) + 1;
}
