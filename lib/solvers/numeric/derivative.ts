/** The derivative of a function that can only be evaluated. */

const rounds = 8;
const shrink = 1.4;
/** A difference that has grown by this much since the best one is rounding alone. */
const spoiled = 2;

/**
 * Ridders' extrapolation of central differences to a vanishing step: D(h) = (f(x + h) - f(x - h)) / 2h, h shrinking by 1.4 each round,
 * and Neville's scheme in h^2.
 * Source: Ridders, Accurate computation of F'(x) and F'(x) F''(x), Advances in Engineering Software 4 (1982) 75-76 (from memory).
 * Range: f smooth within `step` of x and defined there; returns null where it is not. Accuracy: about 1e-11 of f/x for a smooth function.
 * Throws nothing. The trap: a seam of f inside the step; the scheme then keeps the estimate from the smaller steps.
 */
export function derivative(f: (x: number) => number | null, x: number, step: number): number | null {
  let h = step;
  let before: number[] = [];
  let best = { value: NaN, error: Infinity };
  for (let round = 0; round < rounds; round++, h /= shrink) {
    const difference = centralDifference(f, x, h);
    if (difference === null) return null;
    const row = [difference];
    for (let order = 1, factor = shrink * shrink; order <= round; order++, factor *= shrink * shrink) {
      row.push((row[order - 1] * factor - before[order - 1]) / (factor - 1));
      const error = Math.max(Math.abs(row[order] - row[order - 1]), Math.abs(row[order] - before[order - 1]));
      if (error <= best.error) best = { value: row[order], error };
    }
    if (round > 0 && Math.abs(row[round] - before[round - 1]) >= spoiled * best.error) break;
    before = row;
  }
  return best.value;
}

/** Over the difference that the two points really have. */
function centralDifference(f: (x: number) => number | null, x: number, h: number): number | null {
  const [above, below] = [x + h, x - h];
  const [high, low] = [f(above), f(below)];
  return high === null || low === null ? null : (high - low) / (above - below);
}
