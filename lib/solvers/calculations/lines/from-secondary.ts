import { z } from 'zod';
import { defineCalculation, type Warning } from '../../calculation';
import { ImpossibleInput, type InputProblem } from '../../errors';
import { primaryFromSecondary, seriesAndShunt, type SeriesAndShunt } from '../../methods/primary-from-secondary';
import { frequencyColumn, nullableColumn } from '../../nouns/columns';
import { complexForms, complexParts, type ComplexNumber } from '../../nouns/complex-number';
import { frequenciesHz, frequency, mostPoints, pointsOf } from '../../nouns/frequency';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';
import type { ComplexParts } from '../../numeric/phasor';

const entries = (title: string) =>
  z.array(z.number().min(-1e12).max(1e12).meta({ title, description: `${title} at one frequency.`, examples: [50] })).min(1).max(mostPoints).meta({ title, description: `${title}s, one a frequency.`, examples: [[50, 49.9]] });

const givenColumn = z
  .strictObject({ re: entries('Real part'), im: entries('Imaginary part') })
  .meta({ id: 'GivenComplexColumn', title: 'Column', description: 'One value a frequency.', examples: [{ re: [50, 49.9], im: [-0.9, -0.3] }] });

const complexOverFrequency = z.union([...complexForms, givenColumn]);
type ComplexOverFrequency = z.output<typeof complexOverFrequency>;

const input = z
  .strictObject({
    frequency_hz: frequency,
    propagation_constant_per_m: complexOverFrequency.meta({ title: 'Propagation constant', description: 'gamma = alpha + j beta: one value for every frequency, or a column of as many.', examples: [{ re: [0.0018], im: [3.14] }], 'x-unit': '1/m' }),
    characteristic_impedance_ohm: complexOverFrequency.meta({ title: 'Characteristic impedance', description: 'Zc: one value for every frequency, or a column of as many.', examples: [{ re: [50], im: [-0.009] }], 'x-unit': 'ohm' }),
  })
  .meta({ id: 'FromSecondaryInput', title: 'From secondary constants', description: 'Propagation constant and characteristic impedance over frequency.' });

const output = z
  .strictObject({
    frequency_hz: frequencyColumn,
    resistance_ohm_per_m: nullableColumn.meta({ title: 'Resistance', description: 'R, the real part of gamma Zc.', examples: [[0.12]], 'x-unit': 'ohm/m', 'x-figure': 1, 'x-plot': 'rectangular', 'x-plot-group': 'Resistance' }),
    inductance_h_per_m: nullableColumn.meta({ title: 'Inductance', description: 'L, from the imaginary part of gamma Zc; null at 0 Hz.', examples: [[2.5e-7]], 'x-unit': 'H/m', 'x-figure': 2, 'x-plot': 'rectangular', 'x-plot-group': 'Inductance' }),
    conductance_s_per_m: nullableColumn.meta({ title: 'Conductance', description: 'G, the real part of gamma / Zc.', examples: [[2.5e-5]], 'x-unit': 'S/m', 'x-figure': 3, 'x-plot': 'rectangular', 'x-plot-group': 'Conductance' }),
    capacitance_f_per_m: nullableColumn.meta({ title: 'Capacitance', description: 'C, from the imaginary part of gamma / Zc; null at 0 Hz.', examples: [[1e-10]], 'x-unit': 'F/m', 'x-figure': 4, 'x-plot': 'rectangular', 'x-plot-group': 'Capacitance' }),
  })
  .meta({ id: 'FromSecondaryResult', title: 'From secondary constants', description: 'Primary constants over frequency.' });

type Input = z.output<typeof input>;

/** Rounding of gamma and Zc to doubles may turn a vanishing part by this many units of rounding of the whole. */
const allowance = 4 * Number.EPSILON;
const mostProblems = 100;
const mostIndexes = 20;

export const fromSecondary = defineCalculation({
  id: 'from-secondary',
  group: 'lines',
  title: 'From secondary constants',
  summary: 'R, L, G and C back from the propagation constant and characteristic impedance of a line over frequency.',
  input,
  output,
  methods: [primaryFromSecondary],
  cost: { rule: '1 unit per started 1,000 points', units: ({ frequency_hz }) => Math.ceil(pointsOf(frequency_hz) / 1000) },
  solve(given) {
    const problems = problemsOf(given);
    if (problems.length > 0) throw new ImpossibleInput(problems.slice(0, mostProblems));
    const frequencies = frequenciesHz(given.frequency_hz);
    const omega = frequencies.map((each) => 2 * Math.PI * each);
    const [gamma, impedance] = [given.propagation_constant_per_m, given.characteristic_impedance_ohm];
    const found = Array.from(frequencies, (_, index) => seriesAndShunt(valueAt(gamma, index), valueAt(impedance, index)));
    const columns = new ResultColumns();
    const overOmega = (part: (each: SeriesAndShunt) => number) => Float64Array.from(found, (each, index) => (omega[index] > 0 ? part(each) / omega[index] : NaN));
    const atDirectCurrent = 'a reactance at 0 Hz tells nothing of it, or its value is beyond any number';
    const result = {
      frequency_hz: finiteColumn(frequencies),
      resistance_ohm_per_m: columns.real(Float64Array.from(found, ({ series }) => series.re), { pointer: '/resistance_ohm_per_m', code: 'no_value', reason: 'its value is beyond any number' }),
      inductance_h_per_m: columns.real(overOmega(({ series }) => series.im), { pointer: '/inductance_h_per_m', code: 'no_value', reason: atDirectCurrent }),
      conductance_s_per_m: columns.real(Float64Array.from(found, ({ shunt }) => shunt.re), { pointer: '/conductance_s_per_m', code: 'no_value', reason: 'its value is beyond any number' }),
      capacitance_f_per_m: columns.real(overOmega(({ shunt }) => shunt.im), { pointer: '/capacitance_f_per_m', code: 'no_value', reason: atDirectCurrent }),
    };
    return { result, methods: [{ method: primaryFromSecondary, inRange: true }], warnings: [...columns.warnings, ...passivityWarnings(found), ...directCurrentWarnings(found, omega)] };
  },
  examples: [
    {
      name: 'A distortionless line, measured at three frequencies',
      input: { frequency_hz: [1e6, 1e7, 1e8], propagation_constant_per_m: { re: [0.002, 0.002, 0.002], im: [0.031415926535897934, 0.31415926535897931, 3.1415926535897931] }, characteristic_impedance_ohm: 50 },
      expected: [
        { pointer: '/resistance_ohm_per_m/0', value: 0.1 },
        { pointer: '/inductance_h_per_m/1', value: 2.5e-7 },
        { pointer: '/conductance_s_per_m/2', value: 4e-5 },
        { pointer: '/capacitance_f_per_m/2', value: 1e-10 },
      ],
      tolerance: 1e-12,
      source: 'Heaviside’s condition: R = alpha Zc, G = alpha/Zc, L = Zc/v, C = 1/(Zc v) (Pozar, 4th ed., section 2.7, from memory)',
    },
    {
      name: 'A 50 ohm cable at 100 MHz',
      input: { frequency_hz: 100e6, propagation_constant_per_m: { re: 0.00182499996943188493, im: 3.14159270621037809 }, characteristic_impedance_ohm: { re: 50.0000044787117514, im: -0.0091514069592545343 } },
      expected: [
        { pointer: '/resistance_ohm_per_m/0', value: 0.12 },
        { pointer: '/inductance_h_per_m/0', value: 2.5e-7 },
        { pointer: '/conductance_s_per_m/0', value: 2.5e-5 },
        { pointer: '/capacitance_f_per_m/0', value: 1e-10 },
      ],
      tolerance: 1e-11,
      source: 'the line whose secondary constants, by matrix exponential to 30 digits, are the input; rounding those to 16 digits leaves R and G 12',
    },
  ],
});

function isColumn(value: ComplexOverFrequency): value is z.output<typeof givenColumn> {
  return typeof value === 'object' && 're' in value && Array.isArray(value.re);
}

function valueAt(value: ComplexOverFrequency, index: number): ComplexParts {
  return isColumn(value) ? { re: value.re[index], im: value.im[index] } : complexParts(value as ComplexNumber);
}

function problemsOf(given: Input): InputProblem[] {
  const points = pointsOf(given.frequency_hz);
  const names = ['propagation_constant_per_m', 'characteristic_impedance_ohm'] as const;
  const lengths = names.flatMap((name) => lengthProblems(name, given[name], points));
  if (lengths.length > 0) return lengths;
  return names.flatMap((name) => valueProblems(name, given[name], name === 'characteristic_impedance_ohm'));
}

function lengthProblems(name: string, value: ComplexOverFrequency, points: number): InputProblem[] {
  if (!isColumn(value)) return [];
  return (['re', 'im'] as const)
    .filter((part) => value[part].length !== points)
    .map((part) => ({ pointer: `/${name}/${part}`, code: 'length_differs', detail: `${name}.${part} must have as many entries as there are frequencies (${points}); got ${value[part].length}` }));
}

/** A passive wave does not grow on its way, and a passive line does not give power back to what feeds it. */
function valueProblems(name: string, value: ComplexOverFrequency, isImpedance: boolean): InputProblem[] {
  const problems: InputProblem[] = [];
  const count = isColumn(value) ? value.re.length : 1;
  for (let index = 0; index < count && problems.length < mostProblems; index++) {
    const { re, im } = valueAt(value, index);
    const at = isColumn(value) ? { pointer: `/${name}/re/${index}`, name: `${name}.re[${index}]` } : { pointer: `/${name}`, name: `the real part of ${name}` };
    if (re < 0) problems.push({ pointer: at.pointer, code: 'negative_real_part', detail: `${at.name} must be at least 0; got ${re}` });
    else if (isImpedance && re === 0 && im === 0) problems.push({ pointer: at.pointer, code: 'zero_impedance', detail: `${isColumn(value) ? `${name}[${index}]` : name} must not be 0; G and C are gamma divided by it` });
  }
  return problems;
}

function passivityWarnings(found: readonly SeriesAndShunt[]): Warning[] {
  const rows: [pointer: string, title: string, value: (each: SeriesAndShunt) => number, size: (each: SeriesAndShunt) => number][] = [
    ['/resistance_ohm_per_m', 'R', ({ series }) => series.re, ({ seriesSize }) => seriesSize],
    ['/inductance_h_per_m', 'L', ({ series }) => series.im, ({ seriesSize }) => seriesSize],
    ['/conductance_s_per_m', 'G', ({ shunt }) => shunt.re, ({ shuntSize }) => shuntSize],
    ['/capacitance_f_per_m', 'C', ({ shunt }) => shunt.im, ({ shuntSize }) => shuntSize],
  ];
  return rows.flatMap(([pointer, title, value, size]) => {
    const at = indexesOf(found, (each) => value(each) < -allowance * size(each));
    return at === '' ? [] : [{ code: 'not_passive', pointer, detail: `${title} is negative, beyond the rounding of gamma and Zc to 16 digits, at index ${at}; no passive line has these secondary constants` }];
  });
}

/** At direct current a wave does not turn and Zc is a resistance. */
function directCurrentWarnings(found: readonly SeriesAndShunt[], omega: Float64Array): Warning[] {
  const at = indexesOf(found, ({ series, shunt, seriesSize, shuntSize }, index) => omega[index] === 0 && (Math.abs(series.im) > allowance * seriesSize || Math.abs(shunt.im) > allowance * shuntSize));
  return at === '' ? [] : [{ code: 'reactance_at_direct_current', pointer: '/frequency_hz', detail: `gamma Zc and gamma / Zc are real at 0 Hz for every line; their imaginary parts are left out at index ${at}` }];
}

function indexesOf(found: readonly SeriesAndShunt[], applies: (each: SeriesAndShunt, index: number) => boolean): string {
  const at = found.flatMap((each, index) => (applies(each, index) ? [index] : []));
  return at.length > mostIndexes ? `${at.slice(0, mostIndexes).join(', ')} and ${at.length - mostIndexes} more` : at.join(', ');
}
