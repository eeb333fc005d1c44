/**
 * The record of what was published or found by another route, and what the running engine computes now. The data are those of
 * tests/reference, each file made by the generator beside it; the tests and the public page read the same.
 */
import { findCalculation } from '../solvers/registry';
import dimension from '../../tests/reference/dimension.json';
import matching from '../../tests/reference/matching.json';
import given from '../../tests/reference/given.json';
import lumped from '../../tests/reference/lumped.json';
import microstrip from '../../tests/reference/microstrip.json';
import networks from '../../tests/reference/networks.json';
import drivenLines from '../../tests/reference/driven-lines.json';
import reflection from '../../tests/reference/reflection.json';
import round from '../../tests/reference/round.json';
import stripline from '../../tests/reference/stripline.json';
import wires from '../../tests/reference/wires.json';
import striplines from '../../tests/reference/striplines.json';
import telegrapher from '../../tests/reference/telegrapher.json';

/** A number as its digits; a complex one in parts; null where there is none. */
export type PublishedValue = string | boolean | null | { readonly re: string; readonly im: string };

export interface Check {
  /** `lines/secondary-constants`. */
  readonly calculation: string;
  readonly name: string;
  /** Where the value is published, or the route by which it was found, with its locator. */
  readonly source: string;
  readonly input: unknown;
  /** Relative to the published value; absolute where that is zero. */
  readonly tolerance: number;
  /** Whether the computed value must equal the published one, or stay within it as a limit. */
  readonly comparison?: 'equal' | 'at_most' | 'at_least';
  /** By pointer: where the claim does not hold, how far it does, and why. */
  readonly exceptions?: Readonly<Record<string, { readonly tolerance: number; readonly reason: string }>>;
  /** By RFC 6901 pointer into the result; one that ends at a column means its first entry. */
  readonly expected: Readonly<Record<string, PublishedValue>>;
}

export interface CheckFile {
  readonly title: string;
  readonly checks: readonly Check[];
}

export const checkFiles: readonly CheckFile[] = [telegrapher, networks, reflection, drivenLines, matching, given, round, wires, lumped, microstrip, striplines, stripline, dimension] as unknown as readonly CheckFile[];

/** A value as the engine computes it now. */
export type ComputedValue = number | boolean | string | null | { readonly re: number; readonly im: number };

export interface Comparison {
  readonly pointer: string;
  readonly published: PublishedValue;
  readonly computed: ComputedValue;
  /** Relative to the published value, absolute where that is zero; of a limit, by how much it is overstepped; null where either has no number. */
  readonly difference: number | null;
  readonly tolerance: number;
  readonly reason?: string;
  readonly holds: boolean;
}

export interface CheckedCase {
  readonly check: Check;
  readonly comparisons: readonly Comparison[];
  /** Ids of the methods that the answer rested on. */
  readonly methods: readonly string[];
}

/** Runs the check on the engine. Throws where the input is refused, for then the record and the engine have parted. */
export function runCheck(check: Check): CheckedCase {
  const [group, id] = check.calculation.split('/');
  const calculation = findCalculation(group, id);
  if (!calculation) throw new Error(`no calculation ${check.calculation}`);
  const { result, methods } = calculation.solve(calculation.input.parse(check.input));
  return {
    check,
    comparisons: Object.entries(check.expected).map(([pointer, published]) => compare(check, pointer, published, valueAt(result, pointer))),
    methods: methods.map(({ method }) => method.id),
  };
}

function compare(check: Check, pointer: string, published: PublishedValue, computed: ComputedValue): Comparison {
  const exception = check.exceptions?.[pointer];
  const tolerance = exception?.tolerance ?? check.tolerance;
  const shared = { pointer, published, computed, tolerance, ...(exception && { reason: exception.reason }) };
  const wanted = partsOf(published);
  const got = partsOf(computed);
  if (!wanted || !got) return { ...shared, difference: null, holds: published === computed };
  const size = Math.hypot(wanted.re, wanted.im);
  const scale = size === 0 ? 1 : size;
  const difference =
    check.comparison === 'at_most'
      ? Math.max(0, got.re - wanted.re) / scale
      : check.comparison === 'at_least'
        ? Math.max(0, wanted.re - got.re) / scale
        : Math.hypot(got.re - wanted.re, got.im - wanted.im) / scale;
  return { ...shared, difference, holds: difference <= tolerance };
}

function partsOf(value: PublishedValue | ComputedValue): { re: number; im: number } | null {
  if (value === null || typeof value === 'boolean') return null;
  if (typeof value === 'object') return { re: Number(value.re), im: Number(value.im) };
  const re = Number(value);
  return Number.isFinite(re) ? { re, im: 0 } : null;
}

function valueAt(result: unknown, pointer: string): ComputedValue {
  const end = pointer
    .split('/')
    .slice(1)
    .reduce((node: unknown, key) => (node as Record<string, unknown> | undefined)?.[key], result);
  const first = (value: unknown) => (Array.isArray(value) ? value[0] : value) as number | null;
  if (end === undefined) throw new Error(`nothing at ${pointer}`);
  if (typeof end === 'object' && end !== null && 're' in end && 'im' in end) {
    const re = first(end.re);
    const im = first(end.im);
    return re === null || im === null ? null : { re, im };
  }
  return first(end);
}
