/** Microstrip over frequency: how effective permittivity and impedance rise as the field draws into the substrate. */
import type { Method } from '../calculation';
import type { MicrostripShape, StaticMicrostrip } from './microstrip-static';

export const microstripDispersion: Method = {
  id: 'microstrip-dispersion',
  title: 'Dispersion of microstrip',
  source: 'Effective permittivity: Kirschning and Jansen, Accurate model for effective dielectric constant of microstrip with validity up to millimetre-wave frequencies, Electronics Letters 18 (1982) 272-273. Impedance: Hammerstad and Jensen, IEEE MTT-S Digest 1980, 407-409. Both from memory',
  formulas: [
    String.raw`\varepsilon_{\text{eff}}(f) = \varepsilon_r - \frac{\varepsilon_r - \varepsilon_{\text{eff}}(0)}{1 + P}, \qquad P = P_1 P_2\left[(0.1844 + P_3 P_4)\,F\right]^{1.5763}`,
    String.raw`P_1 = 0.27488 + u\left[0.6315 + \frac{0.525}{(1 + 0.0157 F)^{20}}\right] - 0.065683\,e^{-8.7513u}`,
    String.raw`P_2 = 0.33622\left(1 - e^{-0.03442\varepsilon_r}\right), \qquad P_3 = 0.0363\,e^{-4.6u}\left[1 - e^{-(F/38.7)^{4.97}}\right]`,
    String.raw`P_4 = 1 + 2.751\left[1 - e^{-(\varepsilon_r/15.916)^8}\right]`,
    String.raw`Z(f) = Z(0)\,\sqrt{\frac{\varepsilon_{\text{eff}}(0)}{\varepsilon_{\text{eff}}(f)}}\;\frac{\varepsilon_{\text{eff}}(f) - 1}{\varepsilon_{\text{eff}}(0) - 1}`,
  ],
  symbols: [
    { symbol: 'u', meaning: 'width of the strip over the height of the substrate' },
    { symbol: 'F', meaning: 'frequency times height', unit: 'GHz mm' },
    { symbol: String.raw`\varepsilon_r`, meaning: 'relative permittivity of the substrate' },
    { symbol: 'Z(0)', meaning: 'impedance without dispersion', unit: 'ohm' },
  ],
  range: 'permittivity to 20, width 0.1 to 100 heights, height to 0.13 wavelengths in vacuum',
  accuracy: 'effective permittivity 0.6 % (published); impedance by power and current, a plain relation whose error grows with frequency to some percent',
};

/** Where the method holds; the height is in wavelengths of vacuum. */
export const dispersionRange = { leastRatio: 0.1, mostRatio: 100, mostPermittivity: 20, mostHeight: 0.13 };

/**
 * Source, range: `microstripDispersion`. Symbols: permittivity er, height m, frequency Hz. Accuracy: that of the method. Throws nothing.
 * The trap: at a permittivity of 1 the relation for the impedance is 0/0; by shares, q(f)/q(0), it is 1 there.
 */
export function dispersedMicrostrip(line: StaticMicrostrip, { u }: MicrostripShape, er: number, heightM: number, frequencyHz: number): StaticMicrostrip {
  const P = filling(u, er, frequencyHz * 1e-9 * (heightM * 1e3));
  const share = (line.share + P) / (1 + P);
  const effectivePermittivity = er - (er - line.effectivePermittivity) / (1 + P);
  return { impedance: (line.impedance * Math.sqrt(line.effectivePermittivity / effectivePermittivity) * share) / line.share, effectivePermittivity, share };
}

/** P, 0 at 0 Hz and without bound above: how far the field has drawn into the substrate. */
function filling(u: number, er: number, F: number): number {
  const P1 = 0.27488 + u * (0.6315 + 0.525 / (1 + 0.0157 * F) ** 20) - 0.065683 * Math.exp(-8.7513 * u);
  const P2 = -0.33622 * Math.expm1(-0.03442 * er);
  const P3 = -0.0363 * Math.exp(-4.6 * u) * Math.expm1(-((F / 38.7) ** 4.97));
  const P4 = 1 - 2.751 * Math.expm1(-((er / 15.916) ** 8));
  return P1 * P2 * ((0.1844 + P3 * P4) * F) ** 1.5763;
}

/** Hz. Where the first transverse resonance of the strip begins to propagate, or the wave on the substrate couples strongly, whichever is lower. */
export function microstripSingleModeLimitHz(widthM: number, heightM: number, er: number, speed: number): number {
  const resonance = speed / (Math.sqrt(er) * (2 * widthM + 0.8 * heightM));
  const surfaceWave = er > 1 ? (speed * Math.atan(er)) / (Math.SQRT2 * Math.PI * heightM * Math.sqrt(er - 1)) : Infinity;
  return Math.min(resonance, surfaceWave);
}
