/** Columns of the table: a complex quantity takes two, so that digits stand under digits. */
import type { Quantity } from './quantity-of-result';
import { showReal, unitWords } from './show-value';

export interface CellColumn {
  readonly id: string;
  readonly title: string;
  readonly unit: string;
  readonly numeric: boolean;
  cell(index: number): string;
}

export function cellColumnsOf(quantities: readonly Quantity[]): CellColumn[] {
  return quantities.flatMap((quantity) => {
    const { pointer, title, unit, kind, re, im, words } = quantity;
    if (kind === 'word') return [{ id: pointer, title, unit: '', numeric: false, cell: (index: number) => (words[index] ?? '').replaceAll('_', ' ') || '—' }];
    const real = { id: `${pointer}/re`, title: kind === 'complex' ? `Re ${title}` : title, unit: unitWords(unit), numeric: true, cell: (index: number) => cellText(re[index] ?? null, unit) };
    if (kind === 'real') return [real];
    return [real, { ...real, id: `${pointer}/im`, title: `Im ${title}`, cell: (index: number) => cellText(im[index] ?? null, unit) }];
  });
}

/** Number and prefixed unit: the prefix may change from row to row, so the unit goes with each. */
function cellText(value: number | null, unit: string): string {
  const shown = showReal(value, unit, 5);
  return shown.unit ? `${shown.value} ${shown.unit}` : shown.value;
}
