/**
 * A costly law of diffusion along a long sweep: where a stretch of the axis holds more points than its polynomial needs nodes, the law is computed
 * at the nodes alone. Its singularities lie where j X is real and negative, so that ln X has half a turn of room on either side.
 *
 *   X up to 0.5    in X itself      12 nodes    the nearest singularity lies beyond |X| = 3
 *   by decades     in ln X          32 nodes    an error of 3^-32
 *   X from `top`   in 1/sqrt(X)     12 nodes    there the law is a short series in 1/sqrt(X)
 */
import type { Diffused } from './round-conductor';

const low = 0.5;
const endNodes = 12;
const decadeNodes = 32;

/** A stretch of the axis in its own variable. */
interface Stretch {
  readonly from: number;
  readonly to: number;
  readonly nodes: number;
  variable(X: number): number;
  inverse(variable: number): number;
}

/** The law grows as 1/sqrt(X) at the end, and its slope as 1/X^1.5: with these weights both are smooth, and keep their digits, in every stretch. */
const weightsAt = (X: number) => (X <= low ? [1, 1] : [Math.sqrt(X), X * Math.sqrt(X)]);

/**
 * Source: interpolation at Chebyshev's points by the barycentric formula, Berrut and Trefethen, SIAM Review 46 (2004) 501-517 (from memory). Range: X >= 0;
 * `top` is from where the law is a short series in 1/sqrt(X). Accuracy: 1e-13 of |law|. The cost is bounded by the decades below `top`, not by the points.
 */
export function alongSweep(X: Float64Array, top: number, law: (X: number) => Diffused): Diffused[] {
  const decades = Math.ceil(Math.log10(top / low));
  const stretches = new Map<number, number[]>();
  for (let index = 0; index < X.length; index++) {
    const which = X[index] <= low ? -1 : Math.min(decades, Math.floor(Math.log10(X[index] / low)));
    const members = stretches.get(which);
    if (members) members.push(index);
    else stretches.set(which, [index]);
  }
  const result = new Array<Diffused>(X.length);
  for (const [which, members] of stretches) {
    const stretch = stretchOf(which, decades);
    const at = members.length > stretch.nodes ? interpolated(stretch, law) : law;
    for (const index of members) result[index] = at(X[index]);
  }
  return result;
}

function stretchOf(which: number, decades: number): Stretch {
  if (which < 0) return { from: 0, to: low, nodes: endNodes, variable: (X) => X, inverse: (each) => each };
  if (which < decades) return { from: Math.log(low * 10 ** which), to: Math.log(low * 10 ** (which + 1)), nodes: decadeNodes, variable: Math.log, inverse: Math.exp };
  return { from: 0, to: 1 / Math.sqrt(low * 10 ** decades), nodes: endNodes, variable: (X) => 1 / Math.sqrt(X), inverse: (each) => 1 / (each * each) };
}

function interpolated({ from, to, nodes, variable, inverse }: Stretch, law: (X: number) => Diffused): (X: number) => Diffused {
  const angles = Array.from({ length: nodes }, (_, index) => ((2 * index + 1) * Math.PI) / (2 * nodes));
  const points = angles.map((angle) => from + (to - from) * Math.sin(0.5 * angle) ** 2);
  const factors = angles.map((angle, index) => (index % 2 === 0 ? 1 : -1) * Math.sin(angle));
  const values = points.map((point) => {
    const X = inverse(point);
    const { re, im, reSlope, imSlope } = law(X);
    const [weight, slopeWeight] = weightsAt(X);
    return { re: re * weight, im: im * weight, reSlope: reSlope * slopeWeight, imSlope: imSlope * slopeWeight };
  });
  return (X) => {
    const here = variable(X);
    let [sum, re, im, reSlope, imSlope] = [0, 0, 0, 0, 0];
    for (let index = 0; index < nodes; index++) {
      const away = here - points[index];
      if (away === 0) return law(X);
      const factor = factors[index] / away;
      const value = values[index];
      sum += factor;
      re += factor * value.re;
      im += factor * value.im;
      reSlope += factor * value.reSlope;
      imSlope += factor * value.imSlope;
    }
    const [weight, slopeWeight] = weightsAt(X).map((each) => each * sum);
    return { re: re / weight, im: im / weight, reSlope: reSlope / slopeWeight, imSlope: imSlope / slopeWeight };
  };
}
