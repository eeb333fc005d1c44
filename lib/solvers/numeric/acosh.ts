/** acosh(1 + e) for e >= 0, without the cancellation that acosh has near 1: ln(1 + e + sqrt(e (e + 2))). Accuracy: a few units of rounding. */
export function acoshOfOnePlus(e: number): number {
  return Math.log1p(e + Math.sqrt(e * (e + 2)));
}
