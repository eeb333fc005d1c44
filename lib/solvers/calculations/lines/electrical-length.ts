import { z } from 'zod';
import { defineCalculation, mergeMethods, type Warning } from '../../calculation';
import { decibelsPerNeper } from '../../constants';
import { ImpossibleInput } from '../../errors';
import { line, lineMethods, lineOverFrequency } from '../../lines/line';
import type { LineConstants } from '../../lines/line-constants';
import { turnWarnings } from '../../lines/line-warnings';
import { lineTwoPort, telegrapherTwoPort } from '../../methods/line-two-port';
import { longestLumpedLength } from '../../methods/lumped-length';
import { lengthRules, lumpedErrors, lumpedTreatment } from '../../methods/lumped-treatment';
import { lumpedImpedance } from '../../methods/one-port';
import { propagation, telegrapherPropagation, type Propagation } from '../../methods/telegrapher';
import { frequencyColumn, nullableColumn, realColumn } from '../../nouns/columns';
import { frequenciesHz, frequency, mostPoints, pointsOf } from '../../nouns/frequency';
import { lineLength } from '../../nouns/line-length';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';
import { termination, terminationOnePort, terminationProblems, type Termination } from '../../nouns/termination';
import { inSpaceOf, magnitude } from '../../numeric/phasor';

const input = z
  .strictObject({
    line,
    length_m: lineLength(0.12),
    frequency_hz: frequency,
    rise_time_s: z.number().min(1e-15).max(1e6).optional().meta({ title: 'Rise time', description: 'Of the edges on the line, 10 % to 90 %; left out where only frequency matters.', examples: [1e-9], 'x-unit': 's' }),
    tolerance: z.number().min(1e-9).max(0.5).default(0.05).meta({ title: 'Tolerance', description: 'Relative error of the input impedance that may be made.', examples: [0.05] }),
    termination: termination.default(50).meta({ title: 'Termination', description: 'What closes the far end; 50 ohm where left out. An impedance, open, short, matched, parts in series or in parallel, or a table.', examples: [1000, 'open'], 'x-unit': 'ohm' }),
  })
  .meta({ id: 'ElectricalLengthInput', title: 'Electrical length', description: 'A line, its length, what closes it, and the frequencies to look at it.' });

const error = (title: string, description: string) => nullableColumn.meta({ title, description, examples: [[0.04]], 'x-plot': 'rectangular', 'x-plot-group': 'Error of lumped treatment' });
const verdicts = z.array(z.boolean().meta({ title: 'Verdict', description: 'At one frequency.', examples: [false] })).max(mostPoints);

const rule = z
  .strictObject({
    rule: z.enum(['tenth_of_wavelength', 'sixth_of_rise_time', 'half_of_rise_time']).meta({ title: 'Rule', description: 'Which rule.', examples: ['tenth_of_wavelength'] }),
    statement: z.string().meta({ title: 'Statement', description: 'What the rule says.', examples: ['a line where it is longer than a tenth of a wavelength'] }),
    threshold_wavelengths: z.number().optional().meta({ title: 'Threshold', description: 'Length above which the rule says line.', examples: [0.1] }),
    threshold_s: z.number().optional().meta({ title: 'Threshold', description: 'Delay above which the rule says line.', examples: [1.7e-10], 'x-unit': 's' }),
    verdict: verdicts.meta({ title: 'Verdict', description: 'Whether the rule says to treat it as a line.', examples: [[false]] }),
    source: z.string().meta({ title: 'Source', description: 'Where the rule comes from.', examples: ['common practice'] }),
  })
  .meta({ id: 'LengthRule', title: 'Rule of thumb', description: 'A rule of common practice, and what it says here.' });

const output = z
  .strictObject({
    frequency_hz: frequencyColumn,
    length_wavelengths: realColumn.meta({ title: 'Length in wavelengths', description: 'beta l / 2 pi.', examples: [[0.06]], 'x-figure': 1, 'x-plot': 'rectangular', 'x-plot-group': 'Length in wavelengths' }),
    length_deg: realColumn.meta({ title: 'Electrical length', description: 'beta l.', examples: [[21.8]], 'x-unit': 'deg', 'x-figure': 2 }),
    delay_s: nullableColumn.meta({ title: 'Delay', description: 'Phase delay, beta l / omega; its limit at 0 Hz.', examples: [[6e-10]], 'x-unit': 's', 'x-figure': 3 }),
    attenuation_db: realColumn.meta({ title: 'Attenuation', description: 'alpha l, of a matched line.', examples: [[0.01]], 'x-unit': 'dB' }),
    lumped_error: z
      .strictObject({
        as_wire: error('As a wire', 'Relative error of the input impedance where the line is left out and the termination alone is seen; null at a pole.'),
        as_section: error('As one section', 'The same with one section: the whole series impedance, then the whole shunt admittance across the termination.'),
        as_pi_section: error('As one pi section', 'The same with the shunt admittance halved to either side of the series impedance.'),
        as_wire_reflection: error('As a wire, reflection', 'Size of the error of the input reflection, to the size of the line’s own impedance (50 ohm where that is infinite or 0): bounded at a pole.'),
        as_section_reflection: error('As one section, reflection', 'The same with one section.'),
        as_pi_section_reflection: error('As one pi section, reflection', 'The same with one pi section.'),
      })
      .meta({ title: 'Error of lumped treatment', description: 'What it costs to take the line as lumped parts.' }),
    treat_as_line: verdicts.meta({ title: 'Treat as a line', description: 'Where the error as a wire is greater than the tolerance or has no bound, here or at a shorter length (a half wave hides it), or the delay is more than a sixth of the rise time.', examples: [[true]], 'x-figure': 4 }),
    longest_lumped_length_m: nullableColumn.meta({ title: 'Longest lumped length', description: 'Below this length the error as a wire stays within the tolerance; null where none is found within two wavelengths.', examples: [[0.083]], 'x-unit': 'm', 'x-figure': 5, 'x-plot': 'rectangular', 'x-plot-group': 'Longest lumped length' }),
    rules: z.array(rule).max(3).meta({ title: 'Rules of thumb', description: 'What common practice says of the same line; those of the rise time where one is given.' }),
  })
  .meta({ id: 'ElectricalLengthResult', title: 'Electrical length', description: 'Electrical length over frequency, and whether lumped treatment will do.' });

/** A reflection must refer to something where the line's own impedance is infinite or 0. */
const referenceWithoutOwnOhm = 50;
const tenthOfWavelength = 0.1;

export const electricalLength = defineCalculation({
  id: 'electrical-length',
  group: 'lines',
  title: 'Electrical length',
  summary: 'Length in wavelengths, degrees and delay, whether a line may be taken as a wire or as one section of parts, and the error that would cost.',
  input,
  output,
  methods: [telegrapherPropagation, telegrapherTwoPort, lumpedTreatment, lengthRules, lumpedImpedance, ...lineMethods],
  cost: { rule: '1 unit per started 1,000 points', units: ({ frequency_hz }) => Math.ceil(pointsOf(frequency_hz) / 1000) },
  solve(given) {
    const frequencies = frequenciesHz(given.frequency_hz);
    const problems = terminationProblems(given.termination, frequencies, '/termination');
    if (problems.length > 0) throw new ImpossibleInput(problems);
    const model = lineOverFrequency(given.line, frequencies);
    const waves = propagation(model.constants, frequencies);
    const turns = waves.phaseRadPerM.map((each) => each * given.length_m);
    const wavelengths = turns.map((each) => each / (2 * Math.PI));
    const delay = delayOf(waves, turns, given.length_m);
    const { errors, longest } = lumpedOverFrequency(model.constants, waves, frequencies, given.length_m, given.termination, given.tolerance);
    const columns = new ResultColumns();
    const relative = (pointer: string, values: Float64Array) => columns.real(values, { pointer: `/lumped_error/${pointer}`, code: 'pole', reason: 'the input impedance or that of the lumped parts is infinite or 0, so the relative error has no bound' });
    const reflected = (pointer: string, values: Float64Array) => columns.real(values, { pointer: `/lumped_error/${pointer}`, code: 'no_value', reason: 'there is no forward wave to compare with' });
    const isSlow = (fraction: number) => Array.from(delay, (each) => given.rise_time_s !== undefined && each > fraction * given.rise_time_s);
    const tooSlow = isSlow(1 / 6);
    const result = {
      frequency_hz: finiteColumn(frequencies),
      length_wavelengths: finiteColumn(wavelengths),
      length_deg: finiteColumn(turns.map((each) => each * (180 / Math.PI))),
      delay_s: columns.real(delay, { pointer: '/delay_s', code: 'infinite_delay', reason: 'the delay grows without bound towards 0 Hz' }),
      attenuation_db: finiteColumn(waves.attenuationNpPerM.map((each) => each * given.length_m * decibelsPerNeper)),
      lumped_error: {
        as_wire: relative('as_wire', errors.wire.relative),
        as_section: relative('as_section', errors.section.relative),
        as_pi_section: relative('as_pi_section', errors.piSection.relative),
        as_wire_reflection: reflected('as_wire_reflection', errors.wire.reflection),
        as_section_reflection: reflected('as_section_reflection', errors.section.reflection),
        as_pi_section_reflection: reflected('as_pi_section_reflection', errors.piSection.reflection),
      },
      treat_as_line: Array.from(errors.wire.relative, (each, index) => !(each <= given.tolerance) || given.length_m > longest[index] || tooSlow[index]),
      longest_lumped_length_m: columns.real(longest, { pointer: '/longest_lumped_length_m', code: 'no_limit_found', reason: 'the error as a wire does not reach the tolerance within two wavelengths and 1e9 m' }),
      rules: [
        { rule: 'tenth_of_wavelength' as const, statement: 'a line where it is longer than a tenth of a wavelength', threshold_wavelengths: tenthOfWavelength, verdict: Array.from(wavelengths, (each) => each > tenthOfWavelength), source: 'common practice' },
        ...(given.rise_time_s === undefined
          ? []
          : [
              { rule: 'sixth_of_rise_time' as const, statement: 'a line where its delay is more than a sixth of the rise time', threshold_s: given.rise_time_s / 6, verdict: tooSlow, source: 'common practice' },
              { rule: 'half_of_rise_time' as const, statement: 'a line where its delay is more than half of the rise time', threshold_s: given.rise_time_s / 2, verdict: isSlow(1 / 2), source: 'common practice' },
            ]),
      ],
    };
    const used = [telegrapherPropagation, telegrapherTwoPort, lumpedTreatment, lengthRules, ...(hasParts(given.termination) ? [lumpedImpedance] : [])];
    return {
      result,
      methods: mergeMethods([...used.map((method) => ({ method, inRange: true })), ...model.methods]),
      warnings: [...columns.warnings, ...matchedWarnings(result.treat_as_line, wavelengths), ...turnWarnings(turns, '/length_m'), ...model.warnings],
    };
  },
  examples: [
    {
      name: 'A sensor lead of 1.2 m into 1 kohm',
      input: { line: { kind: 'lossless', characteristic_impedance_ohm: 100, velocity_factor: 0.66 }, length_m: 1.2, frequency_hz: [10e3, 1e6, 10e6], rise_time_s: 20e-9, termination: 1000 },
      expected: [
        { pointer: '/length_wavelengths/1', value: (1.2 * 1e6) / (0.66 * 299792458) },
        { pointer: '/delay_s/1', value: 1.2 / (0.66 * 299792458) },
        { pointer: '/lumped_error/as_wire/1', value: 0.377432068197689122 },
        { pointer: '/longest_lumped_length_m/1', value: 0.159043506661566175 },
      ],
      tolerance: 1e-12,
      source: 'Zin = Zc (ZL + j Zc tan(beta l))/(Zc + j ZL tan(beta l)) (Pozar, 4th ed., equation 2.44, from memory), computed to 30 digits',
    },
    {
      name: 'A quarter wave is the furthest from a wire',
      input: { line: { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 }, length_m: 0.749481145, frequency_hz: 100e6, termination: 25 },
      expected: [
        { pointer: '/length_wavelengths/0', value: 0.25 },
        { pointer: '/length_deg/0', value: 90 },
        { pointer: '/lumped_error/as_wire/0', value: 0.75 },
        { pointer: '/lumped_error/as_wire_reflection/0', value: 2 / 3 },
      ],
      tolerance: 1e-12,
      source: 'Quarter-wave transformer, Zin = Zc^2/ZL = 100 ohm: 25 ohm instead is wrong by 0.75, and -1/3 instead of 1/3 by 2/3 (Pozar, 4th ed., section 2.5, from memory)',
    },
  ],
});

function hasParts(value: Termination): boolean {
  return typeof value === 'object' && 'kind' in value && value.kind !== 'table';
}

/** At direct current beta / omega is its limit: the group delay, finite or not. */
function delayOf({ omega, groupDelaySPerM }: Propagation, turns: Float64Array, lengthM: number): Float64Array {
  return turns.map((each, index) => (omega[index] > 0 ? each / omega[index] : lengthM === 0 ? 0 : groupDelaySPerM[index] * lengthM));
}

function lumpedOverFrequency(constants: LineConstants, waves: Propagation, frequencies: Float64Array, lengthM: number, closedBy: Termination, tolerance: number) {
  const { omega, characteristicImpedance: Zc } = waves;
  const reference = Zc.re.map((re, index) => magnitude(re, Zc.im[index])).map((each) => (each > 0 && Number.isFinite(each) ? each : referenceWithoutOwnOhm));
  return inSpaceOf(frequencies.length, (space) => {
    const two = lineTwoPort(space, constants, waves, lengthM);
    const load = terminationOnePort(space, closedBy, frequencies, omega, Zc);
    const [v, i] = [space.column(load.v), space.column(load.i)];
    const longest = frequencies.map((_, index) => {
      const at = {
        R: constants.resistance[index],
        X: omega[index] * constants.inductance[index],
        G: constants.conductance[index],
        B: omega[index] * constants.capacitance[index],
        alpha: waves.attenuationNpPerM[index],
        beta: waves.phaseRadPerM[index],
      };
      return longestLumpedLength(at, { vRe: v.re[index], vIm: v.im[index], iRe: i.re[index], iIm: i.im[index] }, tolerance) ?? NaN;
    });
    return { errors: lumpedErrors(space, constants, waves, lengthM, two, load, reference), longest };
  });
}

/** A load that equals the line's own impedance hides the length from the input impedance, and from nothing else. */
function matchedWarnings(treatAsLine: readonly boolean[], wavelengths: Float64Array): Warning[] {
  const isHidden = wavelengths.some((each, index) => each > tenthOfWavelength && !treatAsLine[index]);
  if (!isHidden) return [];
  return [{ code: 'length_hidden', pointer: '/treat_as_line', detail: 'the termination is so near the line’s own impedance that the input impedance stays within the tolerance at any length; phase and delay of what passes do not' }];
}
