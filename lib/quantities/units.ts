/**
 * Units as people write them, each as a factor and the dimensions it has. Dimensions are powers of
 * metre, second, volt, ampere, kelvin, radian and neper: with those, "pF/ft" and "F/m" are seen to be
 * the same kind of quantity without a table of pairs. Angles and levels count as dimensions of their
 * own, so that a degree is never taken for a plain number or a decibel for a ratio.
 */
import { one, over, rationalOf, times, type Rational } from './rational';

export type Dimension = 'm' | 's' | 'V' | 'A' | 'K' | 'rad' | 'Np' | 'degC';
export type Dimensions = Readonly<Partial<Record<Dimension, number>>>;

export interface Unit {
  readonly factor: Rational;
  readonly dimensions: Dimensions;
}

interface NamedUnit extends Unit {
  /** Whether k, m, µ and the like may stand before it. */
  readonly prefixable: boolean;
}

function unit(factor: string, dimensions: Dimensions, prefixable = false, irrational = 1): NamedUnit {
  return { factor: { ...rationalOf(factor), irrational }, dimensions, prefixable };
}

const resistance: Dimensions = { V: 1, A: -1 };

const named: Readonly<Record<string, NamedUnit>> = {
  m: unit('1', { m: 1 }, true),
  in: unit('0.0254', { m: 1 }),
  ft: unit('0.3048', { m: 1 }),
  yd: unit('0.9144', { m: 1 }),
  mi: unit('1609.344', { m: 1 }),
  mil: unit('0.0000254', { m: 1 }),
  s: unit('1', { s: 1 }, true),
  Hz: unit('1', { s: -1 }, true),
  V: unit('1', { V: 1 }, true),
  A: unit('1', { A: 1 }, true),
  W: unit('1', { V: 1, A: 1 }, true),
  ohm: unit('1', resistance, true),
  S: unit('1', { V: -1, A: 1 }, true),
  H: unit('1', { ...resistance, s: 1 }, true),
  F: unit('1', { V: -1, A: 1, s: 1 }, true),
  K: unit('1', { K: 1 }),
  degC: unit('1', { degC: 1 }),
  rad: unit('1', { rad: 1 }, true),
  deg: unit('1', { rad: 1 }, false, Math.PI / 180),
  Np: unit('1', { Np: 1 }),
  dB: unit('1', { Np: 1 }, false, Math.LN10 / 20),
  '%': unit('0.01', {}),
  ppm: unit('0.000001', {}),
  turn: unit('1', {}),
  '1': unit('1', {}),
};

/** Other spellings. The two omegas look alike and are two characters; so are the two signs for micro. */
const spellings: Readonly<Record<string, string>> = {
  '\u03a9': 'ohm', '\u2126': 'ohm', ohms: 'ohm', Ohm: 'ohm', inch: 'in', inches: 'in', '"': 'in', '″': 'in', "'": 'ft', '′': 'ft',
  foot: 'ft', feet: 'ft', yard: 'yd', yards: 'yd', mile: 'mi', miles: 'mi', mils: 'mil', thou: 'mil', meter: 'm', metre: 'm', meters: 'm', metres: 'm',
  sec: 's', siemens: 'S', mho: 'S', henry: 'H', farad: 'F', volt: 'V', volts: 'V', watt: 'W', watts: 'W', '°': 'deg', degree: 'deg', degrees: 'deg',
  '°C': 'degC', celsius: 'degC', turns: 'turn', twist: 'turn', twists: 'turn', Neper: 'Np', neper: 'Np', percent: '%',
};

export const prefixes: Readonly<Record<string, number>> = {
  E: 18, P: 15, T: 12, G: 9, M: 6, k: 3, '': 0, c: -2, m: -3, u: -6, '\u00b5': -6, '\u03bc': -6, n: -9, p: -12, f: -15, a: -18,
};

/** A single symbol such as "mm", "MHz" or "°", or undefined. Whole names win over prefix and name: "mil" is no milli-il. */
export function symbolUnit(symbol: string): NamedUnit | undefined {
  const whole = nameOf(symbol);
  if (whole) return whole;
  const prefix = symbol.slice(0, 1);
  const rest = nameOf(symbol.slice(1));
  if (!rest?.prefixable || !(prefix in prefixes)) return undefined;
  return { ...rest, factor: times(rest.factor, rationalOf(`1e${prefixes[prefix]}`)), prefixable: false };
}

function nameOf(symbol: string): NamedUnit | undefined {
  const name = Object.hasOwn(spellings, symbol) ? spellings[symbol] : symbol;
  return Object.hasOwn(named, name) ? named[name] : undefined;
}

/** "MHz" for "mhz": what was perhaps meant, when only the case of the letters is wrong. */
export function symbolsLike(symbol: string, wanted: Dimensions): string[] {
  const candidates = Object.keys(named).flatMap((name) => (named[name].prefixable ? Object.keys(prefixes).map((prefix) => prefix + name) : [name]));
  return candidates.filter(
    (candidate) => candidate.toLowerCase() === symbol.toLowerCase() && sameDimensions(symbolUnit(candidate)?.dimensions ?? {}, wanted),
  );
}

export function product(left: Unit, right: Unit, power: 1 | -1): Unit {
  const dimensions: Partial<Record<Dimension, number>> = { ...left.dimensions };
  for (const [name, exponent] of Object.entries(right.dimensions) as [Dimension, number][]) {
    const sum = (dimensions[name] ?? 0) + power * exponent;
    if (sum === 0) delete dimensions[name];
    else dimensions[name] = sum;
  }
  return { factor: power === 1 ? times(left.factor, right.factor) : over(left.factor, right.factor), dimensions };
}

export const plain: Unit = { factor: one, dimensions: {} };

export function sameDimensions(left: Dimensions, right: Dimensions): boolean {
  const names = new Set([...Object.keys(left), ...Object.keys(right)]) as Set<Dimension>;
  return [...names].every((name) => (left[name] ?? 0) === (right[name] ?? 0));
}

const kinds: readonly (readonly [string, Dimensions])[] = [
  ['a length', { m: 1 }],
  ['a time', { s: 1 }],
  ['a frequency', { s: -1 }],
  ['a resistance', resistance],
  ['a conductance', named.S.dimensions],
  ['an inductance', named.H.dimensions],
  ['a capacitance', named.F.dimensions],
  ['a voltage', { V: 1 }],
  ['a current', { A: 1 }],
  ['a power', named.W.dimensions],
  ['a temperature', { degC: 1 }],
  ['a temperature difference', { K: 1 }],
  ['an angle', { rad: 1 }],
  ['a level', { Np: 1 }],
  ['a velocity', { m: 1, s: -1 }],
  ['a plain number', {}],
];

/** "a length" for millimetres, "a resistance per length" for ohm/km. */
export function kindOf(dimensions: Dimensions): string {
  const found = kinds.find(([, candidate]) => sameDimensions(candidate, dimensions));
  if (found) return found[0];
  const perLength = { ...dimensions, m: (dimensions.m ?? 0) + 1 };
  const base = kinds.find(([name, candidate]) => name !== 'a plain number' && sameDimensions(candidate, perLength));
  return base ? `${base[0]} per length` : 'another quantity';
}
