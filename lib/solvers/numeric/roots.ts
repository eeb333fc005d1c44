/** The root of a function between two points where its signs differ. */

export interface Root {
  readonly x: number;
  readonly value: number;
  /** Evaluations that it took. */
  readonly iterations: number;
}

export interface Sample {
  readonly x: number;
  readonly value: number;
}

/** Bisection alone needs 53 to 64 of them; the mixture never more than about twice that. */
const mostIterations = 150;

/**
 * Chandrupatla's mixture of bisection and inverse quadratic interpolation.
 * Symbols: a, b ends of the bracket, c the point that left it; xi and phi say whether the three lie so that interpolation can be trusted.
 * Source: Chandrupatla, A new hybrid quadratic/bisection algorithm for finding the zero of a nonlinear function without using derivatives,
 * Advances in Engineering Software 28 (1997) 145-149 (from memory). Range: finite ends whose values differ in sign. Accuracy: neighbouring numbers of
 * x, about 2 units of rounding. Throws nothing; where the function jumps over 0 it ends at the jump, so look at `value`.
 * The trap: `f` may have no value (null) inside the bracket; then there is no answer and null is returned.
 */
export function bracketedRoot(f: (x: number) => number | null, first: Sample, second: Sample): Root | null {
  let [a, fa, b, fb] = [first.x, first.value, second.x, second.value];
  let t = 0.5;
  for (let iterations = 1; iterations <= mostIterations; iterations++) {
    const x = a + t * (b - a);
    const fx = f(x);
    if (fx === null) return null;
    let [c, fc] = [a, fa];
    if (Math.sign(fx) !== Math.sign(fa)) [c, fc, b, fb] = [b, fb, a, fa];
    [a, fa] = [x, fx];
    const best = Math.abs(fb) < Math.abs(fa) ? { x: b, value: fb } : { x: a, value: fa };
    const least = (2 * Number.EPSILON * Math.abs(best.x) + Number.MIN_VALUE) / Math.abs(b - a);
    if (best.value === 0 || least > 0.5) return { ...best, iterations };
    t = Math.min(1 - least, Math.max(least, step(a, fa, b, fb, c, fc)));
  }
  return Math.abs(fb) < Math.abs(fa) ? { x: b, value: fb, iterations: mostIterations } : { x: a, value: fa, iterations: mostIterations };
}

/** Where to look next, as a fraction of the way from a to b. */
function step(a: number, fa: number, b: number, fb: number, c: number, fc: number): number {
  const xi = (a - b) / (c - b);
  const phi = (fa - fb) / (fc - fb);
  const isTrusted = phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi;
  if (!isTrusted) return 0.5;
  const t = ((fa / (fb - fa)) * fc) / (fb - fc) + ((((c - a) / (b - a)) * fa) / (fc - fa)) * (fb / (fc - fb));
  return Number.isFinite(t) ? t : 0.5;
}
