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
import { ratioOfIntegrals } from '../numeric/elliptic';

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
  accuracy: 'of first order in the thickness: a few percent at its end',
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
 * Source, symbols, range and accuracy: the methods above. Throws nothing. The traps: sinh overflows, and k' = sqrt(1 - k^2) cancels; both are formed from
 * exponentials and from differences of the geometry: 1 - (sinh a/sinh c)^2 = sinh(c - a) sinh(c + a)/sinh^2 c, and the same over cosh for tanh.
 */
export function coplanarLine({ width, gap, height, isBacked }: CoplanarShape, relativePermittivity: number): LosslessPlanarLine {
  const outer = width + 2 * gap;
  const open = ratioOfIntegrals(width / outer, (2 * Math.sqrt(gap) * Math.sqrt(width + gap)) / outer);
  const a = (0.25 * Math.PI * width) / height;
  const c = (0.25 * Math.PI * outer) / height;
  const below = height === Infinity ? open : isBacked ? backedRatio(a, c) : substrateRatio(a, c);
  const [air, field] = isBacked && height !== Infinity ? [open + below, below] : [2 * open, below];
  const effectivePermittivity = (air + (relativePermittivity - 1) * field) / air;
  const impedance = (vacuumPermeabilityHPerM * speedOfLightMPerS) / (2 * Math.sqrt(effectivePermittivity) * air);
  return { impedance, effectivePermittivity, share: (relativePermittivity * field) / air };
}

/** Below this the hyperbolic sines are their own arguments, to rounding. */
function substrateRatio(a: number, c: number): number {
  // sinh x = exp(x) (1 - exp(-2x))/2.
  const sinh = (x: number) => -Math.expm1(-2 * x);
  const k = (Math.exp(a - c) * sinh(a)) / sinh(c);
  const complement = Math.sqrt(sinh(c - a) * sinh(c + a)) / sinh(c);
  return k === 0 ? (0.5 * Math.PI) / (Math.log(4) + c - a - Math.log(sinh(a) / sinh(c))) : ratioOfIntegrals(k, complement);
}

function backedRatio(a: number, c: number): number {
  const sinh = (x: number) => -Math.expm1(-2 * x);
  const cosh = (x: number) => 1 + Math.exp(-2 * x);
  const k = Math.tanh(a) / Math.tanh(c);
  // 1 - tanh^2 a/tanh^2 c = sinh(c - a) sinh(c + a)/(sinh^2 c cosh^2 a): exp(2c - 2c - 2a) is left.
  const complement = (2 * Math.exp(-a) * Math.sqrt(sinh(c - a) * sinh(c + a))) / (sinh(c) * cosh(a));
  // K(k) = ln(4/k') and K(k') = pi/2 where k' vanishes.
  const logarithm = Math.log(2) + a - 0.5 * Math.log(sinh(c - a) * sinh(c + a)) + Math.log(sinh(c) * cosh(a));
  return complement < 1e-8 ? logarithm / (0.5 * Math.PI) : ratioOfIntegrals(k, complement);
}
