/**
 * A line as a data sheet gives it: impedance and velocity, the same at every frequency, and attenuation over frequency.
 *
 *   gamma = alpha + j w/v, Zc = Z0   =>   R = alpha Z0,  L = Z0/v,  G = alpha/Z0,  C = 1/(Z0 v)
 */
import { z } from 'zod';
import type { Method, Warning } from '../calculation';
import { decibelsPerNeper, speedOfLightMPerS } from '../constants';
import { monotoneInterpolant } from '../numeric/monotone-interpolation';
import { defineLineKind } from './line-constants';
import { monotoneTable, outsideWarnings } from './rlgc-table';

export const dataSheetLine: Method = {
  id: 'data-sheet-line',
  title: 'Line of given impedance, velocity and attenuation',
  source: 'R/L = G/C, Heaviside’s condition, solved for R, L, G and C (Pozar, Microwave Engineering, 4th ed., section 2.7, from memory); attenuation by the root of frequency and by frequency (the form of the insertion loss limits of ISO/IEC 11801 and TIA-568, from memory)',
  formulas: [
    String.raw`R = \alpha Z_0, \quad L = \frac{Z_0}{v}, \quad G = \frac{\alpha}{Z_0}, \quad C = \frac{1}{Z_0 v} \quad\Rightarrow\quad \gamma = \alpha + j\frac{\omega}{v}, \quad Z_c = Z_0`,
    String.raw`\alpha_{\mathrm{dB/m}} = k_1\sqrt{\frac{f}{f_0}} + k_2\,\frac{f}{f_0}`,
  ],
  symbols: [
    { symbol: 'Z_0', meaning: 'characteristic impedance', unit: 'ohm' },
    { symbol: 'v', meaning: 'velocity', unit: 'm/s' },
    { symbol: String.raw`\alpha`, meaning: 'attenuation', unit: 'Np/m' },
    { symbol: 'k_1, k_2', meaning: 'attenuation in the conductors and in the dielectric at the reference frequency', unit: 'dB/m' },
    { symbol: 'f_0', meaning: 'reference frequency', unit: 'Hz' },
  ],
  range: 'where the data sheet’s impedance and velocity hold, commonly above a few megahertz; below, a real line’s impedance and delay grow',
  accuracy: 'impedance, velocity and attenuation as given to 1e-12; how the loss divides into R and G is a choice that those three do not show',
};

const mostPoints = 2000;
/** Points nearer to each other than this part of their frequency are one point. */
const leastRatio = 1 + 1e-9;
const mostDbPerM = 1e6;
/** Hz. At direct current a data sheet has no attenuation. */
const lowestPoint = 1e-3;

const decibels = (title: string, description: string, example: number) => z.number().min(0).max(mostDbPerM).meta({ title, description, examples: [example], 'x-unit': 'dB/m' });
const hertz = (title: string, description: string, example: number) => z.number().min(lowestPoint).max(1e15).meta({ title, description, examples: [example], 'x-unit': 'Hz' });

const attenuationPoint = z
  .strictObject({
    frequency_hz: hertz('Frequency', 'Frequency of one point, ascending.', 100e6),
    attenuation_db_per_m: decibels('Attenuation', 'Attenuation at this frequency.', 0.07),
  })
  .meta({ title: 'Point', description: 'One point of the data sheet.', examples: [{ frequency_hz: 100e6, attenuation_db_per_m: 0.07 }] });

const attenuationPoints = z
  .strictObject({
    points: z
      .array(attenuationPoint)
      .min(1)
      .max(mostPoints)
      .meta({ title: 'Points', description: 'Points of the data sheet, by ascending frequency; read by monotone cubics over the root of frequency.', examples: [[{ frequency_hz: 100e6, attenuation_db_per_m: 0.07 }, { frequency_hz: 1e9, attenuation_db_per_m: 0.24 }]] }),
  })
  .superRefine(({ points }, context) => {
    const wrong = points.findIndex(({ frequency_hz }, index) => index > 0 && !(frequency_hz >= points[index - 1].frequency_hz * leastRatio));
    if (wrong < 1) return;
    const message = `must be greater than that of the point before it (${points[wrong - 1].frequency_hz}); got ${points[wrong].frequency_hz}`;
    context.addIssue({ code: 'custom', path: ['points', wrong, 'frequency_hz'], params: { code: 'not_ascending' }, message });
  })
  .meta({ id: 'AttenuationPoints', title: 'Points', description: 'Attenuation at some frequencies.', examples: [{ points: [{ frequency_hz: 100e6, attenuation_db_per_m: 0.07 }, { frequency_hz: 1e9, attenuation_db_per_m: 0.24 }] }] });

const attenuationLaw = z
  .strictObject({
    sqrt_db_per_m: decibels('Conductor part', 'What grows with the root of frequency, at the reference frequency.', 0.066),
    linear_db_per_m: decibels('Dielectric part', 'What grows with frequency, at the reference frequency.', 0.004),
    reference_frequency_hz: hertz('Reference frequency', 'Where both parts are as given.', 100e6),
  })
  .meta({ id: 'AttenuationLaw', title: 'Law', description: 'sqrt part x sqrt(f/fref) + linear part x f/fref.', examples: [{ sqrt_db_per_m: 0.066, linear_db_per_m: 0.004, reference_frequency_hz: 100e6 }] });

type Points = z.output<typeof attenuationPoints>['points'];
type Law = z.output<typeof attenuationLaw>;

/** Attenuation in dB/m, and its derivative to frequency. */
interface Attenuation {
  readonly value: number;
  readonly perHz: number;
}

export const datasheet = defineLineKind({
  schema: z
    .strictObject({
      kind: z.literal('datasheet').meta({ title: 'Kind', description: 'Given by a data sheet’s impedance, velocity and attenuation.', examples: ['datasheet'] }),
      characteristic_impedance_ohm: z.number().min(1e-3).max(1e6).meta({ title: 'Characteristic impedance', description: 'Characteristic impedance, taken as real and the same at every frequency.', examples: [50], 'x-unit': 'ohm' }),
      velocity_factor: z.number().min(1e-3).max(1).meta({ title: 'Velocity factor', description: 'Phase velocity over the speed of light in vacuum.', examples: [0.83] }),
      attenuation: z.union([attenuationPoints, attenuationLaw]).meta({ title: 'Attenuation', description: 'By points, or by a law of two parts.', examples: [{ sqrt_db_per_m: 0.066, linear_db_per_m: 0.004, reference_frequency_hz: 100e6 }] }),
    })
    .meta({ id: 'DatasheetLine', title: 'Data sheet', description: 'A line given by the impedance, velocity factor and attenuation of its data sheet.' }),
  methods: [dataSheetLine, monotoneTable],
  /**
   * Source: `dataSheetLine`; points by `monotoneTable` over the root of frequency, by which conductor loss is a straight line and with the
   * dielectric's a parabola, so that three points of such a law give it back. Symbols: as above. Range: outside the points, attenuation is scaled by the
   * root of frequency from the nearest one, with a warning. Accuracy: exact. Throws nothing.
   * The trap: at direct current the root's slope is infinite; dR/dw changes the size of a transmission and not its phase there, so 0 stands for it.
   */
  model(line, frequenciesHz) {
    const { characteristic_impedance_ohm: impedance, attenuation } = line;
    const velocity = line.velocity_factor * speedOfLightMPerS;
    const isTable = 'points' in attenuation;
    const read = isTable ? readPoints(attenuation.points) : (frequency: number) => readLaw(attenuation, frequency);
    const found = Array.from(frequenciesHz, read);
    const alpha = Float64Array.from(found, ({ value }) => value / decibelsPerNeper);
    const alphaSlope = Float64Array.from(found, ({ perHz }) => perHz / decibelsPerNeper / (2 * Math.PI));
    const zero = new Float64Array(frequenciesHz.length);
    const outside = isTable ? outsideWarnings(attenuation.points.map(({ frequency_hz }) => frequency_hz), frequenciesHz, '/attenuation/points', 'attenuation is scaled by the root of frequency from the nearest point') : [];
    return {
      constants: {
        resistance: alpha.map((each) => each * impedance),
        inductance: zero.map(() => impedance / velocity),
        conductance: alpha.map((each) => each / impedance),
        capacitance: zero.map(() => 1 / (impedance * velocity)),
        slope: { resistance: alphaSlope.map((each) => each * impedance), inductance: zero, conductance: alphaSlope.map((each) => each / impedance), capacitance: zero },
      },
      methods: [{ method: dataSheetLine, inRange: true }, ...(isTable ? [{ method: monotoneTable, inRange: outside.length === 0 }] : [])],
      warnings: [...outside, ...causalityWarnings(attenuation)],
    };
  },
});

function readLaw({ sqrt_db_per_m, linear_db_per_m, reference_frequency_hz }: Law, frequency: number): Attenuation {
  const ratio = frequency / reference_frequency_hz;
  const root = Math.sqrt(ratio);
  return { value: sqrt_db_per_m * root + linear_db_per_m * ratio, perHz: frequency === 0 ? 0 : (sqrt_db_per_m * (0.5 / root) + linear_db_per_m) / reference_frequency_hz };
}

function readPoints(points: Points): (frequency: number) => Attenuation {
  const read = monotoneInterpolant(points.map(({ frequency_hz }) => Math.sqrt(frequency_hz)), points.map(({ attenuation_db_per_m }) => attenuation_db_per_m));
  const [first, last] = [points[0], points[points.length - 1]];
  return (frequency) => {
    if (frequency < first.frequency_hz || points.length === 1) return byRoot(first, frequency);
    if (frequency > last.frequency_hz) return byRoot(last, frequency);
    const root = Math.sqrt(frequency);
    const { value, slope } = read(root);
    return { value, perHz: (slope * 0.5) / root };
  };
}

/** In proportion to the root of frequency, through one point. */
function byRoot(point: Points[number], frequency: number): Attenuation {
  const root = Math.sqrt(frequency / point.frequency_hz);
  return { value: point.attenuation_db_per_m * root, perHz: frequency === 0 ? 0 : (point.attenuation_db_per_m * (0.5 / root)) / point.frequency_hz };
}

/** Loss that varies with frequency turns the phase as well; a data sheet's one velocity leaves that out. */
function causalityWarnings(attenuation: { points: Points } | Law): Warning[] {
  const hasLoss = 'points' in attenuation ? attenuation.points.some(({ attenuation_db_per_m }) => attenuation_db_per_m > 0) : attenuation.sqrt_db_per_m > 0 || attenuation.linear_db_per_m > 0;
  if (!hasLoss) return [];
  return [{ code: 'not_causal', pointer: '/velocity_factor', detail: 'attenuation varies with frequency while velocity and impedance do not, which no causal line does; the true velocity falls a little towards low frequencies' }];
}
