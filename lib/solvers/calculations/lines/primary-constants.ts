import { z } from 'zod';
import { defineCalculation } from '../../calculation';
import { line, lineMethods, lineOverFrequency } from '../../lines/line';
import { givenConstants } from '../../lines/rlgc';
import { frequencyColumn, nullableColumn, realColumn } from '../../nouns/columns';
import { frequenciesHz, frequency, pointsOf } from '../../nouns/frequency';
import { finiteColumn, ResultColumns } from '../../nouns/result-columns';

const input = z.strictObject({ line, frequency_hz: frequency }).meta({ id: 'PrimaryConstantsInput', title: 'Primary constants', description: 'A line and the frequencies to look at it.' });

const output = z
  .strictObject({
    frequency_hz: frequencyColumn,
    resistance_ohm_per_m: realColumn.meta({ title: 'Resistance', description: 'R, series resistance of both conductors together.', examples: [[0.12]], 'x-unit': 'ohm/m', 'x-figure': 1, 'x-plot': 'rectangular', 'x-plot-group': 'Resistance' }),
    inductance_h_per_m: realColumn.meta({ title: 'Inductance', description: 'L, series inductance of the loop, with that inside the conductors.', examples: [[2.5e-7]], 'x-unit': 'H/m', 'x-figure': 2, 'x-plot': 'rectangular', 'x-plot-group': 'Inductance' }),
    conductance_s_per_m: realColumn.meta({ title: 'Conductance', description: 'G, shunt conductance between the conductors.', examples: [[2.5e-5]], 'x-unit': 'S/m', 'x-figure': 3, 'x-plot': 'rectangular', 'x-plot-group': 'Conductance' }),
    capacitance_f_per_m: realColumn.meta({ title: 'Capacitance', description: 'C, shunt capacitance between the conductors.', examples: [[1e-10]], 'x-unit': 'F/m', 'x-figure': 4, 'x-plot': 'rectangular', 'x-plot-group': 'Capacitance' }),
    external_inductance_h_per_m: realColumn.optional().meta({ title: 'External inductance', description: 'Of the field outside the conductors; for a geometry.', examples: [[2.4e-7]], 'x-unit': 'H/m' }),
    effective_permittivity: realColumn.optional().meta({ title: 'Effective permittivity', description: 'C over what it would be in vacuum; for a geometry.', examples: [[2.26]] }),
    skin_depth_m: nullableColumn.optional().meta({ title: 'Skin depth', description: 'In the conductor, the inner one of a coaxial line; null where it is infinite; for a geometry.', examples: [[6.6e-6]], 'x-unit': 'm' }),
    single_mode_limit_hz: z
      .union([z.number().meta({ title: 'Limit', description: 'Where the first higher mode begins.', examples: [3.3e10] }), z.null()])
      .optional()
      .meta({ title: 'Single-mode limit', description: 'Where the first higher mode begins to propagate; null where none is known; for a geometry.', examples: [3.3e10], 'x-unit': 'Hz', 'x-figure': 5 }),
  })
  .meta({ id: 'PrimaryConstantsResult', title: 'Primary constants', description: 'R, L, G and C over frequency.' });

export const primaryConstants = defineCalculation({
  id: 'primary-constants',
  group: 'lines',
  title: 'Primary constants',
  summary: 'R, L, G and C of a line over frequency, from constants, tables, a data sheet or its geometry and materials.',
  input,
  output,
  methods: [givenConstants, ...lineMethods],
  cost: { rule: '1 unit per started 1,000 points', units: ({ frequency_hz }) => Math.ceil(pointsOf(frequency_hz) / 1000) },
  solve({ line: given, frequency_hz }) {
    const frequencies = frequenciesHz(frequency_hz);
    const { constants, geometry, methods, warnings } = lineOverFrequency(given, frequencies);
    const columns = new ResultColumns();
    const result = {
      frequency_hz: finiteColumn(frequencies),
      resistance_ohm_per_m: finiteColumn(constants.resistance),
      inductance_h_per_m: finiteColumn(constants.inductance),
      conductance_s_per_m: finiteColumn(constants.conductance),
      capacitance_f_per_m: finiteColumn(constants.capacitance),
      ...(geometry && {
        external_inductance_h_per_m: finiteColumn(geometry.externalInductance),
        effective_permittivity: finiteColumn(geometry.effectivePermittivity),
        skin_depth_m: columns.real(geometry.skinDepth, { pointer: '/skin_depth_m', code: 'infinite_depth', reason: 'at 0 Hz the current fills the conductor, so there is no skin depth' }),
        single_mode_limit_hz: Number.isFinite(geometry.singleModeLimitHz) ? geometry.singleModeLimitHz : null,
      }),
    };
    return {
      result,
      methods: methods.length > 0 ? methods : [{ method: givenConstants, inRange: true }],
      warnings: [...columns.warnings, ...warnings, ...(geometry && !Number.isFinite(geometry.singleModeLimitHz) ? [{ code: 'no_known_limit', pointer: '/single_mode_limit_hz', detail: 'no higher mode of this geometry has a published limit here' }] : [])],
    };
  },
  examples: [
    {
      name: 'A 50 ohm cable with solid polyethylene, from direct current to 1 GHz',
      input: {
        line: { kind: 'coaxial', inner_diameter_m: 9e-4, outer_diameter_m: 2.95e-3, shield_thickness_m: 1.5e-4, conductor: 'copper', dielectric: 'polyethylene' },
        frequency_hz: [0, 1e6, 1e9],
      },
      expected: [
        { pointer: '/resistance_ohm_per_m/0', value: 0.038902 },
        { pointer: '/capacitance_f_per_m/1', value: 1.0590e-10 },
      ],
      tolerance: 1e-4,
      source: 'rho/area of wire and tube, with copper of IEC 60028, and C = 2 pi eps/ln(D/d) (Pozar, 4th ed., table 2.1), worked by hand to five digits',
    },
    {
      name: 'A 7 mm air line: 50 ohm, single mode to 19 GHz',
      input: { line: { kind: 'coaxial', inner_diameter_m: 3.04e-3, outer_diameter_m: 7e-3, conductor: 'perfect', dielectric: 'air' }, frequency_hz: 18e9 },
      expected: [
        { pointer: '/external_inductance_h_per_m/0', value: 1.6681e-7 },
        { pointer: '/single_mode_limit_hz', value: 1.94e10 },
      ],
      tolerance: 5e-3,
      source: 'Precision air lines of 7 mm: nominal cutoff 19.4 GHz (IEEE Std 287, from memory); L = mu0/(2 pi) ln(D/d)',
    },
  ],
});
