/**
 * A coplanar line: a strip between two half planes on the same surface, on a substrate that may have a plane below.
 *
 *   half space below    k0 = w/(w + 2 s)
 *   substrate           k1 = sinh(pi w/4h)/sinh(pi (w + 2 s)/4h)
 *   substrate, backed   k2 = tanh(pi w/4h)/tanh(pi (w + 2 s)/4h)
 */
import type { Method } from '../calculation';
import { speedOfLightMPerS, vacuumPermeabilityHPerM } from '../constants';
import type { LosslessPlanarLine } from '../lines/planar-constants';
import { logTanh, quarterPeriodRatio } from '../numeric/elliptic';

const symbols = [
  { symbol: 'w', meaning: 'width of the strip', unit: 'm' },
  { symbol: 's', meaning: 'gap on either side', unit: 'm' },
  { symbol: 'h', meaning: 'height of the substrate', unit: 'm' },
  { symbol: String.raw`\varepsilon_r`, meaning: 'relative permittivity of the substrate' },
  { symbol: 'K', meaning: "complete elliptic integral of the first kind; K'(k) = K(k')" },
  { symbol: String.raw`\eta_0`, meaning: 'wave impedance of vacuum', unit: 'ohm' },
] as const;

export const coplanarHalfSpace: Method = {
  id: 'coplanar-half-space',
  title: 'Coplanar line on a half space',
  source: 'Wen, Coplanar waveguide: a surface strip transmission line, IEEE Trans. MTT-17 (1969) 1087-1090 (from memory)',
  formulas: [String.raw`Z_c = \frac{\eta_0}{4\sqrt{\varepsilon_{\mathrm{eff}}}}\frac{K'(k_0)}{K(k_0)}, \qquad k_0 = \frac{w}{w + 2s}, \qquad \varepsilon_{\mathrm{eff}} = \frac{\varepsilon_r + 1}{2}`],
  symbols,
  range: 'planes without thickness that go on for ever, on a substrate without end',
  accuracy: 'exact; 1e-12 relative in float64',
};

export const coplanarSubstrate: Method = {
  id: 'coplanar-substrate',
  title: 'Coplanar line on a substrate',
  source: 'Ghione and Naldi, Analytical formulas for coplanar lines in hybrid and monolithic MICs, Electronics Letters 20 (1984) 179-181 (from memory)',
  formulas: [
    String.raw`\varepsilon_{\mathrm{eff}} = 1 + \frac{\varepsilon_r - 1}{2}\,\frac{K(k_1)}{K'(k_1)}\,\frac{K'(k_0)}{K(k_0)}, \qquad Z_c = \frac{\eta_0}{4\sqrt{\varepsilon_{\mathrm{eff}}}}\frac{K'(k_0)}{K(k_0)}`,
    String.raw`k_0 = \frac{w}{w + 2s}, \qquad k_1 = \frac{\sinh(\pi w/4h)}{\sinh(\pi (w + 2s)/4h)}`,
  ],
  symbols,
  range: 'height of the substrate at least half of w + 2 s; planes without thickness',
  accuracy: '1.5 % in the range; at a height of a fifth of w + 2 s 3.8 % of the impedance and 4 % of the effective permittivity (measured here by solutions of the field)',
};

export const coplanarBacked: Method = {
  id: 'coplanar-backed',
  title: 'Coplanar line over a plane',
  source: 'Ghione and Naldi, Coplanar waveguides for MMIC applications: effect of upper shielding, conductor backing, finite-extent ground planes and line-to-line coupling, IEEE Trans. MTT-35 (1987) 260-267 (from memory)',
  formulas: [
    String.raw`Z_c = \frac{\eta_0}{2\sqrt{\varepsilon_{\mathrm{eff}}}}\Big(\frac{K(k_0)}{K'(k_0)} + \frac{K(k_2)}{K'(k_2)}\Big)^{-1}, \qquad k_2 = \frac{\tanh(\pi w/4h)}{\tanh(\pi (w + 2s)/4h)}`,
    String.raw`\varepsilon_{\mathrm{eff}} = \frac{K(k_0)/K'(k_0) + \varepsilon_r\,K(k_2)/K'(k_2)}{K(k_0)/K'(k_0) + K(k_2)/K'(k_2)}`,
  ],
  symbols,
  range: 'height of the substrate at least half of w + 2 s; planes without thickness',
  accuracy: '1.5 % in the range; at a height of a fifth of w + 2 s 3.8 % of the impedance and 4 % of the effective permittivity (measured here by solutions of the field)',
};

export const coplanarThickness: Method = {
  id: 'coplanar-thickness',
  title: 'Thickness of a coplanar line',
  source: 'Gupta, Garg, Bahl and Bhartia, Microstrip Lines and Slotlines, 2nd ed., 1996, section 7.3 (from memory)',
  formulas: [String.raw`\Delta = \frac{1.25\,t}{\pi}\Big(1 + \ln\frac{4\pi w}{t}\Big), \qquad w \to w + \Delta, \qquad s \to s - \Delta`],
  symbols: [
    { symbol: 't', meaning: 'thickness of strip and planes', unit: 'm' },
    { symbol: String.raw`\Delta`, meaning: 'by how much the strip counts as wider', unit: 'm' },
  ],
  range: 'thickness up to a tenth of gap and width',
  accuracy: 'of first order in the thickness: the impedance some percent low at its end; the resistance, from its derivative, 6 % too high at a thickness of a thousandth of the gap and up to 75 % at a tenth (measured here by maps of the cross-section)',
};

export interface CoplanarShape {
  readonly width: number;
  readonly gap: number;
  /** Infinity without a lower end. */
  readonly height: number;
  readonly isBacked: boolean;
}

/** What the strip counts as wider by. Range and accuracy: above. The trap: its logarithm falls below -1 for a strip far thicker than wide, which counts as square. */
export function coplanarWidening(width: number, given: number): number {
  const thickness = Math.min(given, width);
  return thickness === 0 ? 0 : ((1.25 * thickness) / Math.PI) * (1 + Math.log((4 * Math.PI * width) / thickness));
}

/**
 * Source, symbols, range and accuracy: the methods above. Throws nothing. The traps: sinh overflows, and k' = sqrt(1 - k^2) cancels; so the logarithms of both
 * are formed, and of differences of the geometry: 1 - (sinh a/sinh c)^2 = sinh(c - a) sinh(c + a)/sinh^2 c; for tanh the same, over cosh^2 a.
 */
export function coplanarLine({ width, gap, height, isBacked }: CoplanarShape, relativePermittivity: number): LosslessPlanarLine {
  const outer = width + 2 * gap;
  const logOuter = Math.log(outer);
  const open = quarterPeriodRatio(Math.log(width) - logOuter, Math.LN2 + 0.5 * (Math.log(gap) + Math.log(width + gap)) - logOuter);
  const below = height === Infinity ? open : belowRatio((0.25 * Math.PI * width) / height, (0.25 * Math.PI * outer) / height, (0.5 * Math.PI * gap) / height, isBacked);
  const [air, field] = isBacked && height !== Infinity ? [open + below, below] : [2 * open, below];
  const effectivePermittivity = (air + (relativePermittivity - 1) * field) / air;
  const impedance = (vacuumPermeabilityHPerM * speedOfLightMPerS) / (2 * Math.sqrt(effectivePermittivity) * air);
  return { impedance, effectivePermittivity, share: field / air };
}

/** K/K' of k1, or of k2 with a plane below; a, c and their difference in the arguments of the hyperbolic functions. */
function belowRatio(a: number, c: number, difference: number, isBacked: boolean): number {
  const complement = 0.5 * (logSinh(difference) + logSinh(a + c)) - logSinh(c);
  if (!isBacked) return quarterPeriodRatio(logSinh(a) - logSinh(c), complement);
  return quarterPeriodRatio(logTanh(a) - logTanh(c), complement - logCosh(a));
}

/** ln(2 sinh x), x > 0; its factor of 2 drops out of every ratio here. */
function logSinh(x: number): number {
  return x + Math.log(-Math.expm1(-2 * x));
}

/** ln cosh x. */
function logCosh(x: number): number {
  return x + Math.log1p(Math.exp(-2 * x)) - Math.LN2;
}
