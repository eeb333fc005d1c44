/**
 * Columns of the table. A complex quantity takes two, and where the numbers of a column are of like size they
 * share one prefix and one number of decimals, so that digits stand under digits.
 */
import { shownUnit } from '@/lib/quantities/write-quantity';
import { prefixes } from '@/lib/quantities/units';
import type { Entry, Quantity } from './quantity-of-result';
import { showReal, unitWords } from './show-value';

export interface CellColumn {
  readonly id: string;
  readonly title: string;
  /** Empty where each cell has its own. */
  readonly unit: string;
  readonly numeric: boolean;
  cell(index: number): string;
}

export function cellColumnsOf(quantities: readonly Quantity[]): CellColumn[] {
  return quantities.flatMap((quantity) => {
    const { pointer, title, unit, kind, re, im, words } = quantity;
    if (kind === 'word') return [{ id: pointer, title, unit: '', numeric: false, cell: (index: number) => (words[index] ?? '').replaceAll('_', ' ') || '—' }];
    if (kind === 'real') return [numbers(pointer, title, unit, re)];
    const noise = rounding * Math.max(largestOf(re), largestOf(im));
    return [numbers(`${pointer}/re`, `Re ${title}`, unit, settled(re, noise)), numbers(`${pointer}/im`, `Im ${title}`, unit, settled(im, noise))];
  });
}

/** Beside the other part this is what a sum leaves behind; the download has it. */
const rounding = 1e-13;

function settled(values: readonly Entry[], noise: number): readonly Entry[] {
  return values.map((value) => (value !== null && Math.abs(value) <= noise ? 0 : value));
}

function largestOf(values: readonly Entry[]): number {
  return values.reduce<number>((most, value) => Math.max(most, Math.abs(value ?? 0)), 0);
}

/** Figures of the largest number in a column; the least then has three at least. */
const digits = 6;
const likeSize = 1000;

function numbers(id: string, title: string, unit: string, values: readonly Entry[]): CellColumn {
  const largest = largestOf(values);
  const least = values.reduce<number>((smallest, value) => (value ? Math.min(smallest, Math.abs(value)) : smallest), Infinity);
  const counts = unit === '' && values.every((value) => value === null || Number.isInteger(value));
  if (largest === 0 || counts || largest / least > likeSize) return { id, title, unit: largest === 0 ? unitWords(unit) : '', numeric: true, cell: (index) => loneCell(values[index] ?? null, largest === 0 ? '' : unit) };
  const shown = shownUnit(largest, unit);
  const divisor = shown === unit ? 1 : 10 ** prefixes[shown.slice(0, shown.length - unit.length)];
  const whole = Math.floor(Math.log10(largest / divisor)) + 1;
  // Far from one, decimals alone would be all zeros or none.
  if (whole > digits || whole < -2) return { id, title, unit: unitWords(unit), numeric: true, cell: (index) => loneCell(values[index] ?? null, '') };
  const decimals = Math.max(0, digits - Math.max(1, whole));
  return { id, title, unit: unitWords(shown), numeric: true, cell: (index) => fixedCell(values[index] ?? null, divisor, decimals) };
}

function fixedCell(value: Entry, divisor: number, decimals: number): string {
  return value === null ? '—' : (value / divisor).toFixed(decimals).replace('-', '\u2212');
}

/** Number and prefixed unit: the prefix changes from row to row, so the unit goes with each. */
function loneCell(value: Entry, unit: string): string {
  const shown = showReal(value, unit, 5);
  return shown.unit ? `${shown.value} ${shown.unit}` : shown.value;
}
