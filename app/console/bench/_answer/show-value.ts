/** Numbers of an answer as people read them. */
import { engineering, engineeringComplex, formatPolar, significant } from '@/app/_format/numbers';
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
  const { value, unit } = engineeringComplex({ re, im: im! }, quantity.unit, digits);
  return { value, unit: unitWords(unit) };
}

export function showReal(value: number | null, unit: string, digits = 4): ShownValue {
  if (value === null) return { value: missing, unit: '' };
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
