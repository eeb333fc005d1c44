/**
 * From the scaled matrix of a chain to what is asked of it. With A, B, C, D of the chain, Z1 and Z2 the reference impedances, R1 and R2
 * their real parts, n = A Z2 + B + C Z1 Z2 + D Z1 (Frickey 1994, table I, in Kurokawa's power waves):
 *
 *   S11 = (A Z2 + B - C Z1* Z2 - D Z1*)/n     S21 = 2 sqrt(R1 R2)/n     S12 = det S21     S22 = (-A Z2* + B - C Z1 Z2* + D Z1)/n
 *   Z = [A det; 1 D]/C     Y = [D -det; -1 A]/B     det = AD - BC     group delay = -d(arg S21)/d omega = Im((dn/d omega)/n)
 */
import type { Method } from '../calculation';
import { decibelsPerNeper } from '../constants';
import type { Phasor, Space } from '../numeric/phasor';
import { magnitudes } from '../numeric/phasor';
import { timesPowerOfTwo } from '../numeric/power-of-two';
import type { ComplexColumn } from '../numeric/complex-column';
import type { TwoPort } from './two-port';

export const twoPortConversion: Method = {
  id: 'two-port-conversion',
  title: 'Conversion between ABCD, S, Z, Y and T',
  source: 'Frickey, Conversions between S, Z, Y, h, ABCD and T parameters, IEEE Trans. MTT-42 (1994) 205-211, with Marks and Williams, MTT-43 (1995) 914-915 on its waves (from memory, checked by nodal analysis)',
  formulas: [
    String.raw`\Delta = A Z_2 + B + C Z_1 Z_2 + D Z_1`,
    String.raw`S_{11} = \frac{A Z_2 + B - C Z_1^{*} Z_2 - D Z_1^{*}}{\Delta}, \qquad S_{21} = \frac{2\sqrt{R_1 R_2}}{\Delta}`,
    String.raw`S_{12} = \frac{2 (AD - BC) \sqrt{R_1 R_2}}{\Delta}, \qquad S_{22} = \frac{-A Z_2^{*} + B - C Z_1 Z_2^{*} + D Z_1}{\Delta}`,
    String.raw`\begin{pmatrix} b_1 \\ a_1 \end{pmatrix} = \begin{pmatrix} T_{11} & T_{12} \\ T_{21} & T_{22} \end{pmatrix} \begin{pmatrix} a_2 \\ b_2 \end{pmatrix}`,
  ],
  symbols: [
    { symbol: 'A, B, C, D', meaning: 'transmission parameters', unit: '1, ohm, S, 1' },
    { symbol: 'Z_1, Z_2', meaning: 'reference impedances of port 1 and port 2', unit: 'ohm' },
    { symbol: 'R_1, R_2', meaning: 'their real parts', unit: 'ohm' },
    { symbol: 'a_k, b_k', meaning: 'power waves into and out of port k', unit: 'sqrt W' },
  ],
  range: 'reference impedances with a positive real part; a representation that does not exist is null',
  accuracy: 'exact; in float64 S to 1e-12 of a whole wave and losses to 1e-12 of themselves or 1e-14 dB',
};

/** How T is ordered, in words: two orders are in use. */
export const tOrder = '[b1; a1] = T [a2; b2]' as const;

export interface Scattering<T> {
  readonly s11: T;
  readonly s22: T;
  /** 2 sqrt(R1 R2) factor / n; S21 is this times exp(-loss) and a power of two. */
  readonly forward: T;
  /** The same of S12. */
  readonly backward: T;
  readonly denominator: T;
  readonly denominatorSlope: T;
}

export function scattering<T extends Phasor<T>>(space: Space<T>, two: TwoPort<T>, z1: T, z2: T): Scattering<T> {
  const { a, b, c, d, slope } = two;
  const z1c = z1.conjugate();
  const z2c = z2.conjugate();
  const root = twiceRootOfResistances(space, z1, z2);
  const denominator = a.mul(z2).add(b).add(c.mul(z1).mul(z2)).add(d.mul(z1));
  return {
    s11: a.mul(z2).add(b).sub(c.mul(z1c).mul(z2)).sub(d.mul(z1c)).div(denominator),
    s22: b.sub(a.mul(z2c)).sub(c.mul(z1).mul(z2c)).add(d.mul(z1)).div(denominator),
    forward: two.factor.mul(root).div(denominator),
    backward: two.backward.mul(root).div(denominator),
    denominator,
    denominatorSlope: slope.a.mul(z2).add(slope.b).add(slope.c.mul(z1).mul(z2)).add(slope.d.mul(z1)),
  };
}

/**
 * The rounding of each entry in units of Number.EPSILON. To first order it may have grown at every element as if all conspired; of a passive
 * chain it cannot, against n: a Z2, b, c Z1 Z2 and d Z1 are no larger than n, and neither are their errors but for their number.
 */
export function roundingOfEntries<T extends Phasor<T>>(space: Space<T>, two: TwoPort<T>, { denominator }: Scattering<T>, z1: T, z2: T, isPassive: Uint8Array): TwoPort<T>['size'] {
  const most = magnitudes(space, denominator).map((each, index) => (isPassive[index] ? each * two.roundings[index] : Infinity));
  const ohm1 = magnitudes(space, z1);
  const ohm2 = magnitudes(space, z2);
  const least = (size: Float64Array, ohm: (index: number) => number) => size.map((each, index) => Math.min(each, most[index] / ohm(index)));
  return {
    a: least(two.size.a, (index) => ohm2[index]),
    b: least(two.size.b, () => 1),
    c: least(two.size.c, (index) => ohm1[index] * ohm2[index]),
    d: least(two.size.d, (index) => ohm1[index]),
  };
}

/**
 * Whether n is no more than rounding, at each frequency: the chain and its references then oscillate. n of a passive chain is the largest of its
 * own terms, so that only an active one can come near.
 */
export function oscillates<T extends Phasor<T>>(space: Space<T>, two: TwoPort<T>, { denominator }: Scattering<T>, z1: T, z2: T): Uint8Array {
  const n = magnitudes(space, denominator);
  const ohm1 = magnitudes(space, z1);
  const ohm2 = magnitudes(space, z2);
  const [a, b, c, d] = [two.a, two.b, two.c, two.d].map((each) => magnitudes(space, each));
  return Uint8Array.from(n, (each, index) => {
    const terms = (x: Four) => x.a[index] * ohm2[index] + x.b[index] + x.c[index] * ohm1[index] * ohm2[index] + x.d[index] * ohm1[index];
    const rounding = Math.min(terms(two.size), terms({ a, b, c, d }) * two.roundings[index]);
    return each <= vanishing * rounding ? 1 : 0;
  });
}

type Four = Readonly<Record<'a' | 'b' | 'c' | 'd', Float64Array>>;

/** What is no more than this times the rounding it may have is zero. */
export const vanishing = 8 * Number.EPSILON;

/** [b1; a1] = T [a2; b2], without the scale. */
export function transferScattering<T extends Phasor<T>>(space: Space<T>, { a, b, c, d }: TwoPort<T>, z1: T, z2: T) {
  const z1c = z1.conjugate();
  const z2c = z2.conjugate();
  const root = twiceRootOfResistances(space, z1, z2);
  return {
    t11: a.mul(z2c).sub(b).sub(c.mul(z1c).mul(z2c)).add(d.mul(z1c)).div(root),
    t12: a.mul(z2).add(b).sub(c.mul(z1c).mul(z2)).sub(d.mul(z1c)).div(root),
    t21: a.mul(z2c).sub(b).add(c.mul(z1).mul(z2c)).sub(d.mul(z1)).div(root),
    t22: a.mul(z2).add(b).add(c.mul(z1).mul(z2)).add(d.mul(z1)).div(root),
  };
}

function twiceRootOfResistances<T extends Phasor<T>>(space: Space<T>, z1: T, z2: T): T {
  const first = space.column(z1).re;
  const second = space.column(z2).re;
  return space.from(first.map((each, index) => 2 * Math.sqrt(each) * Math.sqrt(second[index])), new Float64Array(space.length));
}

/** Multiplies by the scale of the matrix: what was formed with `factor` gains exp(-loss) 2^exponent. */
export function withScale<T>({ lossNp, exponent }: TwoPort<T>, column: ComplexColumn): { re: Float64Array; im: Float64Array } {
  return scaled(column, lossNp.map((each) => -each), exponent);
}

/** The same of what was formed with `backward`. */
export function withBackwardScale<T>({ lossNp, backwardExponent }: TwoPort<T>, column: ComplexColumn): { re: Float64Array; im: Float64Array } {
  return scaled(column, lossNp.map((each) => -each), backwardExponent);
}

/** Divides by the scale of the matrix, of which `factor` is done already; infinite where it overflows. */
export function withoutScale<T>({ lossNp, exponent }: TwoPort<T>, column: ComplexColumn): { re: Float64Array; im: Float64Array } {
  return scaled(column, lossNp, exponent.map((each) => -each));
}

/** Times exp(nepers) 2^exponent, the exponential split so that it cannot overflow before the power of two is at work. */
function scaled({ re, im }: ComplexColumn, nepers: Float64Array, exponent: Float64Array): { re: Float64Array; im: Float64Array } {
  const apply = (values: Float64Array) =>
    values.map((value, index) => {
      const whole = Math.round(nepers[index] / Math.LN2);
      return timesPowerOfTwo(value * Math.exp(nepers[index] - whole * Math.LN2), whole + exponent[index]);
    });
  return { re: apply(re), im: apply(im) };
}

/** -20 log10 |S21|, also where S21 itself is too small for a number. */
export function insertionLossDb<T extends Phasor<T>>(space: Space<T>, { lossNp, exponent }: TwoPort<T>, { forward }: Scattering<T>): Float64Array {
  return magnitudes(space, forward).map((each, index) => decibelsPerNeper * (lossNp[index] - Math.log(each) - exponent[index] * Math.LN2) + 0);
}

/** Largest singular value of S, squared, at one frequency: the share of incoming power that can come back out. */
export function largestGain(s11: At, s12: At, s21: At, s22: At): number {
  const power = ([re, im]: At) => re * re + im * im;
  const h11 = power(s11) + power(s21);
  const h22 = power(s12) + power(s22);
  // S^H S off the diagonal: conj(S11) S12 + conj(S21) S22.
  const re = s11[0] * s12[0] + s11[1] * s12[1] + s21[0] * s22[0] + s21[1] * s22[1];
  const im = s11[0] * s12[1] - s11[1] * s12[0] + s21[0] * s22[1] - s21[1] * s22[0];
  return 0.5 * (h11 + h22 + Math.hypot(h11 - h22, 2 * Math.hypot(re, im)));
}

type At = readonly [re: number, im: number];
