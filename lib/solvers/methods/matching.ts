/**
 * What the matching topologies share: the problem, the answer, and how its parts are written. A match presents the conjugate of the
 * source's impedance to the source, so that it gives its available power (power-wave reflection 0, Kurokawa 1965).
 */
import type { Element } from '../elements/element';
import type { Line } from '../lines/line';
import type { ComplexParts } from '../numeric/phasor';

/** All at the design frequency. */
export interface MatchingProblem {
  readonly load: ComplexParts;
  readonly source: ComplexParts;
  readonly frequencyHz: number;
  readonly line?: DesignLine | undefined;
}

/** The line for stubs and connections, at the design frequency. */
export interface DesignLine {
  readonly line: Line;
  readonly attenuationNpPerM: number;
  /** Greater than 0. */
  readonly phaseRadPerM: number;
  readonly characteristicImpedance: ComplexParts;
}

export interface Match {
  readonly description: string;
  /** From source to load. */
  readonly elements: readonly Element[];
}

export interface MatchAnswer {
  readonly matches: readonly Match[];
  /** Why the rest, or all, cannot be; a sentence each. */
  readonly reasons: readonly string[];
}

/** A sum that is no more than the rounding of its terms is 0. */
const dustInUnitsOfRounding = 8;

/** `value`, or 0 where it is only the rounding of terms whose magnitudes add up to `scale`. */
export function withoutDust(value: number, scale: number): number {
  return Math.abs(value) <= dustInUnitsOfRounding * Number.EPSILON * scale ? 0 : value;
}

/** A reactance so small beside the resistance counts as none: it is worth 5e-13 of reflection. */
const noReactance = 1e-12;

export function isReal({ re, im }: ComplexParts): boolean {
  return Math.abs(im) <= noReactance * Math.abs(re);
}

/** Bounds of the elements of a cascade. */
const largest = { inductance_h: 1e3, capacitance_f: 1e3, length_m: 1e9 } as const;

/** Elements of no effect are left out by the topologies; what is left must be what networks/cascade accepts. */
export function isBuildable(elements: readonly Element[]): boolean {
  return elements.every((each) =>
    Object.entries(largest).every(([name, most]) => {
      const value = (each as Readonly<Record<string, unknown>>)[name];
      return value === undefined || (typeof value === 'number' && value >= 0 && value <= most);
    }),
  );
}

/** Six digits, for a sentence; what has grown beyond every number is said in words. */
export function inDigits(value: number): string {
  return Number.isFinite(value) ? String(Number(value.toPrecision(6))) : 'an unbounded number of';
}

/** 1.234e-9 H as "1.234 nH", for a sentence. */
export function inWords(value: number, unit: string): string {
  if (!Number.isFinite(value)) return `unbounded ${unit}`;
  const prefixes = ['f', 'p', 'n', 'µ', 'm', '', 'k', 'M', 'G'];
  const step = value === 0 ? 0 : Math.max(-5, Math.min(3, Math.floor(Math.log10(Math.abs(value)) / 3)));
  return `${Number((value / 1000 ** step).toPrecision(4))} ${prefixes[step + 5]}${unit}`;
}

/** An electrical length in radians as "0.1098 wavelengths". */
export function inWavelengths(radians: number): string {
  return `${Number((radians / (2 * Math.PI)).toPrecision(4))} wavelengths`;
}
