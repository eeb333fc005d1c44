/** A quantity in a request that is the same at every frequency, or a list with one entry a frequency. */
import { z } from 'zod';
import type { ComplexParts } from '../numeric/phasor';
import { complexForms, complexParts, type ComplexNumber } from './complex-number';
import { mostPoints } from './frequency';

interface Described {
  readonly title: string;
  readonly description: string;
  readonly example: number;
  readonly unit?: string;
}

const unitOf = ({ unit }: Described) => (unit === undefined ? {} : { 'x-unit': unit });

/** `bounds` is the schema of one value. */
export function realOrSeries(bounds: z.ZodNumber, described: Described) {
  const { title, description, example } = described;
  const entry = bounds.meta({ title, description: `${title} at one frequency.`, examples: [example], ...unitOf(described) });
  const one = bounds.meta({ title: 'One value', description: `${title}, the same at every frequency.`, examples: [example], ...unitOf(described) });
  const list = z.array(entry).min(1).max(mostPoints).meta({ title: 'List', description: `${title}, one entry a frequency.`, examples: [[example, example]], ...unitOf(described) });
  return z.union([one, list]).meta({ title, description, examples: [example, [example, example]], ...unitOf(described) });
}

/** A column of complex numbers; its lists are of the same length, which `seriesLengths` tells. */
export function complexSeries(id: string, largest: number, described: Described) {
  const { title, example } = described;
  const parts = (part: string, value: number) =>
    z
      .array(z.number().min(-largest).max(largest).meta({ title: part, description: `${part} at one frequency.`, examples: [value] }))
      .min(1)
      .max(mostPoints)
      .meta({ title: `${part}s`, description: `${part}s, one a frequency.`, examples: [[value, value]] });
  return z
    .strictObject({ re: parts('Real part', example), im: parts('Imaginary part', 0) })
    .meta({ id, title: 'Column', description: `${title} over frequency: a list of real and a list of imaginary parts of the same length.`, examples: [{ re: [example, example], im: [0, 0] }], ...unitOf(described) });
}

export type ComplexSeries = z.output<ReturnType<typeof complexSeries>>;

export function complexOrSeries(id: string, largest: number, described: Described) {
  const { title, description, example } = described;
  return z.union([...complexForms, complexSeries(id, largest, described)]).meta({ title, description, examples: [example, { re: example, im: 0 }], ...unitOf(described) });
}

export function isComplexSeries(value: unknown): value is ComplexSeries {
  return typeof value === 'object' && value !== null && 're' in value && Array.isArray(value.re);
}

export function complexEntry(value: ComplexNumber | ComplexSeries, index: number): ComplexParts {
  return isComplexSeries(value) ? { re: value.re[index], im: value.im[index] } : complexParts(value);
}

export interface SeriesLength {
  /** From the field itself: [] for a list, ['re'] for the list of real parts. */
  readonly path: readonly string[];
  readonly length: number;
}

/** The lengths of the lists in a value; none where it is the same at every frequency. */
export function seriesLengths(value: unknown): SeriesLength[] {
  if (Array.isArray(value)) return [{ path: [], length: value.length }];
  if (!isComplexSeries(value)) return [];
  return [
    { path: ['re'], length: value.re.length },
    { path: ['im'], length: value.im.length },
  ];
}
