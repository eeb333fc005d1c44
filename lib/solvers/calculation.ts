/**
 * What a calculation is. One file under calculations/<group>/<id>.ts declares one; the registry makes
 * the route, the OpenAPI path, the Bench form and the describe page out of it.
 */
import type { z } from 'zod';

/** One published way to compute something. */
export interface Method {
  readonly id: string;
  readonly title: string;
  /** LaTeX, one formula an entry, for the method's page. */
  readonly formulas: readonly [string, ...string[]];
  readonly symbols: readonly MethodSymbol[];
  /** Author, work, edition or year, equation or table number. */
  readonly source: string;
  readonly range: string;
  readonly accuracy: string;
}

/** A symbol of a method's formulas; `unit` is left out where it has none. */
export interface MethodSymbol {
  /** LaTeX. */
  readonly symbol: string;
  readonly meaning: string;
  readonly unit?: string;
}

/** A method as one answer rested on it. */
export interface MethodUse {
  readonly method: Method;
  readonly inRange: boolean;
}

/** Each method once, in range where every use of it was. */
export function mergeMethods(uses: readonly MethodUse[]): MethodUse[] {
  const merged = new Map<string, MethodUse>();
  for (const use of uses) merged.set(use.method.id, { method: use.method, inRange: use.inRange && (merged.get(use.method.id)?.inRange ?? true) });
  return [...merged.values()];
}

/** Something the caller should know about a number; `pointer` is RFC 6901, into the result or the input. */
export interface Warning {
  readonly code: string;
  readonly pointer: string;
  readonly detail: string;
}

export interface Solution<Result> {
  readonly result: Result;
  readonly methods: readonly MethodUse[];
  readonly warnings: readonly Warning[];
}

/** One expected number of an example's result, by RFC 6901 pointer. */
export interface ExpectedValue {
  readonly pointer: string;
  readonly value: number | null;
}

/** A worked example: shown in the documentation and on the Bench, and run by the tests. */
export interface Example<Input> {
  readonly name: string;
  readonly input: Input;
  readonly expected: readonly ExpectedValue[];
  /** Relative to the expected value, absolute where that is zero. */
  readonly tolerance: number;
  readonly source: string;
}

/** What a call costs: `rule` is the sentence people read, `units` what is charged. */
export interface Cost<Input> {
  readonly rule: string;
  units(input: Input): number;
}

export const groups = ['lines', 'terminations', 'networks'] as const;
export type Group = (typeof groups)[number];

export interface Calculation<Input extends z.ZodType = z.ZodType, Output extends z.ZodType = z.ZodType> {
  readonly id: string;
  readonly group: Group;
  /** At most 60 characters. */
  readonly title: string;
  /** A sentence. */
  readonly summary: string;
  readonly input: Input;
  readonly output: Output;
  readonly methods: readonly Method[];
  readonly cost: Cost<z.output<Input>>;
  /** Pure. Throws `ImpossibleInput` when the input is well formed but cannot exist physically. */
  solve(input: z.output<Input>): Solution<z.output<Output>>;
  readonly examples: readonly [Example<z.input<Input>>, ...Example<z.input<Input>>[]];
}

/** Checks a declaration's types where it is written, and erases them for the registry. */
export function defineCalculation<Input extends z.ZodType, Output extends z.ZodType>(
  calculation: Calculation<Input, Output>,
): Calculation {
  return calculation as unknown as Calculation;
}

/** `lines/secondary-constants`: the name a calculation has in URLs, logs and batches. */
export function calculationPath(calculation: Pick<Calculation, 'group' | 'id'>): string {
  return `${calculation.group}/${calculation.id}`;
}
