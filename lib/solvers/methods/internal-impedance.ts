/**
 * Internal impedance of conductors: what the field inside them adds to R and L. Each conductor is its resistance at direct current times
 * a function of one number, X = omega mu a^2/rho.
 */
import type { Method } from '../calculation';
import { vacuumPermeabilityHPerM } from '../constants';
import type { ConductorProperties } from '../nouns/conductor';
import { sheet } from '../numeric/plane-conductor';
import { solidWire, wholeSpace, type Diffused } from '../numeric/round-conductor';
import { tubeWall } from '../numeric/round-tube';

export const roundConductors: Method = {
  id: 'round-conductors',
  title: 'Skin effect in round wires and tubes',
  source: 'Schelkunoff, The electromagnetic theory of coaxial transmission lines and cylindrical shields, Bell System Technical Journal 13 (1934) 532-579, section on internal impedances (from memory)',
  formulas: [
    String.raw`Z_{\text{wire}} = \frac{m\rho}{2\pi a}\,\frac{I_0(ma)}{I_1(ma)}, \qquad m^2 = \frac{j\omega\mu}{\rho}`,
    String.raw`Z_{\text{tube}} = \frac{m\rho}{2\pi b}\,\frac{I_0(mb) K_1(mc) + K_0(mb) I_1(mc)}{I_1(mc) K_1(mb) - I_1(mb) K_1(mc)}`,
    String.raw`\omega \to 0:\ Z_{\text{wire}} \to \frac{\rho}{\pi a^2} + j\omega\frac{\mu}{8\pi}`,
  ],
  symbols: [
    { symbol: 'a', meaning: 'radius of the wire', unit: 'm' },
    { symbol: 'b, c', meaning: 'inner and outer radius of the tube', unit: 'm' },
    { symbol: String.raw`\rho`, meaning: 'resistivity at the temperature', unit: 'ohm m' },
    { symbol: String.raw`\mu`, meaning: 'permeability of the conductor', unit: 'H/m' },
    { symbol: 'I_n, K_n', meaning: 'modified Bessel functions' },
  ],
  range: 'round conductors whose current is the same all around; displacement current in the metal neglected',
  accuracy: 'exact; 1e-12 relative in float64',
};

export const flatConductors: Method = {
  id: 'flat-conductors',
  title: 'Skin effect in a flat sheet',
  source: 'Ramo, Whinnery and Van Duzer, Fields and Waves in Communication Electronics, 3rd ed., section 3.17 (from memory)',
  formulas: [String.raw`Z = \frac{m\rho}{w}\coth(mt), \qquad m^2 = \frac{j\omega\mu}{\rho}`],
  symbols: [
    { symbol: 'w', meaning: 'width', unit: 'm' },
    { symbol: 't', meaning: 'thickness', unit: 'm' },
    { symbol: String.raw`\rho`, meaning: 'resistivity at the temperature', unit: 'ohm m' },
    { symbol: String.raw`\mu`, meaning: 'permeability of the conductor', unit: 'H/m' },
  ],
  range: 'the same current all over the width, the field on one side only',
  accuracy: 'exact; 1e-12 relative in float64',
};

/** Series R and L of one conductor over frequency, ohm/m and H/m, with their derivatives to omega. */
export interface SeriesPart {
  readonly resistance: Float64Array;
  readonly inductance: Float64Array;
  readonly resistanceSlope: Float64Array;
  readonly inductanceSlope: Float64Array;
}

/** Source: Schelkunoff 1934. Symbols: diameter m, omega rad/s. Range: any. Accuracy: a few units of rounding. Throws nothing. */
export function wirePart(diameterM: number, conductor: ConductorProperties, omega: Float64Array): SeriesPart {
  const radius = 0.5 * diameterM;
  return part(omega, conductor, radius, conductor.resistivityOhmM / (Math.PI * radius * radius), solidWire);
}

/**
 * The wall of a tube, seen from its bore; without a thickness, a wall without end. Source: Schelkunoff 1934. Range: any. Accuracy: a few units of
 * rounding. Throws nothing. The trap: a wall without end has an inductance that grows without bound towards 0 Hz; there it is left out.
 */
export function tubePart(boreDiameterM: number, thicknessM: number | undefined, conductor: ConductorProperties, omega: Float64Array): SeriesPart {
  const bore = 0.5 * boreDiameterM;
  const law = (X: number): Diffused => {
    if (thicknessM !== undefined) return tubeWall(X, thicknessM / bore);
    return X === 0 ? { re: 0, im: 0, reSlope: 0, imSlope: 0 } : wholeSpace(X);
  };
  return part(omega, conductor, bore, conductor.resistivityOhmM / (2 * Math.PI * bore * bore), law);
}

/** A flat sheet, or, without a thickness, a half space. Source: Ramo et al. 3.17. Range: any. Accuracy: a few units of rounding. Throws nothing. */
export function sheetPart(widthM: number, thicknessM: number | undefined, conductor: ConductorProperties, omega: Float64Array): SeriesPart {
  // Of a half space any depth gives the same; a metre is far beyond every skin depth but that of direct current.
  const depth = thicknessM ?? 1;
  const law = (Y: number): Diffused => {
    if (thicknessM !== undefined) return sheet(Y);
    const root = Math.sqrt(0.5 * Y);
    return { re: root, im: root, reSlope: Y === 0 ? 0 : root / (2 * Y), imSlope: Y === 0 ? 0 : root / (2 * Y) };
  };
  return part(omega, conductor, depth, conductor.resistivityOhmM / (depth * widthM), law);
}

/** `scale` times the law of X = omega mu size^2/rho. */
function part(omega: Float64Array, { resistivityOhmM: rho, relativePermeability }: ConductorProperties, size: number, scale: number, law: (X: number) => Diffused): SeriesPart {
  const columns = { resistance: new Float64Array(omega.length), inductance: new Float64Array(omega.length), resistanceSlope: new Float64Array(omega.length), inductanceSlope: new Float64Array(omega.length) };
  if (rho === 0) return columns;
  const perOmega = (vacuumPermeabilityHPerM * relativePermeability * size * size) / rho;
  for (let index = 0; index < omega.length; index++) {
    const X = omega[index] * perOmega;
    const { re, im, reSlope, imSlope } = law(X);
    // Im Z / omega, whose limit at direct current is the slope.
    const perX = X === 0 ? imSlope : im / X;
    columns.resistance[index] = scale * re;
    columns.inductance[index] = scale * perOmega * perX;
    columns.resistanceSlope[index] = scale * perOmega * reSlope;
    columns.inductanceSlope[index] = X === 0 ? 0 : (scale * perOmega * perOmega * (imSlope - perX)) / X;
  }
  return columns;
}

export function skinDepthM({ resistivityOhmM, relativePermeability }: ConductorProperties, omega: Float64Array): Float64Array {
  return omega.map((each) => (resistivityOhmM === 0 ? 0 : Math.sqrt((2 * resistivityOhmM) / (each * vacuumPermeabilityHPerM * relativePermeability))));
}
