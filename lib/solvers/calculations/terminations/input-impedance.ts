import { z } from 'zod';
import { defineCalculation, mergeMethods } from '../../calculation';
import { ImpossibleInput } from '../../errors';
import { line, lineMethods, lineOverFrequency } from '../../lines/line';
import type { LineConstants } from '../../lines/line-constants';
import { turnWarnings } from '../../lines/line-warnings';
import { powerIntoLine } from '../../methods/line-power';
import { lineTwoPort, telegrapherTwoPort } from '../../methods/line-two-port';
import { impedanceColumn, lumpedImpedance, oddScaleOf, type OnePort } from '../../methods/one-port';
import { powerWaves, reflection, returnLossDb, standingWaveRatio } from '../../methods/reflection';
import { propagation } from '../../methods/telegrapher';
import { complexColumn, frequencyColumn, nullableColumn } from '../../nouns/columns';
import { complexParts, type ComplexNumber } from '../../nouns/complex-number';
import { frequenciesHz, frequency, pointsOf } from '../../nouns/frequency';
import { lineLength } from '../../nouns/line-length';
import { referenceImpedance, referenceProblems } from '../../nouns/reference-impedance';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';
import { hasParts, termination, terminationOnePort, terminationProblems, type Termination } from '../../nouns/termination';
import { inSpaceOf, magnitudes, type Phasor, type Space } from '../../numeric/phasor';

const input = z
  .strictObject({
    line,
    length_m: lineLength(3.2),
    termination,
    frequency_hz: frequency,
    reference_impedance_ohm: referenceImpedance,
  })
  .meta({ id: 'InputImpedanceInput', title: 'Input impedance', description: 'A line, what closes it, and the frequencies to look at it.' });

const reflectionMeta = { 'x-plot': 'smith', 'x-plot-group': 'Reflection' };

const output = z
  .strictObject({
    frequency_hz: frequencyColumn,
    input_impedance_ohm: complexColumn.meta({ title: 'Input impedance', description: 'Impedance at the near end; null at a pole.', examples: [{ re: [69.8], im: [-31.5] }], 'x-unit': 'ohm', 'x-figure': 1, 'x-plot': 'rectangular', 'x-plot-group': 'Input impedance' }),
    input_admittance_s: complexColumn.meta({ title: 'Input admittance', description: 'Admittance at the near end; null at a pole.', examples: [{ re: [0.0119], im: [0.0054] }], 'x-unit': 'S' }),
    characteristic_impedance_ohm: complexColumn.meta({ title: 'Characteristic impedance', description: 'Zc of the line; null where it is infinite.', examples: [{ re: [50], im: [-0.02] }], 'x-unit': 'ohm' }),
    reflection_at_termination: complexColumn.meta({ title: 'Reflection at termination', description: 'To the line’s own impedance, at the far end.', examples: [{ re: [0.25], im: [-0.18] }] }),
    reflection_at_input: complexColumn.meta({ title: 'Reflection at input', description: 'To the line’s own impedance, at the near end.', examples: [{ re: [0.22], im: [-0.21] }] }),
    reflection_at_reference: complexColumn.meta({ title: 'Reflection', description: 'At the near end, as a power wave to the reference impedance.', examples: [{ re: [0.22], im: [-0.21] }], 'x-figure': 2, ...reflectionMeta }),
    vswr: nullableColumn.meta({ title: 'VSWR', description: 'Of the reflection at the reference; null where the reflection is whole or more.', examples: [[1.86]], 'x-figure': 3, 'x-plot': 'rectangular', 'x-plot-group': 'VSWR' }),
    return_loss_db: nullableColumn.meta({ title: 'Return loss', description: 'Of the reflection at the reference; null where there is none.', examples: [[10.45]], 'x-unit': 'dB', 'x-figure': 4, 'x-plot': 'rectangular', 'x-plot-group': 'Return loss' }),
  })
  .meta({ id: 'InputImpedanceResult', title: 'Input impedance', description: 'Input impedance and reflection over frequency.' });

/** A few units of rounding: what is left of a sum of this size where it ought to vanish. */
const vanishing = 8 * Number.EPSILON;

export const inputImpedance = defineCalculation({
  id: 'input-impedance',
  group: 'terminations',
  title: 'Input impedance',
  summary: 'Input impedance and admittance of a terminated line over frequency, with the reflection at both ends, VSWR and return loss.',
  input,
  output,
  methods: [telegrapherTwoPort, powerWaves, lumpedImpedance, ...lineMethods],
  cost: { rule: '1 unit per started 1,000 points', units: ({ frequency_hz }) => Math.ceil(pointsOf(frequency_hz) / 1000) },
  solve(given) {
    const frequencies = frequenciesHz(given.frequency_hz);
    const problems = [...terminationProblems(given.termination, frequencies, '/termination'), ...referenceProblems(given.reference_impedance_ohm)];
    if (problems.length > 0) throw new ImpossibleInput(problems);
    const model = lineOverFrequency(given.line, frequencies);
    const { result, warnings } = compute(model.constants, given.length_m, given.termination, frequencies, given.reference_impedance_ohm);
    const methods = hasParts(given.termination) ? [telegrapherTwoPort, powerWaves, lumpedImpedance] : [telegrapherTwoPort, powerWaves];
    return { result, methods: mergeMethods([...methods.map((method) => ({ method, inRange: true })), ...model.methods]), warnings: [...warnings, ...model.warnings] };
  },
  examples: [
    {
      name: 'A cable of 3.2 m closed by 75 - 30j ohm',
      input: {
        line: { kind: 'rlgc', resistance_ohm_per_m: 0.12, inductance_h_per_m: 2.5e-7, conductance_s_per_m: 2.5e-5, capacitance_f_per_m: 1e-10 },
        length_m: 3.2,
        termination: { re: 75, im: -30 },
        frequency_hz: { start: 10e6, stop: 200e6, points: 401 },
      },
      expected: [
        { pointer: '/input_impedance_ohm/re/0', value: 28.1141262705866934 },
        { pointer: '/input_impedance_ohm/im/0', value: -8.81175133851154201 },
        { pointer: '/vswr/0', value: 1.85767862754880462 },
        { pointer: '/input_impedance_ohm/re/400', value: 26.9103994901571435 },
        { pointer: '/return_loss_db/400', value: 10.4510393766866997 },
      ],
      tolerance: 1e-12,
      source: 'matrix exponential of the telegrapher equations, computed to 30 digits',
    },
    {
      name: 'A quarter wave turns 25 ohm into 100 ohm',
      input: { line: { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 }, length_m: 0.749481145, termination: 25, frequency_hz: 100e6 },
      expected: [
        { pointer: '/input_impedance_ohm/re/0', value: 100 },
        { pointer: '/reflection_at_termination/re/0', value: -1 / 3 },
        { pointer: '/vswr/0', value: 2 },
      ],
      tolerance: 1e-12,
      source: 'Quarter-wave transformer, Zin = Zc^2/ZL (Pozar, 4th ed., section 2.5, from memory)',
    },
  ],
});

function compute(constants: LineConstants, lengthM: number, closedBy: Termination, frequencies: Float64Array, referenceOhm: ComplexNumber) {
  const waves = propagation(constants, frequencies);
  const { omega, characteristicImpedance: Zc } = waves;
  const columns = new ResultColumns();
  const turns = waves.phaseRadPerM.map((each) => each * lengthM);
  const result = inSpaceOf(frequencies.length, (space) => {
    const two = lineTwoPort(space, constants, waves, lengthM);
    const load = terminationOnePort(space, closedBy, frequencies, omega, Zc);
    const V = two.even.mul(load.v).add(two.series.mul(load.i));
    const I = two.shunt.mul(load.v).add(two.even.mul(load.i));

    const trip = magnitudes(space, two.roundTrip);
    const evenScale = trip.map((p, index) => 0.5 * (1 + p) * two.sensitivity[index]);
    const seriesScale = oddScaleOf(space, two, two.series);
    const shuntScale = oddScaleOf(space, two, two.shunt);
    const sizeV = magnitudes(space, V);
    const sizeI = magnitudes(space, I);
    const noVoltage = (index: number) => sizeV[index] <= vanishing * (evenScale[index] * load.vScale[index] + seriesScale[index] * load.iScale[index]);
    const noCurrent = (index: number) => sizeI[index] <= vanishing * (shuntScale[index] * load.vScale[index] + evenScale[index] * load.iScale[index]);

    const own = impedanceColumn(space, Zc.re, Zc.im, Zc.infinite);
    const atTermination = farReflection(space, load, own, closedBy === 'matched');
    const power = powerIntoLine(constants, waves, lengthM, space.column(load.v), space.column(load.i));
    const atReference = reflection(space, V, I, space.constant(complexParts(referenceOhm)), power);
    return {
      frequency_hz: finiteColumn(frequencies),
      input_impedance_ohm: columns.complex(space.column(V.div(I)), { pointer: '/input_impedance_ohm', code: 'pole', reason: 'no current enters, so the impedance is infinite' }, noCurrent),
      input_admittance_s: columns.complex(space.column(I.div(V)), { pointer: '/input_admittance_s', code: 'pole', reason: 'no voltage stands at the input, so the admittance is infinite' }, noVoltage),
      characteristic_impedance_ohm: columns.complex(Zc, { pointer: '/characteristic_impedance_ohm', code: 'infinite_impedance', reason: 'nothing flows between the conductors, so the characteristic impedance has no finite value' }),
      reflection_at_termination: columns.complex(space.column(atTermination), { pointer: '/reflection_at_termination', code: 'no_value', reason: 'there is no forward wave to compare with' }),
      reflection_at_input: columns.complex(space.column(atTermination.mul(two.roundTrip)), { pointer: '/reflection_at_input', code: 'no_value', reason: 'there is no forward wave to compare with' }),
      reflection_at_reference: columns.complex(space.column(atReference.gamma), { pointer: '/reflection_at_reference', code: 'no_value', reason: 'there is no forward wave to compare with' }),
      vswr: columns.real(standingWaveRatio(atReference), { pointer: '/vswr', code: 'whole_reflection', reason: 'the reflection is whole or more, so there is no finite ratio' }),
      return_loss_db: columns.real(returnLossDb(atReference), { pointer: '/return_loss_db', code: 'no_reflection', reason: 'nothing is reflected, so the return loss is infinite' }),
    };
  });
  return { result, warnings: [...columns.warnings, ...turnWarnings(turns, '/length_m')] };
}

/**
 * (ZL - Zc)/(ZL + Zc) with ZL = v/i and Zc in the same form. The trap: at direct current Zc may be infinite or 0, and so may ZL; both
 * terms of the sum vanish, and the limit from above is 1 for an open, -1 for a short, and 0 for the line's own impedance.
 */
function farReflection<T extends Phasor<T>>(space: Space<T>, load: OnePort<T>, own: OnePort<T>, isMatched: boolean): T {
  if (isMatched) return space.constant(0);
  const fromVoltage = load.v.mul(own.i);
  const fromCurrent = own.v.mul(load.i);
  const vanishes = (value: T) => Uint8Array.from(magnitudes(space, value), (each) => (each === 0 ? 1 : 0));
  const noVoltage = vanishes(fromVoltage);
  const noCurrent = vanishes(fromCurrent);
  const isLimit = noVoltage.map((each, index) => each & noCurrent[index]);
  const limit = space.pick(vanishes(load.i), space.constant(1), space.constant(-1));
  return space.pick(isLimit, limit, fromVoltage.sub(fromCurrent).div(fromVoltage.add(fromCurrent)));
}
