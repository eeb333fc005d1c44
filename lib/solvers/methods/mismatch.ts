/**
 * The four ways to say how far a one-port is from a reference impedance, each as the same columns.
 *
 *   from Z            Gamma = (Z - Zr*)/(Z + Zr)                       reflection.ts
 *   from Gamma        Z = (Zr* + Gamma Zr)/(1 - Gamma)                 Kurokawa 1965, equation 10 turned round
 *   from VSWR s       |Gamma| = (s - 1)/(s + 1), 1 - |Gamma|^2 = 4 s/(s + 1)^2
 *   from return loss  |Gamma| = 10^(-L/20),      1 - |Gamma|^2 = 1 - 10^(-L/10)
 *
 * Zr reference impedance in ohm, Re Zr > 0; L in dB. 1 - |Gamma|^2, the part that is taken in, is never formed from a rounded |Gamma|, so
 * what follows from it is right where the reflection is nearly whole.
 */
import { decibelsPerNeper } from '../constants';
import { cosineAndSineOfDegrees } from '../nouns/complex-number';
import { ComplexColumn } from '../numeric/complex-column';
import { LongComplex, longOne } from '../numeric/double-double';
import { magnitude, type ComplexParts } from '../numeric/phasor';

/** 1 - |Gamma|^2 with its own digits, beside |Gamma|. */
export interface ReflectionSize {
  readonly magnitude: number;
  readonly absorbed: number;
}

export interface ImpedanceOfReflection extends ReflectionSize {
  readonly gamma: ComplexParts;
  /** NaN where Gamma = 1, whose impedance is infinite. */
  readonly impedance: ComplexParts;
}

/** Range: s >= 1. Accuracy: rounding, in both. Throws nothing. The trap: near s = 1 and for large s, one of the two is small; neither cancels here. */
export function sizeOfStandingWaveRatio(s: number): ReflectionSize {
  return { magnitude: (s - 1) / (s + 1), absorbed: (4 * (s / (s + 1))) / (s + 1) };
}

/** Range: L >= 0 dB. Accuracy: 1e-13, at 6000 dB as at 1e-12 dB. Throws nothing. The trap: 1 - 10^(-L/10) for a small L, hence expm1. */
export function sizeOfReturnLoss(db: number): ReflectionSize {
  const nepers = db / decibelsPerNeper;
  return { magnitude: Math.exp(-nepers), absorbed: -Math.expm1(-2 * nepers) };
}

/**
 * Z of Gamma given by its parts. Source: Kurokawa 1965, equation 10 solved for Z (number from memory). Range: any Gamma. Accuracy: each part of Z to rounding,
 * for Z = N/|1 - Gamma|^2 with N = (Zr* + Gamma Zr)(1 - Gamma)*, and N, Re N = Rr (1 - |Gamma|^2), is summed in 32 digits. Throws nothing.
 * The trap: 0.6 + 0.8j means a whole reflection and, rounded, is none by 1e-16. Two parts that come that near to it are taken as whole.
 */
export function impedanceOfReflection(gamma: ComplexParts, reference: ComplexParts): ImpedanceOfReflection {
  const g = LongComplex.of(gamma);
  const zr = LongComplex.of(reference);
  const rest = longOne.sub(g);
  const numerator = zr.conjugate().add(g.mul(zr)).mul(rest.conjugate()).rounded();
  const { re, im } = rest.rounded();
  const size = magnitude(re, im);
  const exact = longOne.sub(g.mul(g.conjugate())).rounded().re;
  const isWhole = gamma.re !== 0 && gamma.im !== 0 && Math.abs(exact) <= Number.EPSILON;
  return { gamma, magnitude: magnitude(gamma.re, gamma.im), absorbed: isWhole ? 0 : exact, impedance: { re: numerator.re / size / size, im: numerator.im / size / size } };
}

/**
 * Z of Gamma given by magnitude m and angle. With the half angle, 1 - Gamma = (1 - m) + 2 m sin^2(angle/2) - j m sin(angle), which does not cancel
 * beside Gamma = 1; Re Z = Rr (1 - m)(1 + m)/|1 - Gamma|^2, Im Z = 2 Rr m sin(angle)/|1 - Gamma|^2 - Xr. Range: m >= 0, any angle. Accuracy: rounding of
 * each term. Throws nothing. The trap: m = 1 is a whole reflection at any angle, which its parts no longer say.
 */
export function impedanceOfPolarReflection({ magnitude: m, angle_deg }: { magnitude: number; angle_deg: number }, reference: ComplexParts): ImpedanceOfReflection {
  const half = cosineAndSineOfDegrees(angle_deg / 2);
  const whole = cosineAndSineOfDegrees(angle_deg);
  const gamma = { re: m * whole.cosine, im: m * whole.sine };
  const size = magnitude(1 - m + 2 * m * half.sine * half.sine, gamma.im);
  const absorbed = (1 - m) * (1 + m);
  const impedance = { re: (reference.re * absorbed) / size / size, im: (2 * reference.re * gamma.im) / size / size - reference.im };
  return { gamma, magnitude: m, absorbed, impedance };
}

/** One entry a frequency. */
export function columnOf<Each>(entries: readonly Each[], read: (each: Each) => number): Float64Array {
  return Float64Array.from(entries, read);
}

export function complexColumnOf<Each>(entries: readonly Each[], read: (each: Each) => ComplexParts): ComplexColumn {
  return new ComplexColumn(columnOf(entries, (each) => read(each).re), columnOf(entries, (each) => read(each).im));
}
