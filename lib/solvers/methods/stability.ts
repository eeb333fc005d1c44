/**
 * Stability of a two-port between passive terminations, from its scaled matrix M = scale * ABCD, with f r = det M:
 *
 *   K  = (1 - |S11|^2 - |S22|^2 + |S11 S22 - S12 S21|^2)/(2 |S12 S21|) = Re(a d* + b c*)/|f r|
 *   mu = (1 - |S11|^2)/(|S22 - (S11 S22 - S12 S21) S11*| + |S12 S21|) = 2 Re(x y*)/(|x' y* + y' x*| + 2 R2 |f r|)
 *   x = a Z2 + b, y = c Z2 + d, x' = a Z2* - b, y' = c Z2* - d
 *
 * The forms on the right do not cancel where little passes; K depends on no reference. Both follow from the left by writing the power waves as
 * voltages and currents (checked against the definitions to 30 digits). Range: any two-port; K has no value where nothing passes one way.
 */
import type { Method } from '../calculation';
import type { Phasor, Space } from '../numeric/phasor';
import { magnitudes } from '../numeric/phasor';
import { timesPowerOfTwo } from '../numeric/power-of-two';
import type { TwoPort } from './two-port';

export const stabilityFactors: Method = {
  id: 'stability-factors',
  title: 'Stability of a two-port between passive terminations',
  source: 'Rollett, Stability and power-gain invariants of linear twoports, IRE Trans. CT-9 (1962) 29-32; Edwards and Sinsky, A new criterion for linear 2-port stability using a single geometrically derived parameter, IEEE Trans. MTT-40 (1992) 2303-2311 (from memory)',
  formulas: [
    String.raw`K = \frac{1 - |S_{11}|^2 - |S_{22}|^2 + |\Delta|^2}{2 |S_{12} S_{21}|}, \qquad \Delta = S_{11} S_{22} - S_{12} S_{21}`,
    String.raw`\mu = \frac{1 - |S_{11}|^2}{|S_{22} - \Delta S_{11}^{*}| + |S_{12} S_{21}|}`,
  ],
  symbols: [
    { symbol: 'K', meaning: 'Rollett’s factor; with |Delta| below 1, above 1 where no passive terminations make it oscillate' },
    { symbol: String.raw`\mu`, meaning: 'distance from the centre of the Smith chart to the nearest load that makes it oscillate; above 1 where there is none' },
    { symbol: 'S_{11}, S_{12}, S_{21}, S_{22}', meaning: 'scattering parameters' },
  ],
  range: 'any linear two-port; K where something passes both ways',
  accuracy: 'exact; 1e-12 relative in float64 where the sum itself does not cancel',
};

export interface Stability {
  readonly rollettFactor: Float64Array;
  readonly measure: Float64Array;
}

/** NaN or infinite where there is no value. Throws nothing. */
export function stability<T extends Phasor<T>>(space: Space<T>, two: TwoPort<T>, z2: T): Stability {
  const { a, b, c, d, factor, backward, lossNp, exponent, backwardExponent } = two;
  const forwardSize = magnitudes(space, factor);
  const backwardSize = backward === factor ? forwardSize : magnitudes(space, backward);
  const resistance = space.column(z2).re;
  const invariant = space.column(a.mul(d.conjugate()).add(b.mul(c.conjugate()))).re;

  const x = a.mul(z2).add(b);
  const y = c.mul(z2).add(d);
  const otherX = a.mul(z2.conjugate()).sub(b);
  const otherY = c.mul(z2.conjugate()).sub(d);
  const power = space.column(x.mul(y.conjugate())).re;
  const cross = magnitudes(space, otherX.mul(y.conjugate()).add(otherY.mul(x.conjugate())));
  const passing = forwardSize.map((each, index) => each * backwardSize[index]);
  const powerOfScale = exponent.map((each, index) => each + backwardExponent[index]);
  return {
    // By the loss last, and only half of it at once: exp(2 alpha l) overflows where K itself need not.
    rollettFactor: invariant.map((each, index) => timesPowerOfTwo((each / passing[index]) * Math.exp(lossNp[index]), -powerOfScale[index]) * Math.exp(lossNp[index])),
    measure: power.map((each, index) => (2 * each) / (cross[index] + 2 * resistance[index] * timesPowerOfTwo(passing[index] * Math.exp(-2 * lossNp[index]), powerOfScale[index]))),
  };
}
