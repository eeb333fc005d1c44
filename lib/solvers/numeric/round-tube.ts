/**
 * Diffusion into the wall of a tube from its bore, with no field outside: E'' + E'/r = m^2 E, E'(c) = 0, from c inwards to b by Taylor steps.
 *
 * In units of b, with m^2 = j X and r = r0 (1 - h): E = e + j X sum g(n) h^n and F = -r E'/(j X) = (1 - h) sum n g(n) h^(n-1), where
 *   g(1) = F0,  g(n+2) = ((n + 1)^2 g(n+1) + r0^2 (q(n) - q(n-1))) / ((n + 2)(n + 1)),  q(0) = e, q(n) = j X g(n), q(-1) = 0.
 * Each g is a sum of like signs in powers of j X, so real and imaginary parts keep their digits apart, down to direct current.
 */
import { wholeSpace, type Diffused } from './round-conductor';

/** Beyond this many |m| t nothing comes back from the outer surface: exp(-sqrt(2) |m| t) is below rounding. */
const thickFrom = 27;
/** Of h and of |m| r0 h: within these the series ends after some forty terms, and cancels by less than a digit. */
const longestStep = 0.45;
const mostTurn = 3;
const mostTerms = 120;
/** Far below rounding, for the smaller of the two parts may be a millionth of the larger. */
const enough = 1e-30;
/** Enough for a bore of 1e-12 of the tube. */
const mostSteps = 60;

/**
 * V = impedance of the wall over rho/(2 pi b^2), per unit length, as a function of X = omega mu sigma b^2; `wall` is t/b = c/b - 1.
 * Source: Schelkunoff 1934, equation for a tube with internal return (from memory); the equation of diffusion itself. Range: X >= 0, wall > 0.
 * Accuracy: some units of rounding in each part. Throws nothing.
 */
export function tubeWall(X: number, wall: number): Diffused {
  const reach = Math.sqrt(X);
  if (reach * wall > thickFrom) return wholeSpace(X);
  let state: State = { e: [1, 0, 0, 0], f: [0, 0, 0, 0] };
  let depth = wall;
  for (let step = 0; step < mostSteps && depth > 0; step++) {
    const radius = 1 + depth;
    const next = Math.max(0, depth - radius * longestStep, depth - mostTurn / reach);
    state = inward(state, X, radius, (depth - next) / radius);
    depth = next;
  }
  return quotient(state);
}

/** Real and imaginary part, and their derivatives to X. */
type WithSlope = readonly [number, number, number, number];

interface State {
  readonly e: WithSlope;
  readonly f: WithSlope;
}

const zero: WithSlope = [0, 0, 0, 0];

/** From radius r0 to r0 (1 - h). */
function inward({ e, f }: State, X: number, radius: number, h: number): State {
  const square = radius * radius;
  let [g, q, before] = [f, e, zero];
  let [sum, rise] = [zero, zero];
  let power = 1;
  for (let n = 1; n <= mostTerms; n++) {
    rise = plus(rise, g, n * power);
    if ((Math.abs(g[0]) + Math.abs(g[1])) * n * power < enough * (Math.abs(rise[0]) + Math.abs(rise[1]))) break;
    power *= h;
    sum = plus(sum, g, power);
    const next = scaled(plus(scaled(g, n * n), plus(q, before, -1), square), 1 / (n * (n + 1)));
    before = q;
    q = timesJX(g, X);
    g = next;
  }
  return { e: plus(e, timesJX(sum, X), 1), f: scaled(rise, 1 - h) };
}

function plus(a: WithSlope, b: WithSlope, factor: number): WithSlope {
  return [a[0] + factor * b[0], a[1] + factor * b[1], a[2] + factor * b[2], a[3] + factor * b[3]];
}

function scaled(a: WithSlope, factor: number): WithSlope {
  return [a[0] * factor, a[1] * factor, a[2] * factor, a[3] * factor];
}

/** j X a, and its derivative j (a + X a'). */
function timesJX(a: WithSlope, X: number): WithSlope {
  return [-X * a[1], X * a[0], -a[1] - X * a[3], a[0] + X * a[2]];
}

function quotient({ e, f }: State): Diffused {
  const divisor = f[0] * f[0] + f[1] * f[1];
  const re = (e[0] * f[0] + e[1] * f[1]) / divisor;
  const im = (e[1] * f[0] - e[0] * f[1]) / divisor;
  // V' = (E' - V F')/F.
  const [nRe, nIm] = [e[2] - (re * f[2] - im * f[3]), e[3] - (re * f[3] + im * f[2])];
  return { re, im, reSlope: (nRe * f[0] + nIm * f[1]) / divisor, imSlope: (nIm * f[0] - nRe * f[1]) / divisor };
}
