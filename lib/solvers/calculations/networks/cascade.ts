import { z } from 'zod';
import { defineCalculation, mergeMethods, type Method } from '../../calculation';
import { element, elementProblems, type Element } from '../../elements/element';
import { elementTwoPort } from '../../elements/element-two-port';
import { ImpossibleInput, type InputProblem } from '../../errors';
import { lineMethods, lineOverFrequency } from '../../lines/line';
import type { LineModel } from '../../lines/line-constants';
import { turnWarnings } from '../../lines/line-warnings';
import { telegrapherTwoPort } from '../../methods/line-two-port';
import { impedance, lumpedImpedance } from '../../methods/one-port';
import { powerWaves, reflection, returnLossDb } from '../../methods/reflection';
import { chain, mapFour, transmissionMatrix } from '../../methods/two-port';
import { insertionLossDb, largestGain, roundingOfEntries, scattering, tOrder, transferScattering, twoPortConversion, withoutScale, withScale } from '../../methods/two-port-parameters';
import { complexColumn, frequencyColumn, nullableColumn } from '../../nouns/columns';
import { frequenciesHz, frequency, pointsOf } from '../../nouns/frequency';
import { portReferenceImpedances, portReferences, referenceProblems } from '../../nouns/reference-impedance';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';
import { termination, terminationOnePort, terminationProblems } from '../../nouns/termination';
import { inSpaceOf, magnitudes } from '../../numeric/phasor';

const mostElements = 200;
/** Some tenths of a second of one core, which other calls wait for. */
const mostElementPoints = 400_000;

const input = z
  .strictObject({
    elements: z.array(element).min(1).max(mostElements).meta({ title: 'Elements', description: 'From port 1 to port 2.', examples: [[{ kind: 'series', inductance_h: 1e-8 }]] }),
    frequency_hz: frequency,
    reference_impedance_ohm: portReferenceImpedances,
    termination: termination.optional().meta({ title: 'Termination', description: 'What closes port 2 for the input impedance; its reference impedance when left out, and where "matched".', examples: ['open'], 'x-unit': 'ohm' }),
    include: z
      .array(z.enum(['abcd', 's', 'z', 'y', 't']).meta({ title: 'Representation', description: 'One representation.', examples: ['s'] }))
      .max(5)
      .default(['abcd', 's'])
      .meta({ title: 'Include', description: 'Which representations to answer.', examples: [['abcd', 's']] }),
  })
  .meta({ id: 'CascadeInput', title: 'Cascade', description: 'A chain of elements and the frequencies to look at it.' });

const entryOf = (name: string, unit?: string, hints: Record<string, unknown> = {}) =>
  complexColumn.meta({ title: name, description: `${name}; null where it does not exist.`, examples: [{ re: [1], im: [0] }], ...(unit && { 'x-unit': unit }), ...hints });

const output = z
  .strictObject({
    frequency_hz: frequencyColumn,
    abcd: z.strictObject({ a: entryOf('A'), b: entryOf('B', 'ohm'), c: entryOf('C', 'S'), d: entryOf('D') }).optional().meta({ title: 'ABCD', description: 'V1 = A V2 + B I2, I1 = C V2 + D I2, with I2 out of port 2.' }),
    s: z
      .strictObject({
        s11: entryOf('S11', undefined, { 'x-plot': 'smith', 'x-plot-group': 'Reflection' }),
        s12: entryOf('S12'),
        s21: entryOf('S21', undefined, { 'x-figure': 3 }),
        s22: entryOf('S22', undefined, { 'x-plot': 'smith', 'x-plot-group': 'Reflection' }),
      })
      .optional()
      .meta({ title: 'S', description: 'Scattering parameters in power waves.' }),
    z: z.strictObject({ z11: entryOf('Z11', 'ohm'), z12: entryOf('Z12', 'ohm'), z21: entryOf('Z21', 'ohm'), z22: entryOf('Z22', 'ohm') }).optional().meta({ title: 'Z', description: 'Impedance parameters.' }),
    y: z.strictObject({ y11: entryOf('Y11', 'S'), y12: entryOf('Y12', 'S'), y21: entryOf('Y21', 'S'), y22: entryOf('Y22', 'S') }).optional().meta({ title: 'Y', description: 'Admittance parameters.' }),
    t: z.strictObject({ t11: entryOf('T11'), t12: entryOf('T12'), t21: entryOf('T21'), t22: entryOf('T22') }).optional().meta({ title: 'T', description: 'Transfer scattering parameters.' }),
    t_order: z.literal(tOrder).optional().meta({ title: 'Order of T', description: 'Which waves T joins.', examples: [tOrder] }),
    input_impedance_ohm: complexColumn.meta({ title: 'Input impedance', description: 'At port 1, with port 2 closed; null at a pole.', examples: [{ re: [50], im: [0] }], 'x-unit': 'ohm', 'x-figure': 4, 'x-plot': 'rectangular', 'x-plot-group': 'Input impedance' }),
    insertion_loss_db: nullableColumn.meta({ title: 'Insertion loss', description: '-20 log10 |S21|.', examples: [[0.4]], 'x-unit': 'dB', 'x-figure': 1, 'x-plot': 'rectangular', 'x-plot-group': 'Insertion and return loss' }),
    return_loss_db: nullableColumn.meta({ title: 'Return loss', description: '-20 log10 |S11|.', examples: [[22]], 'x-unit': 'dB', 'x-figure': 2, 'x-plot': 'rectangular', 'x-plot-group': 'Insertion and return loss' }),
    group_delay_s: nullableColumn.meta({ title: 'Group delay', description: '-d arg(S21)/d omega.', examples: [[5e-9]], 'x-unit': 's', 'x-figure': 5, 'x-plot': 'rectangular', 'x-plot-group': 'Group delay' }),
    reciprocal: z.boolean().meta({ title: 'Reciprocal', description: 'S12 = S21.', examples: [true] }),
    passive: z.boolean().meta({ title: 'Passive', description: 'No more power comes out than goes in, at every frequency asked for.', examples: [true] }),
  })
  .meta({ id: 'CascadeResult', title: 'Cascade', description: 'What a chain of elements does over frequency.' });

const vanishing = 8 * Number.EPSILON;
/** Rounding of S over the longest chain. */
const passiveRounding = 1e-12;

export const cascade = defineCalculation({
  id: 'cascade',
  group: 'networks',
  title: 'Cascade',
  summary: 'ABCD, S, Z, Y and T parameters, input impedance, insertion and return loss and group delay of a chain of elements over frequency.',
  input,
  output,
  methods: [transmissionMatrix, twoPortConversion, powerWaves, telegrapherTwoPort, lumpedImpedance, ...lineMethods],
  cost: {
    rule: '1 unit per started 1,000 element-points (elements times frequencies)',
    units: ({ elements, frequency_hz }) => Math.ceil((elements.length * pointsOf(frequency_hz)) / 1000),
  },
  solve(given) {
    const frequencies = frequenciesHz(given.frequency_hz);
    refuse([
      ...elementProblems(given.elements),
      ...referenceProblems(given.reference_impedance_ohm),
      ...(given.termination === undefined ? [] : terminationProblems(given.termination, frequencies, '/termination')),
      ...sizeProblems(given.elements.length, frequencies.length),
    ]);
    const columns = new ResultColumns();
    const models = given.elements.map((each, index) => ('line' in each ? lineOverFrequency(each.line, frequencies, `/elements/${index}/line`) : undefined));
    const lines = models.filter((each) => each !== undefined);
    const { result, turns } = compute(given, models, frequencies, columns);
    return {
      result,
      methods: mergeMethods([...methodsOf(given.elements).map((method) => ({ method, inRange: true })), ...lines.flatMap((each) => each.methods)]),
      warnings: [...columns.warnings, ...turnWarnings(turns, '/elements'), ...lines.flatMap((each) => each.warnings)].slice(0, 100),
    };
  },
  examples: [
    {
      name: 'A third-order low-pass filter: 50 ohm, 0.5 dB ripple, 100 MHz',
      input: {
        elements: [
          { kind: 'shunt', capacitance_f: 5.0812e-11 },
          { kind: 'series', inductance_h: 8.7273e-8 },
          { kind: 'shunt', capacitance_f: 5.0812e-11 },
        ],
        frequency_hz: { start: 1e6, stop: 301e6, points: 301 },
      },
      expected: [{ pointer: '/insertion_loss_db/99', value: 0.5 }],
      tolerance: 1e-3,
      source: 'Loss at the edge of an equal-ripple filter is its ripple; element values 1.5963, 1.0967, 1.5963 to their four decimals (Pozar, 4th ed., table 8.4, from memory)',
    },
    {
      name: 'A quarter-wave open stub shorts the path',
      input: { elements: [{ kind: 'open_stub', line: { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 }, length_m: 0.749481145 }], frequency_hz: 100e6 },
      expected: [
        { pointer: '/s/s11/re/0', value: -1 },
        { pointer: '/abcd/c/re/0', value: null },
      ],
      tolerance: 1e-12,
      source: 'Input of an open line, -j Zc cot(beta l) (Pozar, 4th ed., equation 2.46, from memory)',
    },
  ],
});

type Input = z.output<typeof input>;

function refuse(problems: readonly InputProblem[]): void {
  if (problems.length > 0) throw new ImpossibleInput(problems);
}

function sizeProblems(elements: number, points: number): InputProblem[] {
  if (elements * points <= mostElementPoints) return [];
  return [{ pointer: '/frequency_hz', code: 'too_large', detail: `frequency_hz must have at most ${Math.floor(mostElementPoints / elements)} points for ${elements} elements; got ${points}` }];
}

function methodsOf(elements: readonly Element[]): Method[] {
  const hasLines = elements.some((each) => 'line' in each);
  const hasParts = elements.some((each) => each.kind === 'series' || each.kind === 'shunt');
  return [transmissionMatrix, twoPortConversion, powerWaves, ...(hasLines ? [telegrapherTwoPort] : []), ...(hasParts ? [lumpedImpedance] : [])];
}

function compute({ elements, reference_impedance_ohm, termination: closedBy, include }: Input, models: readonly (LineModel | undefined)[], frequencies: Float64Array, columns: ResultColumns) {
  const omega = frequencies.map((each) => 2 * Math.PI * each);
  return inSpaceOf(frequencies.length, (space) => {
    const two = elements.map((each, index) => elementTwoPort(space, each, models[index]?.constants, frequencies, omega)).reduce((first, second) => chain(space, first, second));
    const [reference1, reference2] = portReferences(reference_impedance_ohm);
    const z1 = space.constant(reference1);
    const z2 = space.constant(reference2);
    const waves = scattering(space, two, z1, z2);

    const rounding = roundingOfEntries(space, two, waves, z1, z2);
    const factorMagnitude = magnitudes(space, two.factor);
    const blocked = (index: number) => factorMagnitude[index] === 0;
    const gone = (name: 'b' | 'c') => {
      const magnitude = magnitudes(space, two[name]);
      return (index: number) => magnitude[index] <= vanishing * rounding[name][index];
    };

    const closed = closedBy === undefined ? impedance(space, reference2) : terminationOnePort(space, closedBy, frequencies, omega, space.column(z2));
    const V = two.a.mul(closed.v).add(two.b.mul(closed.i));
    const I = two.c.mul(closed.v).add(two.d.mul(closed.i));
    const currentSize = magnitudes(space, I);
    const currentScale = rounding.c.map((each, index) => each * closed.vScale[index] + rounding.d[index] * closed.iScale[index]);
    const atReference = reflection(space, two.a.mul(z2).add(two.b), two.c.mul(z2).add(two.d), z1);

    const s21 = withScale(two, space.column(waves.forward));
    const s11 = space.column(waves.s11);
    const s22 = space.column(waves.s22);
    const delay = space.column(waves.denominatorSlope.div(waves.denominator)).im;
    const noPassage = 'so little passes that the value is not finite';
    const wanted = new Set(include);

    const result = {
      frequency_hz: finiteColumn(frequencies),
      ...(wanted.has('abcd') && {
        abcd: named(['a', 'b', 'c', 'd'], Object.values(mapFour({ a: two.a, b: two.b, c: two.c, d: two.d }, (each) => withoutScale(two, space.column(each.div(two.factor))))), (name, column) =>
          columns.complex(column, { pointer: `/abcd/${name}`, code: 'does_not_exist', reason: noPassage }, blocked),
        ),
      }),
      ...(wanted.has('s') && {
        s: named(['s11', 's12', 's21', 's22'], [s11, s21, s21, s22], (name, column) => columns.complex(column, { pointer: `/s/${name}`, code: 'does_not_exist', reason: 'the chain drives its own references, so there is no finite answer' })),
      }),
      ...(wanted.has('z') && {
        z: named(['z11', 'z12', 'z21', 'z22'], [space.column(two.a.div(two.c)), withScale(two, space.column(two.factor.div(two.c))), withScale(two, space.column(two.factor.div(two.c))), space.column(two.d.div(two.c))], (name, column) =>
          columns.complex(column, { pointer: `/z/${name}`, code: 'does_not_exist', reason: 'no current is left with open ports, so there are no impedance parameters' }, gone('c')),
        ),
      }),
      ...(wanted.has('y') && {
        y: named(['y11', 'y12', 'y21', 'y22'], [space.column(two.d.div(two.b)), withScale(two, space.column(two.factor.neg().div(two.b))), withScale(two, space.column(two.factor.neg().div(two.b))), space.column(two.a.div(two.b))], (name, column) =>
          columns.complex(column, { pointer: `/y/${name}`, code: 'does_not_exist', reason: 'no voltage is left with shorted ports, so there are no admittance parameters' }, gone('b')),
        ),
      }),
      ...(wanted.has('t') && {
        t: named(['t11', 't12', 't21', 't22'], Object.values(transferScattering(space, two, z1, z2)).map((each) => withoutScale(two, space.column(each.div(two.factor)))), (name, column) =>
          columns.complex(column, { pointer: `/t/${name}`, code: 'does_not_exist', reason: noPassage }, blocked),
        ),
        t_order: tOrder,
      }),
      input_impedance_ohm: columns.complex(space.column(V.div(I)), { pointer: '/input_impedance_ohm', code: 'pole', reason: 'no current enters, so the impedance is infinite' }, (index) => currentSize[index] <= vanishing * currentScale[index]),
      insertion_loss_db: columns.real(insertionLossDb(space, two, waves), { pointer: '/insertion_loss_db', code: 'nothing_passes', reason: 'nothing passes, so the loss is infinite' }, blocked),
      return_loss_db: columns.real(returnLossDb(atReference), { pointer: '/return_loss_db', code: 'no_reflection', reason: 'nothing is reflected, so the return loss is infinite' }),
      group_delay_s: columns.real(delay, { pointer: '/group_delay_s', code: 'nothing_passes', reason: 'nothing passes, so there is no delay' }, blocked),
      reciprocal: true,
      passive: isPassive(s11, s21, s22),
    };
    return { result, turns: two.roundings };
  });
}

interface Parts {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

function isPassive(s11: Parts, s21: Parts, s22: Parts): boolean {
  const at = ({ re, im }: Parts, index: number) => [re[index], im[index]] as const;
  return s11.re.every((_, index) => {
    const gain = largestGain(at(s11, index), at(s21, index), at(s22, index));
    // Where S has no value the chain and its references oscillate, which no passive chain can.
    return gain <= 1 + passiveRounding;
  });
}

function named<Name extends string, Column, Written>(names: readonly Name[], values: readonly Column[], write: (name: Name, column: Column) => Written): Record<Name, Written> {
  return Object.fromEntries(names.map((name, index) => [name, write(name, values[index])])) as Record<Name, Written>;
}
