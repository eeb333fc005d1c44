/**
 * Of a long sweep what a screen can show: in each column of pixels the first, the least, the greatest and
 * the last value, in their order, so that a resonance one point wide is still drawn. Gaps stay gaps.
 */
import type { Entry } from '../_answer/quantity-of-result';

/** Indices to draw; all of them where there are few. `columns` is how many pixels the axis has. */
export function reducedIndices(position: readonly number[], values: readonly Entry[], columns: number): number[] {
  if (values.length <= 4 * columns) return values.map((_, index) => index);
  const kept: number[] = [];
  let start = 0;
  while (start < values.length) {
    const column = Math.floor(position[start] * columns);
    let end = start + 1;
    while (end < values.length && Math.floor(position[end] * columns) === column) end++;
    kept.push(...extremes(values, start, end));
    start = end;
  }
  return kept;
}

function extremes(values: readonly Entry[], start: number, end: number): number[] {
  let least = -1;
  let most = -1;
  let gap = -1;
  for (let index = start; index < end; index++) {
    const value = values[index];
    if (value === null) {
      gap = index;
      continue;
    }
    if (least < 0 || value < values[least]!) least = index;
    if (most < 0 || value > values[most]!) most = index;
  }
  return [...new Set([start, least, most, gap, end - 1])].filter((index) => index >= 0).sort((a, b) => a - b);
}
