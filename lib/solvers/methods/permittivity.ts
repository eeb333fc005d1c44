/**
 * Relative permittivity eps' - j eps'' of a dielectric over frequency.
 *
 *   constant:        eps' and tan d the same at every frequency; not causal where tan d > 0
 *   wideband Debye:  eps = einf + k ln((w2 + j w)/(w1 + j w)),  w1 = 1e4 rad/s, w2 = 1e12 rad/s
 */
import type { Method, MethodUse, Warning } from '../calculation';

export const widebandDebye: Method = {
  id: 'wideband-debye',
  title: 'Wideband Debye model of a dielectric',
  source: 'Djordjevic, Biljic, Likar-Smiljanic and Sarkar, Wideband frequency-domain characterization of FR-4 and time-domain causality, IEEE Trans. EMC-43 (2001) 662-667 (limits of the band from memory)',
  formulas: [
    String.raw`\varepsilon_r(\omega) = \varepsilon_\infty + \frac{\Delta\varepsilon}{m_2 - m_1}\,\log_{10}\frac{\omega_2 + j\omega}{\omega_1 + j\omega}, \qquad \omega_k = 10^{m_k}\ \mathrm{rad/s}`,
    String.raw`\Delta\varepsilon,\ \varepsilon_\infty \text{ from } \varepsilon_r(\omega_0) = \varepsilon'_0\,(1 - j\tan\delta_0)`,
  ],
  symbols: [
    { symbol: String.raw`\varepsilon_\infty`, meaning: 'permittivity far above the band' },
    { symbol: String.raw`\Delta\varepsilon`, meaning: 'what it falls by over the band' },
    { symbol: 'm_1, m_2', meaning: 'decades of the ends of the band: 4 and 12' },
    { symbol: String.raw`\omega_0`, meaning: 'where permittivity and loss tangent are given', unit: 'rad/s' },
  ],
  range: 'loss nearly constant between 1.6 kHz and 160 GHz',
  accuracy: 'passes through the given values; causal by construction',
};

/** One entry a frequency. */
export interface Permittivity {
  /** eps', relative. */
  readonly real: Float64Array;
  /** w eps'' / w = eps'': the loss part, positive. */
  readonly loss: Float64Array;
  /** Derivatives to omega; left out where both are constant. */
  readonly slope?: { readonly real: Float64Array; readonly loss: Float64Array };
  readonly methods: readonly MethodUse[];
  /** Pointers relative to the line. */
  readonly warnings: readonly Warning[];
}

/** Source: definition. Range: any. Accuracy: exact. Throws nothing; warns that a constant loss tangent is not causal. */
export function constantPermittivity(relativePermittivity: number, lossTangent: number, omega: Float64Array): Permittivity {
  const column = (value: number) => new Float64Array(omega.length).fill(value);
  const warnings: Warning[] =
    lossTangent > 0 && omega.length > 1
      ? [{ code: 'not_causal', pointer: '/dielectric', detail: 'a loss tangent that is the same at every frequency belongs to no causal dielectric; the wideband Debye model is one' }]
      : [];
  return { real: column(relativePermittivity), loss: column(relativePermittivity * lossTangent), methods: [], warnings };
}

/** Ends of the band in rad/s: m1 = 4 and m2 = 12. */
const lowerEnd = 1e4;
const upperEnd = 1e12;

/**
 * Source: Djordjevic et al. 2001. Symbols: omega rad/s. Range: any frequency; the loss is nearly constant between the ends of the band.
 * Accuracy: exact to the model. Throws nothing. The trap: a branch of the logarithm; both arguments lie
 * in the first quadrant, so no branch is near.
 */
export function widebandDebyePermittivity(relativePermittivity: number, lossTangent: number, referenceOmega: number, omega: Float64Array): Permittivity {
  const atReference = logarithm(referenceOmega);
  // Loss part of k ln(...) is -k im; it must equal eps' tan d at the reference.
  const k = (relativePermittivity * lossTangent) / -atReference.im;
  const infinite = relativePermittivity - k * atReference.re;
  const logs = Array.from(omega, logarithm);
  return {
    real: Float64Array.from(logs, ({ re }) => infinite + k * re),
    loss: Float64Array.from(logs, ({ im }) => -k * im + 0),
    slope: {
      real: omega.map((w) => k * (w / (upperEnd * upperEnd + w * w) - w / (lowerEnd * lowerEnd + w * w))),
      loss: omega.map((w) => -k * (upperEnd / (upperEnd * upperEnd + w * w) - lowerEnd / (lowerEnd * lowerEnd + w * w))),
    },
    methods: [{ method: widebandDebye, inRange: omega.every((w) => w === 0 || (w >= lowerEnd && w <= upperEnd)) }],
    warnings: infinite < 1 ? [{ code: 'permittivity_below_one', pointer: '/dielectric', detail: `with this loss the model falls to a relative permittivity of ${infinite.toPrecision(4)} far above its band, which no dielectric has` }] : [],
  };
}

/** ln((w2 + j w)/(w1 + j w)). */
function logarithm(w: number): { re: number; im: number } {
  return { re: Math.log(Math.hypot(upperEnd, w) / Math.hypot(lowerEnd, w)), im: Math.atan2(w, upperEnd) - Math.atan2(w, lowerEnd) };
}
