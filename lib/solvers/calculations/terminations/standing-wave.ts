/** Voltage, current and power along a driven line, with the maxima and minima of the voltage. */
import { z } from 'zod';
import { defineCalculation, mergeMethods, type Warning } from '../../calculation';
import { ImpossibleInput, type InputProblem } from '../../errors';
import { line, lineMethods, lineOverFrequency } from '../../lines/line';
import type { LineConstants } from '../../lines/line-constants';
import { turnWarnings } from '../../lines/line-warnings';
import { drivenProfile, loadOf, type DrivenProfile } from '../../methods/line-profile';
import { telegrapherTwoPort } from '../../methods/line-two-port';
import { lumpedImpedance } from '../../methods/one-port';
import { standingWaves, terminatedLine, voltageExtrema, waveRatio, type Extremum } from '../../methods/standing-wave';
import { propagation, type Propagation } from '../../methods/telegrapher';
import type { TerminatedLine } from '../../methods/voltage-slope';
import { complexForms, complexNumber, complexParts } from '../../nouns/complex-number';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';
import { hasParts, termination, terminationOnePort, terminationProblems } from '../../nouns/termination';
import { inSpaceOf, magnitude } from '../../numeric/phasor';

const mostPlaces = 20_001;
/** More would not be read, and a long line may have millions. */
const mostExtrema = 1000;

const input = z
  .strictObject({
    line,
    length_m: z.number().gt(0).max(1e9).meta({ title: 'Length', description: 'Length of the line.', examples: [3.2], 'x-unit': 'm' }),
    termination,
    frequency_hz: z.number().min(0).max(1e15).meta({ title: 'Frequency', description: 'One frequency; 0 is direct current.', examples: [100e6], 'x-unit': 'Hz' }),
    source_voltage_v: z
      .union([z.number().gt(0).max(1e12).meta({ title: 'Real number', description: 'A voltage greater than 0.', examples: [1] }), complexForms[1], complexForms[2]])
      .default(1)
      .meta({ title: 'Source voltage', description: 'Of the source without load, root mean square; not 0.', examples: [1], 'x-unit': 'V' }),
    source_impedance_ohm: complexNumber.default(50).meta({ title: 'Source impedance', description: 'Inside the source; its real part must not be negative.', examples: [50], 'x-unit': 'ohm' }),
    points: z.number().int().min(2).max(mostPlaces).default(201).meta({ title: 'Points', description: 'Number of places along the line, both ends included.', examples: [201] }),
  })
  .meta({ id: 'StandingWaveInput', title: 'Standing wave', description: 'A line, what drives it and what closes it, at one frequency.' });

const entry = z.number().meta({ title: 'Value', description: 'The value at one place.', examples: [0.5] });
const entryOrNull = z.union([entry, z.null()]).meta({ title: 'Value', description: 'The value at one place; null where there is none, and a warning says why.', examples: [0.5] });
const placeColumn = z.array(entryOrNull).max(mostPlaces);
const complexPlaceColumn = z
  .strictObject({
    re: placeColumn.meta({ title: 'Real part', description: 'Real parts, one a place.', examples: [[0.5, 0.4]] }),
    im: placeColumn.meta({ title: 'Imaginary part', description: 'Imaginary parts, one a place.', examples: [[0, -0.2]] }),
  })
  .meta({ id: 'ComplexProfile', title: 'Complex profile', description: 'A complex quantity along the line: one list of real and one of imaginary parts.', examples: [{ re: [0.5, 0.4], im: [0, -0.2] }] });

const extremum = z
  .strictObject({
    position_m: z.number().meta({ title: 'Position', description: 'From the source.', examples: [1.25], 'x-unit': 'm' }),
    voltage_v: z.number().meta({ title: 'Voltage', description: 'Magnitude of the voltage there.', examples: [0.62], 'x-unit': 'V' }),
    current_a: z.number().meta({ title: 'Current', description: 'Magnitude of the current there.', examples: [0.008], 'x-unit': 'A' }),
  })
  .meta({ id: 'VoltageExtremum', title: 'Place', description: 'Where the voltage is greatest or least.' });

const extrema = z.array(extremum).max(mostExtrema);

const output = z
  .strictObject({
    position_m: z.array(entry).max(mostPlaces).meta({ title: 'Position', description: 'Places along the line: 0 at the source, the length at the termination.', examples: [[0, 0.5, 1]], 'x-unit': 'm' }),
    voltage_v: complexPlaceColumn.meta({ title: 'Voltage', description: 'Between the conductors, root mean square.', examples: [{ re: [0.5], im: [0.1] }], 'x-unit': 'V' }),
    current_a: complexPlaceColumn.meta({ title: 'Current', description: 'Towards the termination, root mean square.', examples: [{ re: [0.01], im: [0.002] }], 'x-unit': 'A' }),
    power_w: placeColumn.meta({ title: 'Power', description: 'Re(V I*): what flows towards the termination.', examples: [[0.005]], 'x-unit': 'W', 'x-plot': 'rectangular', 'x-plot-group': 'Power' }),
    voltage_magnitude_v: placeColumn.meta({ title: 'Voltage', description: 'Magnitude of the voltage.', examples: [[0.51]], 'x-unit': 'V', 'x-figure': 1, 'x-plot': 'rectangular', 'x-plot-group': 'Voltage' }),
    current_magnitude_a: placeColumn.meta({ title: 'Current', description: 'Magnitude of the current.', examples: [[0.0102]], 'x-unit': 'A', 'x-figure': 2, 'x-plot': 'rectangular', 'x-plot-group': 'Current' }),
    maxima: extrema.meta({ title: 'Maxima', description: 'Where the voltage has its maxima, from the source on; an end of the line counts where the voltage is stationary there.' }),
    minima: extrema.meta({ title: 'Minima', description: 'Where the voltage has its minima, from the source on; an end of the line counts where the voltage is stationary there.' }),
    vswr_at_termination: z.union([z.number().meta({ title: 'Ratio', description: 'The ratio.', examples: [1.86] }), z.null()]).meta({ title: 'VSWR at the termination', description: 'To the line’s own impedance; null where the reflection is whole or more.', examples: [1.86], 'x-figure': 3 }),
  })
  .meta({ id: 'StandingWaveResult', title: 'Standing wave', description: 'Voltage, current and power along the line.' });

type Input = z.output<typeof input>;

export const standingWave = defineCalculation({
  id: 'standing-wave',
  group: 'terminations',
  title: 'Standing wave',
  summary: 'Voltage, current and power along a driven and terminated line, and the maxima and minima of the voltage with their places.',
  input,
  output,
  methods: [telegrapherTwoPort, standingWaves, lumpedImpedance, ...lineMethods],
  cost: { rule: '1 unit per started 1,000 places', units: ({ points }) => Math.ceil(points / 1000) },
  solve(given) {
    const frequencies = Float64Array.of(given.frequency_hz);
    const problems = [...terminationProblems(given.termination, frequencies, '/termination'), ...sourceProblems(given)];
    if (problems.length > 0) throw new ImpossibleInput(problems);
    const model = lineOverFrequency(given.line, frequencies);
    const { result, warnings } = compute(given, model.constants, propagation(model.constants, frequencies), frequencies);
    const methods = [telegrapherTwoPort, standingWaves, ...(hasParts(given.termination) ? [lumpedImpedance] : [])];
    return { result, methods: mergeMethods([...methods.map((method) => ({ method, inRange: true })), ...model.methods]), warnings: [...warnings, ...model.warnings].slice(0, 100) };
  },
  examples: [
    {
      name: 'A feeder of one wavelength at 100 MHz into 100 ohm',
      input: { line: { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 }, length_m: 2.99792458, termination: 100, frequency_hz: 100e6, source_voltage_v: 3, source_impedance_ohm: 50, points: 9 },
      expected: [
        { pointer: '/voltage_magnitude_v/0', value: 2 },
        { pointer: '/voltage_magnitude_v/2', value: 1 },
        { pointer: '/power_w/5', value: 0.04 },
        { pointer: '/maxima/1/position_m', value: 2.99792458 / 2 },
        { pointer: '/minima/0/position_m', value: 2.99792458 / 4 },
        { pointer: '/minima/0/current_a', value: 0.04 },
        { pointer: '/vswr_at_termination', value: 2 },
      ],
      tolerance: 1e-12,
      source: 'A whole wave repeats the load: 3 V x 100/150 = 2 V; a quarter wave before it stands 2 V/VSWR = 1 V with 2 V/50 ohm (Pozar, 4th ed., section 2.3, from memory)',
    },
    {
      name: 'An open battery lead of 50 m: direct current leaks on the way',
      input: { line: { kind: 'rlgc', resistance_ohm_per_m: 0.04, inductance_h_per_m: 7e-7, conductance_s_per_m: 0.01, capacitance_f_per_m: 5e-11 }, length_m: 50, termination: 'open', frequency_hz: 0, source_voltage_v: 12, source_impedance_ohm: 0, points: 3 },
      expected: [
        { pointer: '/voltage_v/re/0', value: 12 },
        { pointer: '/voltage_v/re/1', value: (12 * Math.cosh(0.5)) / Math.cosh(1) },
        { pointer: '/voltage_v/re/2', value: 12 / Math.cosh(1) },
        { pointer: '/current_a/re/0', value: 6 * Math.tanh(1) },
        { pointer: '/minima/0/position_m', value: 50 },
      ],
      tolerance: 1e-12,
      source: 'V = V1 cosh(a x)/cosh(a l), I1 = V1 tanh(a l)/Zc with a = sqrt(R G) = 0.02 /m, Zc = sqrt(R/G) = 2 ohm (the leaky cable of any text on lines, from memory)',
    },
  ],
});

function sourceProblems({ source_voltage_v, source_impedance_ohm }: Input): InputProblem[] {
  const problems: InputProblem[] = [];
  const voltage = complexParts(source_voltage_v);
  if (magnitude(voltage.re, voltage.im) === 0) problems.push({ pointer: '/source_voltage_v', code: 'no_source', detail: 'source_voltage_v must not be 0; got 0' });
  const { re } = complexParts(source_impedance_ohm);
  if (re < 0) problems.push({ pointer: '/source_impedance_ohm', code: 'negative_resistance', detail: `source_impedance_ohm must have a real part of at least 0; got ${re}` });
  return problems;
}

function compute(given: Input, constants: LineConstants, waves: Propagation, frequencies: Float64Array) {
  const { length_m: length, points } = given;
  const source = { voltage: complexParts(given.source_voltage_v), impedance: complexParts(given.source_impedance_ohm) };
  const load = inSpaceOf(1, (space) => loadOf(space, terminationOnePort(space, given.termination, frequencies, waves.omega, waves.characteristicImpedance)));
  const positions = Float64Array.from({ length: points }, (_, index) => (index === points - 1 ? length : (length * index) / (points - 1)));
  const along = (places: Float64Array) => drivenProfile(constants, waves, length, places, load, source);
  const none = positions.map(() => NaN);
  const { v, i, power } = along(positions) ?? { v: { re: none, im: none }, i: { re: none, im: none }, power: none };
  const columns = new ResultColumns();
  const gap = (pointer: string) => ({ pointer, code: 'resonance', reason: 'source and line resonate without loss, so there is no finite value' });

  const ends = terminatedLine(constants, waves, 0, load.v, load.i);
  const found = voltageExtrema(ends, length, 0, length, mostExtrema);
  const ratio = given.termination === 'matched' ? 1 : waveRatio(ends);
  const result = {
    position_m: finiteColumn(positions),
    voltage_v: columns.complex(v, gap('/voltage_v')),
    current_a: columns.complex(i, gap('/current_a')),
    power_w: columns.real(power, gap('/power_w')),
    voltage_magnitude_v: columns.real(sizes(v), gap('/voltage_magnitude_v')),
    current_magnitude_a: columns.real(sizes(i), gap('/current_magnitude_a')),
    maxima: listed(found.extrema.filter(({ isMaximum }) => isMaximum), length, ends.characteristicImpedance, along),
    minima: listed(found.extrema.filter(({ isMaximum }) => !isMaximum), length, ends.characteristicImpedance, along),
    vswr_at_termination: Number.isFinite(ratio) ? ratio : null,
  };
  const warnings: Warning[] = [...columns.warnings];
  if (!Number.isFinite(ratio)) warnings.push({ code: 'whole_reflection', pointer: '/vswr_at_termination', detail: 'the reflection to the line’s own impedance is whole or more, so there is no finite ratio' });
  if (found.isCut) warnings.push({ code: 'extrema_cut', pointer: '/maxima', detail: `the line has more than ${mostExtrema} maxima; those nearest the termination are listed, and the minima between them` });
  return { result, warnings: [...warnings, ...turnWarnings(waves.phaseRadPerM.map((each) => each * length), '/length_m')] };
}

function sizes({ re, im }: { re: Float64Array; im: Float64Array }): Float64Array {
  return re.map((each, index) => magnitude(each, im[index]));
}

/** From the source on; none where the line has no finite voltages. */
function listed(extrema: readonly Extremum[], length: number, impedance: TerminatedLine['characteristicImpedance'], along: (places: Float64Array) => DrivenProfile | null) {
  const fromSource = extrema.slice(0, mostExtrema).reverse();
  const there = fromSource.length > 0 ? along(Float64Array.from(fromSource, ({ x }) => length - x)) : null;
  if (there === null) return [];
  const voltage = sizes(there.v);
  const current = sizes(there.i);
  const inOhm = impedance === null ? NaN : magnitude(impedance.re, impedance.im);
  const places = fromSource.map(({ x, isMaximum, vanishing }, index) => ({
    position_m: length - x,
    voltage_v: vanishing !== null && !isMaximum ? vanishing * there.gain[index] : voltage[index],
    current_a: vanishing !== null && isMaximum ? (vanishing / inOhm) * there.gain[index] : current[index],
  }));
  return places.filter(({ voltage_v, current_a }) => Number.isFinite(voltage_v) && Number.isFinite(current_a));
}
