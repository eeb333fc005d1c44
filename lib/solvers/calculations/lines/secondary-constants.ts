import { z } from 'zod';
import { defineCalculation, mergeMethods } from '../../calculation';
import { decibelsPerNeper } from '../../constants';
import { line, lineMethods, lineOverFrequency } from '../../lines/line';
import { propagation, telegrapherPropagation } from '../../methods/telegrapher';
import { complexColumn, frequencyColumn, nullableColumn, realColumn } from '../../nouns/columns';
import { frequenciesHz, frequency, pointsOf } from '../../nouns/frequency';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';

const input = z.strictObject({ line, frequency_hz: frequency }).meta({ id: 'SecondaryConstantsInput', title: 'Secondary constants', description: 'A line and the frequencies to look at it.' });

const output = z
  .strictObject({
    frequency_hz: frequencyColumn,
    propagation_constant_per_m: complexColumn.meta({ title: 'Propagation constant', description: 'gamma = alpha + j beta.', examples: [{ re: [0.0012], im: [3.2] }], 'x-unit': '1/m' }),
    attenuation_np_per_m: realColumn.meta({ title: 'Attenuation', description: 'alpha in nepers.', examples: [[0.0012]], 'x-unit': 'Np/m' }),
    attenuation_db_per_m: realColumn.meta({ title: 'Attenuation', description: 'alpha in decibels.', examples: [[0.0104]], 'x-unit': 'dB/m', 'x-figure': 2, 'x-plot': 'rectangular', 'x-plot-group': 'Attenuation' }),
    phase_constant_rad_per_m: realColumn.meta({ title: 'Phase constant', description: 'beta.', examples: [[3.2]], 'x-unit': 'rad/m', 'x-figure': 3 }),
    characteristic_impedance_ohm: complexColumn.meta({ title: 'Characteristic impedance', description: 'Zc; null where it is infinite.', examples: [{ re: [50], im: [-0.02] }], 'x-unit': 'ohm', 'x-figure': 1, 'x-plot': 'rectangular', 'x-plot-group': 'Characteristic impedance' }),
    phase_velocity_m_per_s: nullableColumn.meta({ title: 'Phase velocity', description: 'omega / beta; its limit at 0 Hz.', examples: [[2e8]], 'x-unit': 'm/s', 'x-figure': 4, 'x-plot': 'rectangular', 'x-plot-group': 'Velocity' }),
    group_velocity_m_per_s: nullableColumn.meta({ title: 'Group velocity', description: 'd omega / d beta.', examples: [[2e8]], 'x-unit': 'm/s', 'x-plot': 'rectangular', 'x-plot-group': 'Velocity' }),
    delay_s_per_m: nullableColumn.meta({ title: 'Delay', description: 'Phase delay, beta / omega; its limit at 0 Hz.', examples: [[5e-9]], 'x-unit': 's/m', 'x-figure': 5 }),
    wavelength_m: nullableColumn.meta({ title: 'Wavelength', description: '2 pi / beta; null where it is infinite.', examples: [[2]], 'x-unit': 'm' }),
  })
  .meta({ id: 'SecondaryConstantsResult', title: 'Secondary constants', description: 'Secondary constants over frequency.' });

export const secondaryConstants = defineCalculation({
  id: 'secondary-constants',
  group: 'lines',
  title: 'Secondary constants',
  summary: 'Propagation constant, attenuation, characteristic impedance, velocities, delay and wavelength of a line over frequency.',
  input,
  output,
  methods: [telegrapherPropagation, ...lineMethods],
  cost: { rule: '1 unit per started 1,000 points', units: ({ frequency_hz }) => Math.ceil(pointsOf(frequency_hz) / 1000) },
  solve({ line: given, frequency_hz }) {
    const frequencies = frequenciesHz(frequency_hz);
    const model = lineOverFrequency(given, frequencies);
    const waves = propagation(model.constants, frequencies);
    const { omega, attenuationNpPerM: alpha, phaseRadPerM: beta, groupDelaySPerM, characteristicImpedance } = waves;
    // At direct current beta / omega is its limit: the group delay, finite or not.
    const delay = beta.map((each, index) => (omega[index] > 0 ? each / omega[index] : groupDelaySPerM[index]));
    const columns = new ResultColumns();
    const result = {
      frequency_hz: finiteColumn(frequencies),
      propagation_constant_per_m: columns.complex({ re: alpha, im: beta }, { pointer: '/propagation_constant_per_m', code: 'no_value', reason: 'there is no propagation constant' }),
      attenuation_np_per_m: finiteColumn(alpha),
      attenuation_db_per_m: finiteColumn(alpha.map((each) => each * decibelsPerNeper)),
      phase_constant_rad_per_m: finiteColumn(beta),
      characteristic_impedance_ohm: columns.complex(characteristicImpedance, { pointer: '/characteristic_impedance_ohm', code: 'infinite_impedance', reason: 'nothing flows between the conductors, so the characteristic impedance has no finite value' }),
      phase_velocity_m_per_s: columns.real(delay.map((each) => (each === Infinity ? 0 : 1 / each)), { pointer: '/phase_velocity_m_per_s', code: 'infinite_velocity', reason: 'the phase does not turn along the line, so its velocity is infinite' }),
      group_velocity_m_per_s: columns.real(groupDelaySPerM.map((each) => (each === Infinity ? 0 : 1 / each)), { pointer: '/group_velocity_m_per_s', code: 'infinite_velocity', reason: 'the phase does not change with frequency, so the group velocity is infinite' }),
      delay_s_per_m: columns.real(delay, { pointer: '/delay_s_per_m', code: 'infinite_delay', reason: 'the delay grows without bound towards 0 Hz' }),
      wavelength_m: columns.real(beta.map((each) => (2 * Math.PI) / each), { pointer: '/wavelength_m', code: 'infinite_wavelength', reason: 'the phase does not turn along the line, so the wavelength is infinite' }),
    };
    return { result, methods: mergeMethods([{ method: telegrapherPropagation, inRange: true }, ...model.methods]), warnings: [...columns.warnings, ...model.warnings] };
  },
  examples: [
    {
      name: 'A distortionless line: R/L = G/C',
      input: {
        line: { kind: 'rlgc', resistance_ohm_per_m: 0.1, inductance_h_per_m: 2.5e-7, conductance_s_per_m: 4e-5, capacitance_f_per_m: 1e-10 },
        frequency_hz: { start: 1e6, stop: 1e9, points: 201, spacing: 'log' },
      },
      expected: [
        { pointer: '/attenuation_np_per_m/0', value: 0.002 },
        { pointer: '/attenuation_np_per_m/200', value: 0.002 },
        { pointer: '/characteristic_impedance_ohm/re/100', value: 50 },
        { pointer: '/characteristic_impedance_ohm/im/100', value: 0 },
        { pointer: '/phase_velocity_m_per_s/0', value: 2e8 },
        { pointer: '/group_velocity_m_per_s/200', value: 2e8 },
      ],
      tolerance: 1e-12,
      source: 'Heaviside’s condition: alpha = sqrt(R G), Zc = sqrt(L/C), v = 1/sqrt(L C) at every frequency (Pozar, 4th ed., section 2.7, from memory)',
    },
    {
      name: 'A 50 ohm cable at 100 MHz',
      input: {
        line: { kind: 'rlgc', resistance_ohm_per_m: 0.12, inductance_h_per_m: 2.5e-7, conductance_s_per_m: 2.5e-5, capacitance_f_per_m: 1e-10 },
        frequency_hz: 100e6,
      },
      expected: [
        { pointer: '/attenuation_np_per_m/0', value: 0.00182499996943188493 },
        { pointer: '/phase_constant_rad_per_m/0', value: 3.14159270621037809 },
        { pointer: '/characteristic_impedance_ohm/re/0', value: 50.0000044787117514 },
        { pointer: '/characteristic_impedance_ohm/im/0', value: -0.0091514069592545343 },
      ],
      tolerance: 1e-12,
      source: 'eigenvalues of the matrix exponential of the telegrapher equations, computed to 30 digits',
    },
  ],
});
