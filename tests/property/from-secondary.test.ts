/** From secondary constants back: the inverse of what makes them, and what is refused and warned of. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ImpossibleInput } from '@/lib/solvers/errors';
import { findCalculation } from '@/lib/solvers/registry';
import { decades, rlgcUpTo } from '../support/arbitraries';

const seed = 20261203;
const run = <Values>(property: fc.IProperty<Values>, runs = 300) => fc.assert(property, { seed, numRuns: runs });
const rlgc = rlgcUpTo(5);

interface Primary {
  readonly resistance_ohm_per_m: (number | null)[];
  readonly inductance_h_per_m: (number | null)[];
  readonly conductance_s_per_m: (number | null)[];
  readonly capacitance_f_per_m: (number | null)[];
}

function solve(id: string, input: object) {
  const calculation = findCalculation('lines', id)!;
  const { result, warnings } = calculation.solve(calculation.input.parse(input));
  return { result, codes: warnings.map(({ code }) => code) };
}
const back = (input: object) => solve('from-secondary', input) as { result: Primary; codes: string[] };

function refusals(input: object): [string, string][] {
  try {
    back(input);
  } catch (error) {
    if (error instanceof ImpossibleInput) return error.problems.map(({ pointer, code }) => [pointer, code]);
    throw error;
  }
  return [];
}

describe('from secondary constants', () => {
  it('is the inverse of secondary-constants, to the rounding of what stands between, and finds every line passive', () => {
    run(
      fc.property(rlgc, fc.array(decades(0, 11), { minLength: 1, maxLength: 4 }), (line, frequency_hz) => {
        const { propagation_constant_per_m, characteristic_impedance_ohm } = solve('secondary-constants', { line, frequency_hz }).result as Record<string, unknown>;
        const { result, codes } = back({ frequency_hz, propagation_constant_per_m, characteristic_impedance_ohm });
        frequency_hz.forEach((f, index) => {
          const w = 2 * Math.PI * f;
          const z = Math.hypot(line.resistance_ohm_per_m, w * line.inductance_h_per_m);
          const y = Math.hypot(line.conductance_s_per_m, w * line.capacitance_f_per_m);
          expect(Math.abs(result.resistance_ohm_per_m[index]! - line.resistance_ohm_per_m)).toBeLessThanOrEqual(2e-15 * z);
          expect(Math.abs(result.inductance_h_per_m[index]! - line.inductance_h_per_m) * w).toBeLessThanOrEqual(2e-15 * z);
          expect(Math.abs(result.conductance_s_per_m[index]! - line.conductance_s_per_m)).toBeLessThanOrEqual(2e-15 * y);
          expect(Math.abs(result.capacitance_f_per_m[index]! - line.capacitance_f_per_m) * w).toBeLessThanOrEqual(2e-15 * y);
        });
        expect(codes).toEqual([]);
      }),
      1000,
    );
  });

  it('is finite or null with a warning over all that it accepts', () => {
    const part = fc.oneof(decades(-320, 12), fc.constantFrom(0, 1e12, 5e-324));
    const signed = fc.tuple(part, fc.boolean()).map(([size, isNegative]) => (isNegative ? -size : size));
    const complex = fc.record({ re: part, im: signed });
    run(
      fc.property(complex, complex, fc.oneof(decades(-320, 15), fc.constantFrom(0, 5e-324)), (gamma, zc, frequency_hz) => {
        fc.pre(zc.re !== 0 || zc.im !== 0);
        const { result, codes } = back({ frequency_hz, propagation_constant_per_m: gamma, characteristic_impedance_ohm: zc });
        const values = Object.values(result).flat() as (number | null)[];
        expect(values.every((each) => each === null || Number.isFinite(each))).toBe(true);
        expect(codes.includes('no_value')).toBe(values.includes(null));
      }),
      1000,
    );
  });

  it('says which constant is negative, and leaves the rounding of a good line alone', () => {
    expect(back({ frequency_hz: 1e8, propagation_constant_per_m: { re: 0.001, im: 2 }, characteristic_impedance_ohm: { re: 50, im: 3 } }).codes).toEqual(['not_passive']);
    expect(back({ frequency_hz: 1e8, propagation_constant_per_m: { re: 0, im: -2 }, characteristic_impedance_ohm: 50 }).codes).toEqual(['not_passive', 'not_passive']);
    expect(back({ frequency_hz: 1e8, propagation_constant_per_m: { re: 0, im: 2 }, characteristic_impedance_ohm: { re: 50, im: 1e-15 } }).codes).toEqual([]);
    expect(back({ frequency_hz: 0, propagation_constant_per_m: { re: 0.1, im: 2 }, characteristic_impedance_ohm: 50 }).codes).toContain('reactance_at_direct_current');
  });

  it('refuses what grows on its way, gives power back or has no impedance, all at once', () => {
    expect(refusals({ frequency_hz: 1e8, propagation_constant_per_m: { re: -0.1, im: 2 }, characteristic_impedance_ohm: 0 })).toEqual([
      ['/propagation_constant_per_m', 'negative_real_part'],
      ['/characteristic_impedance_ohm', 'zero_impedance'],
    ]);
    expect(refusals({ frequency_hz: [1, 2], propagation_constant_per_m: { re: [1, -1], im: [0, 0] }, characteristic_impedance_ohm: { re: [-1, 0], im: [0, 0] } })).toEqual([
      ['/propagation_constant_per_m/re/1', 'negative_real_part'],
      ['/characteristic_impedance_ohm/re/0', 'negative_real_part'],
      ['/characteristic_impedance_ohm/re/1', 'zero_impedance'],
    ]);
    expect(refusals({ frequency_hz: [1, 2], propagation_constant_per_m: { re: [1], im: [0, 0] }, characteristic_impedance_ohm: { re: [1, 1], im: [0, 0, 0] } })).toEqual([
      ['/propagation_constant_per_m/re', 'length_differs'],
      ['/characteristic_impedance_ohm/im', 'length_differs'],
    ]);
  });
});
