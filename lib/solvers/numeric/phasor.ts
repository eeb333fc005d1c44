/**
 * One arithmetic for a single frequency and for a sweep. A formula is written once over `T`; at one point
 * `T` is a complex.js number, over a sweep it is a column. What is real stays a Float64Array in both.
 *
 * Of complex.js only add, sub, mul, div (Smith's algorithm, no overflow), neg, conjugate, exp and expm1 are used,
 * each good to a few units of rounding of the magnitude. Avoided, and why:
 * - abs squares before it scales and so underflows below 1e-154; `magnitudes` below scales first;
 * - sqrt rests on abs, and sqrt(Z) sqrt(Y) cancels in the attenuation of a good line (telegrapher.ts);
 * - sinh, cosh, tanh overflow at 6165 dB or divide infinity by infinity (line-two-port.ts needs none).
 */
import Complex from 'complex.js';
import { ComplexColumn } from './complex-column';

export interface Phasor<T> {
  add(other: T | number): T;
  sub(other: T | number): T;
  mul(other: T | number): T;
  div(other: T | number): T;
  neg(): T;
  conjugate(): T;
  exp(): T;
  /** exp(x) - 1 without cancellation near 0. */
  expm1(): T;
}

export interface ComplexParts {
  readonly re: number;
  readonly im: number;
}

/** Where a formula's values live: at one point or along a sweep. */
export interface Space<T extends Phasor<T>> {
  readonly length: number;
  from(re: Float64Array, im: Float64Array): T;
  constant(value: ComplexParts | number): T;
  column(value: T): ComplexColumn;
  /** Multiplies each point by a real factor. */
  scale(value: T, factors: Float64Array): T;
  pick(condition: Uint8Array, whereTrue: T, whereFalse: T): T;
}

const pointSpace: Space<Complex> = {
  length: 1,
  from: (re, im) => new Complex(re[0], im[0]),
  constant: (value) => new Complex(value),
  column: ({ re, im }) => new ComplexColumn(Float64Array.of(re), Float64Array.of(im)),
  scale: (value, factors) => new Complex(value.re * factors[0], value.im * factors[0]),
  pick: (condition, whereTrue, whereFalse) => (condition[0] ? whereTrue : whereFalse),
};

function columnSpace(length: number): Space<ComplexColumn> {
  return {
    length,
    from: (re, im) => new ComplexColumn(re, im),
    constant: (value) => ComplexColumn.filled(length, value),
    column: (value) => value,
    scale: (value, factors) => value.scaledBy(factors),
    pick: (condition, whereTrue, whereFalse) => ComplexColumn.pick(condition, whereTrue, whereFalse),
  };
}

/** Runs a formula at one point or along a sweep, by the number of frequencies. */
export function inSpaceOf<Result>(length: number, formula: <T extends Phasor<T>>(space: Space<T>) => Result): Result {
  return length === 1 ? formula(pointSpace) : formula(columnSpace(length));
}

export function magnitudes<T extends Phasor<T>>(space: Space<T>, value: T): Float64Array {
  const { re, im } = space.column(value);
  const result = new Float64Array(re.length);
  for (let index = 0; index < result.length; index++) result[index] = magnitude(re[index], im[index]);
  return result;
}

/** |re + j im| that neither overflows nor underflows. */
export function magnitude(re: number, im: number): number {
  const first = Math.abs(re);
  const second = Math.abs(im);
  const large = first < second ? second : first;
  const small = first < second ? first : second;
  if (small === 0) return large;
  const ratio = small / large;
  return large * Math.sqrt(1 + ratio * ratio);
}

/** Where a value is no more than the rounding of the terms it was made of, it is zero. */
const dustInUnitsOfRounding = 8;

/** Sets to exactly 0 what is only rounding: `scales` is the sum of the magnitudes of the value's own terms. */
export function clearDust<T extends Phasor<T>>(space: Space<T>, value: T, scales: Float64Array): T {
  const { re, im } = space.column(value);
  const isDust = new Uint8Array(space.length);
  for (let index = 0; index < isDust.length; index++) {
    isDust[index] = magnitude(re[index], im[index]) <= dustInUnitsOfRounding * Number.EPSILON * scales[index] ? 1 : 0;
  }
  return isDust.includes(1) ? space.pick(isDust, space.constant(0), value) : value;
}
