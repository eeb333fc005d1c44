/**
 * Lengths of a line for a match: found for the line as if it had no loss, then followed as its loss is let in step by step, each step by
 * Newton's method on the exact equation. What is common to the stub topologies.
 */
import Complex from 'complex.js';
import type { Element } from '../elements/element';
import { solveTwoUnknowns, type AtPoint } from '../numeric/two-unknowns';
import { noLength, normalised, type Immittance, type StubEnd } from './immittance-along-line';
import type { DesignLine, MatchingProblem } from './matching';

/** The line's turn alpha/beta + j, and what load and wanted input are beside its characteristic impedance. */
export interface Stage {
  readonly k: Complex;
  readonly load: Complex;
  /** The conjugate of the source: what must stand at the input. */
  readonly wanted: Complex;
  /** The source itself: |w - wanted| / |w + source| is the reflection. */
  readonly source: Complex;
}

const stepsOfLoss = 8;

/** The line with a share of its loss: alpha and the angle of Zc both grow with it. The first has none. */
export function stageOf(problem: MatchingProblem, line: DesignLine, kind: Immittance, share: number): Stage {
  const { re, im } = line.characteristicImpedance;
  const size = Math.hypot(re, im);
  const angle = share * Math.atan2(im, re);
  const Zc = share === 1 ? new Complex(re, im) : new Complex(size * Math.cos(angle), size * Math.sin(angle));
  const source = problem.source;
  return {
    k: new Complex((share * line.attenuationNpPerM) / line.phaseRadPerM, 1),
    load: normalised(kind, problem.load, Zc),
    wanted: normalised(kind, { re: source.re, im: -source.im }, Zc),
    source: normalised(kind, source, Zc),
  };
}

export function isLossless(line: DesignLine): boolean {
  return line.attenuationNpPerM === 0 && line.characteristicImpedance.im === 0;
}

type Equation = (stage: Stage) => (first: number, second: number) => AtPoint;

/** As good as no reflection; below it the circuit itself is the judge. */
const matched = 1e-9;
/** Radians; longer ones would leave the branch that is followed. */
const longestStep = 0.3;

/** Without loss a length and half a wave more are the same; with loss they are not, and the shortest that is left is wanted. */
const halfWavesBeside = [-Math.PI, 0, Math.PI];

/**
 * From lengths (in radians) that solve the equation without loss to the shortest, none negative, that solve it with loss; null where there
 * are none. `value + wanted + source` of the equation must be the sum of input and source.
 */
export function followLoss(problem: MatchingProblem, line: DesignLine, kind: Immittance, equation: Equation, start: readonly [number, number]): readonly [number, number] | null {
  if (isLossless(line)) return follow([stageOf(problem, line, kind, 1)], equation, start);
  const stages = Array.from({ length: stepsOfLoss }, (_, index) => stageOf(problem, line, kind, (index + 1) / stepsOfLoss));
  let shortest: readonly [number, number] | null = null;
  for (const first of halfWavesBeside) {
    for (const second of halfWavesBeside) {
      const lengths = follow(stages, equation, [start[0] + first, start[1] + second]);
      if (lengths && (!shortest || lengths[0] + lengths[1] < shortest[0] + shortest[1])) shortest = lengths;
    }
  }
  return shortest;
}

function follow(stages: readonly Stage[], equation: Equation, start: readonly [number, number]): readonly [number, number] | null {
  const [first, second] = stages.reduce((lengths, stage) => solveTwoUnknowns(equation(stage), lengths, longestStep), start);
  if (!(first > -noLength && second > -noLength)) return null;
  const lengths = [first < noLength ? 0 : first, second < noLength ? 0 : second] as const;
  return isMatch(stages[stages.length - 1], equation, lengths) ? lengths : null;
}

function isMatch(stage: Stage, equation: Equation, [first, second]: readonly [number, number]): boolean {
  const { value } = equation(stage)(first, second);
  const sum = value.add(stage.wanted).add(stage.source);
  return Math.hypot(value.re, value.im) <= matched * Math.hypot(sum.re, sum.im);
}

/** Why no lengths were found although there are some without loss. */
export function noLengths(line: DesignLine, stubs: string): string {
  return isLossless(line) ? `so sharp a match is beyond numbers of 16 digits (${stubs})` : `with the loss of the line no lengths follow from those without loss (${stubs})`;
}

/** Open and shorted, in this order everywhere. */
export const stubKinds = ['open', 'short'] as const;
export type StubKind = (typeof stubKinds)[number];

export function endOf(kind: Immittance, stub: StubKind): StubEnd {
  return (stub === 'open') === (kind === 'admittance') ? 'zero' : 'infinite';
}

/** Left out where it has no length: an open across the path, or a short in series with it. */
export function stubElement(kind: Immittance, stub: StubKind, line: DesignLine, radians: number): Element[] {
  if (radians === 0 && endOf(kind, stub) === 'zero') return [];
  const name = kind === 'admittance' ? (`${stub}_stub` as const) : (`series_${stub}_stub` as const);
  return [{ kind: name, line: line.line, length_m: radians / line.phaseRadPerM }];
}

export function lineElement(line: DesignLine, radians: number): Element[] {
  return radians === 0 ? [] : [{ kind: 'line', line: line.line, length_m: radians / line.phaseRadPerM }];
}

export interface FoundLengths {
  /** Which stubs they are of. */
  readonly stubs: string;
  readonly lengths: readonly [number, number];
}

/** Whether two branches led to one solution. */
export function isSame(one: FoundLengths, other: FoundLengths): boolean {
  return one.stubs === other.stubs && Math.abs(one.lengths[0] - other.lengths[0]) + Math.abs(one.lengths[1] - other.lengths[1]) < 1e-7;
}
