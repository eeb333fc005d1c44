/**
 * Two-ports in a chain, each as its ABCD matrix times a common factor:  M = scale * ABCD,  so that an element whose own ABCD does
 * not exist (a short across the path) still has a matrix, and only `scale` vanishes.
 *
 *   series Z: [1 Z; 0 1]   shunt Y: [1 0; Y 1]   transformer n: [n 0; 0 1/n]   line: cosh, sinh        Pozar table 4.1
 *
 * With (v, i) of the one-port, Z = v/i and Y = i/v: the series element is i * ABCD, the shunt one v * ABCD. All are reciprocal, so the
 * determinant of ABCD is 1 by construction and is never formed from its entries.
 */
import type { Method } from '../calculation';
import type { Phasor, Space } from '../numeric/phasor';
import { magnitudes } from '../numeric/phasor';
import { binaryExponent, powerOfTwo } from '../numeric/power-of-two';
import type { LineTwoPort } from './line-two-port';
import { oddScaleOf, type OnePort } from './one-port';

export const transmissionMatrix: Method = {
  id: 'transmission-matrix',
  title: 'ABCD parameters of elements and of their cascade',
  source: 'Pozar, Microwave Engineering, 4th ed., section 4.4 and table 4.1 (numbers from memory)',
  range: 'any chain of linear reciprocal two-ports',
  accuracy: 'exact; 1e-12 relative in float64',
};

type Four<Each> = { readonly a: Each; readonly b: Each; readonly c: Each; readonly d: Each };
export const entries = ['a', 'b', 'c', 'd'] as const;

export interface TwoPort<T> extends Four<T> {
  /** scale times d(ABCD)/d omega. */
  readonly slope: Four<T>;
  /** Sums of the magnitudes of the terms of each entry: what a vanishing entry is measured against. */
  readonly size: Four<Float64Array>;
  /** scale = factor * exp(-lossNp) * 2^exponent. */
  readonly factor: T;
  readonly factorSize: Float64Array;
  readonly lossNp: Float64Array;
  readonly exponent: Float64Array;
}

export function seriesTwoPort<T extends Phasor<T>>(space: Space<T>, { v, i, vSlope, iSlope, vScale, iScale }: OnePort<T>): TwoPort<T> {
  const zero = space.constant(0);
  const none = new Float64Array(space.length);
  return {
    a: i, b: v, c: zero, d: i,
    slope: { a: zero, b: quotientSlope(space, v, i, vSlope, iSlope), c: zero, d: zero },
    size: { a: iScale, b: vScale, c: none, d: iScale },
    factor: i, factorSize: iScale, lossNp: none, exponent: none,
  };
}

export function shuntTwoPort<T extends Phasor<T>>(space: Space<T>, { v, i, vSlope, iSlope, vScale, iScale }: OnePort<T>): TwoPort<T> {
  const zero = space.constant(0);
  const none = new Float64Array(space.length);
  return {
    a: v, b: zero, c: i, d: v,
    slope: { a: zero, b: zero, c: quotientSlope(space, i, v, iSlope, vSlope), d: zero },
    size: { a: vScale, b: none, c: iScale, d: vScale },
    factor: v, factorSize: vScale, lossNp: none, exponent: none,
  };
}

export function transformerTwoPort<T extends Phasor<T>>(space: Space<T>, n: number): TwoPort<T> {
  const zero = space.constant(0);
  const none = new Float64Array(space.length);
  const column = (value: number) => new Float64Array(space.length).fill(value);
  return {
    a: space.constant(n), b: zero, c: zero, d: space.constant(1 / n),
    slope: { a: zero, b: zero, c: zero, d: zero },
    size: { a: column(n), b: none, c: none, d: column(1 / n) },
    factor: space.constant(1), factorSize: column(1), lossNp: none, exponent: none,
  };
}

/** Its entries are divided by exp(t) already: scale = exp(-t). */
export function lineElementTwoPort<T extends Phasor<T>>(space: Space<T>, line: LineTwoPort<T>): TwoPort<T> {
  const trip = magnitudes(space, line.roundTrip);
  const even = trip.map((p, index) => 0.5 * (1 + p) * line.sensitivity[index]);
  const none = new Float64Array(space.length);
  return {
    a: line.even, b: line.series, c: line.shunt, d: line.even,
    slope: { a: line.evenSlope, b: line.seriesSlope, c: line.shuntSlope, d: line.evenSlope },
    size: { a: even, b: oddScaleOf(space, line, line.series), c: oddScaleOf(space, line, line.shunt), d: even },
    factor: line.turn, factorSize: new Float64Array(space.length).fill(1), lossNp: line.lossNp, exponent: none,
  };
}

/** d(x/y) times y, which is what the scaled matrix holds; where y vanishes nothing passes and there is no group delay to find. */
function quotientSlope<T extends Phasor<T>>(space: Space<T>, x: T, y: T, xSlope: T, ySlope: T): T {
  const vanishes = Uint8Array.from(magnitudes(space, y), (each) => (each === 0 ? 1 : 0));
  return xSlope.sub(x.mul(ySlope).div(space.pick(vanishes, space.constant(1), y)));
}

/**
 * The chain of two, the first nearer to port 1. Range: any. Accuracy: a few units of rounding of `size`. Throws nothing.
 * The trap: products of many entries overflow, so each product is brought back to about 1 by a power of two, kept apart.
 */
export function chain<T extends Phasor<T>>(space: Space<T>, first: TwoPort<T>, second: TwoPort<T>): TwoPort<T> {
  const product = multiply(first, second);
  const slope = add(multiply(first.slope, second), multiply(first, second.slope));
  const size = multiplySizes(first.size, second.size);
  const shift = new Float64Array(space.length);
  const down = new Float64Array(space.length);
  for (let index = 0; index < space.length; index++) {
    const largest = Math.max(size.a[index], size.b[index], size.c[index], size.d[index]);
    shift[index] = largest > 0 && Number.isFinite(largest) ? Math.max(-1000, Math.min(1000, binaryExponent(largest))) : 0;
    down[index] = powerOfTwo(-shift[index]);
  }
  const factor = first.factor.mul(second.factor);
  const factorSize = first.factorSize.map((each, index) => each * second.factorSize[index]);
  const factorShift = factorSize.map((each) => (each > 0 && Number.isFinite(each) ? Math.max(-1000, Math.min(1000, binaryExponent(each))) : 0));
  const factorDown = factorShift.map((each) => powerOfTwo(-each));
  return {
    ...mapFour(product, (each) => space.scale(each, down)),
    slope: mapFour(slope, (each) => space.scale(each, down)),
    size: mapFour(size, (each) => each.map((value, index) => value * down[index])),
    factor: space.scale(factor, factorDown),
    factorSize: factorSize.map((each, index) => each * factorDown[index]),
    lossNp: first.lossNp.map((each, index) => each + second.lossNp[index]),
    exponent: first.exponent.map((each, index) => each + second.exponent[index] + factorShift[index] - shift[index]),
  };
}

function multiply<T extends Phasor<T>>(x: Four<T>, y: Four<T>): Four<T> {
  return {
    a: x.a.mul(y.a).add(x.b.mul(y.c)),
    b: x.a.mul(y.b).add(x.b.mul(y.d)),
    c: x.c.mul(y.a).add(x.d.mul(y.c)),
    d: x.c.mul(y.b).add(x.d.mul(y.d)),
  };
}

function add<T extends Phasor<T>>(x: Four<T>, y: Four<T>): Four<T> {
  return { a: x.a.add(y.a), b: x.b.add(y.b), c: x.c.add(y.c), d: x.d.add(y.d) };
}

function multiplySizes(x: Four<Float64Array>, y: Four<Float64Array>): Four<Float64Array> {
  const sum = (p: Float64Array, q: Float64Array, r: Float64Array, s: Float64Array) => p.map((each, index) => each * q[index] + r[index] * s[index]);
  return { a: sum(x.a, y.a, x.b, y.c), b: sum(x.a, y.b, x.b, y.d), c: sum(x.c, y.a, x.d, y.c), d: sum(x.c, y.b, x.d, y.d) };
}

export function mapFour<Each, Other>(four: Four<Each>, change: (each: Each) => Other): Four<Other> {
  return { a: change(four.a), b: change(four.b), c: change(four.c), d: change(four.d) };
}
