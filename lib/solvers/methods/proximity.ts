/** Crowding of the current in two parallel round wires that carry it there and back, on the sides that face each other. */
import type { Method } from '../calculation';
import { vacuumPermeabilityHPerM } from '../constants';
import type { ConductorProperties } from '../nouns/conductor';
import { alongSweep } from '../numeric/long-sweep';
import type { Diffused } from '../numeric/round-conductor';
import { excessOfPair, wirePair } from '../numeric/wire-pair';
import type { SeriesPart } from './internal-impedance';

export const proximityEffect: Method = {
  id: 'proximity-effect',
  title: 'Proximity effect of two round wires',
  source: 'Carson, Wave propagation over parallel wires: the proximity effect, Philosophical Magazine 41 (1921) 607-633 (from memory; derived anew from the harmonics of the vector potential, and checked by matching the fields at points)',
  formulas: [
    String.raw`M_n = \frac{2 n \mu_r}{\tau_n + n(1 + \mu_r)}, \qquad \tau_n = \frac{z I_{n+1}(z)}{I_n(z)}, \qquad z^2 = \frac{j\omega\mu a^2}{\rho}`,
    String.raw`u_n = \frac{1}{\sqrt n}\Big(\frac{a}{s}\Big)^{n} + \sum_k \frac{(n+k-1)!}{(n-1)!\,(k-1)!\,\sqrt{nk}}\Big(\frac{a}{s}\Big)^{n+k}(1 - M_k)\,u_k`,
    String.raw`Z = 2 Z_{\text{wire}} + j\omega\frac{\mu_0}{\pi}\Big(v + \sum_n \frac{e^{-nv}}{\sqrt n} M_n u_n\Big), \qquad v = \operatorname{arcosh}\frac{s}{2a}`,
  ],
  symbols: [
    { symbol: 'a', meaning: 'radius of each wire', unit: 'm' },
    { symbol: 's', meaning: 'distance between the axes', unit: 'm' },
    { symbol: 'u_n', meaning: 'harmonics of the field that reaches a wire' },
    { symbol: 'M_n', meaning: 'what a wire’s answer to them lacks of a perfect wire’s' },
    { symbol: String.raw`\mu_r`, meaning: 'relative permeability of the wires' },
  ],
  range: 'equal wires; spacing/diameter of 1.0045 or more, or a radius of up to 34 skin depths',
  accuracy: 'exact in the quasi-static field; 1e-12 relative in float64; nearer than the range, measured here, 4e-6 at a spacing of 1.001 diameters and 2e-2 at 1.0001',
};

/** A matrix of this size still takes but a few milliseconds. */
const mostHarmonics = 160;

/** Of |z|: an eddy of a skin depth has no harmonics far beyond, so that up to here 160 leave 1e-12, however near the wires (measured down to a gap of 1e-9 diameters). */
const smoothUpTo = 48;

export interface Harmonics {
  readonly harmonics: number;
  /** What they leave out, as a share of R and L. */
  readonly leftOut: number;
  readonly isEnough: boolean;
}

/** How many harmonics the spacing wants: the images of perfect wires fall as exp(-2 n arcosh(s/d)); six times the first that is left out was the most measured. */
export function harmonicsOf(diameterM: number, arcosh: number, conductor: ConductorProperties, omega: Float64Array): Harmonics {
  const harmonics = harmonicsFor(arcosh);
  const highest = omega.reduce((most, each) => Math.max(most, each), 0);
  const isSmooth = Math.sqrt(highest * diffusionPerOmega(diameterM, conductor)) <= smoothUpTo;
  const leftOut = isSmooth ? 0 : 6 * Math.exp(-2 * harmonics * arcosh);
  return { harmonics, leftOut, isEnough: leftOut <= 1e-12 };
}

function harmonicsFor(arcosh: number): number {
  return Math.min(mostHarmonics, Math.ceil(18.5 / arcosh) + 6);
}

/** About: a matrix for each of the first 400 points, and some nodes to interpolate between for each of the others. */
export function crowdingMicroseconds(arcosh: number, points: number): number {
  return Math.min(points, 400) * (15 + 1.2e-3 * harmonicsFor(arcosh) ** 3) + 2 * points;
}

/** |z|^2/omega. */
function diffusionPerOmega(diameterM: number, { resistivityOhmM, relativePermeability }: ConductorProperties): number {
  return (vacuumPermeabilityHPerM * relativePermeability * 0.25 * diameterM * diameterM) / resistivityOhmM;
}

/**
 * What the crowding adds to two isolated wires and to the inductance (mu0/pi) arcosh(s/d) of the field outside perfect ones: Z = j omega (mu0/pi) Q.
 * Source: Carson 1921. Symbols: diameter and spacing m, arcosh of their ratio, omega rad/s. Range: spacing > diameter, resistivity > 0. Accuracy: 1e-13 of R
 * and L where the harmonics are enough. Throws nothing. The trap: taken from the field of wires without skin instead, R would be the small rest of a
 * large reactance.
 */
export function crowdedPair(diameterM: number, spacingM: number, arcosh: number, conductor: ConductorProperties, omega: Float64Array, { harmonics }: Harmonics): SeriesPart {
  const mu = conductor.relativePermeability;
  const pair = wirePair((0.5 * diameterM) / spacingM, arcosh, mu, harmonics);
  const perOmega = diffusionPerOmega(diameterM, conductor);
  const perTurn = vacuumPermeabilityHPerM / Math.PI;
  // Where |z| is a thousand times what any harmonic is measured against, Q is a short series in 1/z.
  const thin = 1e3 * harmonics * (1 + mu);
  const excess = alongSweep(omega.map((each) => each * perOmega), thin * thin, (X) => excessOfPair(pair, X));
  const column = (value: (each: Diffused, omega: number) => number) => Float64Array.from(excess, (each, index) => perTurn * value(each, omega[index]));
  return {
    resistance: column(({ im }, w) => -w * im),
    inductance: column(({ re }) => re),
    resistanceSlope: column(({ im, imSlope }, w) => -im - w * perOmega * imSlope),
    inductanceSlope: column(({ reSlope }) => perOmega * reSlope),
  };
}
