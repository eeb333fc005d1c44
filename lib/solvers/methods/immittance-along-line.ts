/**
 * Impedance or admittance along a line, at one frequency, for the search of lengths.
 *
 *   w(u) = (w + T)/(1 + w T),   T = tanh(k u),   k = alpha/beta + j,   u = beta l,   dw/du = k (1 - w^2)
 *
 * w is Z/Zc or Y Zc: both turn alike. The input of a stub is T where its end is w = 0 (open in admittance, shorted in impedance) and 1/T
 * where its end is infinite.
 */
import Complex from 'complex.js';
import type { ComplexParts } from '../numeric/phasor';

export type Immittance = 'impedance' | 'admittance';

/** Over Zc as an impedance, times Zc as an admittance: 1/w of the other. */
export function normalised(kind: Immittance, value: ComplexParts, characteristicImpedance: Complex): Complex {
  const z = new Complex(value.re, value.im);
  return kind === 'impedance' ? z.div(characteristicImpedance) : characteristicImpedance.div(z);
}

/** Homogeneous, so that a quarter wave, where T is infinite, is a length like any other. */
export function turned(w: Complex, u: number, k: Complex): Complex {
  const { sum, difference } = trip(u, k);
  return w.mul(sum).add(difference).div(sum.add(w.mul(difference)));
}

/** What a change of w at the far end does at the near one: dw(u)/dw. */
export function passedOn(w: Complex, u: number, k: Complex): Complex {
  const { p, sum, difference } = trip(u, k);
  const divisor = sum.add(w.mul(difference));
  return p.mul(4).div(divisor).div(divisor);
}

export type StubEnd = 'zero' | 'infinite';

export function stub(end: StubEnd, u: number, k: Complex): Complex {
  const { sum, difference } = trip(u, k);
  return end === 'zero' ? difference.div(sum) : sum.div(difference);
}

/** The length, in [0, pi), at which a stub without loss has the immittance j x. */
export function stubLength(end: StubEnd, x: number): number {
  const angle = end === 'zero' ? Math.atan(x) : Math.atan2(1, -x);
  return angle < 0 ? angle + Math.PI : angle;
}

export function slopeAlong(w: Complex, k: Complex): Complex {
  return k.mul(w.mul(w).neg().add(1));
}

/** p = exp(-2 k u), 1 + p, and 1 - p without cancellation. */
function trip(u: number, k: Complex) {
  const minusTwice = k.mul(-2 * u);
  const p = minusTwice.exp();
  return { p, sum: p.add(1), difference: minusTwice.expm1().neg() };
}

/** u in [0, pi), where what is only rounding below pi, or below 0, is 0. */
export function withinHalfWave(angle: number): number {
  const u = angle < 0 ? angle + Math.PI : angle;
  return u < noLength || Math.PI - u < noLength ? 0 : u;
}

/** Radians. A length of so little turns a whole wave by 2e-13. */
export const noLength = 1e-13;
