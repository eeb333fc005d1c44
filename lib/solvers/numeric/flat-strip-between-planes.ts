/**
 * Capacitance of a strip without thickness between two parallel planes, anywhere between them: exact.
 *
 * The cross-section is the image of the ring rho < |W| < 1. The strip is the inner circle; the planes are the outer one, on which the two
 * infinities stand at the angles +-alpha. Im z is b on the arc between them, 0 on the rest and g on the inner circle, and no flux turns round
 * the ring, so g is the mean of the outer values: alpha = pi g/b exactly. What is left is one equation for rho = exp(-pi s), that of the width:
 *
 *   w/(2b) = max over theta of (4/pi) sum_n sin(n alpha) sin(n theta) rho^n / (n (1 - rho^2n))                                       s >= 1
 *          = max over theta of (1/pi) ln[theta4((theta + alpha)/2, rho) / theta4((theta - alpha)/2, rho)]     by Jacobi's transformation, s < 1
 *   C/eps  = 2 pi / ln(1/rho) = 2/s
 *
 * For a strip in the middle this is Cohn's 4 K(k')/K(k), k = sech(pi w/(2b)), which is computed by itself.
 */
import { logSech, logTanh, quarterPeriodRatio } from './elliptic';
import { bracketedRoot, type Sample } from './roots';

/** Further than this many of the wider gap from the edges the field is uniform: exp(-pi 6), squared, is below rounding. */
const wallAfterGaps = 6;
/** Of a search by factors of two: from a strip of 1e-13 of its gap to one of 1e13. */
const mostDoublings = 60;

/**
 * C/eps of a strip of this width. Source: derived here; theta functions as in Abramowitz and Stegun 16.27 (from memory). Symbols: above; lengths in
 * any one unit. Range: any width and gaps above 0. Accuracy: 1e-13. Throws nothing. The trap: wide strips bring rho to 1, where the series creeps.
 */
export function flatStripCapacitance(width: number, gapBelow: number, gapAbove: number): number {
  if (gapBelow === gapAbove) return 4 / quarterPeriodRatio(logSech((0.25 * Math.PI * width) / gapBelow), logTanh((0.25 * Math.PI * width) / gapBelow));
  const [near, far] = [Math.min(gapBelow, gapAbove), Math.max(gapBelow, gapAbove)];
  const spacing = near + far;
  const half = Math.min(0.5 * width, wallAfterGaps * far);
  const plates = (width - 2 * half) / near + (width - 2 * half) / far;
  const alpha = (Math.PI * near) / spacing;
  const wanted = Math.log((Math.PI * half) / spacing);
  const tooWide = (logS: number) => Math.log(halfWidth(Math.exp(logS), alpha)) - wanted;
  const sample = (x: number): Sample => ({ x, value: tooWide(x) });
  // Plates of this width alone would have 2/s, and the edges add to it.
  let wider = sample(-Math.log(half / near + half / far + 1));
  let narrower = wider;
  for (let doubling = 0; doubling < mostDoublings && wider.value <= 0; doubling++) [narrower, wider] = [wider, sample(wider.x - Math.LN2)];
  for (let doubling = 0; doubling < mostDoublings && narrower.value > 0; doubling++) [wider, narrower] = [narrower, sample(narrower.x + Math.LN2)];
  return 2 / Math.exp(bracketedRoot(tooWide, wider, narrower)!.x) + plates;
}

/** pi w/(2b). The tip is where x turns: theta there need only be good to half the digits. */
function halfWidth(s: number, alpha: number): number {
  const { x, slope } = s >= 1 ? bySeries(s, alpha) : byTheta(s, alpha);
  const tip = bracketedRoot(slope, { x: 0, value: 1 }, { x: Math.PI, value: -1 })!.x;
  return x(tip);
}

interface InnerCircle {
  x(theta: number): number;
  slope(theta: number): number;
}

/** exp(-13 pi) is below rounding. */
const seriesTerms = 13;

function bySeries(s: number, alpha: number): InnerCircle {
  const terms = Array.from({ length: seriesTerms }, (_, index) => {
    const n = index + 1;
    return { n, part: (4 * Math.sin(n * alpha) * Math.exp(-Math.PI * s * n)) / -Math.expm1(-2 * Math.PI * s * n) };
  });
  const sum = (of: (n: number) => number) => terms.reduce((total, { n, part }) => total + part * of(n), 0);
  return { x: (theta) => sum((n) => Math.sin(n * theta) / n), slope: (theta) => sum((n) => Math.cos(n * theta)) };
}

/** exp(-4 * 5 pi + 4 * 3/2 pi) is below rounding. */
const thetaTerms = 5;

/**
 * theta2 sums of cosh((2n + 1) y/2s) exp(-n(n + 1) pi/s), with exp(-y/2s) taken out; the quotient as 1 + difference/denominator, where
 * the difference is a product of hyperbolic sines, so that a strip close to one plane keeps its digits.
 */
function byTheta(s: number, alpha: number): InnerCircle {
  const orders = Array.from({ length: thetaTerms }, (_, n) => n);
  const weight = (n: number, theta: number) => Math.exp((n * theta - n * (n + 1) * Math.PI) / s);
  const cosines = (y: number) => orders.reduce((sum, n) => sum + weight(n, y) * (1 + Math.exp((-(2 * n + 1) * y) / s)), 0);
  const sines = (y: number) => orders.reduce((sum, n) => sum + (2 * n + 1) * weight(n, y) * -Math.expm1((-(2 * n + 1) * y) / s), 0);
  const difference = (theta: number) =>
    2 * Math.exp(alpha / (2 * s)) * orders.reduce((sum, n) => sum + weight(n, theta) * -Math.expm1((-(2 * n + 1) * theta) / s) * Math.sinh(((2 * n + 1) * alpha) / (2 * s)), 0);
  return {
    x: (theta) => (-theta * alpha) / (Math.PI * s) + Math.log1p(difference(theta) / cosines(theta - alpha)),
    slope: (theta) => {
      const [after, before] = [theta + alpha, Math.abs(theta - alpha)];
      return sines(after) / cosines(after) - (Math.sign(theta - alpha) * sines(before)) / cosines(before) - (2 * alpha) / Math.PI;
    },
  };
}
