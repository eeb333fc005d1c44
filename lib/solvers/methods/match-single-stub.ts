/**
 * One stub at the source's end and a length of the same line to the load. In admittance for a stub across the path, in impedance for one
 * in series; w stands for either, over that of the line, g for the real part that the source asks for, t = tan(beta d):
 *
 *   Re w(t) = g   <=>   A t^2 - 2 h t + C = 0,   A = g |wL|^2 - gL,   h = g bL,   C = g - gL
 *   h^2 - A C = gL [(g - gL)(1 - g gL) + g bL^2]
 *
 * wL = gL + j bL of the load. The stub then makes up the imaginary part.
 */
import Complex from 'complex.js';
import type { Method } from '../calculation';
import { slopeAlong, stub, stubLength, turned, withinHalfWave, type Immittance } from './immittance-along-line';
import { endOf, followLoss, isLossless, isSame, lineElement, noLengths, stageOf, stubElement, stubKinds, type FoundLengths, type Stage, type StubKind } from './match-stubs-of-line';
import { inDigits, inWavelengths, withoutDust, type DesignLine, type Match, type MatchAnswer, type MatchingProblem } from './matching';

export const singleStubMatching: Method = {
  id: 'single-stub-matching',
  title: 'Matching with one stub',
  source: 'Pozar, Microwave Engineering, 4th ed., section 5.2, equations 5.7 to 5.16 (numbers from memory), in homogeneous form and carried over to any source and to lines with loss',
  formulas: [
    String.raw`w(d) = \frac{w_L + j t}{1 + j w_L t}, \qquad t = \tan\beta d`,
    String.raw`(g |w_L|^2 - g_L)\,t^2 - 2 g b_L\, t + (g - g_L) = 0`,
    String.raw`\tan\beta\ell = b \;\text{(open shunt, shorted series)}, \qquad -\cot\beta\ell = b \;\text{(shorted shunt, open series)}`,
  ],
  symbols: [
    { symbol: 'w', meaning: 'admittance (shunt stub) or impedance (series stub) over that of the line' },
    { symbol: 'w_L', meaning: 'that of the load, g_L + j b_L' },
    { symbol: 'g', meaning: 'real part of that of the source' },
    { symbol: 'd', meaning: 'distance from stub to load', unit: 'm' },
    { symbol: String.raw`\ell`, meaning: 'length of the stub', unit: 'm' },
    { symbol: 'b', meaning: 'what the stub must add to the imaginary part' },
  ],
  range: 'any load and source with a positive resistance; a line with loss where lengths exist that follow from those without loss',
  accuracy: 'exact; lengths to 1e-12 of half a wave in float64, times the quality factor of the match',
};

/**
 * Source: Pozar 5.7 to 5.16. Range: Re > 0 of load and source. Accuracy: reflection to rounding times the quality factor. Throws nothing.
 * The trap: with |wL|^2 g = gL (in Pozar's form RL = Z0) t is infinite, a quarter wave; as the angle of (numerator, denominator) it
 * needs no branch of its own.
 */
export function matchBySingleStub(problem: MatchingProblem, line: DesignLine, kind: Immittance): MatchAnswer {
  const bare = stageOf(problem, line, kind, 0);
  const { distances, exist } = distancesWithoutLoss(bare);
  const reason = outOfReach(problem, line, kind, bare);
  if (!exist && isLossless(line)) return { matches: [], reasons: [reason] };
  const matches: Match[] = [];
  const reasons = new Set<string>();
  const found: FoundLengths[] = [];
  for (const distance of distances) {
    const missing = bare.wanted.sub(turned(bare.load, distance, bare.k)).im;
    for (const each of stubKinds) {
      const end = endOf(kind, each);
      const lengths = followLoss(problem, line, kind, equationFor(kind, each), [distance, withinHalfWave(stubLength(end, missing))]);
      if (!lengths) reasons.add(exist ? noLengths(line, each === 'open' ? 'open stub' : 'shorted stub') : reason);
      else if (!found.some((other) => isSame(other, { stubs: each, lengths }))) {
        found.push({ stubs: each, lengths });
        matches.push({ description: describe(kind, each, lengths), elements: [...stubElement(kind, each, line, lengths[1]), ...lineElement(line, lengths[0])] });
      }
    }
  }
  return { matches, reasons: [...reasons] };
}

/** Ascending, in radians; where there are none, the distance that comes nearest. */
function distancesWithoutLoss({ load, wanted }: Stage): { distances: number[]; exist: boolean } {
  const { re: gL, im: bL } = load;
  const g = wanted.re;
  const square = gL * gL + bL * bL;
  const A = withoutDust(g * square - gL, g * square + gL);
  const h = g * bL;
  const C = withoutDust(g - gL, g + gL);
  const terms = [(g - gL) * (1 - g * gL), g * bL * bL] as const;
  const discriminant = gL * withoutDust(terms[0] + terms[1], Math.abs(terms[0]) + terms[1]);
  // The load is as the line is: one distance is as good as another.
  if (A === 0 && h === 0 && C === 0) return { distances: [0], exist: true };
  if (discriminant <= 0) return { distances: [withinHalfWave(Math.abs(A) >= Math.abs(C) ? Math.atan2(h, A) : Math.atan2(C, h))], exist: discriminant === 0 };
  const root = Math.sqrt(discriminant);
  const larger = h < 0 ? h - root : h + root;
  return { distances: [withinHalfWave(Math.atan2(larger, A)), withinHalfWave(Math.atan2(C, larger))].sort((one, other) => one - other), exist: true };
}

const equationFor = (kind: Immittance, each: StubKind) => {
  const end = endOf(kind, each);
  return ({ k, load, wanted }: Stage) => (distance: number, length: number) => {
    const atStub = turned(load, distance, k);
    const ofStub = stub(end, length, k);
    return { value: atStub.add(ofStub).sub(wanted), first: slopeAlong(atStub, k), second: slopeAlong(ofStub, k) };
  };
};

function describe(kind: Immittance, each: StubKind, [distance, length]: readonly [number, number]): string {
  const where = distance === 0 ? 'at the load' : `${inWavelengths(distance)} from the load`;
  const way = kind === 'admittance' ? 'shunt' : 'series';
  if (length === 0 && endOf(kind, each) === 'zero') return distance === 0 ? 'Nothing: the load is matched as it is' : `A line of ${inWavelengths(distance)}; its stub has no length and is left out`;
  return `${each === 'open' ? 'Open' : 'Shorted'} ${way} stub of ${inWavelengths(length)} ${where}`;
}

function outOfReach({ source }: MatchingProblem, line: DesignLine, kind: Immittance, { load }: Stage): string {
  const Zc = Math.hypot(line.characteristicImpedance.re, line.characteristicImpedance.im);
  const wave = load.sub(1).div(load.add(1));
  const rho = Math.hypot(wave.re, wave.im);
  const ratio = (1 + rho) / (1 - rho);
  const unit = kind === 'impedance' ? 'ohm' : 'S';
  const own = kind === 'impedance' ? Zc : 1 / Zc;
  const asked = kind === 'impedance' ? source.re : new Complex(source.re, source.im).inverse().re;
  const text = inDigits;
  const part = kind === 'impedance' ? 'resistance' : 'conductance';
  return `along the line the ${part} of the load stays between ${text(own / ratio)} and ${text(own * ratio)} ${unit}, and the source asks for ${text(asked)} ${unit}`;
}
