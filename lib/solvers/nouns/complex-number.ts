/** A complex number in a request: 5, {re, im} or {magnitude, angle_deg}. */
import { z } from 'zod';
import type { ComplexParts } from '../numeric/phasor';

/** Generous for any impedance, and far from where products overflow. */
const largest = 1e12;

const number = (most: number, title: string, description: string, example: number) => z.number().min(-most).max(most).meta({ title, description, examples: [example] });

const rectangular = (most: number, id: string) =>
  z
    .strictObject({
      re: number(most, 'Real part', 'Real part, in the unit of the quantity.', 75),
      im: number(most, 'Imaginary part', 'Imaginary part, in the unit of the quantity.', -30),
    })
    .meta({ id, title: 'Rectangular form', description: 'A complex number by its real and imaginary parts.', examples: [{ re: 75, im: -30 }] });

const polar = (most: number, id: string) =>
  z
    .strictObject({
      magnitude: z.number().min(0).max(most).meta({ title: 'Magnitude', description: 'Magnitude, in the unit of the quantity.', examples: [80.8] }),
      angle_deg: z.number().min(-360).max(360).meta({ title: 'Angle', description: 'Angle from the real axis.', examples: [-21.8], 'x-unit': 'deg' }),
    })
    .meta({ id, title: 'Polar form', description: 'A complex number by its magnitude and angle.', examples: [{ magnitude: 80.8, angle_deg: -21.8 }] });

const real = (most: number) => number(most, 'Real number', 'A number without imaginary part.', 50);

/** The three forms, for unions that take further ones. */
export const complexForms = [real(largest), rectangular(largest, 'RectangularComplex'), polar(largest, 'PolarComplex')] as const;

/** The matrix of a chain that passes next to nothing has entries beyond any impedance: 1e60 stands at 1200 dB. */
export const largestEntry = 1e60;
export const matrixEntryForms = [real(largestEntry), rectangular(largestEntry, 'RectangularEntry'), polar(largestEntry, 'PolarEntry')] as const;

export const complexNumber = z
  .union(complexForms)
  .meta({ id: 'ComplexNumber', title: 'Complex number', description: 'A number, real and imaginary parts, or magnitude and angle.', examples: [{ re: 75, im: -30 }] });

export type ComplexNumber = z.output<typeof complexNumber>;

export function complexParts(value: ComplexNumber): ComplexParts {
  if (typeof value === 'number') return { re: value, im: 0 };
  if ('re' in value) return value;
  const { cosine, sine } = cosineAndSineOfDegrees(value.angle_deg);
  return { re: value.magnitude * cosine, im: value.magnitude * sine };
}

/** Reduced to within 45 degrees of an axis first, so that 90 degrees has no real part at all. */
export function cosineAndSineOfDegrees(angle: number): { cosine: number; sine: number } {
  const quarters = Math.round(angle / 90);
  const rest = (angle - 90 * quarters) * (Math.PI / 180);
  const cosine = Math.cos(rest);
  const sine = Math.sin(rest);
  switch (((quarters % 4) + 4) % 4) {
    case 0:
      return { cosine, sine };
    case 1:
      return { cosine: -sine, sine: cosine };
    case 2:
      return { cosine: -cosine, sine: -sine };
    default:
      return { cosine: sine, sine: -cosine };
  }
}
