/** The place on the axis that the figures are read at; moved by pointer or keys, on every plot of a part at once. */
import type { KeyboardEvent } from 'react';

export interface Cursor {
  readonly index: number;
  readonly count: number;
  moveTo(index: number): void;
}

/** Arrow keys step, with Shift or Page keys by a twentieth, Home and End to the ends. */
export function cursorKey(event: KeyboardEvent, { index, count, moveTo }: Cursor): void {
  const leap = Math.max(1, Math.round(count / 20));
  const step = event.shiftKey ? leap : 1;
  const target = {
    ArrowRight: index + step,
    ArrowUp: index + step,
    ArrowLeft: index - step,
    ArrowDown: index - step,
    PageUp: index + leap,
    PageDown: index - leap,
    Home: 0,
    End: count - 1,
  }[event.key];
  if (target === undefined) return;
  event.preventDefault();
  moveTo(Math.min(count - 1, Math.max(0, target)));
}

/** The index whose value comes nearest; `values` in any order. */
export function nearestIndex(pixels: readonly number[], pixel: number): number {
  let best = 0;
  for (let index = 1; index < pixels.length; index++) {
    if (Math.abs(pixels[index] - pixel) < Math.abs(pixels[best] - pixel)) best = index;
  }
  return best;
}
