/**
 * Exact rational numbers for checking rounded ones. Denominators are positive and not reduced; those that come from doubles are
 * powers of two, so one divides the other and sums stay short.
 */
export class Rational {
  private constructor(
    readonly numerator: bigint,
    readonly denominator: bigint,
  ) {}

  /** The exact value of a finite double. */
  static of(value: number): Rational {
    if (!Number.isFinite(value)) throw new RangeError(`${value} is not a rational number.`);
    let denominator = 1n;
    let scaled = value;
    while (!Number.isInteger(scaled)) {
      scaled *= 2;
      denominator *= 2n;
    }
    return new Rational(BigInt(scaled), denominator);
  }

  plus(other: Rational): Rational {
    if (this.denominator % other.denominator === 0n) {
      const factor = this.denominator / other.denominator;
      return new Rational(this.numerator + other.numerator * factor, this.denominator);
    }
    if (other.denominator % this.denominator === 0n) return other.plus(this);
    return new Rational(
      this.numerator * other.denominator + other.numerator * this.denominator,
      this.denominator * other.denominator,
    );
  }

  times(other: Rational): Rational {
    return new Rational(this.numerator * other.numerator, this.denominator * other.denominator);
  }

  negative(): Rational {
    return new Rational(-this.numerator, this.denominator);
  }

  minus(other: Rational): Rational {
    return this.plus(other.negative());
  }

  over(other: Rational): Rational {
    if (other.numerator === 0n) throw new RangeError('Division by zero.');
    const sign = other.numerator < 0n ? -1n : 1n;
    return new Rational(sign * this.numerator * other.denominator, sign * this.denominator * other.numerator);
  }

  /** Nearest double to about 2^-60 of its value. */
  toNumber(): number {
    if (this.numerator === 0n) return 0;
    const size = (n: bigint): number => (n < 0n ? -n : n).toString(2).length;
    const shift = size(this.denominator) - size(this.numerator) + 64;
    const quotient =
      shift >= 0
        ? (this.numerator << BigInt(shift)) / this.denominator
        : this.numerator / (this.denominator << BigInt(-shift));
    return Number(quotient) * 2 ** -shift;
  }
}

export const ZERO = Rational.of(0);
