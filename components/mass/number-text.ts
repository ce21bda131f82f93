/** A number split for setting in columns. `exponent` is empty unless fixed notation would show a value other than zero as zero. */
export interface NumberText {
  readonly sign: '-' | '+' | '';
  readonly whole: string;
  readonly fraction: string;
  readonly exponent: string;
}

/**
 * `value` with that many decimals. With `plus` a positive number carries its sign too. A non-zero value too small for the
 * decimals is set with two digits and a power of ten, so that nothing real is shown as nothing.
 */
export function numberText(value: number, decimals: number, plus = false): NumberText {
  const size = Math.abs(value);
  const fixed = size.toFixed(decimals);
  const lost = size !== 0 && Number(fixed) === 0;
  const [mantissa = '', exponent = ''] = (lost ? size.toExponential(1) : fixed).split('e');
  const [whole = '', fraction = ''] = mantissa.split('.');
  const sign = value < 0 ? '-' : plus && value > 0 ? '+' : '';
  return { sign, whole, fraction, exponent: exponent.replace('+', '') };
}

/** The text as one string, with an ASCII hyphen-minus: what is copied. */
export function plainText(text: NumberText): string {
  const point = text.fraction ? `.${text.fraction}` : '';
  return `${text.sign}${text.whole}${point}${text.exponent ? `e${text.exponent}` : ''}`;
}

/** How many decimals give `value` that many significant digits, never fewer than none. */
export function decimalsFor(value: number, digits: number): number {
  if (value === 0 || !Number.isFinite(value)) return 0;
  // The order after rounding: 0.9999999 to six digits is 1.00000.
  const order = Number(value.toExponential(digits - 1).split('e')[1]);
  return Math.min(12, Math.max(0, digits - 1 - order));
}

/**
 * Decimals for a set of numbers in one unit: two digits of the smallest standard deviation where there is one (JCGM 100, 7.2.6),
 * otherwise `digits` significant digits of the largest number.
 */
export function sharedDecimals(
  values: readonly number[],
  sigmas: readonly number[] = [],
  digits = 6,
): number {
  const known = sigmas.filter((sigma) => sigma > 0);
  if (known.length > 0) return decimalsFor(Math.min(...known), 2);
  return decimalsFor(Math.max(0, ...values.map(Math.abs)), digits);
}

/** Digit groups of three, counted from the decimal point: `from` the right for a whole part, the left for a fraction. */
export function digitGroups(digits: string, from: 'right' | 'left'): readonly string[] {
  if (digits === '') return [];
  const first = from === 'right' ? digits.length % 3 || 3 : 3;
  const groups = [digits.slice(0, first)];
  for (let at = first; at < digits.length; at += 3) groups.push(digits.slice(at, at + 3));
  return groups;
}

/** The decimals that a person typed, for figures that are shown back: of the shortest text that reads as `value`, at most 12. */
export function typedDecimals(value: number): number {
  const [, fraction = ''] = String(value).split('.');
  return fraction.includes('e') ? 12 : Math.min(12, fraction.length);
}
