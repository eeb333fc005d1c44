/**
 * R, L, G and C of a planar line (microstrip, stripline, coplanar) from what its lossless line is at a permittivity and a frequency, from its
 * dielectric, and from its conductors.
 *
 *   L = Zc sqrt(eps_eff)/c + L_i      C = sqrt(eps_eff)/(Zc c)      G = omega C q eps''/eps_eff      R, L_i: methods/planar-conductor
 *
 * A kind gives `lossless`, a pure function of the real relative permittivity and the frequency; it is called once where neither changes.
 * `q` is the share of the dielectric: for a substrate under air (eps_eff - 1)/(eps_r - 1), with its limit at eps_r = 1; 1 where the dielectric
 * fills the line. Zc and eps_eff are those with a real permittivity; loss enters by its share alone, so C, G are exact to first order of tan d.
 */
import type { MethodUse, Warning } from '../calculation';
import { speedOfLightMPerS } from '../constants';
import { skinDepthM } from '../methods/internal-impedance';
import { planarConductorLoss, type PlanarConductor } from '../methods/planar-conductor';
import type { Permittivity } from '../methods/permittivity';
import type { LineModel } from './line-constants';
import { higherModeWarnings } from './line-warnings';

/** A planar line whose conductors are perfect and whose dielectric has no loss. */
export interface LosslessPlanarLine {
  /** ohm. */
  readonly impedance: number;
  readonly effectivePermittivity: number;
  /** q, 0 to 1: the share of the dielectric in the field. */
  readonly share: number;
}

export interface PlanarLine {
  readonly omega: Float64Array;
  /** Of `dielectricOver`. */
  readonly permittivity: Permittivity;
  /** Smooth for permittivities from 0.99 up, as the slopes are differences; none below 1 is asked for otherwise. */
  lossless(relativePermittivity: number, frequencyHz: number): LosslessPlanarLine;
  /** Whether `lossless` depends on the frequency. */
  readonly isDispersive: boolean;
  readonly conductor: PlanarConductor;
  readonly singleModeLimitHz: number;
  /** Without those of permittivity and conductor, which are added here; so for the warnings, and that of higher modes. */
  readonly methods: readonly MethodUse[];
  readonly warnings: readonly Warning[];
}

/** External inductance H/m, capacitance F/m, and capacitance over effective permittivity times share: what eps'' omega makes G of. */
type Outside = readonly [inductance: number, capacitance: number, lossFactor: number];

/**
 * Source: definitions above. Symbols: there. Range: that of `lossless`. Accuracy: that of `lossless`; slopes to 1e-10 of a constant over omega.
 * Throws nothing. The trap: the wideband Debye model may fall below 1, where no dielectric is and the formulas are not made for it; 1 stands for it.
 */
export function planarConstants(line: PlanarLine): LineModel {
  const { omega, permittivity, conductor, singleModeLimitHz } = line;
  const loss = planarConductorLoss(conductor, omega);
  const outside = outsideOver(line);
  const column = (at: (index: number) => number) => Float64Array.from(omega, (_, index) => at(index));
  const { values, slopes, effectivePermittivity } = outside;
  const lossSlope = permittivity.slope?.loss;
  return {
    constants: {
      resistance: loss.resistance,
      inductance: column((index) => values[index][0] + loss.inductance[index]),
      conductance: column((index) => omega[index] * permittivity.loss[index] * values[index][2]),
      capacitance: column((index) => values[index][1]),
      slope: {
        resistance: loss.resistanceSlope,
        inductance: column((index) => slopes[index][0] + loss.inductanceSlope[index]),
        conductance: column((index) => (permittivity.loss[index] + omega[index] * (lossSlope?.[index] ?? 0)) * values[index][2] + omega[index] * permittivity.loss[index] * slopes[index][2]),
        capacitance: column((index) => slopes[index][1]),
      },
    },
    methods: [...line.methods, ...loss.methods, ...permittivity.methods],
    warnings: [...line.warnings, ...loss.warnings, ...permittivity.warnings, ...higherModeWarnings(omega, singleModeLimitHz)],
    geometry: {
      externalInductance: column((index) => values[index][0]),
      effectivePermittivity,
      skinDepth: skinDepthM(conductor.material, omega),
      singleModeLimitHz,
    },
  };
}

/** The greatest real permittivity over the frequencies, and at least 1: with it the limit of a single mode holds at all of them. */
export function greatestPermittivity(permittivity: Permittivity): number {
  return permittivity.real.reduce((most, each) => Math.max(most, each), 1);
}

interface OutsideColumns {
  readonly values: readonly Outside[];
  readonly slopes: readonly Outside[];
  readonly effectivePermittivity: Float64Array;
}

const none: Outside = [0, 0, 0];

function outsideOver({ omega, permittivity, lossless, isDispersive }: PlanarLine): OutsideColumns {
  const { real, slope } = permittivity;
  const at = (relativePermittivity: number, w: number) => lossless(relativePermittivity, w / (2 * Math.PI));
  if (!slope && !isDispersive && omega.length > 0) {
    const once = at(Math.max(1, real[0]), omega[0]);
    const value = outsideOf(once);
    return { values: Array.from(omega, () => value), slopes: Array.from(omega, () => none), effectivePermittivity: omega.map(() => once.effectivePermittivity) };
  }
  const lines = Array.from(omega, (w, index) => at(Math.max(1, real[index]), w));
  const slopes = Array.from(omega, (w, index): Outside => {
    const epsilon = Math.max(1, real[index]);
    const byPermittivity = slope && real[index] > 1 ? scaled(slopeOf((each) => outsideOf(at(each, w)), epsilon, permittivityStep * (epsilon - lowestSmooth)), slope.real[index]) : none;
    const byFrequency = isDispersive && w > stillBelow ? slopeOf((each) => outsideOf(at(epsilon, each)), w, frequencyStep * w) : none;
    return [byPermittivity[0] + byFrequency[0], byPermittivity[1] + byFrequency[1], byPermittivity[2] + byFrequency[2]];
  });
  return { values: lines.map(outsideOf), slopes, effectivePermittivity: Float64Array.from(lines, ({ effectivePermittivity }) => effectivePermittivity) };
}

function outsideOf({ impedance, effectivePermittivity, share }: LosslessPlanarLine): Outside {
  const root = Math.sqrt(effectivePermittivity);
  const capacitance = root / (impedance * speedOfLightMPerS);
  return [(impedance * root) / speedOfLightMPerS, capacitance, (capacitance * share) / effectivePermittivity];
}

/** The formulas for microstrip have a branch point at a permittivity of 0.9. */
const lowestSmooth = 0.9;
/** rad/s. Far below anything that a field depends on, and far above where a step would underflow. */
const stillBelow = 1e-100;
/** Powers up to the twelfth of frequency stand in the formulas: with this step the rest of the series is 1e-12 and rounding 1e-13. */
const frequencyStep = 0.002;
const permittivityStep = 0.002;

/** Central difference of sixth order. */
function slopeOf(f: (x: number) => Outside, x: number, h: number): Outside {
  const [a, b, c] = [1, 2, 3].map((step) => [f(x + step * h), f(x - step * h)]);
  const part = (index: 0 | 1 | 2) => (45 * (a[0][index] - a[1][index]) - 9 * (b[0][index] - b[1][index]) + (c[0][index] - c[1][index])) / (60 * h);
  return [part(0), part(1), part(2)];
}

function scaled([inductance, capacitance, lossFactor]: Outside, by: number): Outside {
  return [inductance * by, capacitance * by, lossFactor * by];
}
