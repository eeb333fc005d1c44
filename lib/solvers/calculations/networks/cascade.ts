import { z } from 'zod';
import { defineCalculation, mergeMethods, type Warning } from '../../calculation';
import { chainTwoPort, elementProblems, modelsOf, workOf, type ChainModels } from '../../elements/chain-of-elements';
import { elementList } from '../../elements/element';
import { ImpossibleInput, type InputProblem } from '../../errors';
import { lineMethods } from '../../lines/line';
import { turnWarnings } from '../../lines/line-warnings';
import { telegrapherTwoPort } from '../../methods/line-two-port';
import { impedance, lumpedImpedance, type OnePort } from '../../methods/one-port';
import { powerWaves, reflection, returnLossDb } from '../../methods/reflection';
import { stability, stabilityFactors } from '../../methods/stability';
import { mapFour, transmissionMatrix, type TwoPort } from '../../methods/two-port';
import {
  insertionLossDb,
  largestGain,
  oscillates,
  roundingOfEntries,
  scattering,
  tOrder,
  transferScattering,
  twoPortConversion,
  vanishing,
  withBackwardScale,
  withoutScale,
  withScale,
} from '../../methods/two-port-parameters';
import { complexColumn, frequencyColumn, nullableColumn } from '../../nouns/columns';
import { frequenciesHz, frequency, pointsOf } from '../../nouns/frequency';
import { portReferenceImpedances, portReferences, referenceProblems } from '../../nouns/reference-impedance';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';
import { termination, terminationOnePort, terminationProblems } from '../../nouns/termination';
import { twoPortColumns } from '../../nouns/two-port-values';
import { inSpaceOf, magnitudes, type Phasor, type Space } from '../../numeric/phasor';

/** Some tenths of a second of one core, which other calls wait for. */
const mostElementPoints = 400_000;

const input = z
  .strictObject({
    elements: elementList,
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

const output = z
  .strictObject({
    frequency_hz: frequencyColumn,
    abcd: twoPortColumns.abcd.optional(),
    s: twoPortColumns.s.optional(),
    z: twoPortColumns.z.optional(),
    y: twoPortColumns.y.optional(),
    t: twoPortColumns.t.optional(),
    t_order: z.literal(tOrder).optional().meta({ title: 'Order of T', description: 'Which waves T joins.', examples: [tOrder] }),
    input_impedance_ohm: complexColumn.meta({ title: 'Input impedance', description: 'At port 1, with port 2 closed; null at a pole.', examples: [{ re: [50], im: [0] }], 'x-unit': 'ohm', 'x-figure': 4, 'x-plot': 'rectangular', 'x-plot-group': 'Input impedance' }),
    insertion_loss_db: nullableColumn.meta({ title: 'Insertion loss', description: '-20 log10 |S21|.', examples: [[0.4]], 'x-unit': 'dB', 'x-figure': 1, 'x-plot': 'rectangular', 'x-plot-group': 'Insertion and return loss' }),
    return_loss_db: nullableColumn.meta({ title: 'Return loss', description: '-20 log10 |S11|.', examples: [[22]], 'x-unit': 'dB', 'x-figure': 2, 'x-plot': 'rectangular', 'x-plot-group': 'Insertion and return loss' }),
    group_delay_s: nullableColumn.meta({ title: 'Group delay', description: '-d arg(S21)/d omega.', examples: [[5e-9]], 'x-unit': 's', 'x-figure': 5, 'x-plot': 'rectangular', 'x-plot-group': 'Group delay' }),
    rollett_stability_factor: nullableColumn.meta({
      title: 'Rollett factor',
      description: 'K, the same for all references; null where nothing passes one way.',
      examples: [[1.2]],
    }),
    stability_measure: nullableColumn.meta({
      title: 'Stability measure',
      description: 'mu of Edwards and Sinsky: above 1 no passive termination makes the chain oscillate; of a passive chain at least 1. Null where it is infinite.',
      examples: [[1.1]],
    }),
    reciprocal: z.boolean().meta({ title: 'Reciprocal', description: 'S12 = S21.', examples: [true] }),
    passive: z.boolean().meta({ title: 'Passive', description: 'No more power comes out than goes in, at every frequency asked for.', examples: [true] }),
  })
  .meta({ id: 'CascadeResult', title: 'Cascade', description: 'What a chain of elements does over frequency.' });

/** Rounding of S over the longest chain. */
const passiveRounding = 1e-12;

export const cascade = defineCalculation({
  id: 'cascade',
  group: 'networks',
  title: 'Cascade',
  summary: 'ABCD, S, Z, Y and T parameters, input impedance, insertion and return loss, group delay and stability of a chain of elements over frequency.',
  input,
  output,
  methods: [transmissionMatrix, twoPortConversion, powerWaves, stabilityFactors, telegrapherTwoPort, lumpedImpedance, ...lineMethods],
  cost: {
    rule: '1 unit per started 1,000 element-points: elements times frequencies, those of a repeated cascade once and up to 18 more for the repeating',
    units: ({ elements, frequency_hz }) => Math.ceil((workOf(elements) * pointsOf(frequency_hz)) / 1000),
  },
  solve(given) {
    const frequencies = frequenciesHz(given.frequency_hz);
    refuse([
      ...elementProblems(given.elements, frequencies.length),
      ...referenceProblems(given.reference_impedance_ohm),
      ...(given.termination === undefined ? [] : terminationProblems(given.termination, frequencies, '/termination')),
      ...sizeProblems(workOf(given.elements), frequencies.length),
    ]);
    const columns = new ResultColumns();
    const models = modelsOf(given.elements, frequencies);
    const { result, warnings } = compute(given, models, frequencies, columns);
    const own = [transmissionMatrix, twoPortConversion, powerWaves, stabilityFactors].map((method) => ({ method, inRange: true }));
    return {
      result,
      methods: mergeMethods([...own, ...models.methods]),
      warnings: [...columns.warnings, ...warnings, ...models.warnings].slice(0, 100),
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
      name: 'Four 10 dB pads, and an isolator by its scattering parameters',
      input: {
        elements: [
          { kind: 'cascade', elements: [{ kind: 'shunt', resistance_ohm: 96.2475 }, { kind: 'series', resistance_ohm: 71.1513 }, { kind: 'shunt', resistance_ohm: 96.2475 }], repeat: 4 },
          { kind: 'two_port', representation: 's', values: { s11: 0, s12: 0.01, s21: 1, s22: 0 } },
        ],
        frequency_hz: 100e6,
      },
      expected: [
        { pointer: '/insertion_loss_db/0', value: 40 },
        { pointer: '/s/s12/re/0', value: 1e-4 },
      ],
      tolerance: 1e-5,
      source: 'Losses of matched two-ports add in decibels; 96.25 and 71.15 ohm for 10 dB in published tables of 50 ohm attenuators (from memory), with the further digits of their formula',
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

function sizeProblems(work: number, points: number): InputProblem[] {
  if (work * points <= mostElementPoints) return [];
  return [{ pointer: '/frequency_hz', code: 'too_large', detail: `frequency_hz must have at most ${Math.floor(mostElementPoints / work)} points for ${work} elements; got ${points}` }];
}

function compute({ elements, reference_impedance_ohm, termination: closedBy, include }: Input, models: ChainModels, frequencies: Float64Array, columns: ResultColumns) {
  const omega = frequencies.map((each) => 2 * Math.PI * each);
  const references = portReferences(reference_impedance_ohm);
  return inSpaceOf(frequencies.length, (space) => {
    const two = chainTwoPort(space, elements, (each) => models.byElement.get(each)?.constants, { frequenciesHz: frequencies, omega, references });
    const z1 = space.constant(references[0]);
    const z2 = space.constant(references[1]);
    const waves = scattering(space, two, z1, z2);
    const oscillating = oscillates(space, two, waves, z1, z2);

    const s11 = space.column(waves.s11);
    const s22 = space.column(waves.s22);
    const s21 = withScale(two, space.column(waves.forward));
    const s12 = two.backward === two.factor ? s21 : withBackwardScale(two, space.column(waves.backward));
    const isPassive = passivity(s11, s12, s21, s22);
    const { rollettFactor, measure } = stability(space, two, z2);

    const rounding = roundingOfEntries(space, two, waves, z1, z2, isPassive);
    const factorMagnitude = magnitudes(space, two.factor);
    const blocked = (index: number) => factorMagnitude[index] === 0;
    const gone = (name: 'b' | 'c') => {
      const magnitude = magnitudes(space, two[name]);
      return (index: number) => magnitude[index] <= vanishing * rounding[name][index];
    };

    const closed = closedBy === undefined ? impedance(space, references[1]) : terminationOnePort(space, closedBy, frequencies, omega, space.column(z2));
    const near = behind(space, two, closed, rounding, blocked);
    const currentSize = magnitudes(space, near.i);
    const atReference = reflection(space, two.a.mul(z2).add(two.b), two.c.mul(z2).add(two.d), z1);

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
        s: named(['s11', 's12', 's21', 's22'], [s11, s12, s21, s22], (name, column) =>
          columns.complex(column, { pointer: `/s/${name}`, code: 'does_not_exist', reason: 'the chain drives its own references, so there is no finite answer' }, (index) => oscillating[index] === 1),
        ),
      }),
      ...(wanted.has('z') && {
        z: named(['z11', 'z12', 'z21', 'z22'], [quotient(space, two.a, two.c), withBackwardScale(two, quotient(space, two.backward, two.c)), withScale(two, quotient(space, two.factor, two.c)), quotient(space, two.d, two.c)], (name, column) =>
          columns.complex(column, { pointer: `/z/${name}`, code: 'does_not_exist', reason: 'no current is left with open ports, so there are no impedance parameters' }, gone('c')),
        ),
      }),
      ...(wanted.has('y') && {
        y: named(['y11', 'y12', 'y21', 'y22'], [quotient(space, two.d, two.b), withBackwardScale(two, quotient(space, two.backward.neg(), two.b)), withScale(two, quotient(space, two.factor.neg(), two.b)), quotient(space, two.a, two.b)], (name, column) =>
          columns.complex(column, { pointer: `/y/${name}`, code: 'does_not_exist', reason: 'no voltage is left with shorted ports, so there are no admittance parameters' }, gone('b')),
        ),
      }),
      ...(wanted.has('t') && {
        t: named(['t11', 't12', 't21', 't22'], Object.values(transferScattering(space, two, z1, z2)).map((each) => withoutScale(two, space.column(each.div(two.factor)))), (name, column) =>
          columns.complex(column, { pointer: `/t/${name}`, code: 'does_not_exist', reason: noPassage }, blocked),
        ),
        t_order: tOrder,
      }),
      input_impedance_ohm: columns.complex(space.column(near.v.div(near.i)), { pointer: '/input_impedance_ohm', code: 'pole', reason: 'no current enters, so the impedance is infinite' }, (index) => currentSize[index] <= vanishing * near.iScale[index]),
      insertion_loss_db: columns.real(insertionLossDb(space, two, waves), { pointer: '/insertion_loss_db', code: 'nothing_passes', reason: 'nothing passes, so the loss is infinite' }, blocked),
      return_loss_db: columns.real(returnLossDb(atReference), { pointer: '/return_loss_db', code: 'no_reflection', reason: 'nothing is reflected, so the return loss is infinite' }),
      group_delay_s: columns.real(delay, { pointer: '/group_delay_s', code: 'nothing_passes', reason: 'nothing passes, so there is no delay' }, blocked),
      rollett_stability_factor: columns.real(rollettFactor, { pointer: '/rollett_stability_factor', code: 'one_way', reason: 'nothing passes one way, so the factor is infinite' }),
      stability_measure: columns.real(measure, { pointer: '/stability_measure', code: 'one_way', reason: 'port 2 reflects nothing and nothing passes one way, so the measure is infinite' }),
      reciprocal: two.isReciprocal || areSame(s12, s21),
      passive: !isPassive.includes(0),
    };
    return { result, warnings: [...turnWarnings(two.roundings, '/elements'), ...activityWarnings(isPassive, measure)] };
  });
}

/**
 * Voltage and current at port 1 with port 2 closed. Where nothing passes, the matrix is of rank 1 and any closing shows the same port 1, but for the
 * one that it takes to nothing: there the clearer column stands for it.
 */
function behind<T extends Phasor<T>>(space: Space<T>, two: TwoPort<T>, closed: OnePort<T>, rounding: TwoPort<T>['size'], blocked: (index: number) => boolean) {
  const v = two.a.mul(closed.v).add(two.b.mul(closed.i));
  const i = two.c.mul(closed.v).add(two.d.mul(closed.i));
  const iScale = rounding.c.map((each, index) => each * closed.vScale[index] + rounding.d[index] * closed.iScale[index]);
  const isBlocked = Uint8Array.from(iScale, (_, index) => (blocked(index) ? 1 : 0));
  if (!isBlocked.includes(1)) return { v, i, iScale };
  const share = (names: readonly ('a' | 'b' | 'c' | 'd')[], index: number) => Math.max(...names.map((name) => (two.size[name][index] > 0 ? sizes[name][index] / two.size[name][index] : 0)));
  const sizes = mapFour({ a: two.a, b: two.b, c: two.c, d: two.d }, (each) => magnitudes(space, each));
  const isFirst = Uint8Array.from(isBlocked, (_, index) => (share(['a', 'c'], index) >= share(['b', 'd'], index) ? 1 : 0));
  return {
    v: space.pick(isBlocked, space.pick(isFirst, two.a, two.b), v),
    i: space.pick(isBlocked, space.pick(isFirst, two.c, two.d), i),
    iScale: iScale.map((each, index) => (isBlocked[index] ? (isFirst[index] ? two.size.c[index] : two.size.d[index]) : each)),
  };
}

function quotient<T extends Phasor<T>>(space: Space<T>, numerator: T, divisor: T) {
  return space.column(numerator.div(divisor));
}

interface Parts {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** 1 where no more power comes out than goes in; where S has no value the chain and its references oscillate, which no passive chain can. */
function passivity(s11: Parts, s12: Parts, s21: Parts, s22: Parts): Uint8Array {
  const at = ({ re, im }: Parts, index: number) => [re[index], im[index]] as const;
  return Uint8Array.from(s11.re, (_, index) => (largestGain(at(s11, index), at(s12, index), at(s21, index), at(s22, index)) <= 1 + passiveRounding ? 1 : 0));
}

function areSame(first: Parts, second: Parts): boolean {
  return first.re.every((re, index) => {
    const size = Math.max(Math.hypot(re, first.im[index]), Math.hypot(second.re[index], second.im[index]));
    return Math.hypot(re - second.re[index], first.im[index] - second.im[index]) <= passiveRounding * size;
  });
}

function activityWarnings(isPassive: Uint8Array, measure: Float64Array): Warning[] {
  const active = indexesWhere(isPassive, (each) => each === 0);
  if (active.length === 0) return [];
  const unstable = active.filter((index) => measure[index] < 1);
  return [
    { code: 'not_passive', pointer: '/passive', detail: `more power can come out than goes in at index ${listed(active)}` },
    ...(unstable.length > 0 ? [{ code: 'conditionally_stable', pointer: '/stability_measure', detail: `some passive terminations make the chain oscillate at index ${listed(unstable)}` }] : []),
  ];
}

function indexesWhere(values: Uint8Array, holds: (value: number) => boolean): number[] {
  return Array.from(values, (each, index) => (holds(each) ? index : -1)).filter((index) => index >= 0);
}

function listed(indexes: readonly number[]): string {
  const shown = indexes.slice(0, 20).join(', ');
  return indexes.length > 20 ? `${shown} and ${indexes.length - 20} more` : shown;
}

function named<Name extends string, Column, Written>(names: readonly Name[], values: readonly Column[], write: (name: Name, column: Column) => Written): Record<Name, Written> {
  return Object.fromEntries(names.map((name, index) => [name, write(name, values[index])])) as Record<Name, Written>;
}
