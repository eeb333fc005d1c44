/** Two flat plates that face each other. */
import { z } from 'zod';
import type { Method } from '../calculation';
import { speedOfLightMPerS, vacuumPermeabilityHPerM, vacuumPermittivityFPerM } from '../constants';
import { flatConductors, sheetPart, skinDepthM } from '../methods/internal-impedance';
import { widebandDebye } from '../methods/permittivity';
import { conductor, conductorAt, temperature } from '../nouns/conductor';
import { dielectric, dielectricOver } from '../nouns/dielectric';
import { conductorIssues, diameter } from './dimensions';
import { defineLineKind } from './line-constants';
import { uniformField } from './uniform-field';

export const parallelPlateField: Method = {
  id: 'parallel-plate-field',
  title: 'Field between parallel plates',
  source: 'Pozar, Microwave Engineering, 4th ed., table 2.1 and section 3.2 (numbers from memory)',
  formulas: [String.raw`L_e = \frac{\mu_0 s}{w}, \qquad C = \frac{\varepsilon' w}{s}, \qquad G = \omega C\tan\delta, \qquad f_c = \frac{c}{2 s\sqrt{\varepsilon_r'}}`],
  symbols: [
    { symbol: 'w', meaning: 'width of the plates', unit: 'm' },
    { symbol: 's', meaning: 'distance between them', unit: 'm' },
    { symbol: 'f_c', meaning: 'cutoff of the first higher mode, TM1', unit: 'Hz' },
  ],
  range: 'width of 20 separations or more: the field at the edges is neglected',
  accuracy: 'exact without the edges; with them C is higher, in vacuum by about (s/(pi w)) (1 + ln(2 pi w/s)): 9 % at w = 20 s, 2.4 % at w = 100 s',
};

const wideFrom = 20;

export const parallelPlate = defineLineKind({
  schema: z
    .strictObject({
      kind: z.literal('parallel_plate').meta({ title: 'Kind', description: 'Two flat plates.', examples: ['parallel_plate'] }),
      width_m: diameter('Width', 'Width of the plates.', 0.02),
      separation_m: diameter('Separation', 'Distance between the plates.', 2e-4),
      thickness_m: diameter('Thickness', 'Of each plate; without it they are taken as thicker than any skin depth.', 3.5e-5).optional(),
      conductor: conductor.default('copper').meta({ title: 'Conductor', description: 'What the plates are made of.', examples: ['copper'] }),
      dielectric,
      temperature_c: temperature,
    })
    .superRefine((line, context) => conductorIssues(context, line.temperature_c, line.conductor))
    .meta({ id: 'ParallelPlateLine', title: 'Parallel plates', description: 'Two wide plates by their dimensions and materials.' }),
  methods: [parallelPlateField, flatConductors, widebandDebye],
  dimensions: ['width_m', 'separation_m'],
  model(line, frequenciesHz) {
    const { width_m: w, separation_m: s, thickness_m: thickness, temperature_c } = line;
    const omega = frequenciesHz.map((each) => 2 * Math.PI * each);
    const plate = conductorAt(line.conductor, temperature_c);
    const permittivity = dielectricOver(line.dielectric, omega);
    const each = sheetPart(w, thickness, plate, omega);
    const isWide = w >= wideFrom * s;
    const isUnbounded = thickness === undefined && plate.resistivityOhmM > 0 && omega.includes(0);
    return uniformField({
      omega,
      externalInductance: (vacuumPermeabilityHPerM * s) / w,
      vacuumCapacitance: (vacuumPermittivityFPerM * w) / s,
      permittivity,
      parts: [each, each],
      skinDepth: skinDepthM(plate, omega),
      singleModeLimitHz: speedOfLightMPerS / (2 * s * Math.sqrt(permittivity.real.reduce((least, value) => Math.min(least, value), Infinity))),
      methods: [
        { method: parallelPlateField, inRange: isWide },
        { method: flatConductors, inRange: true },
      ],
      warnings: [
        ...(isWide ? [] : [{ code: 'fringing_neglected', pointer: '/width_m', detail: `the field at the edges is neglected, which holds from a width of ${wideFrom} separations; got ${(w / s).toPrecision(3)}` }]),
        ...(isUnbounded ? [{ code: 'unbounded_plates', pointer: '/thickness_m', detail: 'plates without thickness have no resistance at 0 Hz and an inductance without bound; both are left out there, so give thickness_m' }] : []),
      ],
    });
  },
});
