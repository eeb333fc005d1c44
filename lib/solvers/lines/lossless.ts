/** A line without loss, given by its impedance and velocity: L = Z0/v, C = 1/(Z0 v). */
import { z } from 'zod';
import { speedOfLightMPerS } from '../constants';
import { constantConstants, defineLineKind } from './line-constants';

export const lossless = defineLineKind({
  schema: z
    .strictObject({
      kind: z.literal('lossless').meta({ title: 'Kind', description: 'Without loss, given by impedance and velocity.', examples: ['lossless'] }),
      characteristic_impedance_ohm: z.number().min(1e-3).max(1e6).meta({ title: 'Characteristic impedance', description: 'Characteristic impedance.', examples: [50], 'x-unit': 'ohm' }),
      velocity_factor: z.number().min(1e-3).max(1).meta({ title: 'Velocity factor', description: 'Phase velocity over the speed of light in vacuum.', examples: [0.66] }),
    })
    .meta({ id: 'LosslessLine', title: 'Lossless', description: 'A line without loss, given by its characteristic impedance and velocity factor.' }),
  methods: [],
  model(line, { length }) {
    const impedance = line.characteristic_impedance_ohm;
    const velocity = line.velocity_factor * speedOfLightMPerS;
    return { constants: constantConstants(length, 0, impedance / velocity, 0, 1 / (impedance * velocity)), methods: [], warnings: [] };
  },
});
