/** A coaxial line: a wire within a tube. */
import { z } from 'zod';
import type { Method } from '../calculation';
import { speedOfLightMPerS, vacuumPermeabilityHPerM, vacuumPermittivityFPerM } from '../constants';
import { roundConductors, skinDepthM, tubePart, wirePart } from '../methods/internal-impedance';
import { widebandDebye } from '../methods/permittivity';
import { conductor, conductorAt, temperature } from '../nouns/conductor';
import { dielectric, dielectricOver } from '../nouns/dielectric';
import { coaxialTe11 } from '../numeric/coaxial-mode';
import { conductorIssues, diameter, mustExceed } from './dimensions';
import { defineLineKind } from './line-constants';
import { uniformField } from './uniform-field';

export const coaxialField: Method = {
  id: 'coaxial-field',
  title: 'Field of a coaxial line',
  source: 'Pozar, Microwave Engineering, 4th ed., table 2.1 and section 3.5 (numbers from memory); TE11: Marcuvitz, Waveguide Handbook, section 2.4 (from memory)',
  formulas: [
    String.raw`L_e = \frac{\mu_0}{2\pi}\ln\frac{D}{d}, \qquad C = \frac{2\pi\varepsilon'}{\ln(D/d)}, \qquad G = \omega C \tan\delta`,
    String.raw`\text{TE}_{11}:\quad J_1'(k\tfrac{d}{2})\,Y_1'(k\tfrac{D}{2}) = J_1'(k\tfrac{D}{2})\,Y_1'(k\tfrac{d}{2}), \qquad f_c = \frac{c\,k}{2\pi\sqrt{\varepsilon_r'}}`,
  ],
  symbols: [
    { symbol: 'd', meaning: 'diameter of the inner conductor', unit: 'm' },
    { symbol: 'D', meaning: 'inner diameter of the shield', unit: 'm' },
    { symbol: 'L_e', meaning: 'inductance of the field between the conductors', unit: 'H/m' },
    { symbol: "\\varepsilon'", meaning: 'real permittivity of the dielectric', unit: 'F/m' },
    { symbol: 'f_c', meaning: 'cutoff of the first higher mode', unit: 'Hz' },
  ],
  range: 'round and concentric conductors, below the cutoff of TE11',
  accuracy: 'exact; 1e-12 relative in float64',
};

export const coaxial = defineLineKind({
  schema: z
    .strictObject({
      kind: z.literal('coaxial').meta({ title: 'Kind', description: 'A wire within a tube.', examples: ['coaxial'] }),
      inner_diameter_m: diameter('Inner diameter', 'Diameter of the inner conductor.', 9e-4),
      outer_diameter_m: diameter('Outer diameter', 'Diameter over the dielectric: the inside of the shield.', 2.95e-3),
      shield_thickness_m: diameter('Shield thickness', 'Thickness of the shield’s wall; without it the wall is taken as thicker than any skin depth.', 1.5e-4).optional(),
      conductor: conductor.default('copper').meta({ title: 'Inner conductor', description: 'What the inner conductor is made of.', examples: ['copper'] }),
      shield: conductor.optional().meta({ title: 'Shield', description: 'What the shield is made of; as the inner conductor when left out.', examples: ['copper'] }),
      dielectric,
      temperature_c: temperature,
    })
    .superRefine((line, context) => {
      mustExceed(context, line, 'outer_diameter_m', 'inner_diameter_m');
      conductorIssues(context, line.temperature_c, line.conductor, line.shield);
    })
    .meta({ id: 'CoaxialLine', title: 'Coaxial', description: 'A coaxial line by its diameters and materials.' }),
  methods: [coaxialField, roundConductors, widebandDebye],
  dimensions: ['inner_diameter_m', 'outer_diameter_m'],
  // The wall of the shield takes a Taylor step for every so much of its thickness, in radii and in skin depths.
  microseconds: ({ outer_diameter_m: D, shield_thickness_m: thickness }, points) => points * (thickness === undefined ? 2 : 5 + 2 * Math.log1p((2 * thickness) / D)),
  model(line, frequenciesHz) {
    const { inner_diameter_m: d, outer_diameter_m: D, shield_thickness_m: thickness, temperature_c } = line;
    const omega = frequenciesHz.map((each) => 2 * Math.PI * each);
    const inner = conductorAt(line.conductor, temperature_c);
    const shield = conductorAt(line.shield ?? line.conductor, temperature_c);
    const permittivity = dielectricOver(line.dielectric, omega);
    // ln(D/d) without cancellation in a thin gap.
    const logarithm = Math.log1p((D - d) / d);
    const isUnbounded = thickness === undefined && shield.resistivityOhmM > 0 && omega.includes(0);
    const relativePermittivity = permittivity.real.reduce((least, each) => Math.min(least, each), Infinity);
    return uniformField({
      omega,
      externalInductance: (vacuumPermeabilityHPerM / (2 * Math.PI)) * logarithm,
      vacuumCapacitance: (2 * Math.PI * vacuumPermittivityFPerM) / logarithm,
      permittivity,
      parts: [wirePart(d, inner, omega), tubePart(D, thickness, shield, omega)],
      skinDepth: skinDepthM(inner, omega),
      singleModeLimitHz: (speedOfLightMPerS * coaxialTe11((D - d) / D)) / (Math.PI * D * Math.sqrt(relativePermittivity)),
      methods: [
        { method: coaxialField, inRange: true },
        { method: roundConductors, inRange: true },
      ],
      warnings: isUnbounded
        ? [{ code: 'unbounded_shield', pointer: '/shield_thickness_m', detail: 'a shield without thickness has no resistance at 0 Hz and an inductance without bound; both are left out there, so give shield_thickness_m' }]
        : [],
    });
  },
});
