/** A line given by its primary constants, taken as the same at every frequency. */
import { z } from 'zod';
import type { Method } from '../calculation';
import { constantConstants, defineLineKind } from './line-constants';
import { constantOverDecadeWarnings } from './line-warnings';

export const givenConstants: Method = {
  id: 'given-constants',
  title: 'Constants as they were given',
  source: 'the request itself; L = Z0/v and C = 1/(Z0 v) for a line without loss (Pozar, Microwave Engineering, 4th ed., equations 2.12 to 2.14, numbers from memory)',
  formulas: [String.raw`L = \frac{Z_0}{v}, \qquad C = \frac{1}{Z_0 v}`],
  symbols: [
    { symbol: 'Z_0', meaning: 'characteristic impedance', unit: 'ohm' },
    { symbol: 'v', meaning: 'velocity', unit: 'm/s' },
  ],
  range: 'as far as what was given holds',
  accuracy: 'exact; 1e-12 relative in float64',
};

export const rlgc = defineLineKind({
  schema: z
    .strictObject({
      kind: z.literal('rlgc').meta({ title: 'Kind', description: 'Given by R, L, G and C.', examples: ['rlgc'] }),
      resistance_ohm_per_m: z.number().min(0).max(1e9).meta({ title: 'Resistance', description: 'Series resistance of both conductors together.', examples: [0.12], 'x-unit': 'ohm/m' }),
      inductance_h_per_m: z.number().min(0).max(1e3).meta({ title: 'Inductance', description: 'Series inductance of the loop.', examples: [2.5e-7], 'x-unit': 'H/m' }),
      conductance_s_per_m: z.number().min(0).max(1e9).meta({ title: 'Conductance', description: 'Shunt conductance between the conductors.', examples: [2.5e-5], 'x-unit': 'S/m' }),
      capacitance_f_per_m: z.number().min(0).max(1e3).meta({ title: 'Capacitance', description: 'Shunt capacitance between the conductors.', examples: [1e-10], 'x-unit': 'F/m' }),
    })
    .meta({ id: 'RlgcLine', title: 'R, L, G, C constants', description: 'A line given by its primary constants, the same at every frequency.' }),
  methods: [],
  model: (line, frequenciesHz) => ({
    constants: constantConstants(frequenciesHz.length, line.resistance_ohm_per_m, line.inductance_h_per_m, line.conductance_s_per_m, line.capacitance_f_per_m),
    methods: [],
    warnings: line.resistance_ohm_per_m === 0 && line.conductance_s_per_m === 0 ? [] : constantOverDecadeWarnings(frequenciesHz),
  }),
});
