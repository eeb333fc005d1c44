/** A line given by a table of its primary constants over frequency. */
import { z } from 'zod';
import type { Method, Warning } from '../calculation';
import { monotoneInterpolant } from '../numeric/monotone-interpolation';
import { defineLineKind, type FourColumns } from './line-constants';
import { hertzRange } from './line-warnings';

export const monotoneTable: Method = {
  id: 'monotone-table',
  title: 'Monotone cubic interpolation of a table',
  source: 'Fritsch and Carlson, Monotone piecewise cubic interpolation, SIAM J. Numer. Anal. 17 (1980) 238-246 (region S2, from memory)',
  formulas: [
    String.raw`y = y_0 + h t\,\bigl(m_0 + t\,(3d - 2m_0 - m_1) + t^2 (m_0 + m_1 - 2d)\bigr), \qquad t = \frac{x - x_0}{h}, \quad d = \frac{y_1 - y_0}{h}`,
    String.raw`\sqrt{m_0^2 + m_1^2} \le 3\,|d|`,
  ],
  symbols: [
    { symbol: 'x', meaning: 'what the table runs over: frequency, or the root of frequency for the attenuation of a data sheet' },
    { symbol: 'y', meaning: 'the value' },
    { symbol: 'h', meaning: 'distance of the two nodes around x' },
    { symbol: 'm_0, m_1', meaning: 'slopes at the two nodes: of the parabola through three neighbours, 0 where the table turns, shrunk to the bound' },
  ],
  range: 'between the first and the last row; outside, the nearest row is held, or the attenuation of a data sheet scaled by the root of frequency',
  accuracy: 'exact at the rows, straight lines reproduced, never above or below the neighbouring rows; between rows as good as the table is dense',
};

const mostRows = 2000;
/** Hz. Rows nearer to each other than this are one row. */
const leastStep = 1e-6;

const quantities = ['resistance_ohm_per_m', 'inductance_h_per_m', 'conductance_s_per_m', 'capacitance_f_per_m'] as const;

const list = (title: string, description: string, examples: number[], largest: number, unit: string) =>
  z
    .array(z.number().min(0).max(largest).meta({ title, description: `${title} at one frequency.`, examples: [examples[0]], 'x-unit': unit }))
    .min(1)
    .max(mostRows)
    .meta({ title, description: `${description}, one a row.`, examples: [examples], 'x-unit': unit });

export const rlgcTable = defineLineKind({
  schema: z
    .strictObject({
      kind: z.literal('rlgc_table').meta({ title: 'Kind', description: 'Given by R, L, G and C over frequency.', examples: ['rlgc_table'] }),
      frequency_hz: z
        .array(z.number().min(0).max(1e15).meta({ title: 'Frequency', description: 'Frequency of one row.', examples: [1e6], 'x-unit': 'Hz' }))
        .min(1)
        .max(mostRows)
        .meta({ title: 'Frequencies', description: 'Frequencies of the rows, ascending.', examples: [[1e6, 1e7, 1e8]], 'x-unit': 'Hz' }),
      resistance_ohm_per_m: list('Resistance', 'Series resistance of both conductors together', [0.05, 0.16, 0.5], 1e9, 'ohm/m'),
      inductance_h_per_m: list('Inductance', 'Series inductance of the loop', [2.7e-7, 2.6e-7, 2.55e-7], 1e3, 'H/m'),
      conductance_s_per_m: list('Conductance', 'Shunt conductance between the conductors', [2e-7, 2e-6, 2e-5], 1e9, 'S/m'),
      capacitance_f_per_m: list('Capacitance', 'Shunt capacitance between the conductors', [1e-10, 1e-10, 1e-10], 1e3, 'F/m'),
    })
    .superRefine((table, context) => {
      const { frequency_hz } = table;
      const wrong = frequency_hz.findIndex((each, index) => index > 0 && !(each >= frequency_hz[index - 1] + leastStep));
      if (wrong > 0) {
        const message = `must be greater than the frequency before it (${frequency_hz[wrong - 1]}) by at least ${leastStep} Hz; got ${frequency_hz[wrong]}`;
        context.addIssue({ code: 'custom', path: ['frequency_hz', wrong], params: { code: 'not_ascending' }, message });
      }
      for (const name of quantities) {
        if (table[name].length === frequency_hz.length) continue;
        const message = `must have as many entries as frequency_hz (${frequency_hz.length}); got ${table[name].length}`;
        context.addIssue({ code: 'custom', path: [name], params: { code: 'length_differs' }, message });
      }
    })
    .meta({ id: 'RlgcTableLine', title: 'R, L, G, C table', description: 'A line given by its primary constants over frequency, one row a frequency, read by monotone cubics between the rows.' }),
  methods: [monotoneTable],
  /**
   * Source: `monotoneTable`, over frequency. Symbols: as the schema's, per metre. Range: between the first and the last row; outside, the nearest row is held, with
   * a warning; one row is a constant. Accuracy: exact at the rows. Throws nothing. The trap: a held row has no slope, though the cubic beside it has one.
   */
  model(table, frequenciesHz) {
    const columns = quantities.map((name) => readOver(table.frequency_hz, table[name], frequenciesHz));
    const four = (part: 'value' | 'slope'): FourColumns => ({ resistance: columns[0][part], inductance: columns[1][part], conductance: columns[2][part], capacitance: columns[3][part] });
    const warnings = outsideWarnings(table.frequency_hz, frequenciesHz, '/frequency_hz', 'the nearest row is held');
    return { constants: { ...four('value'), slope: four('slope') }, methods: [{ method: monotoneTable, inRange: warnings.length === 0 }], warnings };
  },
});

/** Values, and slopes to omega. */
function readOver(at: readonly number[], values: readonly number[], frequenciesHz: Float64Array): { value: Float64Array; slope: Float64Array } {
  const read = monotoneInterpolant(at, values);
  const [first, last] = [at[0], at[at.length - 1]];
  const value = new Float64Array(frequenciesHz.length);
  const slope = new Float64Array(frequenciesHz.length);
  frequenciesHz.forEach((frequency, index) => {
    const found = read(Math.min(last, Math.max(first, frequency)));
    value[index] = found.value;
    slope[index] = frequency < first || frequency > last ? 0 : found.slope / (2 * Math.PI);
  });
  return { value, slope };
}

/** Where a table was left; `what` says what stands there. */
export function outsideWarnings(at: readonly number[], frequenciesHz: Float64Array, pointer: string, what: string): Warning[] {
  const [first, last] = [at[0], at[at.length - 1]];
  const outside = frequenciesHz.filter((each) => each < first || each > last);
  if (outside.length === 0) return [];
  return [{ code: 'outside_table', pointer, detail: `the table covers ${hertzRange(first, last)}; for ${hertzRange(outside.reduce((a, b) => Math.min(a, b)), outside.reduce((a, b) => Math.max(a, b)))} ${what}` }];
}
