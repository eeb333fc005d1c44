/**
 * Primary constants from secondary ones.
 *
 *   R + j w L = gamma Zc,   G + j w C = gamma / Zc
 *
 * gamma 1/m, Zc ohm, w = 2 pi f rad/s; R ohm/m, L H/m, G S/m, C F/m.
 */
import type { Method } from '../calculation';
import { LongComplex } from '../numeric/double-double';
import { magnitude, type ComplexParts } from '../numeric/phasor';
import { binaryExponent, timesPowerOfTwo } from '../numeric/power-of-two';

export const primaryFromSecondary: Method = {
  id: 'primary-from-secondary',
  title: 'R, L, G, C from propagation constant and characteristic impedance',
  source: 'Heaviside, Electrical Papers, vol. 2, 1892; Pozar, Microwave Engineering, 4th ed., equations 2.5 and 2.7, solved for the constants (numbers from memory)',
  formulas: [String.raw`R + j\omega L = \gamma Z_c, \qquad G + j\omega C = \frac{\gamma}{Z_c}`],
  symbols: [
    { symbol: String.raw`\gamma`, meaning: 'propagation constant', unit: '1/m' },
    { symbol: 'Z_c', meaning: 'characteristic impedance', unit: 'ohm' },
    { symbol: String.raw`\omega`, meaning: 'angular frequency', unit: 'rad/s' },
    { symbol: 'R, L', meaning: 'series resistance and inductance', unit: 'ohm/m, H/m' },
    { symbol: 'G, C', meaning: 'shunt conductance and capacitance', unit: 'S/m, F/m' },
  ],
  range: 'Re gamma and Re Zc of 0 or more, Zc not 0; L and C only above direct current',
  accuracy: 'exact; 1e-12 relative to the numbers as given. Of a good line R and G are small differences: what gamma and Zc are uncertain by grows by |Z|/R and |Y|/G',
};

export interface SeriesAndShunt {
  /** R + j w L, ohm/m. */
  readonly series: ComplexParts;
  /** G + j w C, S/m. */
  readonly shunt: ComplexParts;
  /** |gamma Zc| and |gamma / Zc|: what a vanishing part is measured against. */
  readonly seriesSize: number;
  readonly shuntSize: number;
}

/**
 * Source: Pozar 2.5 and 2.7. Range: Zc other than 0. Accuracy: a few units of rounding of each part. Throws nothing; infinite where gamma / Zc is beyond a double.
 * The trap: alpha Re Zc - beta Im Zc cancels for a good line, so the products are formed with 32 digits.
 */
export function seriesAndShunt(gamma: ComplexParts, impedance: ComplexParts): SeriesAndShunt {
  const wave = LongComplex.of(gamma);
  const exponent = binaryExponent(Math.max(Math.abs(impedance.re), Math.abs(impedance.im)));
  const scaled = { re: timesPowerOfTwo(impedance.re, -exponent), im: timesPowerOfTwo(impedance.im, -exponent) };
  const square = scaled.re * scaled.re + scaled.im * scaled.im;
  const part = (value: number) => timesPowerOfTwo(value / square, -exponent);
  const quotient = wave.mul(LongComplex.of(scaled).conjugate()).rounded();
  const size = magnitude(gamma.re, gamma.im);
  return {
    series: wave.mul(LongComplex.of(impedance)).rounded(),
    shunt: { re: part(quotient.re), im: part(quotient.im) },
    seriesSize: size * magnitude(impedance.re, impedance.im),
    shuntSize: timesPowerOfTwo(size / Math.sqrt(square), -exponent),
  };
}
