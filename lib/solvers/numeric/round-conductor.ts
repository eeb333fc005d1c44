/**
 * Diffusion of a field into round conductors: the modified Bessel functions of z = m a, z^2 = j X, X = omega mu sigma a^2, in the ratios that
 * impedances are made of, with their derivatives to X. Nothing here is ever a difference of near-equal numbers, so that the imaginary part
 * keeps its digits down to direct current, where it is a small fraction of the real one.
 *
 *   wire          X small   continued fraction, backwards          X large   asymptotic series
 *   tube          thin      Taylor steps from the outer surface    thick     the same as a hole in a whole space
 *   whole space   X small   power series with its logarithm        middle    Steed's continued fraction    X large   asymptotic series
 */

/** A complex value and its derivative to X. */
export interface Diffused {
  readonly re: number;
  readonly im: number;
  readonly reSlope: number;
  readonly imSlope: number;
}

/** |z| above which the asymptotic series end below rounding, and the part that decays into the conductor, exp(-2 Re z), is below it too. */
const asymptoticFrom = 30;

/**
 * W = (z/2) I0(z)/I1(z): impedance of a solid wire over its resistance at direct current.
 * Source: Schelkunoff, Bell System Technical Journal 13 (1934) 532-579, equation for the solid wire (from memory); Abramowitz and Stegun 9.6, 9.7.
 * Range: X >= 0. Accuracy: a few units of rounding in each part. Throws nothing.
 */
export function solidWire(X: number): Diffused {
  if (X === 0) return { re: 1, im: 0, reSlope: 0, imSlope: 0.125 };
  const [re, im] = Math.sqrt(X) > asymptoticFrom ? halfRatio(X) : onePlusHalfTau(X);
  // z W' = 2 W (1 - W) + z^2/2, and X dW/dX = z W'/2.
  const [uRe, uIm] = [re - 1, im];
  return { re, im, reSlope: -(re * uRe - im * uIm) / X, imSlope: (-(re * uIm + im * uRe) + X / 4) / X };
}

/** tau_n = z I(n+1)/I(n) = z^2 / (2 (n + 1) + tau_(n+1)), backwards from where the start no longer matters; W = 1 + tau_1/2. */
function onePlusHalfTau(X: number): [number, number] {
  const { re, im } = besselSteps(X, 1);
  return [1 + re[1] / 2, im[1] / 2];
}

export interface BesselSteps {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/**
 * tau_n = z I(n+1)(z)/I(n)(z) for n = 0 to `orders`. Source: Abramowitz and Stegun 9.6.26. Range: X >= 0. Accuracy: a few units of rounding.
 * Throws nothing. The trap: upwards the recurrence loses a digit for every e^(n^2/|z|), so that is done only where z is large against the order.
 */
export function besselSteps(X: number, orders: number): BesselSteps {
  const size = Math.sqrt(X);
  if (size > Math.max(asymptoticFrom, orders * orders)) return upwards(X, orders);
  const re = new Float64Array(orders + 1);
  const im = new Float64Array(orders + 1);
  let tRe = size * Math.SQRT1_2;
  let tIm = size * Math.SQRT1_2;
  for (let n = orders + 20 + Math.ceil(6 * Math.sqrt(size)); n >= 0; n--) {
    const dRe = 2 * (n + 1) + tRe;
    const divisor = dRe * dRe + tIm * tIm;
    [tRe, tIm] = [(X * tIm) / divisor, (X * dRe) / divisor];
    if (n <= orders) [re[n], im[n]] = [tRe, tIm];
  }
  return { re, im };
}

function upwards(X: number, orders: number): BesselSteps {
  const re = new Float64Array(orders + 1);
  const im = new Float64Array(orders + 1);
  const [wRe, wIm] = halfRatio(X);
  // tau_0 = z^2/(2 W), tau_(n+1) = z^2/tau_n - 2 (n + 1).
  [re[0], im[0]] = jOver(X / 2, wRe, wIm);
  for (let n = 0; n < orders; n++) {
    const [qRe, qIm] = jOver(X, re[n], im[n]);
    [re[n + 1], im[n + 1]] = [qRe - 2 * (n + 1), qIm];
  }
  return { re, im };
}

/** j x / (a + j b). */
function jOver(x: number, a: number, b: number): [number, number] {
  const divisor = a * a + b * b;
  return [(x * b) / divisor, (x * a) / divisor];
}

/** (z/2) I0(z)/I1(z) by the asymptotic series, Abramowitz and Stegun 9.7.1. */
function halfRatio(X: number): [number, number] {
  const [re, im] = seriesRatio(X, -1);
  return [re / 2, im / 2];
}

/** z times the ratio of the asymptotic series of order 0 and 1, in powers of sign/z: I for -1, K for +1 (Abramowitz and Stegun 9.7.1, 9.7.2). */
function seriesRatio(X: number, sign: 1 | -1): [number, number] {
  const part = Math.sqrt(X / 2);
  const [zero, one] = [asymptoticSum(0, part, sign), asymptoticSum(1, part, sign)];
  const divisor = one[0] * one[0] + one[1] * one[1];
  const re = (zero[0] * one[0] + zero[1] * one[1]) / divisor;
  const im = (zero[1] * one[0] - zero[0] * one[1]) / divisor;
  return [part * (re - im), part * (re + im)];
}

/** Sum of (4 v^2 - 1)(4 v^2 - 9)... / (k! (8 z)^k) times sign^k, z = part (1 + j). */
function asymptoticSum(order: 0 | 1, part: number, sign: 1 | -1): [number, number] {
  let [tRe, tIm] = [1, 0];
  let [sumRe, sumIm] = [1, 0];
  for (let k = 1; k <= 30; k++) {
    const factor = (sign * (4 * order - (2 * k - 1) ** 2)) / (8 * k * 2 * part);
    // Divided by 1 + j: times (1 - j)/2.
    [tRe, tIm] = [factor * (tRe + tIm), factor * (tIm - tRe)];
    sumRe += tRe;
    sumIm += tIm;
    if (Math.abs(tRe) + Math.abs(tIm) < 1e-18) break;
  }
  return [sumRe, sumIm];
}

/**
 * V = z K0(z)/K1(z): impedance of a hole in a conductor without end, over rho/(2 pi b^2); z^2 = j X, X = omega mu sigma b^2.
 * Source: Schelkunoff 1934 (from memory); Abramowitz and Stegun 9.6.13, 9.7.2; Steed's continued fraction as in Temme, J. Comput. Phys. 19 (1975)
 * 324-337. Range: X > 0. Accuracy: a few units of rounding. Throws nothing.
 */
export function wholeSpace(X: number): Diffused {
  const size = Math.sqrt(X);
  const [re, im] = size > asymptoticFrom ? seriesRatio(X, 1) : size > 2 ? steed(X) : withLogarithm(X);
  // z V' = 2 V - z^2 + V^2, and X dV/dX = z V'/2.
  const square = [re * re - im * im, 2 * re * im];
  return { re, im, reSlope: (re + square[0] / 2) / X, imSlope: (im + square[1] / 2 - X / 2) / X };
}

/** z K0/K1 from K1/K0 = (z + 1/2 - h)/z. */
function steed(X: number): [number, number] {
  const part = Math.sqrt(X / 2);
  let bRe = 2 * (1 + part);
  const bIm = 2 * part;
  let divisor = bRe * bRe + bIm * bIm;
  let [dRe, dIm] = [bRe / divisor, -bIm / divisor];
  let [stepRe, stepIm] = [dRe, dIm];
  let [hRe, hIm] = [dRe, dIm];
  let a = -0.25;
  for (let i = 2; i <= 500; i++) {
    a -= 2 * (i - 1);
    bRe += 2;
    const [eRe, eIm] = [bRe + a * dRe, bIm + a * dIm];
    divisor = eRe * eRe + eIm * eIm;
    [dRe, dIm] = [eRe / divisor, -eIm / divisor];
    const [fRe, fIm] = [bRe * dRe - bIm * dIm - 1, bRe * dIm + bIm * dRe];
    [stepRe, stepIm] = [fRe * stepRe - fIm * stepIm, fRe * stepIm + fIm * stepRe];
    hRe += stepRe;
    hIm += stepIm;
    if (Math.abs(stepRe) + Math.abs(stepIm) < 1e-17 * (Math.abs(hRe) + Math.abs(hIm))) break;
  }
  const [nRe, nIm] = [part + 0.5 - 0.25 * hRe, part - 0.25 * hIm];
  return jOver(X, nRe, nIm);
}

const euler = 0.5772156649015329;

/** K0 and z K1 by their power series, with ln(z/2) + euler in one piece. */
function withLogarithm(X: number): [number, number] {
  const [lRe, lIm] = [0.5 * Math.log(X / 4) + euler, Math.PI / 4];
  // With u = (z/2)^2 = j X/4: I0 = sum u^k/k!^2; K0 = -l I0 + sum H_k u^k/k!^2;
  // z K1 = 1 + 2 l (z/2) I1 - sum (H_k + H_(k+1)) u^(k+1)/(k! (k+1)!).
  const u = X / 4;
  let [pRe, pIm] = [1, 0];
  let harmonic = 0;
  let [i0Re, i0Im, k0Re, k0Im, i1Re, i1Im, k1Re, k1Im] = [0, 0, 0, 0, 0, 0, 0, 0];
  for (let k = 0; k <= 24; k++) {
    i0Re += pRe;
    i0Im += pIm;
    k0Re += harmonic * pRe;
    k0Im += harmonic * pIm;
    // u^(k+1)/(k! (k+1)!)
    const [nRe, nIm] = [(-u * pIm) / (k + 1), (u * pRe) / (k + 1)];
    const both = 2 * harmonic + 1 / (k + 1);
    i1Re += nRe;
    i1Im += nIm;
    k1Re += both * nRe;
    k1Im += both * nIm;
    [pRe, pIm] = [nRe / (k + 1), nIm / (k + 1)];
    harmonic += 1 / (k + 1);
  }
  const [zeroRe, zeroIm] = [-(lRe * i0Re - lIm * i0Im) + k0Re, -(lRe * i0Im + lIm * i0Re) + k0Im];
  const [oneRe, oneIm] = [1 + 2 * (lRe * i1Re - lIm * i1Im) - k1Re, 2 * (lRe * i1Im + lIm * i1Re) - k1Im];
  // z K0/K1 = z^2 K0/(z K1).
  const divisor = oneRe * oneRe + oneIm * oneIm;
  const [qRe, qIm] = [(zeroRe * oneRe + zeroIm * oneIm) / divisor, (zeroIm * oneRe - zeroRe * oneIm) / divisor];
  return [-X * qIm, X * qRe];
}
