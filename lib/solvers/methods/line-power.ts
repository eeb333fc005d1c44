/**
 * Power into a terminated line, without forming it as the small difference of two large products.
 *
 *   Re(V1 I1*) = Re(V2 I2*) + R integral |I|^2 dx + G integral |V|^2 dx
 *
 * V1, I1 at the input, V2, I2 at the termination, x from the termination. Every term is positive for a passive termination, so what a very
 * good line takes in keeps all its digits. With V(x) = V2 c + Z I2 s, I(x) = I2 c + Y V2 s, c = cosh(gamma x), s = sinh(gamma x)/gamma, the
 * integrals are those of |c|^2, |s|^2 and c s*, in closed form below. Source: Poynting's theorem on the telegrapher equations (Pozar, 4th
 * ed., section 2.7 on the perturbation of loss, from memory); the integrals are elementary. All is divided by exp(2 alpha l), as the
 * entries of the two-port are by exp(gamma l).
 */
import type { LineConstants } from '../lines/line-constants';
import type { ComplexColumn } from '../numeric/complex-column';
import type { Propagation } from './telegrapher';

/** Below this size of 2 gamma l the difference of sinh(a)/a and sin(b)/b cancels; its series is good to rounding within ten terms. */
const seriesBelow = 1;

/** Each divided by exp(2 alpha l), one entry a frequency. */
export interface LinePower {
  /** Re(V1 I1*): into the line. */
  readonly total: Float64Array;
  /** The two integrals: what the line dissipates. */
  readonly dissipated: Float64Array;
}

/** `powerAlongLine`, into the line alone. */
export function powerIntoLine(constants: LineConstants, waves: Propagation, lengthM: number, v: ComplexColumn, i: ComplexColumn): Float64Array {
  return powerAlongLine(constants, waves, lengthM, v, i).total;
}

/**
 * Power of a line with a termination of voltage v and current i. Range: any line, length and termination. Accuracy: a few units of
 * rounding for passive terminations. Throws nothing.
 */
export function powerAlongLine(constants: LineConstants, waves: Propagation, lengthM: number, v: ComplexColumn, i: ComplexColumn): LinePower {
  const { omega, attenuationNpPerM, phaseRadPerM } = waves;
  const total = new Float64Array(omega.length);
  const dissipated = new Float64Array(omega.length);
  for (let index = 0; index < omega.length; index++) {
    const R = constants.resistance[index];
    const X = constants.inductance[index] * omega[index];
    const G = constants.conductance[index];
    const B = constants.capacitance[index] * omega[index];
    const alpha = attenuationNpPerM[index];
    const beta = phaseRadPerM[index];
    const vr = v.re[index];
    const vi = v.im[index];
    const ir = i.re[index];
    const ii = i.im[index];
    const a = 2 * alpha * lengthM;
    const b = 2 * beta * lengthM;
    const decay = Math.exp(-a);
    const { cc, ss, csRe, csIm } = integrals(alpha, beta, a, b, decay, lengthM);

    const vv = vr * vr + vi * vi;
    const currents = ir * ir + ii * ii;
    // Z I2 and Y V2.
    const zr = R * ir - X * ii;
    const zi = R * ii + X * ir;
    const yr = G * vr - B * vi;
    const yi = G * vi + B * vr;
    const voltageIntegral = vv * cc + (zr * zr + zi * zi) * ss + 2 * ((vr * zr + vi * zi) * csRe - (vi * zr - vr * zi) * csIm);
    const currentIntegral = currents * cc + (yr * yr + yi * yi) * ss + 2 * ((ir * yr + ii * yi) * csRe - (ii * yr - ir * yi) * csIm);
    total[index] = (vr * ir + vi * ii) * decay + R * currentIntegral + G * voltageIntegral;
    dissipated[index] = R * currentIntegral + G * voltageIntegral;
  }
  return { total, dissipated };
}

/** Integrals over the length of |c|^2, |s|^2 and c s*, each times exp(-a). */
function integrals(alpha: number, beta: number, a: number, b: number, decay: number, lengthM: number) {
  // exp(-a) sinh(a)/a, exp(-a) (cosh(a) - 1)/a, sin(b)/b and (1 - cos b)/b, each with its limit at 0.
  const hyperbolic = a === 0 ? 1 : -Math.expm1(-2 * a) / (2 * a);
  const hyperbolicRise = a === 0 ? 0 : (Math.expm1(-a) * Math.expm1(-a)) / (2 * a);
  const circular = b === 0 ? 1 : Math.sin(b) / b;
  const circularRise = b === 0 ? 0 : (2 * Math.sin(0.5 * b) ** 2) / b;
  const cc = 0.5 * lengthM * (hyperbolic + decay * circular);
  const gammaSquared = alpha * alpha + beta * beta;
  if (a * a + b * b < seriesBelow) {
    // sinh(a)/a - sin(b)/b = sum of (a^2k - (-1)^k b^2k)/(2k + 1)!, and a^2 + b^2 = 4 |gamma|^2 l^2 divides every term.
    return { cc, ss: 2 * lengthM ** 3 * decay * differenceSeries(a * a, b * b), ...crossSmall(a, b, decay, lengthM) };
  }
  const ss = (0.5 * lengthM * (hyperbolic - decay * circular)) / gammaSquared;
  // (p - j q)/(2 gamma*) with gamma* = alpha - j beta.
  const p = lengthM * hyperbolicRise;
  const q = lengthM * decay * circularRise;
  return { cc, ss, csRe: (p * alpha + q * beta) / (2 * gammaSquared), csIm: (p * beta - q * alpha) / (2 * gammaSquared) };
}

/** (sinh(a)/a - sin(b)/b)/(a^2 + b^2) for x = a^2, y = b^2. */
function differenceSeries(x: number, y: number): number {
  let sum = 0;
  let factorial = 6;
  // q_k = (x^k - (-y)^k)/(x + y): q_1 = 1, q_(k+1) = x q_k + (-y)^k.
  let quotient = 1;
  let power = -y;
  for (let k = 1; k <= 10; k++) {
    sum += quotient / factorial;
    quotient = x * quotient + power;
    power *= -y;
    factorial *= (2 * k + 2) * (2 * k + 3);
  }
  return sum;
}

/**
 * With t = gamma x, c s* = (sinh(2 alpha x) - j sin(2 beta x))/(2 gamma*); the sum over k of its Taylor terms, each divisible by
 * gamma*: l^2 sum of 2 (a^(2k-1) - j (-1)^(k-1) b^(2k-1)) / ((2k)! (a - j b)).
 */
function crossSmall(a: number, b: number, decay: number, lengthM: number): { csRe: number; csIm: number } {
  let re = 0;
  let im = 0;
  let factorial = 2;
  // r_k = (a^n - j s b^n)/(a - j b), n = 2k - 1, s = (-1)^(k-1): r_1 = 1 and a^n - (j b)^n = (a - j b) (a^(n-1) + a^(n-2) j b + ...).
  for (let k = 1; k <= 10; k++) {
    const { re: rr, im: ri } = geometric(a, b, 2 * k - 1);
    re += rr / factorial;
    im += ri / factorial;
    factorial *= (2 * k + 1) * (2 * k + 2);
  }
  return { csRe: lengthM * lengthM * decay * re, csIm: lengthM * lengthM * decay * im };
}

/** a^(n-1) + a^(n-2) (j b) + ... + (j b)^(n-1), by Horner's rule. */
function geometric(a: number, b: number, n: number): { re: number; im: number } {
  let re = 1;
  let im = 0;
  let power = 1;
  for (let term = 1; term < n; term++) {
    power *= a;
    [re, im] = [power - b * im, b * re];
  }
  return { re, im };
}
