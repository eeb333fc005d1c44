/** What closes a line's far end. */
import { z } from 'zod';
import type { InputProblem } from '../errors';
import { impedance, impedanceColumn, openCircuit, parallelParts, seriesParts, shortCircuit, type OnePort } from '../methods/one-port';
import type { Phasor, Space } from '../numeric/phasor';
import { complexForms, complexParts } from './complex-number';
import { frequencyList, mostPoints } from './frequency';

export const partFields = {
  resistance_ohm: z.number().min(0).max(1e12).optional().meta({ title: 'Resistance', description: 'Resistance; left out where there is none.', examples: [100], 'x-unit': 'ohm' }),
  inductance_h: z.number().min(0).max(1e3).optional().meta({ title: 'Inductance', description: 'Inductance; left out where there is none.', examples: [1e-8], 'x-unit': 'H' }),
  capacitance_f: z.number().min(0).max(1e3).optional().meta({ title: 'Capacitance', description: 'Capacitance; left out where there is none.', examples: [1e-12], 'x-unit': 'F' }),
};

const namedTermination = z.enum(['open', 'short', 'matched']).meta({ id: 'NamedTermination', title: 'Named', description: 'Open, short, or the line’s own characteristic impedance.', examples: ['open'] });

const partsTermination = (kind: 'series_rlc' | 'parallel_rlc', id: string, title: string) =>
  z
    .strictObject({ kind: z.literal(kind).meta({ title: 'Kind', description: title, examples: [kind] }), ...partFields })
    .meta({ id, title, description: `${title}, any of the three.`, examples: [{ kind, resistance_ohm: 100, capacitance_f: 1e-12 }] });

const ohms = (title: string) =>
  z.array(z.number().min(-1e12).max(1e12).meta({ title, description: `${title} at one frequency.`, examples: [50], 'x-unit': 'ohm' })).min(1).max(mostPoints).meta({ title, description: `${title}s, one a frequency.`, examples: [[50, 51]], 'x-unit': 'ohm' });

const tableTermination = z
  .strictObject({
    kind: z.literal('table').meta({ title: 'Kind', description: 'Impedance over frequency.', examples: ['table'] }),
    frequency_hz: frequencyList.meta({ title: 'Frequencies', description: 'Frequencies of the table, ascending.', examples: [[1e6, 1e9]], 'x-unit': 'Hz' }),
    impedance_ohm: z.strictObject({ re: ohms('Resistance'), im: ohms('Reactance') }).meta({ title: 'Impedance', description: 'Impedance at each frequency; read linearly between.', examples: [{ re: [50, 51], im: [0, 3] }], 'x-unit': 'ohm' }),
  })
  .superRefine(({ frequency_hz, impedance_ohm }, context) => {
    const wrong = frequency_hz.findIndex((each, index) => index > 0 && each <= frequency_hz[index - 1]);
    if (wrong > 0) context.addIssue({ code: 'custom', path: ['frequency_hz', wrong], params: { code: 'not_ascending' }, message: `must be greater than the frequency before it; got ${frequency_hz[wrong]}` });
    for (const part of ['re', 'im'] as const) {
      if (impedance_ohm[part].length !== frequency_hz.length) {
        context.addIssue({ code: 'custom', path: ['impedance_ohm', part], params: { code: 'length_differs' }, message: `must have as many entries as frequency_hz (${frequency_hz.length}); got ${impedance_ohm[part].length}` });
      }
    }
  })
  .meta({ id: 'TableTermination', title: 'Table', description: 'Impedance over frequency.' });

const seriesRlcTermination = partsTermination('series_rlc', 'SeriesRlcTermination', 'Resistance, inductance and capacitance in series');
const parallelRlcTermination = partsTermination('parallel_rlc', 'ParallelRlcTermination', 'Resistance, inductance and capacitance in parallel');

/** What has a finite impedance: a termination without its names. */
export const impedanceForms = [...complexForms, seriesRlcTermination, parallelRlcTermination, tableTermination] as const;

export const termination = z
  .union([...complexForms, namedTermination, seriesRlcTermination, parallelRlcTermination, tableTermination])
  .meta({ id: 'Termination', title: 'Termination', description: 'An impedance, open, short, matched, parts in series or in parallel, or a table.', examples: [{ re: 75, im: -30 }, 'open'], 'x-unit': 'ohm' });

export type Termination = z.output<typeof termination>;

/** Whether it is made of lumped parts. */
export function hasParts(value: Termination): boolean {
  return typeof value === 'object' && 'kind' in value && value.kind !== 'table';
}

/** What a schema cannot say: parts without any part, and frequencies outside a table. */
export function terminationProblems(value: Termination, frequenciesHz: Float64Array, pointer: string): InputProblem[] {
  if (typeof value !== 'object' || !('kind' in value)) return [];
  if (value.kind === 'table') return tableProblems(value.frequency_hz, frequenciesHz, pointer);
  const { resistance_ohm, inductance_h, capacitance_f } = value;
  if (resistance_ohm !== undefined || inductance_h !== undefined || capacitance_f !== undefined) return [];
  return [{ pointer, code: 'no_parts', detail: `${pointer.slice(1)} must have at least one of resistance_ohm, inductance_h and capacitance_f` }];
}

function tableProblems(table: readonly number[], frequenciesHz: Float64Array, pointer: string): InputProblem[] {
  const first = table[0];
  const last = table[table.length - 1];
  const outside = frequenciesHz.find((each) => each < first || each > last);
  if (outside === undefined) return [];
  return [{ pointer: `${pointer}/frequency_hz`, code: 'outside_table', detail: `frequency_hz of the table covers ${first} to ${last}; ${outside} lies outside` }];
}

export interface MatchedTo {
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly infinite?: Uint8Array;
}

/** The termination as a one-port; `matched` is what "matched" stands for. */
export function terminationOnePort<T extends Phasor<T>>(
  space: Space<T>,
  value: Termination,
  frequenciesHz: Float64Array,
  omega: Float64Array,
  matched: MatchedTo,
): OnePort<T> {
  if (value === 'open') return openCircuit(space);
  if (value === 'short') return shortCircuit(space);
  if (value === 'matched') return impedanceColumn(space, matched.re, matched.im, matched.infinite);
  if (typeof value === 'number' || !('kind' in value)) return impedance(space, complexParts(value));
  switch (value.kind) {
    case 'series_rlc':
      return seriesParts(space, omega, value);
    case 'parallel_rlc':
      return parallelParts(space, omega, value);
    case 'table':
      return impedanceColumn(space, interpolate(value.frequency_hz, value.impedance_ohm.re, frequenciesHz), interpolate(value.frequency_hz, value.impedance_ohm.im, frequenciesHz));
  }
}

/** Linear between neighbours; the table covers every frequency asked for. */
function interpolate(at: readonly number[], values: readonly number[], wanted: Float64Array): Float64Array {
  return wanted.map((x) => {
    let low = 0;
    let high = at.length - 1;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (at[middle] <= x) low = middle;
      else high = middle;
    }
    if (x === at[high]) return values[high];
    return at.length === 1 ? values[0] : values[low] + ((values[high] - values[low]) * (x - at[low])) / (at[high] - at[low]);
  });
}
