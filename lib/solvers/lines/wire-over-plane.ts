/** A round wire over a conducting plane. */
import { z } from 'zod';
import type { Method } from '../calculation';
import { vacuumPermeabilityHPerM, vacuumPermittivityFPerM } from '../constants';
import { roundConductors, skinDepthM, wirePart } from '../methods/internal-impedance';
import { widebandDebye } from '../methods/permittivity';
import { conductor, conductorAt, temperature } from '../nouns/conductor';
import { dielectric, dielectricOver } from '../nouns/dielectric';
import { acoshOfOnePlus } from '../numeric/acosh';
import { conductorIssues, diameter, mustExceed } from './dimensions';
import { defineLineKind } from './line-constants';
import { uniformField } from './uniform-field';

export const wireOverPlaneField: Method = {
  id: 'wire-over-plane-field',
  title: 'Field of a round wire over a plane',
  source: 'The wire and its image, half of two parallel wires (bipolar coordinates, any field text)',
  formulas: [String.raw`L_e = \frac{\mu_0}{2\pi}\operatorname{arcosh}\frac{2h}{d}, \qquad C = \frac{2\pi\varepsilon'}{\operatorname{arcosh}(2h/d)}, \qquad G = \omega C\tan\delta`],
  symbols: [
    { symbol: 'h', meaning: 'height of the axis above the plane', unit: 'm' },
    { symbol: 'd', meaning: 'diameter of the wire', unit: 'm' },
    { symbol: 'L_e', meaning: 'inductance of the field outside the wire', unit: 'H/m' },
  ],
  range: 'a perfect plane without end; height far below the wavelength; crowding of the current in the wire neglected, below 2 % of R from a height of 2.5 diameters',
  accuracy: 'exact for perfect conductors; the plane’s own loss is not counted',
};

/** (1 - (d/2h)^2)^(-1/2) is what the nearness of the plane multiplies the wire's resistance by in the end: 1.02 at h = 2.55 d. */
const crowdedBelow = 2.5;

export const wireOverPlane = defineLineKind({
  schema: z
    .strictObject({
      kind: z.literal('wire_over_plane').meta({ title: 'Kind', description: 'A round wire over a plane.', examples: ['wire_over_plane'] }),
      conductor_diameter_m: diameter('Conductor diameter', 'Diameter of the wire.', 1e-3),
      height_m: diameter('Height', 'From the plane to the axis of the wire.', 5e-3),
      conductor: conductor.default('copper').meta({ title: 'Conductor', description: 'What the wire is made of; the plane is taken as perfect.', examples: ['copper'] }),
      dielectric,
      temperature_c: temperature,
    })
    .superRefine((line, context) => {
      mustExceed(context, line, 'height_m', 'conductor_diameter_m', 0.5);
      conductorIssues(context, line.temperature_c, line.conductor);
    })
    .meta({ id: 'WireOverPlaneLine', title: 'Wire over a plane', description: 'A round wire over a perfect plane, by its dimensions and materials.' }),
  methods: [wireOverPlaneField, roundConductors, widebandDebye],
  dimensions: ['conductor_diameter_m', 'height_m'],
  model(line, frequenciesHz) {
    const { conductor_diameter_m: d, height_m: h, temperature_c } = line;
    const omega = frequenciesHz.map((each) => 2 * Math.PI * each);
    const wire = conductorAt(line.conductor, temperature_c);
    const arcosh = acoshOfOnePlus((2 * h - d) / d);
    const isCrowded = wire.resistivityOhmM > 0 && h < crowdedBelow * d;
    return uniformField({
      omega,
      externalInductance: (vacuumPermeabilityHPerM / (2 * Math.PI)) * arcosh,
      vacuumCapacitance: (2 * Math.PI * vacuumPermittivityFPerM) / arcosh,
      permittivity: dielectricOver(line.dielectric, omega),
      parts: [wirePart(d, wire, omega)],
      skinDepth: skinDepthM(wire, omega),
      singleModeLimitHz: Infinity,
      methods: [
        { method: wireOverPlaneField, inRange: !isCrowded },
        { method: roundConductors, inRange: true },
      ],
      warnings: isCrowded
        ? [{ code: 'proximity_neglected', pointer: '/height_m', detail: `so near to the plane the current crowds on the side that faces it; at high frequency R is ${(1 / Math.sqrt(1 - (d / (2 * h)) ** 2)).toPrecision(3)} times what is answered` }]
        : [],
    });
  },
});
