/**
 * Reflection of a one-port, as a power wave, and what follows from its magnitude.
 *
 *   Gamma = (V - Zr* I) / (V + Zr I)                              Kurokawa 1965, equation 1 and 10
 *   1 - |Gamma|^2 = 4 Re(Zr) Re(V I*) / |V + Zr I|^2
 *
 * V, I any common multiple of voltage and current; Zr reference impedance in ohm, Re Zr > 0.
 */
import type { Method } from '../calculation';
import { decibelsPerNeper } from '../constants';
import type { Phasor, Space } from '../numeric/phasor';
import { magnitudes } from '../numeric/phasor';

export const powerWaves: Method = {
  id: 'power-waves',
  title: 'Power waves with a complex reference impedance',
  source: 'Kurokawa, Power waves and the scattering matrix, IEEE Trans. MTT-13 (1965) 194-202 (equation numbers from memory)',
  formulas: [
    String.raw`a = \frac{V + Z_r I}{2\sqrt{\operatorname{Re} Z_r}}, \qquad b = \frac{V - Z_r^{*} I}{2\sqrt{\operatorname{Re} Z_r}}, \qquad \Gamma = \frac{b}{a} = \frac{Z - Z_r^{*}}{Z + Z_r}`,
    String.raw`\mathrm{VSWR} = \frac{1 + |\Gamma|}{1 - |\Gamma|}, \qquad \text{return loss} = -20\log_{10}|\Gamma|`,
  ],
  symbols: [
    { symbol: 'V, I', meaning: 'voltage and current at the port', unit: 'V, A' },
    { symbol: 'Z_r', meaning: 'reference impedance', unit: 'ohm' },
    { symbol: 'a, b', meaning: 'incident and reflected power wave', unit: 'sqrt W' },
    { symbol: String.raw`\Gamma`, meaning: 'reflection coefficient' },
  ],
  range: 'any impedance; reference impedances with a positive real part',
  accuracy: 'exact; 1e-12 relative in float64',
};

export interface Reflection<T> {
  readonly gamma: T;
  readonly magnitude: Float64Array;
  /** 1 - |Gamma|^2, the part of the available power that is taken in; negative where more comes back. */
  readonly absorbed: Float64Array;
}

/**
 * Range: any pair (V, I) that is not (0, 0). Accuracy: Gamma to rounding; `absorbed` keeps its own relative accuracy where |Gamma| is
 * nearly 1, as far as `power`, Re(V I*), does; a caller who knows it better than as a product gives it.
 * Throws nothing. The trap: Gamma of a load equal to a complex Zr is not 0; that of its conjugate is.
 */
export function reflection<T extends Phasor<T>>(
  space: Space<T>,
  v: T,
  i: T,
  reference: T,
  power: Float64Array = space.column(v.mul(i.conjugate())).re,
): Reflection<T> {
  const denominator = v.add(reference.mul(i));
  const gamma = v.sub(reference.conjugate().mul(i)).div(denominator);
  const resistance = space.column(reference).re;
  const size = magnitudes(space, denominator);
  const absorbed = power.map((each, index) => (4 * resistance[index] * (each / size[index])) / size[index]);
  return { gamma, magnitude: magnitudes(space, gamma), absorbed };
}

/** |Gamma| and 1 - |Gamma|^2, each with its own digits. */
export type ReflectionSizes = Pick<Reflection<unknown>, 'magnitude' | 'absorbed'>;

/** (1 + |Gamma|) / (1 - |Gamma|); NaN where |Gamma| is 1 or more. */
export function standingWaveRatio({ magnitude, absorbed }: ReflectionSizes): Float64Array {
  return magnitude.map((each, index) => (absorbed[index] > 0 ? ((1 + each) * (1 + each)) / absorbed[index] : NaN));
}

/** Below this |Gamma| its own logarithm is as good as that of 1 minus the absorbed part, above it worse. */
const nearlyWhole = 0.7;

/** -20 log10 |Gamma|; infinite where Gamma is 0. */
export function returnLossDb({ magnitude, absorbed }: ReflectionSizes): Float64Array {
  return magnitude.map((each, index) => {
    const db = each < nearlyWhole ? -decibelsPerNeper * Math.log(each) : -0.5 * decibelsPerNeper * Math.log1p(-absorbed[index]);
    return db === 0 ? 0 : db;
  });
}

/** -10 log10(1 - |Gamma|^2); NaN where |Gamma| is more than 1, infinite where it is 1. */
export function mismatchLossDb({ magnitude, absorbed }: ReflectionSizes): Float64Array {
  return magnitude.map((each, index) => {
    const db = -0.5 * decibelsPerNeper * (each < nearlyWhole ? Math.log1p(-each * each) : Math.log(absorbed[index]));
    return db === 0 ? 0 : db;
  });
}
