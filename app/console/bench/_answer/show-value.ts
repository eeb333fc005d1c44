/** Numbers of an answer as people read them. */
import { engineering, formatPolar, significant } from '@/app/_format/numbers';
import { shownUnit } from '@/lib/quantities/write-quantity';
import { prefixes } from '@/lib/quantities/units';
import { valueAt, wordAt, type Quantity } from './quantity-of-result';

export interface ShownValue {
  readonly value: string;
  readonly unit: string;
}

const missing = '—';

/** A ratio of waves is read by size and angle, an impedance by its parts. */
export function readsPolar({ kind, unit }: Quantity): boolean {
  return kind === 'complex' && unit === '';
}

export function showAt(quantity: Quantity, index: number, digits = 4): ShownValue {
  if (quantity.kind === 'word') return { value: wordAt(quantity, index).replaceAll('_', ' ') || missing, unit: '' };
  const { re, im } = valueAt(quantity, index);
  if (re === null || (quantity.kind === 'complex' && im === null)) return { value: missing, unit: '' };
  if (quantity.kind === 'real') return showReal(re, quantity.unit, digits);
  if (readsPolar(quantity)) {
    const { magnitude, angle } = formatPolar({ re, im: im! }, digits);
    return { value: magnitude, unit: angle };
  }
  return showParts(re, im!, quantity.unit, digits);
}

/** A part this much smaller than the other is rounding, or drowned by it. */
const negligible = 1e-6;

/** Both parts under one prefix, each with its own digits, down to where the other drowns it. */
function showParts(re: number, im: number, unit: string, digits: number): ShownValue {
  const largest = Math.max(Math.abs(re), Math.abs(im));
  const shown = largest === 0 ? unit : shownUnit(largest, unit);
  const divisor = shown === unit ? 1 : 10 ** prefixes[shown.slice(0, shown.length - unit.length)];
  const part = (value: number) => (Math.abs(value) <= negligible * largest ? '0' : significant(Math.abs(value) / divisor, digits));
  const isNegative = (value: number) => value < 0 && Math.abs(value) > negligible * largest;
  const sign = isNegative(im) ? '\u2212' : '+';
  return { value: `${isNegative(re) ? '\u2212' : ''}${part(re)}\u2009${sign}\u2009${part(im)}j`, unit: unitWords(shown) };
}

/** Of a place on an axis: no zeros that say nothing. */
export function showPlace(quantity: Quantity, index: number): ShownValue {
  const { value, unit } = showAt(quantity, index, 7);
  return { value: withoutTrailingZeros(value), unit };
}

export function withoutTrailingZeros(text: string): string {
  return text.replace(/(\.\d*?)0+(?=$|e)/, '$1').replace(/\.(?=$|e)/, '');
}

export function showReal(value: number | null, unit: string, digits = 4): ShownValue {
  if (value === null) return { value: missing, unit: '' };
  if (unit === 'dB' && Math.abs(value) < 1e-9) return { value: '0', unit };
  // Counts are exact; nobody reads 3.000 sections.
  if (unit === '' && Number.isInteger(value) && Math.abs(value) < 1e6) return { value: String(value).replace('-', '\u2212'), unit };
  // 198 Mm/s would be right, and read by nobody.
  if (unit === 'm/s') return { value: significant(value, digits), unit };
  const shown = engineering(value, unit, digits);
  return { value: shown.value, unit: unitWords(shown.unit) };
}

export function unitWords(unit: string): string {
  return unit.replaceAll('*', '·').replace(/^deg$/, '°').replace(/^degC$/, '°C');
}

/** All digits, for those who hover or copy. */
export function exactAt(quantity: Quantity, index: number): string {
  if (quantity.kind === 'word') return wordAt(quantity, index);
  const { re, im } = valueAt(quantity, index);
  if (re === null) return 'no finite value';
  const unit = quantity.unit ? ` ${quantity.unit}` : '';
  if (quantity.kind === 'real' || im === null) return `${re}${unit}`;
  return `${re}${im < 0 || Object.is(im, -0) ? '' : '+'}${im}j${unit}`;
}
