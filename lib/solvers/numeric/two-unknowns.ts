/** Newton's method for one complex equation in two real unknowns. */
import type Complex from 'complex.js';

export interface AtPoint {
  readonly value: Complex;
  /** Derivatives of the value to the first and to the second unknown. */
  readonly first: Complex;
  readonly second: Complex;
}

const mostSteps = 60;
/** A step so short that does not better the value is rounding. */
const settled = 1e-9;

/**
 * Formula: [Re; Im] of first du + second dv = -value, solved by Cramer's rule. Range: unknowns of the order of 1; a step is held to
 * `longestStep`. Answers the point with the smallest |value| that it met, which the caller must judge. Throws nothing.
 * The trap: where the two derivatives point the same way there is no step; the search then ends where it stands.
 */
export function solveTwoUnknowns(at: (u: number, v: number) => AtPoint, start: readonly [number, number], longestStep: number): readonly [number, number] {
  let [u, v] = start;
  let best: readonly [number, number] = start;
  let least = Infinity;
  for (let step = 0; step < mostSteps; step++) {
    const { value, first, second } = at(u, v);
    const size = Math.hypot(value.re, value.im);
    if (!Number.isFinite(size)) return best;
    const isNoBetter = size >= least;
    if (!isNoBetter) {
      least = size;
      best = [u, v];
    }
    const determinant = first.re * second.im - first.im * second.re;
    const du = (value.im * second.re - value.re * second.im) / determinant;
    const dv = (value.re * first.im - value.im * first.re) / determinant;
    const length = Math.hypot(du, dv);
    if (size === 0 || !Number.isFinite(length) || (isNoBetter && length < settled)) return best;
    const held = length > longestStep ? longestStep / length : 1;
    u += held * du;
    v += held * dv;
  }
  return best;
}
