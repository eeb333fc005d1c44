/** Two insulated wires twisted about each other. */
import { z } from 'zod';
import type { Method } from '../calculation';
import { vacuumPermeabilityHPerM, vacuumPermittivityFPerM } from '../constants';
import { roundConductors, skinDepthM, wirePart, type SeriesPart } from '../methods/internal-impedance';
import { widebandDebye } from '../methods/permittivity';
import { conductor, conductorAt, temperature } from '../nouns/conductor';
import { dielectric, dielectricOver } from '../nouns/dielectric';
import { acoshOfOnePlus } from '../numeric/acosh';
import { conductorIssues, diameter, mustExceed } from './dimensions';
import { defineLineKind } from './line-constants';
import { uniformField } from './uniform-field';

export const twistedPairFormula: Method = {
  id: 'twisted-pair-formula',
  title: 'Twisted pair of insulated wires',
  source: 'Lefferson, Twisted magnet wire transmission line, IEEE Trans. Parts, Hybrids and Packaging PHP-7 (1971) 148-154 (from memory)',
  formulas: [
    String.raw`\theta = \arctan(\pi T D), \qquad q = 0.25 + 0.0004\,\theta^2\ (\theta\text{ in degrees}), \qquad \varepsilon_{\mathrm{eff}} = 1 + q(\varepsilon_r - 1)`,
    String.raw`Z_0 = \frac{\eta_0}{\pi\sqrt{\varepsilon_{\mathrm{eff}}}}\operatorname{arcosh}\frac{D}{d}, \qquad R = \frac{2 Z_{\text{wire}}}{\cos\theta}`,
  ],
  symbols: [
    { symbol: 'd', meaning: 'diameter of the wires', unit: 'm' },
    { symbol: 'D', meaning: 'diameter over the insulation, the distance between the axes', unit: 'm' },
    { symbol: 'T', meaning: 'twists in a metre', unit: '1/m' },
    { symbol: String.raw`\theta`, meaning: 'pitch angle', unit: 'deg' },
    { symbol: 'q', meaning: 'share of the field in the insulation' },
  ],
  range: 'pitch angles up to 45 degrees, insulation diameter up to 1.5 conductor diameters (film-insulated wire); wires touching along their insulation',
  accuracy: 'empirical, about 10 %; with the thick insulation of a data cable’s pair (diameters 1.8 to 1) the impedance comes out some 20 % high; the wires’ own loss exact, crowding of the current neglected',
};

const steepestDegrees = 45;
/** Film-insulated wire; above, the share of the field in the insulation is more than the formula says. */
const thickestRatio = 1.5;

export const twistedPair = defineLineKind({
  schema: z
    .strictObject({
      kind: z.literal('twisted_pair').meta({ title: 'Kind', description: 'Two insulated wires, twisted.', examples: ['twisted_pair'] }),
      conductor_diameter_m: diameter('Conductor diameter', 'Diameter of each wire without its insulation.', 5.1e-4),
      insulation_diameter_m: diameter('Insulation diameter', 'Diameter over the insulation.', 9.5e-4),
      twists_per_m: z.number().min(0).max(1e5).meta({ title: 'Twists', description: 'Whole turns in a metre of the pair.', examples: [60], 'x-unit': '1/m' }),
      conductor: conductor.default('copper').meta({ title: 'Conductor', description: 'What the wires are made of.', examples: ['copper'] }),
      dielectric: dielectric.meta({ title: 'Insulation', description: 'What the insulation is made of; vacuum when left out.', examples: ['polyethylene'] }),
      temperature_c: temperature,
    })
    .superRefine((line, context) => {
      mustExceed(context, line, 'insulation_diameter_m', 'conductor_diameter_m');
      conductorIssues(context, line.temperature_c, line.conductor);
    })
    .meta({ id: 'TwistedPairLine', title: 'Twisted pair', description: 'Two insulated wires twisted about each other, by their dimensions and materials.' }),
  methods: [twistedPairFormula, roundConductors, widebandDebye],
  dimensions: ['conductor_diameter_m', 'insulation_diameter_m', 'twists_per_m'],
  model(line, frequenciesHz) {
    const { conductor_diameter_m: d, insulation_diameter_m: D, twists_per_m: T, temperature_c } = line;
    const omega = frequenciesHz.map((each) => 2 * Math.PI * each);
    const wire = conductorAt(line.conductor, temperature_c);
    const tangent = Math.PI * T * D;
    const degrees = (Math.atan(tangent) * 180) / Math.PI;
    const isGentle = degrees <= steepestDegrees;
    const isThin = D <= thickestRatio * d;
    const filling = Math.min(1, 0.25 + 0.0004 * degrees * degrees);
    const arcosh = acoshOfOnePlus((D - d) / d);
    const longer = lengthened(wirePart(d, wire, omega), Math.hypot(1, tangent));
    return uniformField({
      omega,
      externalInductance: (vacuumPermeabilityHPerM / Math.PI) * arcosh,
      vacuumCapacitance: (Math.PI * vacuumPermittivityFPerM) / arcosh,
      permittivity: dielectricOver(line.dielectric, omega),
      filling,
      parts: [longer, longer],
      skinDepth: skinDepthM(wire, omega),
      singleModeLimitHz: Infinity,
      methods: [
        { method: twistedPairFormula, inRange: isGentle && isThin },
        { method: roundConductors, inRange: true },
      ],
      warnings: [
        ...(isGentle ? [] : [{ code: 'steep_twist', pointer: '/twists_per_m', detail: `the formula holds up to a pitch angle of ${steepestDegrees} degrees; these twists have ${degrees.toPrecision(3)}` }]),
        ...(isThin ? [] : [{ code: 'thick_insulation', pointer: '/insulation_diameter_m', detail: `the formula holds up to an insulation diameter of ${thickestRatio} conductor diameters; at ${(D / d).toPrecision(3)} the impedance comes out high, some 20 % at 1.8` }]),
      ],
    });
  },
});

/** A twisted wire is longer than the pair. */
function lengthened(part: SeriesPart, factor: number): SeriesPart {
  const times = (column: Float64Array) => column.map((each) => each * factor);
  return { resistance: times(part.resistance), inductance: times(part.inductance), resistanceSlope: times(part.resistanceSlope), inductanceSlope: times(part.inductanceSlope) };
}
