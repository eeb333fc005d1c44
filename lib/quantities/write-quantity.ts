/**
 * From a number on the wire back to what stands in a field: 2.5e-7 H/m is "250" in a field that shows
 * nH/m. Reading the text back gives the same number to the last bit.
 */
import { shiftedDecimal } from './decimal';
import type { TypedComplex } from './read-complex';
import { prefixes, symbolUnit } from './units';

const engineeringPrefixes = ['G', 'M', 'k', '', 'm', 'µ', 'n', 'p', 'f', 'a'] as const;

/**
 * The unit to show for numbers of this size: the one with the SI prefix that leaves one to three digits
 * before the point. Of a quotient the first factor takes the prefix; a velocity takes none.
 */
export function shownUnit(size: number, unit: string): string {
  const first = /^[^\s/·*]+/.exec(unit)?.[0] ?? '';
  if (size === 0 || !Number.isFinite(size) || unit === 'm/s' || /[·*\s]/.test(unit) || !symbolUnit(first)?.prefixable) return unit;
  const exponent = Math.floor(Math.log10(Math.abs(size)) + 1e-12);
  const prefix = engineeringPrefixes.find((candidate) => prefixes[candidate] <= exponent) ?? 'a';
  // From a tenth up the unit itself reads best: 0.12 ohm/m, 0.5 m.
  if (prefix === 'm' && exponent === -1) return unit;
  // Lengths between a metre and ten kilometres read best in metres; nobody measures cable in 0.12 km.
  if (first === 'm' && prefix === 'k' && exponent < 4) return unit;
  return prefix + unit;
}

/** The text for `value` in a field of `unit` that shows `shown`. */
export function writeQuantity(value: number, unit: string, shown: string): string {
  if (Object.is(value, -0)) return '0';
  const text = shiftedDecimal(value, -placesOf(unit, shown));
  // A long row of zeros hides the number; then the power of ten is clearer.
  return text.replace(/\D/g, '').length > 20 ? `${value} ${unit}`.trim() : text;
}

export function writeComplex(value: TypedComplex, unit: string, shown: string): string {
  if (typeof value === 'number') return writeQuantity(value, unit, shown);
  if ('re' in value) {
    const places = -placesOf(unit, shown);
    const imaginary = shiftedDecimal(value.im, places);
    return `${shiftedDecimal(value.re, places)}${imaginary.startsWith('-') ? '' : '+'}${imaginary}j`;
  }
  return `${writeQuantity(value.magnitude, unit, shown)}∠${shiftedDecimal(value.angle_deg, 0)}°`;
}

export function sizeOfComplex(value: TypedComplex): number {
  if (typeof value === 'number') return value;
  return 're' in value ? Math.max(Math.abs(value.re), Math.abs(value.im)) : value.magnitude;
}

function placesOf(unit: string, shown: string): number {
  return shown === unit ? 0 : prefixes[shown.slice(0, shown.length - unit.length)];
}
