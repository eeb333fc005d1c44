/** Diffusion of a field into a flat sheet from one side, with no field on the other: x coth x with x^2 = j Y, Y = omega mu sigma t^2. */
import type { Diffused } from './round-conductor';

/** |x| above which coth x is 1 to rounding: exp(-sqrt(2) |x|). */
const thickFrom = 27;

/**
 * U = x coth x: impedance of the sheet over its resistance at direct current.
 * Source: diffusion into a slab; Ramo, Whinnery and Van Duzer, Fields and Waves in Communication Electronics, section 3.17 (from memory). Range: Y >= 0.
 * Accuracy: a few units of rounding in each part. Throws nothing.
 */
export function sheet(Y: number): Diffused {
  if (Y === 0) return { re: 1, im: 0, reSlope: 0, imSlope: 1 / 3 };
  const size = Math.sqrt(Y);
  const [re, im] = size > thickFrom ? [size * Math.SQRT1_2, size * Math.SQRT1_2] : fraction(Y, size);
  // x U' = U + x^2 - U^2, and Y dU/dY = x U'/2.
  const [vRe, vIm] = [re - 1, im];
  return { re, im, reSlope: -(re * vRe - im * vIm) / (2 * Y), imSlope: (-(re * vIm + im * vRe) + Y) / (2 * Y) };
}

/** 1 + x^2/(3 + x^2/(5 + ...)), backwards from where the start no longer matters. */
function fraction(Y: number, size: number): [number, number] {
  let [re, im] = [0, 0];
  for (let n = 20 + Math.ceil(6 * Math.sqrt(size)); n >= 1; n--) {
    const below = 2 * n + 1 + re;
    const divisor = below * below + im * im;
    [re, im] = [(Y * im) / divisor, (Y * below) / divisor];
  }
  return [1 + re, im];
}
