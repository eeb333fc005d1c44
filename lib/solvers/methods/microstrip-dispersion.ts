/** Microstrip over frequency: how effective permittivity and impedance rise as the field draws into the substrate. */
import type { Method } from '../calculation';
import type { MicrostripShape, StaticMicrostrip } from './microstrip-static';

export const microstripDispersion: Method = {
  id: 'microstrip-dispersion',
  title: 'Microstrip: dispersion of the effective permittivity',
  source: 'Kirschning and Jansen, Accurate model for effective dielectric constant of microstrip with validity up to millimetre-wave frequencies, Electronics Letters 18 (1982) 272-273 (from memory, checked here against full-wave solutions)',
  formulas: [
    String.raw`\varepsilon_{\text{eff}}(f) = \varepsilon_r - \frac{\varepsilon_r - \varepsilon_{\text{eff}}(0)}{1 + P}, \qquad P = P_1 P_2\left[(0.1844 + P_3 P_4)\,F\right]^{1.5763}`,
    String.raw`P_1 = 0.27488 + u\left[0.6315 + \frac{0.525}{(1 + 0.0157 F)^{20}}\right] - 0.065683\,e^{-8.7513u}`,
    String.raw`P_2 = 0.33622\left(1 - e^{-0.03442\varepsilon_r}\right), \qquad P_3 = 0.0363\,e^{-4.6u}\left[1 - e^{-(F/38.7)^{4.97}}\right]`,
    String.raw`P_4 = 1 + 2.751\left[1 - e^{-(\varepsilon_r/15.916)^8}\right]`,
  ],
  symbols: [
    { symbol: 'u', meaning: 'width of the strip over the height of the substrate' },
    { symbol: 'F', meaning: 'frequency times height', unit: 'GHz mm' },
    { symbol: String.raw`\varepsilon_r`, meaning: 'relative permittivity of the substrate' },
    { symbol: String.raw`\varepsilon_{\text{eff}}(0)`, meaning: 'effective permittivity without dispersion' },
  ],
  range: 'permittivity to 20, width 0.1 to 100 heights, height to 0.13 wavelengths in vacuum',
  accuracy: '0.6 % (published; the same was measured here)',
};

export const microstripImpedanceDispersion: Method = {
  id: 'microstrip-impedance-dispersion',
  title: 'Microstrip: dispersion of the impedance',
  source:
    'Jansen and Kirschning, Arguments and an accurate model for the power-current formulation of microstrip characteristic impedance, AEU 37 (1983) 108-112 (from memory, checked here against full-wave solutions); below a permittivity of 1.3 it gives way to the relation of Hammerstad and Jensen, IEEE MTT-S Digest 1980 (from memory)',
  formulas: [
    String.raw`Z(f) = Z(0)\left(\frac{R_{13}}{R_{14}}\right)^{R_{17}}, \qquad R_{13} = 0.9408\,\varepsilon_{\text{eff}}(f)^{R_8} - 0.9603, \qquad R_{14} = (0.9408 - R_9)\,\varepsilon_{\text{eff}}(0)^{R_8} - 0.9603`,
    String.raw`R_1 = 0.03891\,\varepsilon_r^{1.4}, \qquad R_2 = 0.267\,u^7, \qquad R_3 = 4.766\,e^{-3.228u^{0.641}}, \qquad R_4 = 0.016 + (0.0514\,\varepsilon_r)^{4.524}`,
    String.raw`R_5 = \left(\frac{F}{28.843}\right)^{12}, \qquad R_6 = 22.20\,u^{1.92}, \qquad R_7 = 1.206 - 0.3144\,e^{-R_1}(1 - e^{-R_2})`,
    String.raw`R_8 = 1 + 1.275\left[1 - \exp\left(-0.004625\,R_3\,\varepsilon_r^{1.674}\left(\frac{F}{18.365}\right)^{2.745}\right)\right]`,
    String.raw`R_9 = 5.086\,\frac{R_4}{0.3838 + 0.386 R_4}\;\frac{R_5\,e^{-R_6}}{1 + 1.2992 R_5}\;\frac{(\varepsilon_r - 1)^6}{1 + 10(\varepsilon_r - 1)^6}`,
    String.raw`R_{10} = 0.00044\,\varepsilon_r^{2.136} + 0.0184, \qquad R_{11} = \frac{(F/19.47)^6}{1 + 0.0962(F/19.47)^6}, \qquad R_{12} = \frac{1}{1 + 0.00245u^2}`,
    String.raw`R_{15} = 0.707\,R_{10}\left(\frac{F}{12.3}\right)^{1.097}, \qquad R_{16} = 1 + 0.0503\,\varepsilon_r^2 R_{11}\left[1 - e^{-(u/15)^6}\right]`,
    String.raw`R_{17} = R_7\left[1 - 1.1241\,\frac{R_{12}}{R_{16}}\,e^{-0.026F^{1.15656} - R_{15}}\right]`,
    String.raw`\varepsilon_r \to 1: \quad Z(f) = Z(0)\,\sqrt{\frac{\varepsilon_{\text{eff}}(0)}{\varepsilon_{\text{eff}}(f)}}\;\frac{\varepsilon_{\text{eff}}(f) - 1}{\varepsilon_{\text{eff}}(0) - 1}`,
  ],
  symbols: [
    { symbol: 'Z(0)', meaning: 'impedance without dispersion', unit: 'ohm' },
    { symbol: 'Z(f)', meaning: 'impedance by power and current: twice the power over the squared current', unit: 'ohm' },
    { symbol: 'u', meaning: 'width of the strip over the height of the substrate' },
    { symbol: 'F', meaning: 'frequency times height', unit: 'GHz mm' },
    { symbol: String.raw`\varepsilon_r`, meaning: 'relative permittivity of the substrate' },
  ],
  range: 'permittivity to 20, width 0.1 to 100 heights, height to 0.13 wavelengths in vacuum',
  accuracy: 'measured here, for permittivities from 2 and widths to 10 heights: 1.1 % with a height to 0.06 wavelengths, 2 % to 0.1; beyond, and for wider strips, some percent, and much more for narrow strips on a permittivity above 12',
};

/** Where the methods hold; the height is in wavelengths of vacuum. */
export const dispersionRange = { leastRatio: 0.1, mostRatio: 100, mostPermittivity: 20, mostHeight: 0.13 };

/**
 * Sources, range, accuracy: the two methods above. Symbols: permittivity er, height m, frequency Hz. Throws nothing; finite everywhere.
 * The trap: near a permittivity of 1 R13 and R14 pass through 0, and the other relation is 0/0 at 1; by shares, q(f)/q(0), it is 1 there.
 */
export function dispersedMicrostrip(line: StaticMicrostrip, { u }: MicrostripShape, er: number, heightM: number, frequencyHz: number): StaticMicrostrip {
  const F = frequencyHz * 1e-9 * (heightM * 1e3);
  const P = filling(u, er, F);
  const share = (line.share + P) / (1 + P);
  const effectivePermittivity = er - (er - line.effectivePermittivity) / (1 + P);
  const weight = Math.min(1, Math.max(0, (er - seam.from) / (seam.to - seam.from)));
  const bySharing = weight === 1 ? 0 : (Math.sqrt(line.effectivePermittivity / effectivePermittivity) * share) / line.share;
  const byFit = weight === 0 ? 0 : impedanceRise(u, er, F, line.effectivePermittivity, effectivePermittivity);
  return { impedance: line.impedance * (weight * byFit + (1 - weight) * bySharing), effectivePermittivity, share };
}

/** Between these permittivities one relation leads over to the other; both are within 5 % of full-wave solutions there. */
const seam = { from: 1.1, to: 1.3 };

/** P, 0 at 0 Hz and without bound above: how far the field has drawn into the substrate. */
function filling(u: number, er: number, F: number): number {
  const P1 = 0.27488 + u * (0.6315 + 0.525 / (1 + 0.0157 * F) ** 20) - 0.065683 * Math.exp(-8.7513 * u);
  const P2 = -0.33622 * Math.expm1(-0.03442 * er);
  const P3 = -0.0363 * Math.exp(-4.6 * u) * Math.expm1(-((F / 38.7) ** 4.97));
  const P4 = 1 - 2.751 * Math.expm1(-((er / 15.916) ** 8));
  return P1 * P2 * ((0.1844 + P3 * P4) * F) ** 1.5763;
}

/** Z(f)/Z(0). Beyond their range width and permittivity keep their last value here: R14 would turn negative. */
function impedanceRise(ratio: number, permittivity: number, F: number, still: number, moved: number): number {
  const u = Math.min(Math.max(ratio, dispersionRange.leastRatio), dispersionRange.mostRatio);
  const er = Math.min(permittivity, dispersionRange.mostPermittivity);
  const R1 = 0.03891 * er ** 1.4;
  const R2 = 0.267 * u ** 7;
  const R3 = 4.766 * Math.exp(-3.228 * u ** 0.641);
  const R4 = 0.016 + (0.0514 * er) ** 4.524;
  const R5 = (F / 28.843) ** 12;
  const R6 = 22.2 * u ** 1.92;
  const R7 = 1.206 + 0.3144 * Math.exp(-R1) * Math.expm1(-R2);
  const R8 = 1 - 1.275 * Math.expm1(-0.004625 * R3 * er ** 1.674 * (F / 18.365) ** 2.745);
  const contrast = (er - 1) ** 6;
  const R9 = ((((5.086 * R4) / (0.3838 + 0.386 * R4)) * (R5 * Math.exp(-R6))) / (1 + 1.2992 * R5)) * (contrast / (1 + 10 * contrast));
  const R10 = 0.00044 * er ** 2.136 + 0.0184;
  const R11 = (F / 19.47) ** 6 / (1 + 0.0962 * (F / 19.47) ** 6);
  const R12 = 1 / (1 + 0.00245 * u * u);
  const R13 = 0.9408 * moved ** R8 - 0.9603;
  const R14 = (0.9408 - R9) * still ** R8 - 0.9603;
  const R15 = 0.707 * R10 * (F / 12.3) ** 1.097;
  const R16 = 1 - 0.0503 * er * er * R11 * Math.expm1(-((u / 15) ** 6));
  const R17 = R7 * (1 - 1.1241 * (R12 / R16) * Math.exp(-0.026 * F ** 1.15656 - R15));
  return (R13 / R14) ** R17;
}

/** Hz. Where the first transverse resonance of the strip begins to propagate, or the wave on the substrate couples strongly, whichever is lower. */
export function microstripSingleModeLimitHz(widthM: number, heightM: number, er: number, speed: number): number {
  const resonance = speed / (Math.sqrt(er) * (2 * widthM + 0.8 * heightM));
  const surfaceWave = er > 1 ? (speed * Math.atan(er)) / (Math.SQRT2 * Math.PI * heightM * Math.sqrt(er - 1)) : Infinity;
  return Math.min(resonance, surfaceWave);
}
