/** What becomes of the power a source has to give: mismatch at the source, loss along the line, and what the termination gets. */
import { z } from 'zod';
import { defineCalculation, mergeMethods, type Warning } from '../../calculation';
import { ImpossibleInput, type InputProblem } from '../../errors';
import { line, lineMethods, lineOverFrequency } from '../../lines/line';
import type { LineConstants } from '../../lines/line-constants';
import { turnWarnings } from '../../lines/line-warnings';
import { lineLoss, lossesOfLine } from '../../methods/line-loss';
import { profile } from '../../methods/line-profile';
import { telegrapherTwoPort } from '../../methods/line-two-port';
import { lumpedImpedance } from '../../methods/one-port';
import { mismatchLossDb, powerWaves, reflection } from '../../methods/reflection';
import { placesOfHighestVoltage, standingWaves } from '../../methods/standing-wave';
import { propagation } from '../../methods/telegrapher';
import { frequencyColumn, nullableColumn, realColumn } from '../../nouns/columns';
import { complexNumber, complexParts } from '../../nouns/complex-number';
import { frequenciesHz, frequency, pointsOf } from '../../nouns/frequency';
import { lineLength } from '../../nouns/line-length';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';
import { hasParts, termination, terminationOnePort, terminationProblems } from '../../nouns/termination';
import { inSpaceOf, magnitudes } from '../../numeric/phasor';

const input = z
  .strictObject({
    line,
    length_m: lineLength(3.2),
    termination,
    frequency_hz: frequency,
    source_impedance_ohm: complexNumber.default(50).meta({ title: 'Source impedance', description: 'Inside the source; its real part must be greater than 0.', examples: [50], 'x-unit': 'ohm' }),
    available_power_w: z.number().gt(0).max(1e12).default(1).meta({ title: 'Available power', description: 'What the source gives into the conjugate of its own impedance; greater than 0.', examples: [1], 'x-unit': 'W' }),
  })
  .meta({ id: 'PowerBudgetInput', title: 'Power budget', description: 'A source, a line, what closes it, and the frequencies to look at it.' });

const loss = { 'x-plot': 'rectangular', 'x-plot-group': 'Losses' };

const output = z
  .strictObject({
    frequency_hz: frequencyColumn,
    available_power_w: realColumn.meta({ title: 'Available power', description: 'What the source could give.', examples: [[1]], 'x-unit': 'W' }),
    power_into_line_w: nullableColumn.meta({ title: 'Power into the line', description: 'What enters the line; negative where it comes back.', examples: [[0.9]], 'x-unit': 'W', 'x-plot': 'rectangular', 'x-plot-group': 'Power' }),
    power_delivered_w: nullableColumn.meta({ title: 'Power delivered', description: 'What the termination takes in; negative where it gives.', examples: [[0.87]], 'x-unit': 'W', 'x-figure': 1, 'x-plot': 'rectangular', 'x-plot-group': 'Power' }),
    matched_line_loss_db: realColumn.meta({ title: 'Matched line loss', description: 'Loss of the line closed by its own impedance: 8.686 alpha l.', examples: [[0.1]], 'x-unit': 'dB', 'x-figure': 3, ...loss }),
    total_line_loss_db: nullableColumn.meta({ title: 'Total line loss', description: '10 log10 of power into the line over power delivered; null where nothing is delivered.', examples: [[0.15]], 'x-unit': 'dB', 'x-figure': 4, ...loss }),
    additional_loss_db: nullableColumn.meta({ title: 'Additional loss', description: 'Total less matched: what the standing wave costs; may be negative where the line’s impedance is complex.', examples: [[0.05]], 'x-unit': 'dB' }),
    source_mismatch_loss_db: nullableColumn.meta({ title: 'Source mismatch loss', description: 'What the reflection at the source costs: -10 log10(1 - |Gamma|^2).', examples: [[0.45]], 'x-unit': 'dB', 'x-figure': 5, ...loss }),
    transducer_loss_db: nullableColumn.meta({ title: 'Transducer loss', description: '10 log10 of available power over power delivered.', examples: [[0.6]], 'x-unit': 'dB', 'x-figure': 2, ...loss }),
    peak_voltage_v: nullableColumn.meta({ title: 'Peak voltage', description: 'The highest peak voltage anywhere on the line: sqrt(2) times the largest root mean square.', examples: [[12.6]], 'x-unit': 'V', 'x-figure': 6, 'x-plot': 'rectangular', 'x-plot-group': 'Peak voltage' }),
  })
  .meta({ id: 'PowerBudgetResult', title: 'Power budget', description: 'Powers and losses over frequency.' });

type Input = z.output<typeof input>;

export const powerBudget = defineCalculation({
  id: 'power-budget',
  group: 'terminations',
  title: 'Power budget',
  summary: 'Power into a line and delivered to its termination, loss with and without the standing wave, mismatch at the source, and the peak voltage on the line.',
  input,
  output,
  methods: [lineLoss, powerWaves, telegrapherTwoPort, standingWaves, lumpedImpedance, ...lineMethods],
  cost: { rule: '1 unit per started 1,000 points', units: ({ frequency_hz }) => Math.ceil(pointsOf(frequency_hz) / 1000) },
  solve(given) {
    const frequencies = frequenciesHz(given.frequency_hz);
    const problems = [...terminationProblems(given.termination, frequencies, '/termination'), ...sourceProblems(given)];
    if (problems.length > 0) throw new ImpossibleInput(problems);
    const model = lineOverFrequency(given.line, frequencies);
    const { result, warnings } = compute(given, model.constants, frequencies);
    const methods = [lineLoss, powerWaves, telegrapherTwoPort, standingWaves, ...(hasParts(given.termination) ? [lumpedImpedance] : [])];
    return { result, methods: mergeMethods([...methods.map((method) => ({ method, inRange: true })), ...model.methods]), warnings: [...warnings, ...model.warnings].slice(0, 100) };
  },
  examples: [
    {
      name: 'Half a wave of ideal line into 150 ohm',
      input: { line: { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 }, length_m: 1.49896229, termination: 150, frequency_hz: 100e6, source_impedance_ohm: 50, available_power_w: 100 },
      expected: [
        { pointer: '/power_delivered_w/0', value: 75 },
        { pointer: '/source_mismatch_loss_db/0', value: -10 * Math.log10(0.75) },
        { pointer: '/total_line_loss_db/0', value: 0 },
        { pointer: '/peak_voltage_v/0', value: 150 },
      ],
      tolerance: 1e-12,
      source: 'Gamma = 1/2, so 1 - |Gamma|^2 = 3/4 is taken in; 75 W in 150 ohm are 106 V root mean square, 150 V at the peak, the highest on the line (Pozar, 4th ed., section 2.3, from memory)',
    },
    {
      name: 'A feeder of 100 m with 6 dB of matched loss and a VSWR of 3 at the antenna',
      input: {
        // Heaviside's condition: alpha = sqrt(R G) = 0.3/(8.685889638 x 5) Np/m and Zc = 50 ohm.
        line: { kind: 'rlgc', resistance_ohm_per_m: 0.34538776394910684, inductance_h_per_m: 2.5e-7, conductance_s_per_m: 0.00013815510557964275, capacitance_f_per_m: 1e-10 },
        length_m: 100,
        termination: 150,
        frequency_hz: 14e6,
        available_power_w: 100,
      },
      expected: [
        { pointer: '/matched_line_loss_db/0', value: 6 },
        { pointer: '/additional_loss_db/0', value: 10 * Math.log10((10 ** 0.6 - 0.25 * 10 ** -0.6) / 0.75) - 6 },
        { pointer: '/total_line_loss_db/0', value: 10 * Math.log10((10 ** 0.6 - 0.25 * 10 ** -0.6) / 0.75) },
      ],
      tolerance: 1e-12,
      source: 'Loss of a mismatched line with a real impedance, 10 log10((a^2 - |Gamma|^2)/(a (1 - |Gamma|^2))) with a = 10^0.6 and |Gamma| = 1/2 (any handbook of radio amateurs or of microwaves, from memory)',
    },
  ],
});

function sourceProblems({ source_impedance_ohm }: Input): InputProblem[] {
  const { re } = complexParts(source_impedance_ohm);
  if (re > 0) return [];
  return [{ pointer: '/source_impedance_ohm', code: 'source_without_resistance', detail: `source_impedance_ohm must have a real part greater than 0, or no power is available; got ${re}` }];
}

/** A few units of rounding: what is left of a sum of this size where it ought to vanish. */
const vanishing = 8 * Number.EPSILON;

function compute({ length_m: length, termination: closedBy, source_impedance_ohm, available_power_w: available }: Input, constants: LineConstants, frequencies: Float64Array) {
  const waves = propagation(constants, frequencies);
  const zs = complexParts(source_impedance_ohm);
  return inSpaceOf(frequencies.length, (space) => {
    const load = terminationOnePort(space, closedBy, frequencies, waves.omega, waves.characteristicImpedance);
    const v = space.column(load.v);
    const i = space.column(load.i);
    const input = profile(space, constants, waves, frequencies.map(() => length), load);
    const source = space.constant(zs);
    const driven = input.v.add(source.mul(input.i));
    const size = magnitudes(space, driven);
    const sourceSize = magnitudes(space, source);
    const diverges = (index: number) => !(size[index] > vanishing * (input.vScale[index] + sourceSize[index] * input.iScale[index]));
    const seen = reflection(space, input.v, input.i, source, input.power);
    const losses = lossesOfLine(waves, length, v, i, input.dissipated);

    const taken = v.re.map((re, index) => re * i.re[index] + v.im[index] * i.im[index]);
    const arriving = taken.map((each, index) => each * Math.exp(-2 * waves.attenuationNpPerM[index] * length));
    const perSquare = (each: number, index: number) => ((4 * zs.re * available * (each / size[index])) / size[index]) + 0;
    const mismatch = mismatchLossDb(seen);
    const transducer = mismatch.map((each, index) => each + losses.totalDb[index]);
    const places = placesOfHighestVoltage(constants, waves, length, v, i);
    const between = magnitudes(space, profile(space, constants, waves, places, load).v);
    const near = magnitudes(space, input.v);
    const peak = near.map((each, index) => {
      const highest = Math.max(each, between[index] * Math.exp(-waves.attenuationNpPerM[index] * (length - places[index])));
      return Math.sqrt(8 * zs.re * available) * (highest / size[index]);
    });

    const columns = new ResultColumns();
    const unbounded = (pointer: string) => ({ pointer, code: 'no_value', reason: 'source and termination sustain themselves, so there is no finite value' });
    const nothing = (pointer: string) => ({ pointer, code: 'nothing_delivered', reason: 'the termination takes in no power, so there is no finite ratio' });
    const result = {
      frequency_hz: finiteColumn(frequencies),
      available_power_w: finiteColumn(frequencies.map(() => available)),
      power_into_line_w: columns.real(input.power.map(perSquare), unbounded('/power_into_line_w'), diverges),
      power_delivered_w: columns.real(arriving.map(perSquare), unbounded('/power_delivered_w'), diverges),
      matched_line_loss_db: finiteColumn(losses.matchedDb),
      total_line_loss_db: columns.real(losses.totalDb, nothing('/total_line_loss_db')),
      additional_loss_db: columns.real(losses.additionalDb, nothing('/additional_loss_db')),
      source_mismatch_loss_db: columns.real(mismatch, { pointer: '/source_mismatch_loss_db', code: 'whole_reflection', reason: 'no power enters the line, so there is no finite ratio' }, diverges),
      transducer_loss_db: columns.real(transducer, nothing('/transducer_loss_db'), diverges),
      peak_voltage_v: columns.real(peak, unbounded('/peak_voltage_v'), diverges),
    };
    const warnings: Warning[] = [...columns.warnings, ...activeWarnings(taken), ...negativeWarnings(losses.additionalDb), ...turnWarnings(waves.phaseRadPerM.map((each) => each * length), '/length_m')];
    return { result, warnings };
  });
}

function activeWarnings(taken: Float64Array): Warning[] {
  const index = taken.findIndex((each) => each < 0);
  return index < 0 ? [] : [{ code: 'active_termination', pointer: '/termination', detail: `the termination gives power instead of taking it, first at index ${index}; power_delivered_w is negative there` }];
}

function negativeWarnings(additionalDb: Float64Array): Warning[] {
  const index = additionalDb.findIndex((each) => each < 0);
  return index < 0 ? [] : [{ code: 'negative_additional_loss', pointer: '/additional_loss_db', detail: `less is lost than with a matched termination, first at index ${index}; with a complex characteristic impedance that is physical` }];
}
