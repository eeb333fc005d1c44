/** The lowest higher mode between two coaxial cylinders, TE11, found from its own equation. */
import { bracketedRoot } from './roots';

/** j'(1,1), the first zero of the derivative of J1: TE11 of a tube without inner conductor (Abramowitz and Stegun, table 9.5). */
const withoutInner = 1.8411837813406593;
const longestStep = 0.4;
const mostSteps = 80;
const terms = 90;

/**
 * k b of TE11, with a = b/ratio: the lowest root of J1'(ka) Y1'(kb) = J1'(kb) Y1'(ka).
 *
 *   R'' + R'/r + (k^2 - 1/r^2) R = 0,  R'(a) = R'(b) = 0
 *
 * Source: Marcuvitz, Waveguide Handbook, section 2.4 (from memory). Symbols: `gap` = (b - a)/b. Range: 0 < gap < 1. Accuracy: 1e-14. Throws nothing.
 * R is carried from b to a by Taylor steps, so that neither a thin gap nor a thin wire cancels; k b lies between 1 (no gap) and 1.841 (no wire).
 */
export function coaxialTe11(gap: number): number {
  const slopeAt = (kb: number) => innerSlope(kb, gap);
  const [low, high] = [1 - 1e-12, withoutInner * (1 + 1e-12)];
  return bracketedRoot(slopeAt, { x: low, value: slopeAt(low) }, { x: high, value: slopeAt(high) })!.x;
}

/** -r R'(r) at r = a, in units of b, from R(b) = 1, R'(b) = 0. */
function innerSlope(kb: number, gap: number): number {
  let [value, slope] = [1, 0];
  let depth = gap;
  for (let step = 0; step < mostSteps && depth > 0; step++) {
    const radius = 1 - gap + depth;
    const next = Math.max(0, depth - radius * longestStep);
    [value, slope] = inward(value, slope, kb * radius * (kb * radius), (depth - next) / radius);
    depth = next;
  }
  return slope;
}

/** R(r0 (1 - h)) and its -r R': (1 - h)^2 R'' - (1 - h) R' + (s (1 - h)^2 - 1) R = 0 by the powers of h, s = (k r0)^2. */
function inward(value: number, slope: number, s: number, h: number): [number, number] {
  let [twoBack, oneBack, now, next] = [0, 0, value, slope];
  let sum = value;
  let rise = 0;
  let power = 1;
  for (let n = 0; n < terms; n++) {
    rise += (n + 1) * next * power;
    power *= h;
    sum += next * power;
    const after = ((n + 1) * (2 * n + 1) * next - (n * n - 1) * now - s * (now - 2 * oneBack + twoBack)) / ((n + 2) * (n + 1));
    [twoBack, oneBack, now, next] = [oneBack, now, next, after];
  }
  return [sum, rise * (1 - h)];
}
