/**
 * A quarter wave of line between two resistances, Z = sqrt(Rs R), R that of the load; or where the load is complex, that at a voltage
 * maximum or minimum of the given line, where the impedance along it is real.
 */
import Complex from 'complex.js';
import type { Method } from '../calculation';
import { speedOfLightMPerS } from '../constants';
import type { Element } from '../elements/element';
import { slopeAlong, turned, withinHalfWave } from './immittance-along-line';
import { lineElement, isLossless, stageOf } from './match-stubs-of-line';
import { inWavelengths, isReal, type DesignLine, type Match, type MatchAnswer, type MatchingProblem } from './matching';

export const quarterWaveMatching: Method = {
  id: 'quarter-wave-matching',
  title: 'Matching with a quarter-wave transformer',
  source: 'Pozar, Microwave Engineering, 4th ed., sections 2.5 and 5.4, equation 5.25 (numbers from memory)',
  formulas: [String.raw`Z = \sqrt{R_s R}, \qquad \ell = \frac{\lambda}{4}`, String.raw`\operatorname{Im} Z(d) = 0, \qquad R = Z(d)`],
  symbols: [
    { symbol: 'Z', meaning: 'characteristic impedance of the transformer', unit: 'ohm' },
    { symbol: 'R_s', meaning: 'resistance of the source', unit: 'ohm' },
    { symbol: 'R', meaning: 'resistance of the load, or of the line closed by it at the distance d', unit: 'ohm' },
    { symbol: String.raw`\ell, \lambda`, meaning: 'length of the transformer, wavelength on it', unit: 'm' },
    { symbol: 'd', meaning: 'distance from transformer to load', unit: 'm' },
  ],
  range: 'a real source; a complex load only with a line that makes it real',
  accuracy: 'exact; 1e-12 relative in float64',
};

const least = { characteristicImpedanceOhm: 1e-3, velocityFactor: 1e-3 } as const;
const most = { characteristicImpedanceOhm: 1e6, velocityFactor: 1 } as const;

/**
 * Source: Pozar 5.25. Range: Im Zs = 0. Accuracy: a few units of rounding. Throws nothing.
 * The trap: with loss, the impedance is not real where the voltage is greatest but beside it; the real one is what counts here.
 */
export function matchByQuarterWave(problem: MatchingProblem): MatchAnswer {
  const { load, source, line } = problem;
  const none = (reason: string): MatchAnswer => ({ matches: [], reasons: [reason] });
  if (!isReal(source)) return none('a quarter wave turns a resistance into a resistance, and source_impedance_ohm has a reactance');
  const velocityFactor = line ? velocityFactorOf(line, problem.frequencyHz) : 1;
  if (!(velocityFactor >= least.velocityFactor && velocityFactor <= most.velocityFactor)) {
    return none(`the velocity on the line is ${Number(velocityFactor.toPrecision(6))} of that of light, and a lossless line is taken from ${least.velocityFactor} to ${most.velocityFactor} only`);
  }
  if (isReal(load)) return collect([transformer(problem, velocityFactor, load.re, [], 'at the load')]);
  if (!line) return none('the load has a reactance, which a quarter wave alone cannot match; give line, a length of which makes the load real');
  const places = (['maximum', 'minimum'] as const).map((place) => {
    const distance = distanceToReal(problem, line, place);
    if (distance === null) return isLossless(line) ? `at a voltage ${place} so sharp a match is beyond numbers of 16 digits` : `with the loss of the line its impedance does not become real near a voltage ${place}`;
    const at = turned(stageOf(problem, line, 'impedance', 1).load, distance, turnOf(line)).mul(complexOf(line.characteristicImpedance));
    return transformer(problem, velocityFactor, at.re, lineElement(line, distance), `at a voltage ${place}, ${inWavelengths(distance)} from the load`);
  });
  return collect(places);
}

function collect(answers: readonly (Match | string)[]): MatchAnswer {
  return { matches: answers.filter((each) => typeof each !== 'string'), reasons: answers.filter((each) => typeof each === 'string') };
}

function transformer({ source, frequencyHz }: MatchingProblem, velocityFactor: number, resistance: number, toLoad: readonly Element[], where: string): Match | string {
  const Z = Math.sqrt(source.re) * Math.sqrt(resistance);
  const text = `${Number(Z.toPrecision(4))} ohm`;
  if (!(Z >= least.characteristicImpedanceOhm && Z <= most.characteristicImpedanceOhm)) return `the transformer would need ${text}, which is outside 0.001 to 1e6 ohm`;
  const section: Element = {
    kind: 'line',
    line: { kind: 'lossless', characteristic_impedance_ohm: Z, velocity_factor: velocityFactor },
    length_m: (velocityFactor * speedOfLightMPerS) / (4 * frequencyHz),
  };
  return { description: `Quarter wave of ${text} ${where}`, elements: [section, ...toLoad] };
}

/** That of a lossless line as it was given; a rounding above 1 is 1. */
function velocityFactorOf({ line, phaseRadPerM }: DesignLine, frequencyHz: number): number {
  if (line.kind === 'lossless') return line.velocity_factor;
  const factor = (2 * Math.PI * frequencyHz) / phaseRadPerM / speedOfLightMPerS;
  return factor > 1 && factor < 1 + 1e-12 ? 1 : factor;
}

const mostSteps = 60;
const stepsOfLoss = 8;

/** Radians from the load to where Im Z = 0; null where following the loss leads to no such place. */
function distanceToReal(problem: MatchingProblem, line: DesignLine, place: 'maximum' | 'minimum'): number | null {
  const bare = stageOf(problem, line, 'impedance', 0).load;
  const wave = bare.sub(1).div(bare.add(1));
  if (wave.re === 0 && wave.im === 0) return null;
  const start = withinHalfWave((Math.atan2(wave.im, wave.re) / 2 + (place === 'maximum' ? 0 : Math.PI / 2)) % Math.PI);
  // The shortest: loss may carry a place past the load, or leave one half a wave nearer.
  for (const from of isLossless(line) ? [start] : [start - Math.PI, start, start + Math.PI]) {
    let distance = from;
    const shares = isLossless(line) ? [1] : Array.from({ length: stepsOfLoss }, (_, index) => (index + 1) / stepsOfLoss);
    for (const share of shares) distance = nearestReal(problem, line, share, distance);
    if (distance >= 0 && isRealAt(problem, line, distance)) return distance;
  }
  return null;
}

/** Newton's method on the angle of Z, whose slope along the line does not vanish where Z is real and not Zc. */
function nearestReal(problem: MatchingProblem, line: DesignLine, share: number, start: number): number {
  const { k, load } = stageOf(problem, line, 'impedance', share);
  const { re, im } = line.characteristicImpedance;
  const Zc = complexOf({ re: Math.cos(share * Math.atan2(im, re)), im: Math.sin(share * Math.atan2(im, re)) });
  let u = start;
  for (let step = 0; step < mostSteps; step++) {
    const w = turned(load, u, k);
    const Z = w.mul(Zc);
    const change = -Math.atan2(Z.im, Z.re) / slopeAlong(w, k).div(w).im;
    if (!Number.isFinite(change)) return u;
    u += Math.max(-0.3, Math.min(0.3, change));
    if (Math.abs(change) < 4 * Number.EPSILON) return u;
  }
  return u;
}

function isRealAt(problem: MatchingProblem, line: DesignLine, distance: number): boolean {
  const Z = turned(stageOf(problem, line, 'impedance', 1).load, distance, turnOf(line)).mul(complexOf(line.characteristicImpedance));
  return Math.abs(Z.im) <= 1e-9 * Z.re;
}

function turnOf(line: DesignLine): Complex {
  return new Complex(line.attenuationNpPerM / line.phaseRadPerM, 1);
}

function complexOf({ re, im }: { readonly re: number; readonly im: number }): Complex {
  return new Complex(re, im);
}
