/** A complex quantity along a sweep: two real columns. Each operation allocates one column, never a point. */
import type { ComplexParts, Phasor } from './phasor';

export class ComplexColumn implements Phasor<ComplexColumn> {
  constructor(
    readonly re: Float64Array,
    readonly im: Float64Array,
  ) {}

  static filled(length: number, value: ComplexParts | number): ComplexColumn {
    const { re, im } = typeof value === 'number' ? { re: value, im: 0 } : value;
    return new ComplexColumn(new Float64Array(length).fill(re), new Float64Array(length).fill(im));
  }

  static pick(condition: Uint8Array, whereTrue: ComplexColumn, whereFalse: ComplexColumn): ComplexColumn {
    const result = ComplexColumn.empty(condition.length);
    for (let index = 0; index < condition.length; index++) {
      const source = condition[index] ? whereTrue : whereFalse;
      result.re[index] = source.re[index];
      result.im[index] = source.im[index];
    }
    return result;
  }

  private static empty(length: number): ComplexColumn {
    return new ComplexColumn(new Float64Array(length), new Float64Array(length));
  }

  get length(): number {
    return this.re.length;
  }

  add(other: ComplexColumn | number): ComplexColumn {
    if (typeof other === 'number') return new ComplexColumn(this.re.map((re) => re + other), this.im);
    const result = ComplexColumn.empty(this.length);
    for (let index = 0; index < this.length; index++) {
      result.re[index] = this.re[index] + other.re[index];
      result.im[index] = this.im[index] + other.im[index];
    }
    return result;
  }

  sub(other: ComplexColumn | number): ComplexColumn {
    if (typeof other === 'number') return this.add(-other);
    const result = ComplexColumn.empty(this.length);
    for (let index = 0; index < this.length; index++) {
      result.re[index] = this.re[index] - other.re[index];
      result.im[index] = this.im[index] - other.im[index];
    }
    return result;
  }

  mul(other: ComplexColumn | number): ComplexColumn {
    if (typeof other === 'number') {
      return new ComplexColumn(
        this.re.map((re) => re * other),
        this.im.map((im) => im * other),
      );
    }
    const result = ComplexColumn.empty(this.length);
    for (let index = 0; index < this.length; index++) {
      const a = this.re[index];
      const b = this.im[index];
      const c = other.re[index];
      const d = other.im[index];
      result.re[index] = a * c - b * d;
      result.im[index] = a * d + b * c;
    }
    return result;
  }

  scaledBy(factors: Float64Array): ComplexColumn {
    const result = ComplexColumn.empty(this.length);
    for (let index = 0; index < this.length; index++) {
      result.re[index] = this.re[index] * factors[index];
      result.im[index] = this.im[index] * factors[index];
    }
    return result;
  }

  /** R. L. Smith, Algorithm 116, Communications of the ACM 5 (1962) 435: scaled by the larger part of the divisor. */
  div(other: ComplexColumn | number): ComplexColumn {
    if (typeof other === 'number') {
      return new ComplexColumn(
        this.re.map((re) => re / other),
        this.im.map((im) => im / other),
      );
    }
    const result = ComplexColumn.empty(this.length);
    for (let index = 0; index < this.length; index++) {
      const a = this.re[index];
      const b = this.im[index];
      const c = other.re[index];
      const d = other.im[index];
      if (Math.abs(c) < Math.abs(d)) {
        const ratio = c / d;
        const divisor = c * ratio + d;
        result.re[index] = (a * ratio + b) / divisor;
        result.im[index] = (b * ratio - a) / divisor;
      } else {
        const ratio = d / c;
        const divisor = d * ratio + c;
        result.re[index] = (a + b * ratio) / divisor;
        result.im[index] = (b - a * ratio) / divisor;
      }
    }
    return result;
  }

  neg(): ComplexColumn {
    return new ComplexColumn(
      this.re.map((re) => -re),
      this.im.map((im) => -im),
    );
  }

  conjugate(): ComplexColumn {
    return new ComplexColumn(this.re, this.im.map((im) => -im));
  }

  exp(): ComplexColumn {
    const result = ComplexColumn.empty(this.length);
    for (let index = 0; index < this.length; index++) {
      const radius = Math.exp(this.re[index]);
      result.re[index] = radius * Math.cos(this.im[index]);
      result.im[index] = radius * Math.sin(this.im[index]);
    }
    return result;
  }

  /** expm1(a) cos b - 2 sin^2(b/2) + j exp(a) sin b. */
  expm1(): ComplexColumn {
    const result = ComplexColumn.empty(this.length);
    for (let index = 0; index < this.length; index++) {
      const a = this.re[index];
      const b = this.im[index];
      const halfSine = Math.sin(0.5 * b);
      result.re[index] = Math.expm1(a) * Math.cos(b) - 2 * halfSine * halfSine;
      result.im[index] = Math.exp(a) * Math.sin(b);
    }
    return result;
  }
}
