/** Which stretch of numbers a plot shows, on what kind of scale, and in which multiple of the unit. */
import { shownUnit } from '@/lib/quantities/write-quantity';
import { prefixes } from '@/lib/quantities/units';
import type { Entry } from '../_answer/quantity-of-result';

export interface Scale {
  readonly domain: readonly [number, number];
  readonly logarithmic: boolean;
  /** Some values lie beyond the domain: the plot would show nothing else if it held them. */
  readonly clipped: boolean;
  /** The unit on the axis, and what a value is divided by for it. */
  readonly unit: string;
  readonly divisor: number;
}

/** Equal ratios from entry to entry: a logarithmic sweep. */
export function isLogarithmic(values: readonly number[]): boolean {
  const last = values.length - 1;
  if (last < 2 || !(values[0] > 0) || !(values[last] > values[0])) return false;
  const first = Math.log(values[1] / values[0]);
  return Math.abs(Math.log(values[last] / values[0]) / last / first - 1) < 1e-3 && values[last] / values[0] > 2;
}

export function axisScale(values: readonly number[], unit: string): Scale {
  const logarithmic = isLogarithmic(values);
  const domain: [number, number] = [Math.min(values[0], values[values.length - 1]), Math.max(values[0], values[values.length - 1])];
  return { domain, logarithmic, clipped: false, ...multiple(logarithmic ? 0 : domain[1], unit) };
}

/** Beyond this many times what nearly all values keep to, the rest is a pole. */
const poleRatio = 6;
/** No instrument and no reader tells a level or an angle this small from zero. */
const leastLevel = 1e-9;
/** Over more than three decades a linear axis shows the last only. */
const wide = 1000;

export function valueScale(traces: readonly (readonly Entry[])[], unit: string, besideLogarithmic: boolean): Scale {
  const values = Float64Array.from(traces.flatMap((trace) => trace.filter((value): value is number => value !== null))).sort();
  if (values.length === 0) return { domain: [0, 1], logarithmic: false, clipped: false, unit, divisor: 1 };
  const [least, most] = [values[0], values[values.length - 1]];
  if (besideLogarithmic && least > 0 && most / least > wide && unit !== 'dB' && unit !== '°') {
    return { domain: [least, most], logarithmic: true, clipped: false, ...multiple(0, unit) };
  }
  const quantile = (share: number) => values[Math.round(share * (values.length - 1))];
  const [low, high] = [quantile(0.04), quantile(0.96)];
  const reach = Math.max(high - low, Math.abs(high) / 100, Number.MIN_VALUE);
  const lower = least < low - poleRatio * reach ? low - reach : least;
  const upper = most > high + poleRatio * reach ? high + reach : most;
  const isLevel = unit === 'dB' || unit === '°';
  if (isLevel && Math.max(-lower, upper) < leastLevel) return { domain: [-1, 1], logarithmic: false, clipped: false, unit, divisor: 1 };
  const domain = unit === '°' && upper - lower > 180 ? ([-180, 180] as const) : padded(lower, upper);
  return { domain, logarithmic: false, clipped: lower > least || upper < most, ...multiple(Math.max(Math.abs(domain[0]), Math.abs(domain[1])), unit) };
}

/** Of any unit, in decibels and degrees above all: rounding around zero. */
const nothing = 1e-30;

/** A constant gets room on both sides; zero is kept on the plot where the values come near it. */
function padded(lower: number, upper: number): readonly [number, number] {
  const size = Math.max(Math.abs(lower), Math.abs(upper));
  // Differences in the last digits are rounding, and would be drawn as mountains.
  if (upper - lower <= 1e-9 * size || size < nothing) return size < nothing ? [-1, 1] : [Math.min(0, 1.5 * lower), Math.max(0, 1.5 * upper)];
  const margin = (upper - lower) / 16;
  const from = lower >= 0 && lower < (upper - lower) / 2 ? 0 : lower - margin;
  const to = upper <= 0 && -upper < (upper - lower) / 2 ? 0 : upper + margin;
  return [from, to];
}

function multiple(size: number, unit: string): { unit: string; divisor: number } {
  const shown = size === 0 ? unit : shownUnit(size, unit);
  return { unit: shown, divisor: shown === unit ? 1 : 10 ** prefixes[shown.slice(0, shown.length - unit.length)] };
}
