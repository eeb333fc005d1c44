/**
 * Up to which length a line may be taken as a wire: where the error of its input impedance first reaches a tolerance.
 *
 *   error(l) = l |S| |Y v^2 - Z i^2| / (|E v + Z l S i| |i|)          E = cosh t, S = sinh(t)/t, t = gamma l, both divided by exp(t)
 */
import { magnitude } from '../numeric/phasor';
import { bracketedRoot } from '../numeric/roots';

export interface LineAt {
  /** R + j w L, ohm/m, and G + j w C, S/m, in parts. */
  readonly R: number;
  readonly X: number;
  readonly G: number;
  readonly B: number;
  /** gamma. */
  readonly alpha: number;
  readonly beta: number;
}

export interface LoadAt {
  readonly vRe: number;
  readonly vIm: number;
  readonly iRe: number;
  readonly iIm: number;
}

/** How far is looked: |gamma| l = 4 pi, two wavelengths of a good line, over 100 dB of a bad one. */
const farthest = 4 * Math.PI;
/** A step is at most this much of |gamma| l: thirty-two to a half wavelength, over which the error rises and falls once. */
const longestStep = Math.PI / 32;
/** Where the line is short the error only grows, so that the steps may grow in proportion. */
const growth = 0.25;
const longestM = 1e9;
const mostSteps = 2000;
/** |2 t|^2 below which sinh(t)/t is 1. */
const negligible = 1e-200;

/**
 * Source: two-port of the line (line-two-port.ts). Symbols: tolerance relative, at most 0.5. Range: any line and load. Accuracy: 1e-12 relative, times how fast the
 * error grows there. Throws nothing; null where the tolerance is not reached within |gamma| l = 4 pi and 1e9 m.
 * The trap: over a half wavelength of a good line the error comes back to 0, so a bracket from 0 to far away may hold no change of sign.
 */
export function longestLumpedLength(line: LineAt, load: LoadAt, tolerance: number): number | null {
  const { mismatch, error } = errorOverLength(line, load);
  if (mismatch === 0) return null;
  const i = magnitude(load.iRe, load.iIm);
  const v = magnitude(load.vRe, load.vIm);
  // An open is wrong by an infinite impedance and a short by the whole of it, at any length.
  if (i === 0 || v === 0) return 0;
  const firstOrder = ((tolerance * v) / mismatch) * i;
  if (firstOrder === 0) return 0;
  const size = magnitude(line.alpha, line.beta);
  const most = Math.min(longestM, farthest / size);
  const step = Math.min(firstOrder / 4, longestStep / size, longestM);
  const longest = Math.min(longestStep / size, longestM);
  let [length, value] = [0, -tolerance];
  for (let count = 0; count < mostSteps && length < most; count++) {
    const next = Math.min(most, length + Math.min(longest, Math.max(step, growth * length)));
    const nextValue = error(next) - tolerance;
    if (nextValue >= 0) return bracketedRoot((at) => Math.min(error(at) - tolerance, 1), { x: length, value }, { x: next, value: Math.min(nextValue, 1) })?.x ?? null;
    [length, value] = [next, nextValue];
  }
  return null;
}

/** |Y v^2 - Z i^2|, 0 where it is no more than rounding, and the error of a length. */
function errorOverLength({ R, X, G, B, alpha, beta }: LineAt, { vRe, vIm, iRe, iIm }: LoadAt) {
  const [v2Re, v2Im] = [vRe * vRe - vIm * vIm, 2 * vRe * vIm];
  const [i2Re, i2Im] = [iRe * iRe - iIm * iIm, 2 * iRe * iIm];
  const [yRe, yIm] = [G * v2Re - B * v2Im, G * v2Im + B * v2Re];
  const [zRe, zIm] = [R * i2Re - X * i2Im, R * i2Im + X * i2Re];
  const difference = magnitude(yRe - zRe, yIm - zIm);
  const mismatch = difference <= 8 * Number.EPSILON * (magnitude(yRe, yIm) + magnitude(zRe, zIm)) ? 0 : difference;
  const current = magnitude(iRe, iIm);
  const [ziRe, ziIm] = [R * iRe - X * iIm, R * iIm + X * iRe];
  const error = (length: number): number => {
    const [a, b] = [-2 * alpha * length, -2 * beta * length];
    // p - 1 = exp(-2 t) - 1 without cancellation.
    const halfSine = Math.sin(0.5 * b);
    const [fRe, fIm] = [Math.expm1(a) * Math.cos(b) - 2 * halfSine * halfSine, Math.exp(a) * Math.sin(b)];
    const square = a * a + b * b;
    const [sRe, sIm] = square < negligible ? [1, 0] : [(fRe * a + fIm * b) / square, (fIm * a - fRe * b) / square];
    const [eRe, eIm] = [1 + 0.5 * fRe, 0.5 * fIm];
    const re = eRe * vRe - eIm * vIm + length * (sRe * ziRe - sIm * ziIm);
    const im = eRe * vIm + eIm * vRe + length * (sRe * ziIm + sIm * ziRe);
    return (length * Math.hypot(sRe, sIm) * mismatch) / magnitude(re, im) / current;
  };
  return { mismatch, error };
}
