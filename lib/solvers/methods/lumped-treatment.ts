/**
 * What it costs to take a line as lumped parts: the error of its input impedance, without subtracting impedances that are nearly the same.
 *
 *   exact   V = E v + z S i,  I = y S v + E i        E = cosh t, S = sinh(t)/t, t^2 = z y;  z = Z l, y = Y l
 *   model   V', I' from v, i likewise;  error = |Z'/Zin - 1| = |V' I - V I'| / |V I'|
 *
 *   wire          V' = v                  V' I - V I' = S (y v^2 - z i^2)
 *   section       z, then y at the load   z y (y v^2 (S - K) + E v i + z i^2 K)                            K = (E - S)/t^2
 *   pi section    y/2, z, y/2             z y (y v^2 (S/2 - E/4 - K) - z y S v i / 4 + z i^2 (K - S/2))
 *
 * (v, i) is the load; every entry of the exact line is carried divided by exp(t), which the quotients do not notice.
 */
import type { Method } from '../calculation';
import type { LineConstants } from '../lines/line-constants';
import { clearDust, magnitudes, type Phasor, type Space } from '../numeric/phasor';
import type { LineTwoPort } from './line-two-port';
import { oddScaleOf, type OnePort } from './one-port';
import type { Propagation } from './telegrapher';

export const lumpedTreatment: Method = {
  id: 'lumped-treatment',
  title: 'Error of taking a line as a wire or as one section of lumped parts',
  source: 'Two-port of the line against Kirchhoff’s laws for the parts; one section as in Pozar, Microwave Engineering, 4th ed., figure 2.1b, with the whole length for dz (from memory); nominal pi of power engineering',
  formulas: [
    String.raw`\text{wire: } Z' = Z_L, \qquad \text{section: } Z' = Z\ell + \frac{Z_L}{1 + Y\ell\,Z_L}, \qquad \text{error} = \left|\frac{Z'}{Z_{in}} - 1\right|`,
    String.raw`\text{pi: } \begin{pmatrix} 1 + \tfrac{1}{2} Z Y \ell^2 & Z\ell \\ Y\ell\,(1 + \tfrac{1}{4} Z Y \ell^2) & 1 + \tfrac{1}{2} Z Y \ell^2 \end{pmatrix}`,
  ],
  symbols: [
    { symbol: 'Z, Y', meaning: 'series impedance R + jwL and shunt admittance G + jwC', unit: 'ohm/m, S/m' },
    { symbol: String.raw`\ell`, meaning: 'length', unit: 'm' },
    { symbol: 'Z_L', meaning: 'termination', unit: 'ohm' },
    { symbol: 'Z_{in}', meaning: 'input impedance of the line', unit: 'ohm' },
  ],
  range: 'any line, length, termination and frequency',
  accuracy: 'exact; 1e-12 relative to the error itself, however small, except beside a pole or zero of the input impedance',
};

export const lengthRules: Method = {
  id: 'length-rules',
  title: 'Rules of thumb: when a conductor pair is treated as a line',
  source: 'common practice; authors differ in the fractions',
  formulas: [String.raw`\ell > \frac{\lambda}{10}, \qquad t_d > \frac{t_r}{6}, \qquad t_d > \frac{t_r}{2}`],
  symbols: [
    { symbol: String.raw`\lambda`, meaning: 'wavelength on the line', unit: 'm' },
    { symbol: 't_d', meaning: 'delay of the line', unit: 's' },
    { symbol: 't_r', meaning: 'rise time of the edge', unit: 's' },
  ],
  range: 'a first look; they know neither the termination nor the loss',
  accuracy: 'rules of thumb; the error itself is computed beside them',
};

export interface LumpedErrors {
  /** |Z'/Zin - 1|; infinite at a zero of Zin or where the model has a pole. */
  readonly relative: Float64Array;
  /** |Gamma' - Gamma| to a real reference: bounded by 2 for a passive load. */
  readonly reflection: Float64Array;
}

export interface LumpedModels {
  readonly wire: LumpedErrors;
  readonly section: LumpedErrors;
  readonly piSection: LumpedErrors;
}

/** A few units of rounding: what is left of a sum of this size where it ought to vanish. */
const vanishing = 8 * Number.EPSILON;

/**
 * Source: above. Symbols: `referenceOhm` real, what reflection refers to. Range: any. Accuracy: each error to a few units of rounding of itself.
 * Throws nothing. The trap: a short as a wire is wrong by the whole impedance at any length, and an open by an infinite one.
 */
export function lumpedErrors<T extends Phasor<T>>(space: Space<T>, constants: LineConstants, { omega }: Propagation, lengthM: number, two: LineTwoPort<T>, load: OnePort<T>, referenceOhm: Float64Array): LumpedModels {
  const { resistance: R, inductance: L, conductance: G, capacitance: C } = constants;
  const z = space.from(R.map((each) => each * lengthM), L.map((each, index) => each * omega[index] * lengthM));
  const y = space.from(G.map((each) => each * lengthM), C.map((each, index) => each * omega[index] * lengthM));
  const { even: E, quotient: S, kernel: K, series, shunt } = two;
  const { v, i } = load;
  const q = z.mul(y);
  const V = E.mul(v).add(series.mul(i));
  const I = shunt.mul(v).add(E.mul(i));
  const [vv, vi, ii] = [y.mul(v).mul(v), v.mul(i), z.mul(i).mul(i)];
  const sizes = (value: T) => magnitudes(space, value);

  const evenScale = sizes(two.roundTrip).map((p, index) => 0.5 * (1 + p) * two.sensitivity[index]);
  const seriesScale = oddScaleOf(space, two, series);
  const sizeV = sizes(V).map((each, index) => (each <= vanishing * (evenScale[index] * load.vScale[index] + seriesScale[index] * load.iScale[index]) ? 0 : each));
  const reference = space.from(referenceOhm, new Float64Array(space.length));
  const exactWave = sizes(V.add(reference.mul(I)));

  const errorsOf = (modelV: T, modelI: T, difference: T): LumpedErrors => {
    const size = sizes(difference);
    const [sizeI, modelWave] = [sizes(modelI), sizes(modelV.add(reference.mul(modelI)))];
    return {
      relative: size.map((each, index) => (each === 0 ? 0 : each / sizeV[index] / sizeI[index])),
      reflection: size.map((each, index) => (each === 0 ? 0 : (2 * referenceOhm[index] * (each / modelWave[index])) / exactWave[index])),
    };
  };

  const [sizeVv, sizeIi] = [sizes(vv), sizes(ii)];
  const mismatch = clearDust(space, vv.sub(ii), sizeVv.map((each, index) => each + sizeIi[index]));
  const halfS = S.mul(0.5);
  const sectionI = i.add(y.mul(v));
  const a = q.mul(0.5).add(1);
  return {
    wire: errorsOf(v, i, S.mul(mismatch)),
    section: errorsOf(v.add(z.mul(sectionI)), sectionI, q.mul(vv.mul(S.sub(K)).add(E.mul(vi)).add(ii.mul(K)))),
    piSection: errorsOf(
      a.mul(v).add(z.mul(i)),
      a.mul(i).add(y.mul(q.mul(0.25).add(1)).mul(v)),
      q.mul(vv.mul(halfS.sub(E.mul(0.25)).sub(K)).sub(q.mul(S).mul(vi).mul(0.25)).add(ii.mul(K.sub(halfS)))),
    ),
  };
}
