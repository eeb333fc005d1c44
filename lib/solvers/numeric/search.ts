/**
 * Every place where a function takes a wanted value. The function need not rise or fall throughout, and it may have no value at some
 * points (null).
 *
 *   1. it is sampled at the given points; stretches of samples with a value are kept, and where one ends its end is found by bisection;
 *   2. a peak or trough that comes close without reaching the value is followed to its top by golden sections;
 *   3. between neighbours on two sides of the value lies a root.
 *
 * What is missed: two roots between neighbouring points of which neither shows as a peak or trough.
 */
import { bracketedRoot, type Root, type Sample } from './roots';

export interface PartialFunction {
  /** Whether it can have a value at all; cheap. */
  isDefined(x: number): boolean;
  valueAt(x: number): number | null;
}

export interface Search {
  /** By x. */
  readonly roots: readonly Root[];
  readonly least: Sample;
  readonly greatest: Sample;
  /** Where the function has values at all. */
  readonly first: number;
  readonly last: number;
}

/** More would help nobody, and noise can make many. */
const mostRoots = 8;
const mostPeaks = 8;
const mostHalvings = 60;
/** Where only the function itself knows its end, which may cost much. */
const mostCostlyHalvings = 20;
const goldenSections = 60;
const goldenRatio = (Math.sqrt(5) - 1) / 2;

/** An end that misses the value by this much, relative, is the value: it was computed forth and back. */
const roundTrip = 1e-12;

/** `points` rise. Null where the function has no value at any of them. */
export function searchFor(wanted: number, f: PartialFunction, points: Float64Array): Search | null {
  const stretches = stretchesOf(f, points).map((stretch) => withPeaks(wanted, f, stretch));
  const samples = stretches.flat();
  if (samples.length === 0) return null;
  const [least, greatest] = [extreme(samples, -1), extreme(samples, 1)];
  const roots = stretches.flatMap((stretch) => rootsIn(wanted, f, stretch)).slice(0, mostRoots);
  const close = [least, greatest].filter(({ value }) => Math.abs(value - wanted) <= roundTrip * Math.abs(wanted));
  const found = roots.length > 0 ? roots : close.slice(0, 1).map((sample) => ({ ...sample, iterations: 0 }));
  return { roots: found, least, greatest, first: samples[0].x, last: samples[samples.length - 1].x };
}

function extreme(samples: readonly Sample[], sign: 1 | -1): Sample {
  return samples.reduce((best, sample) => (sign * sample.value > sign * best.value ? sample : best));
}

function stretchesOf(f: PartialFunction, points: Float64Array): Sample[][] {
  const stretches: Sample[][] = [];
  let open: Sample[] | null = null;
  points.forEach((x, index) => {
    const value = f.valueAt(x);
    if (value === null) {
      if (open) open.push(...endOf(f, open[open.length - 1], x));
      open = null;
      return;
    }
    if (open === null) {
      open = index > 0 ? endOf(f, { x, value }, points[index - 1]) : [];
      stretches.push(open);
    }
    open.push({ x, value });
  });
  return stretches;
}

/** The sample farthest from `inside` on the way to `outside` that has a value; none where that is `inside` itself. */
function endOf(f: PartialFunction, inside: Sample, outside: number): Sample[] {
  if (f.isDefined(outside)) return costlyEnd(f, inside, outside);
  const [x] = halved(inside.x, outside, mostHalvings, (each) => f.isDefined(each));
  if (x === inside.x) return [];
  const value = f.valueAt(x);
  return value === null ? costlyEnd(f, inside, x) : [{ x, value }];
}

function costlyEnd(f: PartialFunction, inside: Sample, outside: number): Sample[] {
  let end = inside;
  halved(inside.x, outside, mostCostlyHalvings, (x) => {
    const value = f.valueAt(x);
    if (value !== null) end = { x, value };
    return value !== null;
  });
  return end === inside ? [] : [end];
}

/** Brings together what holds and what does not; to neighbouring numbers where the halvings suffice. */
function halved(holds: number, fails: number, most: number, test: (x: number) => boolean): [holds: number, fails: number] {
  for (let halving = 0; halving < most; halving++) {
    const x = holds + (fails - holds) / 2;
    if (x === holds || x === fails) break;
    if (test(x)) holds = x;
    else fails = x;
  }
  return [holds, fails];
}

function withPeaks(wanted: number, f: PartialFunction, stretch: readonly Sample[]): Sample[] {
  let peaks = 0;
  return stretch.flatMap((sample, index) => {
    const [before, after] = [stretch[index - 1], stretch[index + 1]];
    if (!before || !after || peaks >= mostPeaks) return [sample];
    // A peak below the value, or a trough above it.
    const sign = sample.value < wanted ? 1 : -1;
    const rise = Math.min(sign * (sample.value - before.value), sign * (sample.value - after.value));
    if (!(rise >= 0) || (before.value === sample.value && after.value === sample.value) || sample.value === wanted) return [sample];
    peaks++;
    const top = topOf(f, sign, before.x, after.x);
    if (!top || sign * top.value <= sign * sample.value) return [sample];
    return top.x < sample.x ? [top, sample] : [sample, top];
  });
}

/** Golden sections between two points. */
function topOf(f: PartialFunction, sign: 1 | -1, from: number, to: number): Sample | null {
  let [a, b] = [from, to];
  let best: Sample | null = null;
  const look = (x: number): number => {
    const value = f.valueAt(x);
    if (value === null) return -Infinity;
    if (!best || sign * value > sign * best.value) best = { x, value };
    return sign * value;
  };
  let [left, right] = [b - goldenRatio * (b - a), a + goldenRatio * (b - a)];
  let [atLeft, atRight] = [look(left), look(right)];
  for (let section = 0; section < goldenSections && right > left; section++) {
    if (atLeft < atRight) {
      [a, left, atLeft] = [left, right, atRight];
      right = a + goldenRatio * (b - a);
      atRight = look(right);
    } else {
      [b, right, atRight] = [right, left, atLeft];
      left = b - goldenRatio * (b - a);
      atLeft = look(left);
    }
  }
  return best;
}

function rootsIn(wanted: number, f: PartialFunction, stretch: readonly Sample[]): Root[] {
  const difference = (x: number) => {
    const value = f.valueAt(x);
    return value === null ? null : value - wanted;
  };
  return stretch.flatMap((sample, index): Root[] => {
    const after = stretch[index + 1];
    // A flat stretch at the value counts once.
    if (sample.value === wanted) return stretch[index - 1]?.value === wanted ? [] : [{ ...sample, iterations: 0 }];
    if (!after || after.value === wanted || sample.value < wanted === after.value < wanted) return [];
    const root = bracketedRoot(difference, { x: sample.x, value: sample.value - wanted }, { x: after.x, value: after.value - wanted });
    return root ? [{ ...root, value: root.value + wanted }] : [];
  });
}
