<<<<<<< HEAD
/** A stripline: a strip between two ground planes, in one dielectric. */
import { z } from 'zod';
import { widebandDebye } from '../methods/permittivity';
import { hammerstadRoughness, incrementalInductance, type PlanarConductor } from '../methods/planar-conductor';
import { flatStripline, striplineImpedance, striplineRecession, striplineSingleModeLimitHz, thickStripline } from '../methods/stripline';
import { conductor, conductorAt, temperature } from '../nouns/conductor';
import { dielectric, dielectricOver } from '../nouns/dielectric';
import type { StripBetweenPlanes } from '../numeric/thick-strip-between-planes';
import { conductorIssues, diameter as dimension, leastM, mostM, mustExceed } from './dimensions';
=======
/** A stripline: a strip between two planes, all in one dielectric. */
import { z } from 'zod';
import { speedOfLightMPerS, vacuumPermeabilityHPerM } from '../constants';
import { widebandDebye } from '../methods/permittivity';
import { hammerstadRoughness, incrementalInductance } from '../methods/planar-conductor';
import { centredStripline, stripCapacitance, striplineField, striplineImpedance, type StripShape } from '../methods/stripline-field';
import { conductor, conductorAt, temperature } from '../nouns/conductor';
import { dielectric, dielectricOver } from '../nouns/dielectric';
import { conductorIssues, diameter as dimension, leastM, mostM } from './dimensions';
>>>>>>> 7344cb1 (Striplines of any thickness and offset, coplanar lines with and without a plane; what the contract tests found)
import { defineLineKind } from './line-constants';
import { greatestPermittivity, planarConstants } from './planar-constants';

const schema = z
  .strictObject({
<<<<<<< HEAD
    kind: z.literal('stripline').meta({ title: 'Kind', description: 'A strip between two ground planes.', examples: ['stripline'] }),
    width_m: dimension('Width', 'Width of the strip.', 3e-4),
    plane_spacing_m: dimension('Plane spacing', 'From one ground plane to the other.', 8e-4),
    thickness_m: z.number().min(0).max(mostM).default(0).meta({ title: 'Thickness', description: 'Thickness of the strip; 0 leaves conductor loss out.', examples: [1.7e-5], 'x-unit': 'm' }),
    offset_m: z.number().min(-mostM).max(mostM).default(0).meta({ title: 'Offset', description: 'How far the middle of the strip is from midway between the planes.', examples: [1e-4], 'x-unit': 'm' }),
    conductor: conductor.default('copper').meta({ title: 'Conductor', description: 'What strip and planes are made of.', examples: ['copper'] }),
    dielectric,
    roughness_rms_m: z.number().min(0).max(1e-3).default(0).meta({ title: 'Roughness', description: 'Root mean square roughness of the conductors.', examples: [1.5e-6], 'x-unit': 'm' }),
    temperature_c: temperature,
  })
  .superRefine((line, context) => {
    const { thickness_m, plane_spacing_m, offset_m } = line;
    if (thickness_m > 0 && thickness_m < leastM) context.addIssue({ code: 'custom', path: ['thickness_m'], params: { code: 'too_small' }, message: `must be 0, or at least ${leastM}; got ${thickness_m}` });
    mustExceed(context, line, 'plane_spacing_m', 'thickness_m');
    const room = 0.5 * (plane_spacing_m - thickness_m);
    if (room > 0 && Math.abs(offset_m) >= room) {
      context.addIssue({ code: 'custom', path: ['offset_m'], params: { code: 'geometry' }, message: `must be less than half of plane_spacing_m minus thickness_m (${room}), to either side; got ${offset_m}` });
    }
    conductorIssues(context, line.temperature_c, line.conductor);
  })
  .meta({ id: 'StriplineLine', title: 'Stripline', description: 'A stripline by its dimensions and materials.' });

type Stripline = z.output<typeof schema>;

export const stripline = defineLineKind({
  schema,
  methods: [flatStripline, thickStripline, incrementalInductance, hammerstadRoughness, widebandDebye],
  dimensions: ['width_m', 'plane_spacing_m', 'thickness_m'],
  model(line, frequenciesHz) {
    const omega = frequenciesHz.map((each) => 2 * Math.PI * each);
    const strip = stripOf(line);
    const inVacuum = striplineImpedance(strip);
    const permittivity = dielectricOver(line.dielectric, omega);
    return planarConstants({
      omega,
      permittivity,
      lossless: (er) => ({ impedance: inVacuum / Math.sqrt(er), effectivePermittivity: er, share: 1 }),
      isDispersive: false,
      conductor: conductorOf(line, strip),
      singleModeLimitHz: striplineSingleModeLimitHz(line.width_m, line.plane_spacing_m, greatestPermittivity(permittivity)),
      methods: [{ method: line.thickness_m === 0 ? flatStripline : thickStripline, inRange: true }],
=======
    kind: z.literal('stripline').meta({ title: 'Kind', description: 'A strip between two planes.', examples: ['stripline'] }),
    width_m: dimension('Width', 'Width of the strip.', 2.5e-4),
    plane_spacing_m: dimension('Plane spacing', 'Distance between the planes.', 6e-4),
    thickness_m: z.number().min(0).max(mostM).default(0).meta({ title: 'Thickness', description: 'Thickness of the strip; 0 leaves conductor loss out.', examples: [1.8e-5], 'x-unit': 'm' }),
    offset_m: z.number().min(-mostM).max(mostM).default(0).meta({ title: 'Offset', description: 'From half way between the planes to the middle of the strip.', examples: [5e-5], 'x-unit': 'm' }),
    conductor: conductor.default('copper').meta({ title: 'Conductor', description: 'What strip and planes are made of.', examples: ['copper'] }),
    dielectric,
    roughness_rms_m: z.number().min(0).max(1e-3).default(0).meta({ title: 'Roughness', description: 'Root mean square roughness of the conductors.', examples: [1e-6], 'x-unit': 'm' }),
    temperature_c: temperature,
  })
  .superRefine(({ plane_spacing_m: b, thickness_m: t, offset_m: offset, temperature_c, conductor }, context) => {
    const issue = (path: string, code: string, message: string) => context.addIssue({ code: 'custom', path: [path], params: { code }, message });
    if (t > 0 && t < leastM) issue('thickness_m', 'too_small', `must be 0, or at least ${leastM}; got ${t}`);
    if (t >= b) issue('thickness_m', 'geometry', `must be less than plane_spacing_m (${b}); got ${t}`);
    // A millionth of the spacing must be left, so that the strip and the plane are apart in the numbers too.
    else if (Math.abs(offset) + 0.5 * t > b * (0.5 - leastGap)) issue('offset_m', 'geometry', `must leave the strip between the planes, within ${0.5 * b - 0.5 * t} of the middle; got ${offset}`);
    conductorIssues(context, temperature_c, conductor);
  })
  .meta({ id: 'Stripline', title: 'Stripline', description: 'A strip between two planes, by its dimensions and materials.' });

const leastGap = 1e-6;
/** Thinner than this part of the width, thickness is below what the panels resolve. */
const thinnest = 1e-7;

export const stripline = defineLineKind({
  schema,
  methods: [centredStripline, striplineField, incrementalInductance, hammerstadRoughness, widebandDebye],
  dimensions: ['width_m', 'plane_spacing_m', 'thickness_m', 'offset_m'],
  model(line, frequenciesHz) {
    const { width_m: w, plane_spacing_m: b, thickness_m: t, offset_m } = line;
    const omega = frequenciesHz.map((each) => 2 * Math.PI * each);
    const permittivity = dielectricOver(line.dielectric, omega);
    const material = conductorAt(line.conductor, line.temperature_c);
    const leastThickness = thinnest * Math.min(w, b);
    const shape = { width: w / b, thickness: t < leastThickness ? 0 : t / b, middle: 0.5 + Math.abs(offset_m) / b };
    const vacuumImpedance = striplineImpedance(shape, 1);
    const isExact = shape.thickness === 0 && offset_m === 0;
    return planarConstants({
      omega,
      permittivity,
      lossless: (relativePermittivity) => ({ impedance: vacuumImpedance / Math.sqrt(relativePermittivity), effectivePermittivity: relativePermittivity, share: relativePermittivity }),
      isDispersive: false,
      conductor: {
        material,
        thicknessM: t,
        directResistance: t === 0 ? 0 : material.resistivityOhmM / (w * t),
        recession: t === 0 ? 0 : recession({ ...shape, thickness: Math.max(t, leastThickness) / b }) / b,
        roughnessM: line.roughness_rms_m,
      },
      singleModeLimitHz: speedOfLightMPerS / (Math.sqrt(greatestPermittivity(permittivity)) * (2 * w + 0.5 * Math.PI * b)),
      methods: [{ method: isExact ? centredStripline : striplineField, inRange: true }],
>>>>>>> 7344cb1 (Striplines of any thickness and offset, coplanar lines with and without a plane; what the contract tests found)
      warnings: [],
    });
  },
});

<<<<<<< HEAD
function stripOf({ width_m: width, plane_spacing_m, thickness_m: thickness, offset_m }: Stripline): StripBetweenPlanes {
  const room = 0.5 * (plane_spacing_m - thickness);
  return { width, thickness, gapBelow: room - offset_m, gapAbove: room + offset_m };
}

function conductorOf({ width_m, thickness_m, conductor, temperature_c, roughness_rms_m }: Stripline, strip: StripBetweenPlanes): PlanarConductor {
  const material = conductorAt(conductor, temperature_c);
  const isLossy = thickness_m > 0 && material.resistivityOhmM > 0;
  return {
    material,
    thicknessM: thickness_m,
    directResistance: isLossy ? material.resistivityOhmM / (width_m * thickness_m) : 0,
    recession: isLossy ? striplineRecession(strip) : 0,
    roughnessM: roughness_rms_m,
  };
=======
/** Of each dimension, for the difference: the panels move with it, so that their error does not show. */
const step = 1e-3;

/** dL0/dn in units of the spacing: the strip loses n on every side, the planes recede by n. */
function recession({ width, thickness, middle }: StripShape): number {
  const inductance = (n: number) => {
    const spacing = 1 + 2 * n;
    return vacuumPermeabilityHPerM / stripCapacitance({ width: (width - 2 * n) / spacing, thickness: (thickness - 2 * n) / spacing, middle: (middle + n) / spacing });
  };
  const n = step * Math.min(width, thickness, 1 - middle - 0.5 * thickness);
  return (inductance(n) - inductance(-n)) / (2 * n);
>>>>>>> 7344cb1 (Striplines of any thickness and offset, coplanar lines with and without a plane; what the contract tests found)
}
