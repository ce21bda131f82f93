import { productError, sumError } from './sums';

/** A number to twice the precision of a double: the sum of a double and of what is left over, less than half its last place. */
export type Twice = readonly [number, number];

/** a + b of a larger and a smaller double, exactly. */
function joined(large: number, small: number): Twice {
  const sum = large + small;
  return [sum, small - (sum - large)];
}

/** a + b (Dekker 1971). */
export function addTwice(a: Twice, b: Twice): Twice {
  const sum = a[0] + b[0];
  return joined(sum, sumError(a[0], b[0], sum) + (a[1] + b[1]));
}

/** a b (Dekker 1971). */
export function timesTwice(a: Twice, b: Twice): Twice {
  const product = a[0] * b[0];
  return joined(product, productError(a[0], b[0], product) + (a[0] * b[1] + a[1] * b[0]));
}

export function minusTwice(a: Twice): Twice {
  return [-a[0], -a[1]];
}

/** a / b, b not zero: one step of long division after the first. */
export function overTwice(a: Twice, b: Twice): Twice {
  const quotient = a[0] / b[0];
  const rest = addTwice(a, minusTwice(timesTwice(b, [quotient, 0])));
  return joined(quotient, rest[0] / b[0]);
}
