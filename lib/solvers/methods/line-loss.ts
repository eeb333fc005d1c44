/**
 * What a line costs of the power sent into it, and how much of that is due to the standing wave.
 *
 *   total       10 log10(P1/P2),  P1/P2 = 1 + D/P2
 *   matched     8.686 alpha l, what the line costs where the termination is its own impedance
 *   additional  total - matched = 10 log10(1 + N/P2')
 *   N = Rc |B|^2 (1 - e^(-4 alpha l)) / |Zc|^2 + 2 Xc Im(B A* (1 - e^(-2 gamma l))) / |Zc|^2,   A, B = (v +- Zc i)/2
 *
 * P1 into the line, P2 = P2' = Re(v i*) into the termination, D dissipated (line-power.ts); alpha Np/m, l m, Zc = Rc + j Xc ohm.
 */
import type { Method } from '../calculation';
import { decibelsPerNeper } from '../constants';
import type { ComplexColumn } from '../numeric/complex-column';
import { magnitude } from '../numeric/phasor';
import type { Propagation } from './telegrapher';

export const lineLoss: Method = {
  id: 'line-loss',
  title: 'Loss of a line, matched and with a standing wave',
  source: 'Poynting’s theorem on the telegrapher equations (Pozar, Microwave Engineering, 4th ed., sections 2.6 and 2.7, from memory)',
  formulas: [
    String.raw`L_{\text{total}} = 10\log_{10}\frac{P_1}{P_2}, \qquad P_1 = P_2 + \int_0^{\ell} R\,|I|^2 + G\,|V|^2\,dx`,
    String.raw`L_{\text{matched}} = \frac{20}{\ln 10}\,\alpha\ell, \qquad L_{\text{additional}} = L_{\text{total}} - L_{\text{matched}}`,
    String.raw`L_{\text{source}} = -10\log_{10}\left(1 - |\Gamma_{\text{in}}|^2\right), \qquad L_{\text{transducer}} = L_{\text{source}} + L_{\text{total}}`,
  ],
  symbols: [
    { symbol: 'P_1, P_2', meaning: 'power into the line and into the termination', unit: 'W' },
    { symbol: 'R, G', meaning: 'series resistance and shunt conductance', unit: 'ohm/m, S/m' },
    { symbol: String.raw`\alpha`, meaning: 'attenuation', unit: 'Np/m' },
    { symbol: String.raw`\ell`, meaning: 'length', unit: 'm' },
    { symbol: String.raw`\Gamma_{\text{in}}`, meaning: 'power-wave reflection at the input, to the source impedance' },
  ],
  range: 'any line, length and passive termination that takes power',
  accuracy: 'exact; 1e-12 relative in float64, at losses of 1e-12 dB as at 200 dB',
};

export interface LineLosses {
  readonly matchedDb: Float64Array;
  /** Not a number where the termination takes nothing in. */
  readonly totalDb: Float64Array;
  readonly additionalDb: Float64Array;
}

/** Below this exp(2 alpha l) and what follows from it are far from overflow. */
const finiteNepers = 600;

/**
 * `dissipated` is D exp(-2 alpha l). Source: Poynting's theorem. Range: any. Accuracy: rounding of D and P2. Throws nothing.
 * The traps: a good line's P1/P2 is 1 to all digits, so the logarithm is that of 1 + D/P2; the additional loss of a nearly matched line is the small
 * difference of two losses, so it has its own formula; and it may be negative where Zc is complex.
 */
export function lossesOfLine(waves: Propagation, lengthM: number, v: ComplexColumn, i: ComplexColumn, dissipated: Float64Array): LineLosses {
  const matchedDb = waves.attenuationNpPerM.map((alpha) => alpha * lengthM * decibelsPerNeper);
  const delivered = v.re.map((re, index) => re * i.re[index] + v.im[index] * i.im[index]);
  const decibels = (nepers: number) => 0.5 * decibelsPerNeper * nepers + 0;
  const totalDb = delivered.map((power, index) => (power > 0 ? decibels(totalNepers(2 * waves.attenuationNpPerM[index] * lengthM, dissipated[index], power)) : NaN));
  const additionalDb = delivered.map((power, index) => (power > 0 ? decibels(Math.log1p(additional(waves, index, lengthM, v, i, dissipated[index]) / power)) : NaN));
  return { matchedDb, totalDb, additionalDb };
}

/** ln(1 + D/P2), with D = d exp(a). */
function totalNepers(a: number, d: number, power: number): number {
  const ratio = d / power;
  const grown = a < finiteNepers ? ratio * Math.exp(a) : Infinity;
  return grown < Infinity ? Math.log1p(grown) : a + Math.log(d) - Math.log(power);
}

/** N; it is D where nothing is attenuated for Zc is infinite or 0. */
function additional({ attenuationNpPerM, phaseRadPerM, characteristicImpedance: Zc }: Propagation, index: number, lengthM: number, v: ComplexColumn, i: ComplexColumn, dissipated: number): number {
  const zc = { re: Zc.re[index], im: Zc.im[index] };
  const size = magnitude(zc.re, zc.im);
  if (Zc.infinite[index] || size === 0) return dissipated;
  const u = { re: (zc.re * i.re[index] - zc.im * i.im[index]) / size, im: (zc.re * i.im[index] + zc.im * i.re[index]) / size };
  const w = { re: v.re[index] / size, im: v.im[index] / size };
  // A and B, over |Zc|.
  const forward = { re: (w.re + u.re) / 2, im: (w.im + u.im) / 2 };
  const backward = { re: (w.re - u.re) / 2, im: (w.im - u.im) / 2 };
  const loss = 2 * attenuationNpPerM[index] * lengthM;
  const turn = 2 * phaseRadPerM[index] * lengthM;
  // 1 - e^(-2 gamma l), as expm1 has it.
  const half = Math.sin(0.5 * turn);
  const gone = { re: -Math.expm1(-loss) * Math.cos(turn) + 2 * half * half, im: Math.exp(-loss) * Math.sin(turn) };
  const product = { re: backward.re * forward.re + backward.im * forward.im, im: backward.im * forward.re - backward.re * forward.im };
  return -Math.expm1(-2 * loss) * zc.re * (backward.re ** 2 + backward.im ** 2) + 2 * zc.im * (product.re * gone.im + product.im * gone.re);
}
