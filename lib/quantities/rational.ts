/**
 * Exact scaling of what a person typed. "250 nH/m" must be the very number that 2.5e-7 is, and "12 ft" the
 * one that 3.6576 is; a product of two binary fractions would miss both by a digit in the last place.
 */
export interface Rational {
  readonly numerator: bigint;
  readonly denominator: bigint;
  /** What no fraction can say: the pi in a degree, the logarithm in a decibel. 1 where there is none. */
  readonly irrational: number;
}

export const one: Rational = { numerator: 1n, denominator: 1n, irrational: 1 };

/** A whole power of ten, negative ones too. */
export function powerOfTen(exponent: number): Rational {
  const power = 10n ** BigInt(Math.abs(exponent));
  return exponent < 0 ? { ...one, denominator: power } : { ...one, numerator: power };
}

export function times(left: Rational, right: Rational): Rational {
  return {
    numerator: left.numerator * right.numerator,
    denominator: left.denominator * right.denominator,
    irrational: left.irrational * right.irrational,
  };
}

export function over(left: Rational, right: Rational): Rational {
  return {
    numerator: left.numerator * right.denominator,
    denominator: left.denominator * right.numerator,
    irrational: left.irrational / right.irrational,
  };
}

/** The fraction that a decimal text such as "-0.3048" or "2.5e-7" is. */
export function rationalOf(decimal: string): Rational {
  const [mantissa, exponent = '0'] = decimal.toLowerCase().split('e');
  const [whole, fraction = ''] = mantissa.split('.');
  return times({ ...one, numerator: BigInt(whole + fraction) }, powerOfTen(Number(exponent) - fraction.length));
}

/** Enough that reading them back rounds only once. */
const digits = 40;

export function numberOf({ numerator, denominator, irrational }: Rational): number {
  if (numerator === 0n) return 0;
  const magnitude = String(abs(numerator)).length - String(abs(denominator)).length;
  const shift = digits - magnitude;
  const quotient = shift >= 0 ? (numerator * 10n ** BigInt(shift)) / denominator : numerator / (denominator * 10n ** BigInt(-shift));
  return Number(`${quotient}e${-shift}`) * irrational;
}

function abs(value: bigint): bigint {
  return value < 0n ? -value : value;
}
