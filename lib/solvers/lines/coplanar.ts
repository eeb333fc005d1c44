/** A coplanar line: a strip between two planes on the surface of a substrate. */
import { z } from 'zod';
import type { MethodUse, Warning } from '../calculation';
import { speedOfLightMPerS } from '../constants';
import { coplanarBacked, coplanarHalfSpace, coplanarLine, coplanarSubstrate, coplanarThickness, coplanarWidening, type CoplanarShape } from '../methods/coplanar-waveguide';
import { widebandDebye } from '../methods/permittivity';
import { hammerstadRoughness, incrementalInductance } from '../methods/planar-conductor';
import { conductor, conductorAt, temperature } from '../nouns/conductor';
import { dielectric, dielectricOver } from '../nouns/dielectric';
import { conductorIssues, diameter as dimension, leastM, mostM, optionalDiameter } from './dimensions';
import { defineLineKind } from './line-constants';
import { planarConstants } from './planar-constants';

const schema = z
  .strictObject({
    kind: z.literal('coplanar').meta({ title: 'Kind', description: 'A strip between two planes on one surface.', examples: ['coplanar'] }),
    width_m: dimension('Width', 'Width of the strip.', 6e-4),
    gap_m: dimension('Gap', 'From the strip to the plane on either side.', 2e-4),
    height_m: optionalDiameter('Height', 'Height of the substrate; without end when left out.', 1.5e-3),
    thickness_m: z.number().min(0).max(mostM).default(0).meta({ title: 'Thickness', description: 'Thickness of strip and planes; 0 leaves conductor loss out.', examples: [1.8e-5], 'x-unit': 'm' }),
    backed: z.boolean().default(false).meta({ title: 'Backed', description: 'Whether a ground plane lies below the substrate.', examples: [true] }),
    conductor: conductor.default('copper').meta({ title: 'Conductor', description: 'What strip and planes are made of.', examples: ['copper'] }),
    dielectric: dielectric.meta({ title: 'Substrate', description: 'A material by name, or by its numbers; vacuum when left out. Above it is vacuum.', examples: ['fr4'] }),
    roughness_rms_m: z.number().min(0).max(1e-3).default(0).meta({ title: 'Roughness', description: 'Root mean square roughness of the conductors.', examples: [1e-6], 'x-unit': 'm' }),
    temperature_c: temperature,
  })
  .superRefine(({ width_m: w, gap_m: s, height_m: h, thickness_m: t, backed, temperature_c, conductor }, context) => {
    const issue = (path: string, code: string, message: string) => context.addIssue({ code: 'custom', path: [path], params: { code }, message });
    if (t > 0 && t < leastM) issue('thickness_m', 'too_small', `must be 0, or at least ${leastM}; got ${t}`);
    else if (coplanarWidening(w, t) >= mostWidening * s) issue('thickness_m', 'geometry', `must leave a gap: at this thickness the strip counts as ${coplanarWidening(w, t).toPrecision(3)} wider, and gap_m is ${s}`);
    if (backed && h === undefined) issue('height_m', 'missing', 'must be given where backed is true');
    conductorIssues(context, temperature_c, conductor);
  })
  .meta({ id: 'CoplanarLine', title: 'Coplanar', description: 'A strip between two planes on a substrate, with or without a plane below.' });

/** Of the gap: what thickness may take of it before the formula has lost its sense. */
const mostWidening = 0.9;
const thickestShare = 0.1;
const lowestShare = 0.5;

export const coplanar = defineLineKind({
  schema,
  methods: [coplanarHalfSpace, coplanarSubstrate, coplanarBacked, coplanarThickness, incrementalInductance, hammerstadRoughness, widebandDebye],
  dimensions: ['width_m', 'gap_m', 'height_m', 'thickness_m'],
  model(line, frequenciesHz) {
    const { width_m: w, gap_m: s, height_m: h = Infinity, thickness_m: t, backed } = line;
    const omega = frequenciesHz.map((each) => 2 * Math.PI * each);
    const permittivity = dielectricOver(line.dielectric, omega);
    const material = conductorAt(line.conductor, line.temperature_c);
    const shape = thickened({ width: w, gap: s, height: h, isBacked: backed }, t);
    const isLow = h < lowestShare * (w + 2 * s);
    const isThick = t > thickestShare * Math.min(s, w);
    const main = h === Infinity ? coplanarHalfSpace : backed ? coplanarBacked : coplanarSubstrate;
    const methods: MethodUse[] = [{ method: main, inRange: !isLow }, ...(t > 0 ? [{ method: coplanarThickness, inRange: !isThick }] : [])];
    const warnings: Warning[] = [
      ...(isLow ? [{ code: 'outside_range', pointer: '/height_m', detail: `height_m should be at least ${lowestShare} of width_m + 2 gap_m for an accuracy of 1.5 %; it is ${(h / (w + 2 * s)).toPrecision(3)}, and at 0.2 the accuracy is 3.8 %` }] : []),
      ...(isThick ? [{ code: 'outside_range', pointer: '/thickness_m', detail: `thickness_m should be at most ${thickestShare} of gap_m and width_m; it is ${(t / Math.min(s, w)).toPrecision(3)}` }] : []),
    ];
    return planarConstants({
      omega,
      permittivity,
      lossless: (relativePermittivity) => coplanarLine(shape, relativePermittivity),
      isDispersive: false,
      conductor: { material, thicknessM: t, directResistance: t === 0 ? 0 : material.resistivityOhmM / (w * t), recession: t === 0 ? 0 : recession(line.width_m, s, h, t, backed), roughnessM: line.roughness_rms_m },
      singleModeLimitHz: Infinity,
      methods,
      warnings,
    });
  },
});

function thickened(shape: CoplanarShape, thickness: number): CoplanarShape {
  const widening = coplanarWidening(shape.width, thickness);
  return { ...shape, width: shape.width + widening, gap: shape.gap - widening };
}

/** Of the smallest dimension, for the difference. */
const step = 1e-4;

/** dL0/dn: strip and planes lose n on every side, and a plane below recedes. */
function recession(width: number, gap: number, height: number, thickness: number, isBacked: boolean): number {
  const inductance = (n: number) => coplanarLine(thickened({ width: width - 2 * n, gap: gap + 2 * n, height: isBacked ? height + 2 * n : height, isBacked }, thickness - 2 * n), 1).impedance / speedOfLightMPerS;
  const n = step * Math.min(width, gap, height, thickness);
  return (inductance(n) - inductance(-n)) / (2 * n);
}
