/** The few quantities that answer the question at a glance, in the order that the schema gives them. */
import type { Quantity } from './quantity-of-result';
import type { ResultPart } from './result-view';

/** Without hints of a schema as many as one line holds. */
const unhinted = 6;

export function figuresOf({ singles, columns }: ResultPart): Quantity[] {
  const all = [...singles, ...columns];
  const hinted = all.filter(({ figure }) => figure !== undefined).toSorted((a, b) => a.figure! - b.figure!);
  return hinted.length > 0 ? hinted : all.slice(0, unhinted);
}
