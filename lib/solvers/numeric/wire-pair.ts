/**
 * Two parallel round wires that carry a current there and back: what the skin of finite depth leaves in them beside their isolated skin effect.
 *
 * Each wire answers the harmonic n of a field from outside with lambda(n) = 1 - M(n),
 *   M(n) = 2 n mu / (tau(n) + n (1 + mu)),   tau(n) = z I(n+1)(z)/I(n)(z),   z^2 = j X,  X = omega mu mu0 a^2/rho,
 * where M = 0 is a perfect conductor. With h = a/s and cosh v = s/(2 a), the harmonics that reach a wire follow from
 *   (1 - K lambda) u = c,   K(n,k) = (n + k - 1)!/((n - 1)! (k - 1)! sqrt(n k)) h^(n+k),   c(n) = h^n/sqrt(n),
 * and for perfect wires are those of their images, p(n) = exp(-n v)/sqrt(n). Since K is symmetric, the pair differs from one of perfect wires by
 *   Q = sum of p(n) M(n) u(n):   Z = 2 Z(isolated) + j omega (mu0/pi) (v + Q).
 * Nothing is subtracted from what perfect wires have, so that R keeps its digits however thin the skin.
 */
import { complexVector, solveSymmetric, type ComplexVector } from './complex-symmetric';
import { besselSteps, type Diffused } from './round-conductor';

export interface WirePair {
  readonly relativePermeability: number;
  readonly harmonics: number;
  /** K, row after row. */
  readonly coupling: Float64Array;
  /** c and p. */
  readonly fromAxis: Float64Array;
  readonly fromImage: Float64Array;
}

/** `ratio` is a/s, `arcosh` is v. Entries too small for a number are 0. */
export function wirePair(ratio: number, arcosh: number, relativePermeability: number, harmonics: number): WirePair {
  const coupling = new Float64Array(harmonics * harmonics);
  const fromAxis = new Float64Array(harmonics);
  const fromImage = new Float64Array(harmonics);
  for (let n = 1; n <= harmonics; n++) {
    let entry = Math.sqrt(n) * ratio ** (n + 1);
    for (let k = 1; k <= harmonics; k++) {
      coupling[(n - 1) * harmonics + k - 1] = entry;
      entry *= ratio * (1 + n / k) * Math.sqrt(k / (k + 1));
    }
    fromAxis[n - 1] = ratio ** n / Math.sqrt(n);
    fromImage[n - 1] = Math.exp(-n * arcosh) / Math.sqrt(n);
  }
  return { relativePermeability, harmonics, coupling, fromAxis, fromImage };
}

/**
 * Q and its derivative to X, which is sum of u(n)^2 dM(n)/dX. Source: Carson, Philosophical Magazine 41 (1921) 607-633 treats the same problem
 * (from memory); derived anew. Range: X >= 0. Accuracy: some units of rounding of each part, with harmonics enough for exp(-2 N v) to vanish. Throws nothing.
 */
export function excessOfPair({ relativePermeability: mu, harmonics: N, coupling, fromAxis, fromImage }: WirePair, X: number): Diffused {
  const tau = besselSteps(X, N);
  const M = complexVector(N);
  for (let n = 1; n <= N; n++) {
    const [dRe, dIm] = [tau.re[n] + n * (1 + mu), tau.im[n]];
    const factor = (2 * n * mu) / (dRe * dRe + dIm * dIm);
    M.re[n - 1] = factor * dRe;
    M.im[n - 1] = -factor * dIm;
  }
  const u = harmonicsOf(coupling, M, fromAxis);
  let [re, im, reSlope, imSlope] = [0, 0, 0, 0];
  for (let index = N - 1; index >= 0; index--) {
    const [uRe, uIm, mRe, mIm] = [u.re[index], u.im[index], M.re[index], M.im[index]];
    re += fromImage[index] * (mRe * uRe - mIm * uIm);
    im += fromImage[index] * (mRe * uIm + mIm * uRe);
    const [sRe, sIm] = slopeOfM(index + 1, mu, X, tau.re[index + 1], tau.im[index + 1], mRe, mIm);
    const [squareRe, squareIm] = [uRe * uRe - uIm * uIm, 2 * uRe * uIm];
    reSlope += squareRe * sRe - squareIm * sIm;
    imSlope += squareRe * sIm + squareIm * sRe;
  }
  return { re, im, reSlope, imSlope };
}

/** (1 - K lambda) u = c by way of w = sqrt(lambda) u, for which the system is symmetric: (1 - sqrt(lambda) K sqrt(lambda)) w = sqrt(lambda) c. */
function harmonicsOf(coupling: Float64Array, M: ComplexVector, fromAxis: Float64Array): ComplexVector {
  const N = fromAxis.length;
  const root = complexVector(N);
  const w = complexVector(N);
  for (let n = 0; n < N; n++) {
    [root.re[n], root.im[n]] = rootOf(1 - M.re[n], -M.im[n]);
    [w.re[n], w.im[n]] = [root.re[n] * fromAxis[n], root.im[n] * fromAxis[n]];
  }
  const matrix = complexVector(N * N);
  for (let n = 0; n < N; n++) {
    const [re, im] = [root.re[n], root.im[n]];
    for (let k = n, at = n * N + n; k < N; k++, at++) {
      matrix.re[at] = -coupling[at] * (re * root.re[k] - im * root.im[k]);
      matrix.im[at] = -coupling[at] * (re * root.im[k] + im * root.re[k]);
    }
    matrix.re[n * N + n] += 1;
  }
  solveSymmetric(matrix, w);
  const u: ComplexVector = { re: fromAxis.slice(), im: new Float64Array(N) };
  for (let k = 0; k < N; k++) {
    const [re, im] = [root.re[k] * w.re[k] - root.im[k] * w.im[k], root.re[k] * w.im[k] + root.im[k] * w.re[k]];
    for (let n = 0, at = k * N; n < N; n++, at++) {
      u.re[n] += coupling[at] * re;
      u.im[n] += coupling[at] * im;
    }
  }
  return u;
}

/** sqrt(a + j b), the larger part first. */
function rootOf(a: number, b: number): [number, number] {
  const larger = Math.sqrt(0.5 * (Math.hypot(a, b) + Math.abs(a)));
  if (larger === 0) return [0, 0];
  return a >= 0 ? [larger, b / (2 * larger)] : [b / (2 * larger), larger];
}

/** dM/dX = -M^2 tau'/(2 n mu), with X tau' = (j X - tau^2 - 2 n tau)/2, and tau = j X/(2 (n + 1)) to first order. */
function slopeOfM(n: number, mu: number, X: number, tRe: number, tIm: number, mRe: number, mIm: number): [number, number] {
  const [pRe, pIm] = X === 0 ? [0, 0.5 / (n + 1)] : [-(tRe * tRe - tIm * tIm + 2 * n * tRe) / (2 * X), (X - 2 * tRe * tIm - 2 * n * tIm) / (2 * X)];
  const [squareRe, squareIm] = [mRe * mRe - mIm * mIm, 2 * mRe * mIm];
  const factor = -1 / (2 * n * mu);
  return [factor * (squareRe * pRe - squareIm * pIm), factor * (squareRe * pIm + squareIm * pRe)];
}
