/**
 * Derivative to omega of a quantity known only at the frequencies of a sweep: that of the parabola through a point and its neighbours.
 *
 *   v' = (h2 q1 + h1 q2)/(h1 + h2),   q = (v(k+1) - v(k))/h,   at an end v' = q1 + (q1 - q2) h1/(h1 + h2)
 *
 * h1, h2 steps of omega to either side in rad/s. For what turns in phase the same is done to ln v, each step being ln(v(k+1)/v(k)), so that a plain delay
 * comes out exactly; right where the phase turns by less than half a turn between neighbours. Source: Abramowitz and Stegun, 25.3.4 (from memory).
 * Accuracy: of second order in the step. Range: any order of frequencies; 0 where there is only one. Throws nothing.
 */
import Complex from 'complex.js';
import type { ComplexParts } from '../numeric/phasor';

export type Slope = readonly ComplexParts[];

export function slopeOfColumn(omega: Float64Array, values: readonly ComplexParts[]): Slope {
  const column = values.map((each) => new Complex(each.re, each.im));
  return slopeBySteps(omega, (from, to) => column[to].sub(column[from]));
}

/** v'/v; 0 where v or a neighbour of it is. */
export function logarithmicSlopeOfColumn(omega: Float64Array, values: readonly ComplexParts[]): Slope {
  const column = values.map((each) => new Complex(each.re, each.im));
  return slopeBySteps(omega, (from, to) => (column[from].isZero() || column[to].isZero() ? new Complex(0, 0) : column[to].div(column[from]).log()));
}

function slopeBySteps(omega: Float64Array, step: (from: number, to: number) => Complex): Slope {
  const order = risingOnce(omega);
  const x = order.map((each) => omega[each]);
  const quotients = order.slice(1).map((to, index) => step(order[index], to).div(x[index + 1] - x[index]));
  const atDistinct = new Map(x.map((each, index) => [each, slopeAt(x, quotients, index)]));
  return Array.from(omega, (each) => atDistinct.get(each)!);
}

/** Indexes by rising omega, each omega once. */
function risingOnce(omega: Float64Array): number[] {
  const order = Array.from(omega, (_, index) => index).sort((first, second) => omega[first] - omega[second] || first - second);
  return order.filter((each, index) => index === 0 || omega[each] !== omega[order[index - 1]]);
}

function slopeAt(x: readonly number[], quotients: readonly Complex[], index: number): ComplexParts {
  const last = x.length - 1;
  if (last === 0) return { re: 0, im: 0 };
  if (last === 1) return quotients[0];
  if (index === 0) return beyond(quotients[0], quotients[1], x[1] - x[0], x[2] - x[1]);
  if (index === last) return beyond(quotients[last - 1], quotients[last - 2], x[last] - x[last - 1], x[last - 1] - x[last - 2]);
  const before = x[index] - x[index - 1];
  const after = x[index + 1] - x[index];
  const sum = before + after;
  return quotients[index - 1].mul(after / sum).add(quotients[index].mul(before / sum));
}

/** At an end: `near` is the quotient beside it over `step`, `far` the next over `nextStep`. */
function beyond(near: Complex, far: Complex, step: number, nextStep: number): ComplexParts {
  return near.add(near.sub(far).mul(step / (step + nextStep)));
}
