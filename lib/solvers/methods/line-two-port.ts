/**
 * The two-port of a length of line, in a form that neither overflows nor cancels.
 *
 *   A = D = cosh t,  B = Z l sinh(t)/t,  C = Y l sinh(t)/t,  t = gamma l
 *
 * Every entry is carried divided by exp(t). With p = exp(-2 t): cosh t -> (1 + p)/2 and sinh(t)/t -> S = (1 - p)/(2 t). The
 * factor exp(t) cancels wherever two entries are divided, and is kept apart where it does not.
 */
import type { Method } from '../calculation';
import type { LineConstants } from '../lines/line-constants';
import type { Phasor, Space } from '../numeric/phasor';
import { magnitudes } from '../numeric/phasor';
import type { Propagation } from './telegrapher';

export const telegrapherTwoPort: Method = {
  id: 'telegrapher-two-port',
  title: 'Two-port of a uniform line',
  source: 'Heaviside, Electrical Papers, vol. 2, 1892; Pozar, Microwave Engineering, 4th ed., section 2.3 and table 4.1 (numbers from memory)',
  formulas: [
    String.raw`\begin{pmatrix} V_1 \\ I_1 \end{pmatrix} = \begin{pmatrix} \cosh\gamma\ell & Z_c \sinh\gamma\ell \\ \sinh(\gamma\ell)/Z_c & \cosh\gamma\ell \end{pmatrix} \begin{pmatrix} V_2 \\ I_2 \end{pmatrix}`,
    String.raw`p = e^{-2\gamma\ell}, \qquad e^{-\gamma\ell}\cosh\gamma\ell = \frac{1+p}{2}, \qquad e^{-\gamma\ell}\,\frac{\sinh\gamma\ell}{\gamma\ell} = \frac{1-p}{2\gamma\ell}`,
  ],
  symbols: [
    { symbol: 'V_1, I_1', meaning: 'voltage and current at the near end', unit: 'V, A' },
    { symbol: 'V_2, I_2', meaning: 'voltage and current at the far end, the current out of the line', unit: 'V, A' },
    { symbol: String.raw`\gamma`, meaning: 'propagation constant', unit: '1/m' },
    { symbol: String.raw`\ell`, meaning: 'length', unit: 'm' },
    { symbol: 'Z_c', meaning: 'characteristic impedance', unit: 'ohm' },
    { symbol: 'p', meaning: 'what a reflection at the far end is multiplied by on its way back' },
  ],
  range: 'any frequency, length and loss, direct current included',
  accuracy: 'exact; 1e-12 relative in float64',
};

export interface LineTwoPort<T> {
  /** (1 + p)/2, S Z l and S Y l: the entries divided by exp(t). */
  readonly even: T;
  readonly series: T;
  readonly shunt: T;
  /** S alone, and K = (cosh t - S)/t^2 in the same scale: how far the line is from its series impedance and shunt admittance. */
  readonly quotient: T;
  readonly kernel: T;
  /** Derivatives of even, series and shunt to omega, divided by exp(t). */
  readonly evenSlope: T;
  readonly seriesSlope: T;
  readonly shuntSlope: T;
  /** exp(-2 t): what a reflection at the far end is multiplied by on its way back to the near end. */
  readonly roundTrip: T;
  /** exp(-j beta l), and alpha l: exp(-t) in two parts. */
  readonly turn: T;
  readonly lossNp: Float64Array;
  /** 1 + |t|: by what rounding of t is magnified in an entry that vanishes. */
  readonly sensitivity: Float64Array;
}

/** Below this |t| the quotient for the slope cancels; its series is good to rounding within ten terms. */
const slopeSeriesBelow = 1;

/**
 * Source: Pozar table 4.1. Symbols: Z = R + j w L ohm/m, Y = G + j w C S/m, l m. Range: any. Accuracy: a few units of rounding
 * of each entry's magnitude, times 1 + |t| where an entry vanishes. Throws nothing.
 * The trap: at direct current with G = 0, Zc is infinite; Z l and Y l never are, so Zc does not appear.
 */
export function lineTwoPort<T extends Phasor<T>>(space: Space<T>, constants: LineConstants, waves: Propagation, lengthM: number): LineTwoPort<T> {
  const { omega, attenuationNpPerM, phaseRadPerM } = waves;
  const lossNp = attenuationNpPerM.map((alpha) => alpha * lengthM);
  const phase = phaseRadPerM.map((beta) => beta * lengthM);
  const theta = space.from(lossNp, phase);
  const { resistance: R, inductance: L, conductance: G, capacitance: C } = constants;
  const zeros = new Float64Array(space.length);
  const Zl = space.from(R.map((each) => each * lengthM), L.map((each, index) => each * omega[index] * lengthM));
  const Yl = space.from(G.map((each) => each * lengthM), C.map((each, index) => each * omega[index] * lengthM));
  const { slope } = constants;
  const ZlSlope = space.from(
    slope ? slope.resistance.map((each) => each * lengthM) : zeros,
    L.map((each, index) => (each + (slope ? omega[index] * slope.inductance[index] : 0)) * lengthM),
  );
  const YlSlope = space.from(
    slope ? slope.conductance.map((each) => each * lengthM) : zeros,
    C.map((each, index) => (each + (slope ? omega[index] * slope.capacitance[index] : 0)) * lengthM),
  );

  const size = magnitudes(space, theta);
  const vanishes = Uint8Array.from(size, (each) => (each === 0 ? 1 : 0));
  const minusTwoTheta = theta.mul(-2);
  const one = space.constant(1);
  const roundTrip = minusTwoTheta.exp();
  const S = space.pick(vanishes, one, minusTwoTheta.expm1().div(space.pick(vanishes, one, minusTwoTheta)));
  const even = roundTrip.add(1).mul(0.5);

  // d(t^2)/dw / 2, regular where t itself is not.
  const halfSquareSlope = ZlSlope.mul(Yl).add(Zl.mul(YlSlope)).mul(0.5);
  const K = slopeKernel(space, theta, size, even, S);
  return {
    even,
    series: Zl.mul(S),
    shunt: Yl.mul(S),
    quotient: S,
    kernel: K,
    evenSlope: halfSquareSlope.mul(S),
    seriesSlope: ZlSlope.mul(S).add(Zl.mul(halfSquareSlope).mul(K)),
    shuntSlope: YlSlope.mul(S).add(Yl.mul(halfSquareSlope).mul(K)),
    roundTrip,
    turn: space.from(phase.map(Math.cos), phase.map((each) => -Math.sin(each))),
    lossNp,
    sensitivity: size.map((each) => 1 + each),
  };
}

/** (cosh t - sinh(t)/t) / t^2, divided by exp(t); the sum of 2k t^(2k-2) / (2k + 1)! for small t. */
function slopeKernel<T extends Phasor<T>>(space: Space<T>, theta: T, size: Float64Array, even: T, S: T): T {
  const isSmall = Uint8Array.from(size, (each) => (each < slopeSeriesBelow ? 1 : 0));
  const small = space.pick(isSmall, theta, space.constant(0));
  const square = small.mul(small);
  let series = space.constant(0);
  for (let k = 10; k >= 1; k--) series = series.mul(square).add((2 * k) / factorial(2 * k + 1));
  const large = space.pick(isSmall, space.constant(1), theta);
  return space.pick(isSmall, series.mul(small.neg().exp()), even.sub(S).div(large).div(large));
}

function factorial(n: number): number {
  let product = 1;
  for (let factor = 2; factor <= n; factor++) product *= factor;
  return product;
}
