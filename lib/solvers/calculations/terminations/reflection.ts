/** Reflection coefficient, VSWR, return loss and mismatch loss of a one-port, from whichever of them is known. */
import { z } from 'zod';
import { defineCalculation } from '../../calculation';
import { ImpossibleInput } from '../../errors';
import { columnOf, complexColumnOf, impedanceOfPolarReflection, impedanceOfReflection, sizeOfReturnLoss, sizeOfStandingWaveRatio } from '../../methods/mismatch';
import { impedanceColumn, openCircuit } from '../../methods/one-port';
import { mismatchLossDb, powerWaves, reflection as reflectionOf, returnLossDb, standingWaveRatio, type ReflectionSizes } from '../../methods/reflection';
import { complexColumn, frequencyColumn, nullableColumn } from '../../nouns/columns';
import { complexForms, complexParts } from '../../nouns/complex-number';
import { frequenciesHz, frequency, pointsOf } from '../../nouns/frequency';
import { referenceImpedance, referenceProblems } from '../../nouns/reference-impedance';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';
import { complexEntry, complexOrSeries, complexSeries, realOrSeries, seriesLengths } from '../../nouns/value-or-series';
import type { ComplexColumn } from '../../numeric/complex-column';
import { inSpaceOf, magnitudes, type ComplexParts } from '../../numeric/phasor';

const known = ['impedance_ohm', 'reflection', 'vswr', 'return_loss_db'] as const;
const listed = 'impedance_ohm, reflection, vswr and return_loss_db';

const largest = 1e12;
const impedanceDescribed = { title: 'Impedance', description: 'Of the one-port: one value, a column, "open" or "short".', example: 75, unit: 'ohm' };

const fields = z.strictObject({
  frequency_hz: frequency.optional().meta({ title: 'Frequency', description: 'What the lists and columns belong to; answered beside them.', examples: [[1e6, 10e6]], 'x-unit': 'Hz' }),
  impedance_ohm: z
    .union([...complexForms, z.enum(['open', 'short']).meta({ title: 'Named', description: 'Open or short.', examples: ['open'] }), complexSeries('ImpedanceSeries', largest, impedanceDescribed)])
    .optional()
    .meta({ title: 'Impedance', description: impedanceDescribed.description, examples: [{ re: 75, im: -30 }, 'open'], 'x-unit': 'ohm' }),
  reflection: complexOrSeries('ReflectionSeries', largest, { title: 'Reflection', description: 'Reflection coefficient, as a power wave to the reference impedance.', example: 0.2 }).optional(),
  vswr: realOrSeries(z.number().min(1).max(1e15), { title: 'VSWR', description: 'Voltage standing-wave ratio; at least 1.', example: 1.5 }).optional(),
  return_loss_db: realOrSeries(z.number().min(0).max(6000), { title: 'Return loss', description: 'Return loss; at least 0 dB.', example: 14, unit: 'dB' }).optional(),
  reference_impedance_ohm: referenceImpedance,
});

type Input = z.output<typeof fields>;

const input = fields
  .superRefine((given, context) => {
    const present = known.filter((name) => given[name] !== undefined);
    const issue = (path: PropertyKey[], code: string, message: string) => context.addIssue({ code: 'custom', path, params: { code }, message });
    if (present.length === 0) issue([], 'one_of_required', `must have one of ${listed}; got none`);
    if (present.length > 1) for (const name of present) issue([name], 'only_one', `must be the only one of ${listed}; got ${present.join(', ')}`);
    const lists = present.flatMap((name) => seriesLengths(given[name]).map(({ path, length }) => ({ path: [name, ...path], length })));
    const wanted = given.frequency_hz === undefined ? lists[0]?.length : pointsOf(given.frequency_hz);
    const against = given.frequency_hz === undefined ? lists[0]?.path.join('.') : 'frequency_hz';
    for (const { path, length } of lists) if (length !== wanted) issue(path, 'length_differs', `must have as many entries as ${against} (${wanted}); got ${length}`);
  })
  .meta({ id: 'ReflectionInput', title: 'Reflection', description: 'One of impedance, reflection, VSWR and return loss, and the reference impedance.' });

const output = z
  .strictObject({
    frequency_hz: frequencyColumn.optional(),
    impedance_ohm: complexColumn.meta({ title: 'Impedance', description: 'Impedance of the one-port; null where it is infinite, or where only a magnitude is known.', examples: [{ re: [75], im: [-30] }], 'x-unit': 'ohm', 'x-figure': 1 }),
    reflection: complexColumn.meta({ title: 'Reflection', description: 'Reflection coefficient to the reference, as a power wave; null where only its magnitude is known.', examples: [{ re: [0.245], im: [-0.181] }], 'x-figure': 2, 'x-plot': 'smith', 'x-plot-group': 'Reflection' }),
    reflection_magnitude: nullableColumn.meta({ title: 'Magnitude of the reflection', description: '|Gamma|.', examples: [[0.305]] }),
    vswr: nullableColumn.meta({ title: 'VSWR', description: '(1 + |Gamma|)/(1 - |Gamma|); null where the reflection is whole or more.', examples: [[1.88]], 'x-figure': 3, 'x-plot': 'rectangular', 'x-plot-group': 'VSWR' }),
    return_loss_db: nullableColumn.meta({ title: 'Return loss', description: '-20 log10 |Gamma|; null where nothing is reflected.', examples: [[10.3]], 'x-unit': 'dB', 'x-figure': 4, 'x-plot': 'rectangular', 'x-plot-group': 'Return and mismatch loss' }),
    mismatch_loss_db: nullableColumn.meta({ title: 'Mismatch loss', description: '-10 log10(1 - |Gamma|^2): what the reflection costs of the available power; null where the reflection is whole or more.', examples: [[0.424]], 'x-unit': 'dB', 'x-figure': 5, 'x-plot': 'rectangular', 'x-plot-group': 'Return and mismatch loss' }),
  })
  .meta({ id: 'ReflectionResult', title: 'Reflection', description: 'Reflection and what follows from it.' });

export const reflection = defineCalculation({
  id: 'reflection',
  group: 'terminations',
  title: 'Reflection',
  summary: 'Reflection coefficient, VSWR, return loss and mismatch loss from an impedance, and the other way round from any of them.',
  input,
  output,
  methods: [powerWaves],
  cost: { rule: '1 unit per started 1,000 points', units: (given) => Math.ceil(pointsIn(given) / 1000) },
  solve(given) {
    const problems = referenceProblems(given.reference_impedance_ohm);
    if (problems.length > 0) throw new ImpossibleInput(problems);
    const points = pointsIn(given);
    const { impedance, gamma, sizes } = seen(given, points);
    const columns = new ResultColumns();
    const unknown = { re: new Float64Array(points).fill(NaN), im: new Float64Array(points) };
    const undetermined = { code: 'undetermined', reason: 'only the magnitude of the reflection is known' };
    const whole = { code: 'whole_reflection', reason: 'the reflection is whole or more, so there is no finite value' };
    const result = {
      ...(given.frequency_hz !== undefined && { frequency_hz: finiteColumn(frequenciesHz(given.frequency_hz)) }),
      impedance_ohm: columns.complex(impedance ?? unknown, { pointer: '/impedance_ohm', ...(impedance ? { code: 'pole', reason: 'no current flows, so the impedance is infinite' } : undetermined) }),
      reflection: columns.complex(gamma ?? unknown, { pointer: '/reflection', ...(gamma ? { code: 'no_value', reason: 'there is no forward wave to compare with' } : undetermined) }),
      reflection_magnitude: columns.real(sizes.magnitude, { pointer: '/reflection_magnitude', code: 'no_value', reason: 'there is no forward wave to compare with' }),
      vswr: columns.real(given.vswr === undefined ? standingWaveRatio(sizes) : columnOver(points, (index) => entry(given.vswr!, index)), { pointer: '/vswr', ...whole }),
      return_loss_db: columns.real(given.return_loss_db === undefined ? returnLossDb(sizes) : columnOver(points, (index) => entry(given.return_loss_db!, index)), {
        pointer: '/return_loss_db',
        code: 'no_reflection',
        reason: 'nothing is reflected, or there is no forward wave, so the return loss is not finite',
      }),
      mismatch_loss_db: columns.real(mismatchLossDb(sizes), { pointer: '/mismatch_loss_db', ...whole }),
    };
    return { result, methods: [{ method: powerWaves, inRange: true }], warnings: columns.warnings };
  },
  examples: [
    {
      name: 'An antenna of 75 - 30j ohm on a 50 ohm cable',
      input: { impedance_ohm: { re: 75, im: -30 } },
      expected: [
        { pointer: '/reflection/re/0', value: 161 / 661 },
        { pointer: '/reflection/im/0', value: -120 / 661 },
        { pointer: '/mismatch_loss_db/0', value: -10 * Math.log10(600 / 661) },
      ],
      tolerance: 1e-12,
      source: '(25 - 30j)/(125 - 30j) = (161 - 120j)/661 and 1 - |Gamma|^2 = 4 R Z0/|Z + Z0|^2 = 600/661 (Pozar, 4th ed., equations 2.35 and 2.37, from memory)',
    },
    {
      name: 'A data sheet’s return loss of 9.542 dB is a VSWR of 2',
      input: { return_loss_db: [9.542, 13.979], frequency_hz: [1e9, 2e9] },
      expected: [
        { pointer: '/vswr/0', value: 2 },
        { pointer: '/vswr/1', value: 1.5 },
        { pointer: '/mismatch_loss_db/0', value: 0.512 },
        { pointer: '/impedance_ohm/re/0', value: null },
      ],
      tolerance: 1e-3,
      source: 'Published tables of VSWR and return loss: 2.00 is 9.542 dB with 0.512 dB of mismatch loss, 1.50 is 13.979 dB (from memory)',
    },
    {
      name: 'From an analyser’s reflection to the impedance of a sensor',
      input: { reflection: { re: [0.2, 0, 0], im: [0, 0.5, -1] }, frequency_hz: [10e6, 20e6, 30e6], reference_impedance_ohm: 50 },
      expected: [
        { pointer: '/impedance_ohm/re/0', value: 75 },
        { pointer: '/impedance_ohm/re/1', value: 30 },
        { pointer: '/impedance_ohm/im/1', value: 40 },
        { pointer: '/impedance_ohm/im/2', value: -50 },
        { pointer: '/vswr/2', value: null },
      ],
      tolerance: 1e-12,
      source: 'Z = Z0 (1 + Gamma)/(1 - Gamma) (Pozar, 4th ed., section 2.3, from memory)',
    },
  ],
});

interface Seen {
  /** null where the input does not determine it. */
  readonly impedance: ComplexColumn | null;
  readonly gamma: ComplexColumn | null;
  readonly sizes: ReflectionSizes;
}

function seen({ impedance_ohm, reflection: given, vswr, return_loss_db, reference_impedance_ohm }: Input, points: number): Seen {
  const reference = complexParts(reference_impedance_ohm);
  const indexes = Array.from({ length: points }, (_, index) => index);
  if (impedance_ohm !== undefined) return fromImpedance(impedance_ohm, reference, indexes);
  if (given !== undefined) {
    const polar = typeof given === 'object' && 'magnitude' in given;
    const entries = indexes.map((index) => (polar ? impedanceOfPolarReflection(given, reference) : impedanceOfReflection(complexEntry(given, index), reference)));
    return { impedance: complexColumnOf(entries, (each) => each.impedance), gamma: complexColumnOf(entries, (each) => each.gamma), sizes: sizesOf(entries) };
  }
  const sizes = indexes.map((index) => (vswr !== undefined ? sizeOfStandingWaveRatio(entry(vswr, index)) : sizeOfReturnLoss(entry(return_loss_db!, index))));
  return { impedance: null, gamma: null, sizes: sizesOf(sizes) };
}

function fromImpedance(value: NonNullable<Input['impedance_ohm']>, reference: ComplexParts, indexes: readonly number[]): Seen {
  return inSpaceOf(indexes.length, (space) => {
    const column = value === 'open' ? null : complexColumnOf(indexes, (index) => (value === 'short' ? { re: 0, im: 0 } : complexEntry(value, index)));
    const { v, i } = column === null ? openCircuit(space) : impedanceColumn(space, column.re, column.im);
    const { gamma, magnitude, absorbed } = reflectionOf(space, v, i, space.constant(reference));
    const impedance = space.pick(Uint8Array.from(magnitudes(space, i), (each) => (each === 0 ? 1 : 0)), space.constant(NaN), v);
    return { impedance: space.column(impedance), gamma: space.column(gamma), sizes: { magnitude, absorbed } };
  });
}

function sizesOf(entries: readonly { magnitude: number; absorbed: number }[]): ReflectionSizes {
  return { magnitude: columnOf(entries, (each) => each.magnitude), absorbed: columnOf(entries, (each) => each.absorbed) };
}

function entry(value: number | readonly number[], index: number): number {
  return typeof value === 'number' ? value : value[index];
}

function columnOver(points: number, at: (index: number) => number): Float64Array {
  return Float64Array.from({ length: points }, (_, index) => at(index));
}

/** As many as there are frequencies, or without these as the lists have entries; else one. */
function pointsIn(given: Input): number {
  if (given.frequency_hz !== undefined) return pointsOf(given.frequency_hz);
  return seriesLengths(known.map((name) => given[name]).find((each) => each !== undefined))[0]?.length ?? 1;
}
