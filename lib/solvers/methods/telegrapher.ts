/**
 * Propagation along a uniform line, from its primary constants.
 *
 *   gamma = alpha + j beta = sqrt(R + j w L) sqrt(G + j w C),   Zc = (R + j w L) / gamma
 *
 * R ohm/m, L H/m, G S/m, C F/m, w = 2 pi f rad/s; alpha Np/m, beta rad/m, Zc ohm.
 */
import type { Method } from '../calculation';
import type { LineConstants } from '../lines/line-constants';

export const telegrapherPropagation: Method = {
  id: 'telegrapher-propagation',
  title: 'Propagation constant and characteristic impedance from R, L, G, C',
  source: 'Heaviside, Electrical Papers, vol. 2, 1892; Pozar, Microwave Engineering, 4th ed., equations 2.5 to 2.7 (numbers from memory)',
  formulas: [String.raw`\gamma = \alpha + j\beta = \sqrt{R + j\omega L}\,\sqrt{G + j\omega C}`, String.raw`Z_c = \frac{R + j\omega L}{\gamma}`, String.raw`v_p = \frac{\omega}{\beta}, \qquad \frac{1}{v_g} = \frac{d\beta}{d\omega}`],
  symbols: [
    { symbol: 'R', meaning: 'series resistance', unit: 'ohm/m' },
    { symbol: 'L', meaning: 'series inductance', unit: 'H/m' },
    { symbol: 'G', meaning: 'shunt conductance', unit: 'S/m' },
    { symbol: 'C', meaning: 'shunt capacitance', unit: 'F/m' },
    { symbol: String.raw`\omega`, meaning: 'angular frequency', unit: 'rad/s' },
    { symbol: String.raw`\alpha`, meaning: 'attenuation', unit: 'Np/m' },
    { symbol: String.raw`\beta`, meaning: 'phase constant', unit: 'rad/m' },
    { symbol: 'Z_c', meaning: 'characteristic impedance', unit: 'ohm' },
  ],
  range: 'any uniform line of two conductors in its transverse mode, at any frequency',
  accuracy: 'exact; 1e-12 relative in float64',
};

/** One entry a frequency. */
export interface Propagation {
  readonly omega: Float64Array;
  readonly attenuationNpPerM: Float64Array;
  readonly phaseRadPerM: Float64Array;
  /** d beta / d omega, s/m; infinite where a line without conductance or resistance comes to direct current. */
  readonly groupDelaySPerM: Float64Array;
  /** NaN where Zc is infinite; never passed on, `infinite` says where. */
  readonly characteristicImpedance: { readonly re: Float64Array; readonly im: Float64Array; readonly infinite: Uint8Array };
}

/**
 * Source: Pozar 2.5 to 2.7. Range: any R, L, G, C >= 0 and w >= 0. Accuracy: a few units of rounding in each of
 * alpha and beta, also where one is far smaller than the other. Throws nothing.
 * The trap: the square root of gamma^2 loses alpha of a good line. With gamma^2 = a + j b and |gamma^2| = |Z||Y|, the
 * larger part is the root of a sum of like signs and the smaller follows from their product, b/2.
 */
export function propagation(constants: LineConstants, frequenciesHz: Float64Array): Propagation {
  const { slope } = constants;
  const length = frequenciesHz.length;
  const omega = frequenciesHz.map((frequency) => 2 * Math.PI * frequency);
  const attenuationNpPerM = new Float64Array(length);
  const phaseRadPerM = new Float64Array(length);
  const groupDelaySPerM = new Float64Array(length);
  const re = new Float64Array(length);
  const im = new Float64Array(length);
  const infinite = new Uint8Array(length);
  for (let index = 0; index < length; index++) {
    const w = omega[index];
    const R = constants.resistance[index];
    const L = constants.inductance[index];
    const G = constants.conductance[index];
    const C = constants.capacitance[index];
    const magnitude = Math.hypot(R, w * L) * Math.hypot(G, w * C);
    const a = R * G - w * L * (w * C);
    const halfB = 0.5 * w * (R * C + L * G);
    const larger = Math.sqrt(0.5 * (magnitude + Math.abs(a)));
    const smaller = larger === 0 ? 0 : halfB / larger;
    const alpha = a < 0 ? smaller : larger;
    const beta = a < 0 ? larger : smaller;
    attenuationNpPerM[index] = alpha;
    phaseRadPerM[index] = beta;
    if (larger > 0) {
      const divisor = alpha * alpha + beta * beta;
      re[index] = (R * alpha + w * L * beta) / divisor;
      im[index] = (w * L * alpha - R * beta) / divisor;
      // d(gamma^2)/dw = -2 w L C + j (R C + L G), and d gamma = d(gamma^2) / (2 gamma).
      groupDelaySPerM[index] = ((R * C + L * G) * alpha + 2 * w * L * C * beta) / (2 * divisor);
      if (slope) {
        const [dR, dL, dG, dC] = [slope.resistance[index], slope.inductance[index], slope.conductance[index], slope.capacitance[index]];
        const re = dR * G + R * dG - w * w * (dL * C + L * dC);
        const im = w * (dR * C + R * dC + dL * G + L * dG);
        groupDelaySPerM[index] += (im * alpha - re * beta) / (2 * divisor);
      }
    } else {
      const seriesVanishes = R === 0 && w * L === 0;
      const shuntVanishes = G === 0 && w * C === 0;
      // Both vanish for a line without loss at direct current: the limit from above is meant.
      const limit = seriesVanishes && shuntVanishes ? Math.sqrt(L / C) : seriesVanishes ? 0 : Infinity;
      infinite[index] = Number.isFinite(limit) ? 0 : 1;
      re[index] = Number.isFinite(limit) ? limit : NaN;
      groupDelaySPerM[index] = seriesVanishes && shuntVanishes ? Math.sqrt(L * C) : R * C + L * G > 0 ? Infinity : 0;
    }
  }
  return { omega, attenuationNpPerM, phaseRadPerM, groupDelaySPerM, characteristicImpedance: { re, im, infinite } };
}
