/** Columns of a result: one entry a frequency, null where the quantity has no finite value. */
import { z } from 'zod';
import { mostPoints } from './frequency';

const entry = z.number().meta({ title: 'Value', description: 'The value at one frequency.', examples: [50] });
const entryOrNull = z
  .union([entry, z.null()])
  .meta({ title: 'Value', description: 'The value at one frequency; null where there is none, and a warning says why.', examples: [50] });

/** A real quantity that always exists. */
export const realColumn = z.array(entry).max(mostPoints);

/** A real quantity that may have no finite value at some frequencies. */
export const nullableColumn = z.array(entryOrNull).max(mostPoints);

export const complexColumn = z
  .strictObject({
    re: z.array(entryOrNull).max(mostPoints).meta({ title: 'Real part', description: 'Real parts, one a frequency.', examples: [[50, 49.9]] }),
    im: z.array(entryOrNull).max(mostPoints).meta({ title: 'Imaginary part', description: 'Imaginary parts, one a frequency.', examples: [[0, -1.2]] }),
  })
  .meta({
    id: 'ComplexColumn',
    title: 'Complex column',
    description: 'A complex quantity over frequency: one list of real and one of imaginary parts.',
    examples: [{ re: [50, 49.9], im: [0, -1.2] }],
  });

export const frequencyColumn = realColumn.meta({
  title: 'Frequency',
  description: 'The frequencies the other columns belong to.',
  examples: [[1e6, 10e6]],
  'x-unit': 'Hz',
});

export type RealColumn = (number | null)[];
export type ComplexColumnResult = z.output<typeof complexColumn>;
