/** A microstrip line: a strip on a substrate over a ground plane. */
import { z } from 'zod';
import type { MethodUse, Warning } from '../calculation';
import { speedOfLightMPerS } from '../constants';
import { dispersedMicrostrip, dispersionRange, microstripDispersion, microstripImpedanceDispersion, microstripSingleModeLimitHz } from '../methods/microstrip-dispersion';
import { microstripLine, microstripRecession, microstripStatic, staticRange, type MicrostripShape } from '../methods/microstrip-static';
import { widebandDebye } from '../methods/permittivity';
import { hammerstadRoughness, incrementalInductance, type PlanarConductor } from '../methods/planar-conductor';
import { conductor, conductorAt, temperature } from '../nouns/conductor';
import { dielectric, dielectricOver } from '../nouns/dielectric';
import { conductorIssues, diameter as dimension, leastM, mostM } from './dimensions';
import { defineLineKind } from './line-constants';
import { inHertz } from './line-warnings';
import { greatestPermittivity, planarConstants } from './planar-constants';

const schema = z
  .strictObject({
    kind: z.literal('microstrip').meta({ title: 'Kind', description: 'A strip on a substrate over a ground plane.', examples: ['microstrip'] }),
    width_m: dimension('Width', 'Width of the strip.', 2.9e-3),
    height_m: dimension('Height', 'Height of the substrate: from the plane to the underside of the strip.', 1.5e-3),
    thickness_m: z.number().min(0).max(mostM).default(0).meta({ title: 'Thickness', description: 'Thickness of the strip; 0 leaves conductor loss out.', examples: [3.5e-5], 'x-unit': 'm' }),
    conductor: conductor.default('copper').meta({ title: 'Conductor', description: 'What strip and plane are made of.', examples: ['copper'] }),
    dielectric: dielectric.meta({ title: 'Substrate', description: 'A material by name, or by its numbers; vacuum when left out. Above it is vacuum.', examples: ['fr4'] }),
    roughness_rms_m: z.number().min(0).max(1e-3).default(0).meta({ title: 'Roughness', description: 'Root mean square roughness of the conductors.', examples: [1.5e-6], 'x-unit': 'm' }),
    dispersion: z.boolean().default(false).meta({ title: 'Dispersion', description: 'Whether effective permittivity and impedance vary with frequency, as they do in gigahertz.', examples: [true] }),
    temperature_c: temperature,
  })
  .superRefine(({ thickness_m, temperature_c, conductor }, context) => {
    if (thickness_m > 0 && thickness_m < leastM) context.addIssue({ code: 'custom', path: ['thickness_m'], params: { code: 'too_small' }, message: `must be 0, or at least ${leastM}; got ${thickness_m}` });
    conductorIssues(context, temperature_c, conductor);
  })
  .meta({ id: 'MicrostripLine', title: 'Microstrip', description: 'A microstrip line by its dimensions and materials.' });

type Microstrip = z.output<typeof schema>;

export const microstrip = defineLineKind({
  schema,
  methods: [microstripStatic, microstripDispersion, microstripImpedanceDispersion, incrementalInductance, hammerstadRoughness, widebandDebye],
  dimensions: ['width_m', 'height_m', 'thickness_m'],
  model(line, frequenciesHz) {
    const { width_m: w, height_m: h, thickness_m: t, dispersion } = line;
    const omega = frequenciesHz.map((each) => 2 * Math.PI * each);
    const shape = { u: w / h, tau: t / h };
    const permittivity = dielectricOver(line.dielectric, omega);
    const er = greatestPermittivity(permittivity);
    const highestHz = frequenciesHz.reduce((highest, each) => Math.max(highest, each), 0);
    const still = staticWarnings(shape, er);
    const moving = dispersion ? dispersionWarnings(shape, er, h, highestHz) : leftOutWarnings(shape, er, h, highestHz);
    const methods: MethodUse[] = [{ method: microstripStatic, inRange: still.length === 0 && (dispersion || moving.length === 0) }];
    if (dispersion) methods.push(...[microstripDispersion, microstripImpedanceDispersion].map((method) => ({ method, inRange: moving.length === 0 })));
    return planarConstants({
      omega,
      permittivity,
      lossless(epsilon, frequencyHz) {
        const found = microstripLine(shape, epsilon);
        return dispersion ? dispersedMicrostrip(found, shape, epsilon, h, frequencyHz) : found;
      },
      isDispersive: dispersion,
      conductor: conductorOf(line, shape),
      singleModeLimitHz: microstripSingleModeLimitHz(w, h, er, speedOfLightMPerS),
      methods,
      warnings: [...still, ...moving],
    });
  },
});

function conductorOf({ width_m, height_m, thickness_m, conductor, temperature_c, roughness_rms_m }: Microstrip, shape: MicrostripShape): PlanarConductor {
  const material = conductorAt(conductor, temperature_c);
  return {
    material,
    thicknessM: thickness_m,
    directResistance: thickness_m === 0 ? 0 : material.resistivityOhmM / (width_m * thickness_m),
    recession: thickness_m === 0 ? 0 : microstripRecession(shape, height_m),
    roughnessM: roughness_rms_m,
  };
}

/** Thicker than this, thickness is no longer the small correction that the method takes it for. */
const mostThickness = 0.2;
/** On a high permittivity the error of the effective permittivity is 0.5 % with a thickness of half the width, and above 1 % with one of the width. */
const mostOfWidth = 0.5;

function staticWarnings({ u, tau }: MicrostripShape, er: number): Warning[] {
  const { leastRatio, mostRatio, mostPermittivity } = staticRange;
  return [
    ...(u < leastRatio || u > mostRatio ? [outside('/width_m', `width_m over height_m should be ${leastRatio} to ${mostRatio} for the formulas for microstrip; it is ${short(u)}`)] : []),
    ...(er > mostPermittivity ? [outside('/dielectric', `the relative permittivity should be at most ${mostPermittivity} for the formulas for microstrip; it is ${short(er)}`)] : []),
    ...(tau > mostThickness || tau > mostOfWidth * u
      ? [{ code: 'narrow_and_thick', pointer: '/thickness_m', detail: `thickness_m should be at most ${mostThickness} of height_m and ${mostOfWidth} of width_m for the stated accuracy; it is ${short(tau)} of the height and ${short(tau / u)} of the width` }]
      : []),
  ];
}

function dispersionWarnings({ u }: MicrostripShape, er: number, heightM: number, highestHz: number): Warning[] {
  const { leastRatio, mostRatio, mostPermittivity, mostHeight } = dispersionRange;
  const wavelengths = (heightM * highestHz) / speedOfLightMPerS;
  return [
    ...(u < leastRatio || u > mostRatio ? [outside('/width_m', `width_m over height_m should be ${leastRatio} to ${mostRatio} for the formulas for dispersion; it is ${short(u)}`)] : []),
    ...(er > mostPermittivity ? [outside('/dielectric', `the relative permittivity should be at most ${mostPermittivity} for the formulas for dispersion; it is ${short(er)}`)] : []),
    ...(wavelengths > mostHeight ? [outside('/height_m', `height_m should be at most ${mostHeight} wavelengths in vacuum for the formulas for dispersion; at ${inHertz(highestHz)} it is ${short(wavelengths)}`)] : []),
  ];
}

/** What dispersion may move the effective permittivity by before it is missed. */
const noticeable = 0.01;

function leftOutWarnings(shape: MicrostripShape, er: number, heightM: number, highestHz: number): Warning[] {
  const found = microstripLine(shape, er);
  const rise = dispersedMicrostrip(found, shape, er, heightM, highestHz).effectivePermittivity / found.effectivePermittivity - 1;
  if (rise <= noticeable) return [];
  return [{ code: 'dispersion_left_out', pointer: '/dispersion', detail: `at ${inHertz(highestHz)} dispersion raises the effective permittivity by ${short(100 * rise)} %, which is left out; set dispersion to true` }];
}

function outside(pointer: string, detail: string): Warning {
  return { code: 'outside_range', pointer, detail };
}

function short(value: number): string {
  return String(Number(value.toPrecision(3)));
}
