/**
 * Where the voltage along a terminated line is greatest and least; how the places are found is in voltage-slope.ts.
 */
import type { Method } from '../calculation';
import type { LineConstants } from '../lines/line-constants';
import type { ComplexColumn } from '../numeric/complex-column';
import { magnitude, type ComplexParts } from '../numeric/phasor';
import type { Propagation } from './telegrapher';
import { VoltageSlope, type TerminatedLine } from './voltage-slope';

export const standingWaves: Method = {
  id: 'standing-waves',
  title: 'Maxima and minima of the voltage along a line',
  source: 'From the telegrapher equations (Pozar, Microwave Engineering, 4th ed., section 2.1, from memory); the stationary points are bracketed between the turns of the slope',
  formulas: [
    String.raw`|V(x)|^2 = |A|^2 e^{2\alpha x} + |B|^2 e^{-2\alpha x} + 2\operatorname{Re}\left(A B^{*} e^{2j\beta x}\right), \qquad A, B = \frac{v \pm Z_c i}{2}`,
    String.raw`\frac{d|V|^2}{dx} = 0: \quad \sin\psi = \frac{\alpha}{\beta}\sinh u, \qquad \psi = 2\beta x + \arg AB^{*}, \quad u = 2\alpha x + \ln\left|\frac{A}{B}\right|`,
  ],
  symbols: [
    { symbol: 'x', meaning: 'distance from the termination', unit: 'm' },
    { symbol: 'v, i', meaning: 'voltage and current of the termination', unit: 'V, A' },
    { symbol: 'A, B', meaning: 'wave towards the termination and wave back, at the termination', unit: 'V' },
    { symbol: String.raw`\alpha, \beta`, meaning: 'attenuation and phase constant', unit: 'Np/m, rad/m' },
    { symbol: 'Z_c', meaning: 'characteristic impedance', unit: 'ohm' },
  ],
  range: 'any uniform line and termination, direct current included',
  accuracy: 'exact; places to the rounding of the phase',
};

export interface Extremum {
  /** m, from the termination. */
  readonly x: number;
  readonly isMaximum: boolean;
  /** |V| of a minimum, |Zc I| of a maximum, over exp(alpha x), where it is small and so better known than as a sum of waves; else null. */
  readonly vanishing: number | null;
}

export interface Extrema {
  /** From the termination on. */
  readonly extrema: readonly Extremum[];
  /** Whether there were more than `mostPeriods` let it find. */
  readonly isCut: boolean;
}

/**
 * Extrema of |V| for from <= x <= to, those at the ends of the line included where the slope vanishes there. Range: any line and termination.
 * Accuracy: x to the rounding of the phase, a few 1e-16 of (1 + 2 beta x)/(2 beta). Throws nothing. The trap: Zc may be infinite, and P and Q then equal and
 * infinite; the slope is formed from v and Zc i, scaled, of which it needs only products that do not cancel.
 */
export function voltageExtrema(line: TerminatedLine, lengthM: number, from: number, to: number, mostPeriods: number): Extrema {
  const { characteristicImpedance: zc } = line;
  if (zc === null) return { extrema: straightMinimum(line, lengthM), isCut: false };
  const wave = new VoltageSlope(line, zc);
  const { pieces, isCut } = wave.pieces(from, to, mostPeriods);
  const extrema = pieces.flatMap((piece) => {
    const x = wave.zeroOf(piece, lengthM);
    return x === null ? [] : [{ x, isMaximum: piece.rises, vanishing: wave.vanishingAt(x, piece.rises) }];
  });
  return { extrema, isCut };
}

/** Where nothing flows between the conductors at direct current, V = v + Z i x. */
function straightMinimum({ series, v, i }: TerminatedLine, lengthM: number): Extremum[] {
  const drop = { re: series.re * i.re - series.im * i.im, im: series.re * i.im + series.im * i.re };
  const size = magnitude(drop.re, drop.im);
  if (size === 0) return [];
  const x = -(v.re * (drop.re / size) + v.im * (drop.im / size)) / size;
  return x >= 0 && x <= lengthM ? [{ x: x + 0, isMaximum: false, vanishing: null }] : [];
}

/** The line and its load at one of the frequencies. */
export function terminatedLine({ resistance, inductance }: LineConstants, waves: Propagation, index: number, v: ComplexParts, i: ComplexParts): TerminatedLine {
  const { re, im, infinite } = waves.characteristicImpedance;
  return {
    alpha: waves.attenuationNpPerM[index],
    beta: waves.phaseRadPerM[index],
    series: { re: resistance[index], im: waves.omega[index] * inductance[index] },
    characteristicImpedance: infinite[index] ? null : { re: re[index], im: im[index] },
    v,
    i,
  };
}

/**
 * (1 + |Gamma|)/(1 - |Gamma|) of the termination to the line's own impedance; NaN where |Gamma| is 1 or more. Accuracy: rounding, for 1 - |Gamma|^2 is
 * 4 Re(Zc i v*)/|v + Zc i|^2. The trap: with a complex Zc, |Gamma| of a passive termination may be more than 1.
 */
export function waveRatio({ characteristicImpedance: zc, v, i }: TerminatedLine): number {
  if (zc === null) return NaN;
  const u = { re: zc.re * i.re - zc.im * i.im, im: zc.re * i.im + zc.im * i.re };
  const sum = magnitude(v.re + u.re, v.im + u.im);
  const reflected = magnitude(v.re - u.re, v.im - u.im) / sum;
  const absorbed = 4 * ((u.re / sum) * (v.re / sum) + (u.im / sum) * (v.im / sum));
  return absorbed > 0 ? (1 + reflected) ** 2 / absorbed : NaN;
}

/** Far more than there are in half a wave. */
const fewPeriods = 8;

/**
 * Where between the ends the voltage is greatest, from the termination, one entry a frequency; 0 where it is so at an end alone. Without the
 * interference |V|^2 is convex, and interference repeats every half wave, so that place is no farther than half a wave from one of the ends.
 */
export function placesOfHighestVoltage(constants: LineConstants, waves: Propagation, lengthM: number, v: ComplexColumn, i: ComplexColumn): Float64Array {
  return v.re.map((_, index) => {
    const line = terminatedLine(constants, waves, index, { re: v.re[index], im: v.im[index] }, { re: i.re[index], im: i.im[index] });
    if (line.characteristicImpedance === null) return 0;
    const wave = new VoltageSlope(line, line.characteristicImpedance);
    const half = Math.min(lengthM, Math.PI / line.beta);
    const near = maximaOf(wave, lengthM, 0, half);
    const far = half < lengthM ? maximaOf(wave, lengthM, lengthM - half, lengthM) : [];
    return [...near, ...far].reduce((best, x) => (wave.level(x, lengthM) > wave.level(best, lengthM) ? x : best), 0);
  });
}

function maximaOf(wave: VoltageSlope, lengthM: number, from: number, to: number): number[] {
  return wave.pieces(from, to, fewPeriods).pieces.flatMap((piece) => (piece.rises ? (wave.zeroOf(piece, lengthM) ?? []) : []));
}
