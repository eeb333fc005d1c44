/**
 * Two-ports in a chain, each as its ABCD matrix times a common factor:  M = scale * ABCD,  so that an element whose own ABCD does
 * not exist (a short across the path) still has a matrix, and only `scale` vanishes.
 *
 *   series Z: [1 Z; 0 1]   shunt Y: [1 0; Y 1]   transformer n: [n 0; 0 1/n]   line: cosh, sinh        Pozar table 4.1
 *
 * With (v, i) of the one-port, Z = v/i and Y = i/v: the series element is i * ABCD, the shunt one v * ABCD. The determinant is never formed
 * from the entries: det M = scale * backward scale, and both multiply along a chain. Of a reciprocal two-port the two are the same.
 */
import type { Method } from '../calculation';
import type { Phasor, Space } from '../numeric/phasor';
import { clearDust, magnitudes } from '../numeric/phasor';
import { binaryExponent, powerOfTwo } from '../numeric/power-of-two';
import type { LineTwoPort } from './line-two-port';
import { oddScaleOf, type OnePort } from './one-port';

export const transmissionMatrix: Method = {
  id: 'transmission-matrix',
  title: 'ABCD parameters of elements and of their cascade',
  source: 'Pozar, Microwave Engineering, 4th ed., section 4.4 and table 4.1 (numbers from memory)',
  formulas: [
    String.raw`\text{series } Z: \begin{pmatrix} 1 & Z \\ 0 & 1 \end{pmatrix} \qquad \text{shunt } Y: \begin{pmatrix} 1 & 0 \\ Y & 1 \end{pmatrix} \qquad \text{transformer } n: \begin{pmatrix} n & 0 \\ 0 & 1/n \end{pmatrix}`,
    String.raw`\begin{pmatrix} A & B \\ C & D \end{pmatrix} = \prod_k \begin{pmatrix} A_k & B_k \\ C_k & D_k \end{pmatrix}`,
  ],
  symbols: [
    { symbol: 'Z', meaning: 'impedance in series with the path', unit: 'ohm' },
    { symbol: 'Y', meaning: 'admittance across the path', unit: 'S' },
    { symbol: 'n', meaning: 'turns ratio, V1 = n V2' },
    { symbol: 'A, B, C, D', meaning: 'transmission parameters: V1 = A V2 + B I2, I1 = C V2 + D I2', unit: '1, ohm, S, 1' },
  ],
  range: 'any chain of linear two-ports',
  accuracy: 'exact; 1e-12 relative in float64',
};

type Four<Each> = { readonly a: Each; readonly b: Each; readonly c: Each; readonly d: Each };
export const entries = ['a', 'b', 'c', 'd'] as const;

export interface TwoPort<T> extends Four<T> {
  /** scale times d(ABCD)/d omega. */
  readonly slope: Four<T>;
  /** The rounding of each entry in units of Number.EPSILON, to first order: what a vanishing entry is measured against. */
  readonly size: Four<Float64Array>;
  /** How many roundings the chain has seen; those of a phase count as often as it turns, in radians. */
  readonly roundings: Float64Array;
  /** scale = factor * exp(-lossNp) * 2^exponent; factor is exactly 0 where nothing passes. */
  readonly factor: T;
  readonly lossNp: Float64Array;
  readonly exponent: Float64Array;
  /** det M / scale = backward * exp(-lossNp) * 2^backwardExponent: what passes from port 2 to port 1. The very `factor` where that is known. */
  readonly backward: T;
  readonly backwardExponent: Float64Array;
  /** Every part is reciprocal, to the rounding of what was given. */
  readonly isReciprocal: boolean;
}

type OneWay = 'factor' | 'exponent' | 'backward' | 'backwardExponent' | 'isReciprocal';

function reciprocal<T>(factor: T, exponent: Float64Array): Pick<TwoPort<T>, OneWay> {
  return { factor, exponent, backward: factor, backwardExponent: exponent, isReciprocal: true };
}

export function seriesTwoPort<T extends Phasor<T>>(space: Space<T>, onePort: OnePort<T>): TwoPort<T> {
  const { v, i: computed, vSlope, iSlope, vScale, iScale } = onePort;
  const i = clearDust(space, computed, iScale);
  const zero = space.constant(0);
  const none = new Float64Array(space.length);
  return {
    a: i, b: v, c: zero, d: i,
    slope: { a: zero, b: quotientSlope(space, v, i, vSlope, iSlope), c: zero, d: zero },
    size: { a: iScale, b: vScale, c: none, d: iScale },
    roundings: roundingsOf(space, onePort),
    lossNp: none, ...reciprocal(i, none),
  };
}

export function shuntTwoPort<T extends Phasor<T>>(space: Space<T>, onePort: OnePort<T>): TwoPort<T> {
  const { v: computed, i, vSlope, iSlope, vScale, iScale } = onePort;
  const v = clearDust(space, computed, vScale);
  const zero = space.constant(0);
  const none = new Float64Array(space.length);
  return {
    a: v, b: zero, c: i, d: v,
    slope: { a: zero, b: zero, c: quotientSlope(space, i, v, iSlope, vSlope), d: zero },
    size: { a: vScale, b: none, c: iScale, d: vScale },
    roundings: roundingsOf(space, onePort),
    lossNp: none, ...reciprocal(v, none),
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
    roundings: column(1),
    lossNp: none, ...reciprocal(space.constant(1), none),
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
    roundings: line.sensitivity,
    lossNp: line.lossNp, ...reciprocal(line.turn, none),
  };
}

/** Of v and i, one may vanish and have only rounding left; the other then tells how much a phase was turned. */
function roundingsOf<T extends Phasor<T>>(space: Space<T>, { v, i, vScale, iScale }: OnePort<T>): Float64Array {
  const sizeV = magnitudes(space, v);
  const sizeI = magnitudes(space, i);
  const ratio = (scale: number, size: number) => (size > 0 ? scale / size : Infinity);
  return sizeV.map((_, index) => Math.max(1, Math.min(ratio(vScale[index], sizeV[index]), ratio(iScale[index], sizeI[index]))));
}

/** d(x/y) times y, which is what the scaled matrix holds; where y vanishes nothing passes and there is no group delay to find. */
function quotientSlope<T extends Phasor<T>>(space: Space<T>, x: T, y: T, xSlope: T, ySlope: T): T {
  const vanishes = Uint8Array.from(magnitudes(space, y), (each) => (each === 0 ? 1 : 0));
  return xSlope.sub(x.mul(ySlope).div(space.pick(vanishes, space.constant(1), y)));
}

/**
 * The chain of two, the first nearer to port 1. Range: any. Accuracy: a few units of rounding of `size`. Throws nothing.
 * The traps: products of many entries overflow, so each product is brought back to about 1 by a power of two, kept apart; and where
 * both block, between them is a node that nothing determines, and the plain product of their matrices may be 0.
 */
export function chain<T extends Phasor<T>>(space: Space<T>, first: TwoPort<T>, second: TwoPort<T>): TwoPort<T> {
  const firstSizes = mapFour<T, Float64Array>(first, (each) => magnitudes(space, each));
  const secondSizes = mapFour<T, Float64Array>(second, (each) => magnitudes(space, each));
  const bothBlock = bothVanish(passagesOf(space, first), passagesOf(space, second));
  const plain = multiply(first, second);
  const product = bothBlock.includes(1) ? apart(space, bothBlock, plain, first, second, firstSizes, secondSizes) : plain;
  const slope = add(multiply(first.slope, second), multiply(first, second.slope));
  const size = sizesOfProduct(first.size, firstSizes, second.size, secondSizes);
  const shift = powersOf(...entries.map((name) => magnitudes(space, product[name])));
  const down = shift.map((each) => powerOfTwo(-each));
  return {
    ...mapFour(product, (each) => space.scale(each, down)),
    slope: mapFour(slope, (each) => space.scale(each, down)),
    size: mapFour(size, (each) => each.map((value, index) => value * down[index])),
    roundings: first.roundings.map((each, index) => each + second.roundings[index]),
    lossNp: first.lossNp.map((each, index) => each + second.lossNp[index]),
    ...passagesOfChain(space, first, second, shift),
  };
}

/** The same two-port `times` over, by squaring: 2 log2(times) chains at most. */
export function repeated<T extends Phasor<T>>(space: Space<T>, two: TwoPort<T>, times: number): TwoPort<T> {
  let result: TwoPort<T> | undefined;
  let square = two;
  for (let rest = times; ; square = chain(space, square, square)) {
    if (rest % 2 === 1) result = result ? chain(space, result, square) : square;
    rest = Math.floor(rest / 2);
    if (rest === 0) return result!;
  }
}

/** How many chains `repeated` makes. */
export function chainsToRepeat(times: number): number {
  const bits = times.toString(2);
  return bits.length - 1 + bits.replaceAll('0', '').length - 1;
}

function passagesOfChain<T extends Phasor<T>>(space: Space<T>, first: TwoPort<T>, second: TwoPort<T>, shift: Float64Array): Pick<TwoPort<T>, OneWay> {
  const through = (one: T, other: T, exponents: Float64Array, others: Float64Array) => {
    const product = one.mul(other);
    const up = powersOf(magnitudes(space, product));
    return { value: space.scale(product, up.map((each) => powerOfTwo(-each))), exponent: exponents.map((each, index) => each + others[index] + up[index] - shift[index]) };
  };
  const { value: factor, exponent } = through(first.factor, second.factor, first.exponent, second.exponent);
  const isSame = first.backward === first.factor && second.backward === second.factor;
  if (isSame) return reciprocal(factor, exponent);
  const { value: backward, exponent: backwardExponent } = through(first.backward, second.backward, first.backwardExponent, second.backwardExponent);
  return { factor, exponent, backward, backwardExponent, isReciprocal: first.isReciprocal && second.isReciprocal };
}

interface Passages {
  readonly forward: Float64Array;
  readonly backward: Float64Array;
}

function passagesOf<T extends Phasor<T>>(space: Space<T>, { factor, backward }: TwoPort<T>): Passages {
  const forward = magnitudes(space, factor);
  return { forward, backward: backward === factor ? forward : magnitudes(space, backward) };
}

/** Nothing passes the two in either direction, and neither alone tells its two ports' worth: both matrices are singular. */
function bothVanish(first: Passages, second: Passages): Uint8Array {
  return Uint8Array.from(first.forward, (forward, index) => {
    const one = [forward === 0, first.backward[index] === 0] as const;
    const other = [second.forward[index] === 0, second.backward[index] === 0] as const;
    return (one[0] || one[1]) && (other[0] || other[1]) && (one[0] || other[0]) && (one[1] || other[1]) ? 1 : 0;
  });
}

/** The power of two that brings the largest of several columns to about 1; 0 where all vanish. */
function powersOf(...columns: readonly Float64Array[]): Float64Array {
  const result = new Float64Array(columns[0].length);
  for (let index = 0; index < result.length; index++) {
    let largest = 0;
    for (const column of columns) largest = Math.max(largest, column[index]);
    result[index] = largest > 0 && Number.isFinite(largest) ? Math.max(-1000, Math.min(1000, binaryExponent(largest))) : 0;
  }
  return result;
}

/**
 * Two that block: each matrix is a column times a row, u v^T and x y^T, and their product u (v^T x) y^T. Only ratios of entries count,
 * so u y^T stands for it, also where v^T x is 0: two blocking capacitors with a line between them, at direct current.
 */
function apart<T extends Phasor<T>>(
  space: Space<T>,
  bothBlock: Uint8Array,
  plain: Four<T>,
  first: TwoPort<T>,
  second: TwoPort<T>,
  firstSizes: Four<Float64Array>,
  secondSizes: Four<Float64Array>,
): Four<T> {
  const share = (sizes: Four<Float64Array>, { size }: TwoPort<T>, name: (typeof entries)[number], index: number) =>
    size[name][index] > 0 ? sizes[name][index] / size[name][index] : 0;
  const isClearer = (sizes: Four<Float64Array>, two: TwoPort<T>, names: 'ac' | 'ab', others: 'bd' | 'cd') =>
    Uint8Array.from(bothBlock, (_, index) => {
      const best = (pair: string) => Math.max(...[...pair].map((name) => share(sizes, two, name as 'a', index)));
      return best(names) >= best(others) ? 1 : 0;
    });
  const left = isClearer(firstSizes, first, 'ac', 'bd');
  const upper = isClearer(secondSizes, second, 'ab', 'cd');
  const u = [space.pick(left, first.a, first.b), space.pick(left, first.c, first.d)] as const;
  const y = [space.pick(upper, second.a, second.c), space.pick(upper, second.b, second.d)] as const;
  const outer = { a: u[0].mul(y[0]), b: u[0].mul(y[1]), c: u[1].mul(y[0]), d: u[1].mul(y[1]) };
  return { a: space.pick(bothBlock, outer.a, plain.a), b: space.pick(bothBlock, outer.b, plain.b), c: space.pick(bothBlock, outer.c, plain.c), d: space.pick(bothBlock, outer.d, plain.d) };
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

/** d(x y) = dx y + x dy: the roundings of the two add, where their sizes would multiply. Written to columns in place: it is half the work. */
function sizesOfProduct(dx: Four<Float64Array>, x: Four<Float64Array>, dy: Four<Float64Array>, y: Four<Float64Array>): Four<Float64Array> {
  const length = dx.a.length;
  const size = mapFour(dx, () => new Float64Array(length));
  for (let index = 0; index < length; index++) {
    const a = dx.a[index], b = dx.b[index], c = dx.c[index], d = dx.d[index];
    const A = x.a[index], B = x.b[index], C = x.c[index], D = x.d[index];
    size.a[index] = a * y.a[index] + A * dy.a[index] + b * y.c[index] + B * dy.c[index];
    size.b[index] = a * y.b[index] + A * dy.b[index] + b * y.d[index] + B * dy.d[index];
    size.c[index] = c * y.a[index] + C * dy.a[index] + d * y.c[index] + D * dy.c[index];
    size.d[index] = c * y.b[index] + C * dy.b[index] + d * y.d[index] + D * dy.d[index];
  }
  return size;
}

export function mapFour<Each, Other>(four: Four<Each>, change: (each: Each) => Other): Four<Other> {
  return { a: change(four.a), b: change(four.b), c: change(four.c), d: change(four.d) };
}
