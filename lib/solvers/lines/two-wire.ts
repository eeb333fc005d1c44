/** Two parallel round wires of the same kind. */
import { z } from 'zod';
import type { Method } from '../calculation';
import { vacuumPermeabilityHPerM, vacuumPermittivityFPerM } from '../constants';
import { roundConductors, skinDepthM, wirePart } from '../methods/internal-impedance';
import { widebandDebye } from '../methods/permittivity';
import { conductor, conductorAt, temperature } from '../nouns/conductor';
import { dielectric, dielectricOver } from '../nouns/dielectric';
import { crowdedPair, crowdingMicroseconds, harmonicsOf, proximityEffect } from '../methods/proximity';
import { acoshOfOnePlus } from '../numeric/acosh';
import { conductorIssues, diameter, mustExceed } from './dimensions';
import { defineLineKind } from './line-constants';
import { uniformField } from './uniform-field';

export const twoWireField: Method = {
  id: 'two-wire-field',
  title: 'Field of two parallel round wires',
  source: 'Pozar, Microwave Engineering, 4th ed., table 2.1 (from memory); bipolar coordinates, any field text',
  formulas: [String.raw`L_e = \frac{\mu_0}{\pi}\operatorname{arcosh}\frac{s}{d}, \qquad C = \frac{\pi\varepsilon'}{\operatorname{arcosh}(s/d)}, \qquad G = \omega C\tan\delta`],
  symbols: [
    { symbol: 's', meaning: 'distance between the axes', unit: 'm' },
    { symbol: 'd', meaning: 'diameter of each wire', unit: 'm' },
    { symbol: 'L_e', meaning: 'inductance of the field outside the wires, as if they were perfect', unit: 'H/m' },
  ],
  range: 'equal wires in one dielectric; spacing far below the wavelength',
  accuracy: 'exact for perfect conductors; 1e-12 relative in float64',
};

export const twoWire = defineLineKind({
  schema: z
    .strictObject({
      kind: z.literal('two_wire').meta({ title: 'Kind', description: 'Two parallel round wires.', examples: ['two_wire'] }),
      conductor_diameter_m: diameter('Conductor diameter', 'Diameter of each wire.', 1e-3),
      spacing_m: diameter('Spacing', 'Distance between the axes of the wires.', 5e-3),
      conductor: conductor.default('copper').meta({ title: 'Conductor', description: 'What the wires are made of.', examples: ['copper'] }),
      dielectric,
      proximity: z.boolean().default(true).meta({ title: 'Proximity effect', description: 'Whether the crowding of the current on the sides that face each other is taken into account.', examples: [true] }),
      temperature_c: temperature,
    })
    .superRefine((line, context) => {
      mustExceed(context, line, 'spacing_m', 'conductor_diameter_m');
      conductorIssues(context, line.temperature_c, line.conductor);
    })
    .meta({ id: 'TwoWireLine', title: 'Two wires', description: 'Two parallel round wires by their dimensions and materials.' }),
  methods: [twoWireField, roundConductors, proximityEffect, widebandDebye],
  dimensions: ['conductor_diameter_m', 'spacing_m'],
  microseconds: ({ conductor_diameter_m: d, spacing_m: s, proximity }, points) => points + (proximity ? crowdingMicroseconds(acoshOfOnePlus((s - d) / d), points) : 0),
  model(line, frequenciesHz) {
    const { conductor_diameter_m: d, spacing_m: s, proximity, temperature_c } = line;
    const omega = frequenciesHz.map((each) => 2 * Math.PI * each);
    const wire = conductorAt(line.conductor, temperature_c);
    const arcosh = acoshOfOnePlus((s - d) / d);
    const isCrowded = proximity && wire.resistivityOhmM > 0;
    const crowding = isCrowded ? harmonicsOf(d, arcosh, wire, omega) : undefined;
    const isolated = wirePart(d, wire, omega);
    const externalInductance = (vacuumPermeabilityHPerM / Math.PI) * arcosh;
    return uniformField({
      omega,
      externalInductance,
      vacuumCapacitance: (Math.PI * vacuumPermittivityFPerM) / arcosh,
      permittivity: dielectricOver(line.dielectric, omega),
      parts: crowding ? [isolated, isolated, crowdedPair(d, s, arcosh, wire, omega, crowding)] : [isolated, isolated],
      skinDepth: skinDepthM(wire, omega),
      singleModeLimitHz: Infinity,
      methods: [{ method: twoWireField, inRange: true }, { method: roundConductors, inRange: true }, ...(crowding ? [{ method: proximityEffect, inRange: crowding.isEnough }] : [])],
      warnings:
        crowding && !crowding.isEnough
          ? [{ code: 'wires_nearly_touch', pointer: '/spacing_m', detail: `the crowding of current converges slowly at this spacing; the ${crowding.harmonics} harmonics that are taken may leave out ${crowding.leftOut.toPrecision(1)} of R and L` }]
          : [],
    });
  },
});
