/** A stripline: a strip between two ground planes, in one dielectric. */
import { z } from 'zod';
import { widebandDebye } from '../methods/permittivity';
import { hammerstadRoughness, incrementalInductance, type PlanarConductor } from '../methods/planar-conductor';
import { flatStripline, striplineImpedance, striplineRecession, striplineSingleModeLimitHz, thickStripline } from '../methods/stripline';
import { conductor, conductorAt, temperature } from '../nouns/conductor';
import { dielectric, dielectricOver } from '../nouns/dielectric';
import type { StripBetweenPlanes } from '../numeric/thick-strip-between-planes';
import { conductorIssues, diameter as dimension, leastM, mostM, mustExceed } from './dimensions';
import { defineLineKind } from './line-constants';
import { greatestPermittivity, planarConstants } from './planar-constants';

const schema = z
  .strictObject({
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
    if (room > 0 && room - Math.abs(offset_m) < leastGap * plane_spacing_m) {
      const message = `must leave ${leastGap} of plane_spacing_m or more between strip and plane: it must be less than half of plane_spacing_m minus thickness_m (${room}), to either side; got ${offset_m}`;
      context.addIssue({ code: 'custom', path: ['offset_m'], params: { code: 'geometry' }, message });
    }
    conductorIssues(context, line.temperature_c, line.conductor);
  })
  .meta({ id: 'StriplineLine', title: 'Stripline', description: 'A stripline by its dimensions and materials.' });

/** Of the plane spacing. Numbers of 16 digits tell the strip from the plane to some 1e-7 there. */
const leastGap = 1e-9;

type Stripline = z.output<typeof schema>;

export const stripline = defineLineKind({
  schema,
  methods: [flatStripline, thickStripline, incrementalInductance, hammerstadRoughness, widebandDebye],
  dimensions: ['width_m', 'plane_spacing_m', 'thickness_m'],
  // A map of the cross-section, and seven more for the derivative where there is conductor loss.
  microseconds: ({ thickness_m }, points) => (thickness_m === 0 ? 500 : 10_000) + points,
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
      warnings: [],
    });
  },
});

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
}
