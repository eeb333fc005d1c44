/**
 * Complex numbers of 32 digits, each part an unevaluated sum of two doubles: for determinants and sums that cancel, at one point.
 *
 *   sum       s = a + b, e = (a - (s - t)) + (b - t), t = s - a          Knuth, The Art of Computer Programming, vol. 2, 4.2.2 (from memory)
 *   product   p = a b, e = ((a1 b1 - p) + a1 b2 + a2 b1) + a2 b2         Dekker, Numerische Mathematik 18 (1971) 224-242 (from memory)
 *
 * Accuracy: 1e-31 relative for a sum or product. Range: parts from 1e-140 to 1e290; beyond, no worse than a double. Throws nothing.
 */
import type { ComplexParts } from './phasor';

/** 2^27 + 1: cuts a double into halves whose products are exact. */
const splitter = 134217729;

class DoubleDouble {
  constructor(
    readonly high: number,
    readonly low: number,
  ) {}

  add(other: DoubleDouble): DoubleDouble {
    const sum = exactSum(this.high, other.high);
    const rest = exactSum(this.low, other.low);
    const middle = normalized(sum.high, sum.low + rest.high);
    return normalized(middle.high, middle.low + rest.low);
  }

  neg(): DoubleDouble {
    return new DoubleDouble(-this.high, -this.low);
  }

  mul(other: DoubleDouble): DoubleDouble {
    const product = exactProduct(this.high, other.high);
    return normalized(product.high, product.low + (this.high * other.low + this.low * other.high));
  }
}

function normalized(high: number, low: number): DoubleDouble {
  const sum = high + low;
  return new DoubleDouble(sum, low - (sum - high));
}

function exactSum(a: number, b: number): DoubleDouble {
  const sum = a + b;
  const part = sum - a;
  return new DoubleDouble(sum, a - (sum - part) + (b - part));
}

function exactProduct(a: number, b: number): DoubleDouble {
  const product = a * b;
  const aCut = splitter * a;
  const aHigh = aCut - (aCut - a);
  const aLow = a - aHigh;
  const bCut = splitter * b;
  const bHigh = bCut - (bCut - b);
  const bLow = b - bHigh;
  return new DoubleDouble(product, aHigh * bHigh - product + aHigh * bLow + aLow * bHigh + aLow * bLow);
}

export class LongComplex {
  private constructor(
    private readonly re: DoubleDouble,
    private readonly im: DoubleDouble,
  ) {}

  static of({ re, im }: ComplexParts): LongComplex {
    return new LongComplex(new DoubleDouble(re, 0), new DoubleDouble(im, 0));
  }

  add(other: LongComplex): LongComplex {
    return new LongComplex(this.re.add(other.re), this.im.add(other.im));
  }

  sub(other: LongComplex): LongComplex {
    return this.add(other.neg());
  }

  neg(): LongComplex {
    return new LongComplex(this.re.neg(), this.im.neg());
  }

  conjugate(): LongComplex {
    return new LongComplex(this.re, this.im.neg());
  }

  mul(other: LongComplex): LongComplex {
    return new LongComplex(this.re.mul(other.re).add(this.im.mul(other.im).neg()), this.re.mul(other.im).add(this.im.mul(other.re)));
  }

  /** To the nearest doubles. */
  rounded(): ComplexParts {
    return { re: this.re.high, im: this.im.high };
  }
}

export const longOne = LongComplex.of({ re: 1, im: 0 });
