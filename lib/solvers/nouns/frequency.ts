/** The frequencies of a request: a number, a list, or a sweep. */
import { z } from 'zod';

export const mostPoints = 20_001;
const highestHz = 1e15;

const hertz = (meta: { title: string; description: string; examples: number[] }) =>
  z.number().min(0).max(highestHz).meta({ ...meta, 'x-unit': 'Hz' });

const frequencySweep = z
  .strictObject({
    start: hertz({ title: 'Start', description: 'First frequency; greater than 0 where spacing is "log".', examples: [1e6] }),
    stop: hertz({ title: 'Stop', description: 'Last frequency; greater than start.', examples: [1e9] }),
    points: z.number().int().min(1).max(mostPoints).meta({ title: 'Points', description: 'Number of frequencies; one point is the start alone.', examples: [401] }),
    spacing: z.enum(['linear', 'log']).default('linear').meta({ title: 'Spacing', description: 'Equal steps or equal ratios.', examples: ['log'] }),
  })
  .superRefine(({ start, stop, spacing }, context) => {
    if (stop <= start) {
      context.addIssue({ code: 'custom', path: ['stop'], params: { code: 'sweep_order' }, message: `must be greater than start (${start}); got ${stop}` });
    }
    if (spacing === 'log' && start === 0) {
      context.addIssue({ code: 'custom', path: ['start'], params: { code: 'log_from_zero' }, message: 'must be greater than 0 where spacing is "log"; got 0' });
    }
  })
  .meta({
    id: 'FrequencySweep',
    title: 'Sweep',
    description: 'Frequencies from start to stop, both included.',
    examples: [{ start: 1e6, stop: 1e9, points: 401, spacing: 'log' }],
  });

const oneFrequency = hertz({ title: 'One frequency', description: 'A single frequency; 0 is direct current.', examples: [100e6] });

export const frequencyList = z
  .array(hertz({ title: 'Frequency', description: 'One of the frequencies.', examples: [100e6] }))
  .min(1)
  .max(mostPoints)
  .meta({ title: 'List of frequencies', description: 'Frequencies in any order.', examples: [[0, 1e6, 10e6]], 'x-unit': 'Hz' });

export const frequency = z.union([oneFrequency, frequencyList, frequencySweep]).meta({
  id: 'Frequency',
  title: 'Frequency',
  description: 'A frequency, a list of them, or a sweep. 0 is direct current.',
  examples: [100e6, { start: 1e6, stop: 1e9, points: 401, spacing: 'log' }],
  'x-unit': 'Hz',
});

export type Frequency = z.output<typeof frequency>;

export function pointsOf(value: Frequency): number {
  if (typeof value === 'number') return 1;
  return Array.isArray(value) ? value.length : value.points;
}

export function frequenciesHz(value: Frequency): Float64Array {
  if (typeof value === 'number') return Float64Array.of(value);
  if (Array.isArray(value)) return Float64Array.from(value);
  const { start, stop, points, spacing } = value;
  const at = spacing === 'log' ? logarithmic(start, stop) : linear(start, stop);
  const result = new Float64Array(points);
  for (let index = 0; index < points; index++) result[index] = index === 0 ? start : index === points - 1 ? stop : at(index / (points - 1));
  return result;
}

function linear(start: number, stop: number): (fraction: number) => number {
  return (fraction) => start + (stop - start) * fraction;
}

/** By powers of ten, so that a sweep over decades meets the decades themselves. */
function logarithmic(start: number, stop: number): (fraction: number) => number {
  const first = Math.log10(start);
  const last = Math.log10(stop);
  return (fraction) => 10 ** (first + (last - first) * fraction);
}
