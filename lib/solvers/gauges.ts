/** Wire gauges: American (AWG) by number, metric by nominal area, and what a solid wire of that size measures. */

export interface GaugeSize {
  readonly diameterM: number;
  readonly areaM2: number;
}

/** 0000, which counts as -3. */
export const thickestAwg = -3;
export const thinnestAwg = 56;

export const awgSource = 'ASTM B258: diameters in geometric steps, 39 of them from 0000 AWG, 0.46 in, to 36 AWG, 0.005 in, a ratio of 92';
export const metricSource = 'IEC 60228: nominal cross-sectional areas, written from memory. The standard does not prescribe a diameter, but a maximum resistance for each class, which a nominal one does not exceed';

/** mm2; the usual nominal areas of IEC 60228 (2004), tables 1 and 2, from memory; without the sizes that it advises against. */
export const usualMetricSizes = [
  '0.5', '0.75', '1', '1.5', '2.5', '4', '6', '10', '16', '25', '35', '50', '70', '95', '120', '150', '185', '240', '300', '400', '500', '630', '800', '1000', '1200', '1600', '2000', '2500',
] as const;

/** mm2; beyond any wire that is drawn. */
const smallestArea = 1e-6;
const largestArea = 1e4;

/** `24`, and 0, 00, 000, 0000 as 0, -1, -2, -3; also 1/0 to 4/0. Undefined where the text names no gauge. */
export function readAwg(text: string): number | undefined {
  const aught = /^([1-4])\/0$/.exec(text);
  if (aught) return 1 - Number(aught[1]);
  if (/^0{1,4}$/.test(text)) return 1 - text.length;
  return /^[1-9]\d?$/.test(text) && Number(text) <= thinnestAwg ? Number(text) : undefined;
}

/** 0000 for -3, and so on. */
export function awgName(number: number): string {
  return number > 0 ? String(number) : '0'.repeat(1 - number);
}

/** mm2 of a plain decimal such as 0.5 or 1.50. Undefined where the text is none, or lies outside 1e-6 to 1e4 mm2. */
export function readMetricSize(text: string): number | undefined {
  if (!/^\d{1,5}(\.\d{1,9})?$/.test(text)) return undefined;
  const area = Number(text);
  return area >= smallestArea && area <= largestArea ? area : undefined;
}

/**
 * d = 0.127 mm 92^((36 - n)/39). Symbols: n gauge number, whole; d m. Source: ASTM B258 (from memory). Range: n from -3 (0000) to 56.
 * Accuracy: exact to the definition; the standard's table is this, rounded to 4 digits. Throws nothing.
 * The trap: 0, 00, 000 and 0000 are 0, -1, -2 and -3.
 */
export function awgSize(number: number): GaugeSize {
  const diameterM = 0.127e-3 * 92 ** ((36 - number) / 39);
  return { diameterM, areaM2: (Math.PI / 4) * diameterM * diameterM };
}

/**
 * d = sqrt(4 A / pi). Symbols: A m2, d m. Source: geometry of a solid round wire. Range: A > 0. Accuracy: exact. Throws nothing.
 * The trap: a stranded conductor of the same area is thicker.
 */
export function metricSize(areaMm2: number): GaugeSize {
  const areaM2 = areaMm2 / 1e6;
  return { diameterM: Math.sqrt((4 * areaM2) / Math.PI), areaM2 };
}

/**
 * R' = rho / A, ohm/m. Symbols: rho ohm m, A m2. Source: definition of resistivity. Range: direct current, a straight solid wire.
 * Accuracy: exact for that area; made wires differ by their tolerance. Throws nothing.
 * The trap: the area is that of 20 degC; its thermal expansion (about 3e-5 per K of copper) is left out, as it is in the coefficients of the standards.
 */
export function wireResistanceOhmPerM(resistivityOhmM: number, { areaM2 }: GaugeSize): number {
  return resistivityOhmM / areaM2;
}
