/** What the property tests draw their inputs from, and what every answer to them must be. */
import fc from 'fast-check';
import { expect } from 'vitest';
import { ImpossibleInput } from '@/lib/solvers/errors';
import { line as lineSchema, lineOverFrequency } from '@/lib/solvers/lines/line';
import { findCalculation } from '@/lib/solvers/registry';

/** Powers of ten between two exponents. */
export const decades = (low: number, high: number) => fc.double({ min: low, max: high, noNaN: true }).map((exponent) => 10 ** exponent);

export const orNone = (value: fc.Arbitrary<number>) => fc.oneof({ weight: 4, arbitrary: value }, { weight: 1, arbitrary: fc.constant(0) });

/** Constants of real lines, with resistances up to a power of ten. */
export const rlgcUpTo = (mostResistanceExponent: number) =>
  fc.record({
    kind: fc.constant('rlgc'),
    resistance_ohm_per_m: orNone(decades(-6, mostResistanceExponent)),
    inductance_h_per_m: decades(-8, -5),
    conductance_s_per_m: orNone(decades(-10, -2)),
    capacitance_f_per_m: decades(-12, -9),
  });

export const lossless = fc.record({ kind: fc.constant('lossless'), characteristic_impedance_ohm: decades(0, 3), velocity_factor: fc.double({ min: 0.1, max: 1, noNaN: true }) });

/** JSON has no NaN and no infinity; a warning stands for each null. */
export function holdsOnlyFiniteNumbers(group: string, id: string, input: object): void {
  const calculation = findCalculation(group, id)!;
  try {
    const { result, warnings } = calculation.solve(calculation.input.parse(input));
    const parsed = calculation.output.safeParse(result);
    expect(parsed.error?.issues, JSON.stringify(input)).toBeUndefined();
    if (JSON.stringify(result).includes('null')) expect(warnings.length).toBeGreaterThan(0);
  } catch (error) {
    if (!(error instanceof ImpossibleInput)) throw error;
  }
}

/** Every number in a result, however deep. */
export function numbersIn(value: unknown): number[] {
  if (typeof value === 'number') return [value];
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersIn) : [];
}

/** A line's answers, in these calculations, and its constants and their slopes hold finite numbers; R and G are not negative, L and C are positive. */
export function isFiniteEverywhere(given: object, frequency_hz: number[], calls: readonly (readonly [group: string, id: string, rest: object])[]): void {
  for (const [group, id, rest] of calls) {
    const calculation = findCalculation(group, id)!;
    const { result } = calculation.solve(calculation.input.parse({ line: given, frequency_hz, ...rest }));
    expect(numbersIn(result).every(Number.isFinite), `${group}/${id}`).toBe(true);
  }
  const { resistance, inductance, conductance, capacitance, slope } = lineOverFrequency(lineSchema.parse(given), Float64Array.from(frequency_hz)).constants;
  for (const column of [resistance, conductance]) expect(column.every((each) => each >= 0 && Number.isFinite(each))).toBe(true);
  for (const column of [inductance, capacitance]) expect(column.every((each) => each > 0 && Number.isFinite(each))).toBe(true);
  for (const column of Object.values(slope!)) expect((column as Float64Array).every(Number.isFinite)).toBe(true);
}
