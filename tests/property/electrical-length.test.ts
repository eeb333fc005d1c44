/** Electrical length and the error of lumped treatment, whatever the numbers. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findCalculation } from '@/lib/solvers/registry';
import { decades, rlgcUpTo } from '../support/arbitraries';

const seed = 20261204;
const run = <Values>(property: fc.IProperty<Values>, runs = 300) => fc.assert(property, { seed, numRuns: runs });
const rlgc = rlgcUpTo(5);
const load = fc.oneof(decades(0, 4), fc.record({ re: decades(-1, 4), im: fc.double({ min: -1e3, max: 1e3, noNaN: true }) }));
const tolerance = decades(-6, -0.31);

interface Result {
  readonly length_wavelengths: number[];
  readonly length_deg: number[];
  readonly attenuation_db: number[];
  readonly lumped_error: Record<'as_wire' | 'as_section' | 'as_pi_section' | 'as_wire_reflection' | 'as_section_reflection', (number | null)[]>;
  readonly treat_as_line: boolean[];
  readonly longest_lumped_length_m: (number | null)[];
  readonly rules: { readonly rule: string; readonly verdict: boolean[] }[];
}

function solve(input: object): Result {
  const calculation = findCalculation('lines', 'electrical-length')!;
  return calculation.solve(calculation.input.parse(input)).result as Result;
}

describe('electrical length', () => {
  it('at the longest lumped length makes the error that is allowed, and less below it', () => {
    run(
      fc.property(rlgc, load, decades(3, 10), tolerance, fc.double({ min: 0.01, max: 1, noNaN: true }), (line, termination, frequency_hz, allowed, fraction) => {
        const given = { line, termination, frequency_hz, tolerance: allowed };
        const [longest] = solve({ ...given, length_m: 1 }).longest_lumped_length_m;
        fc.pre(longest !== null && longest > 0);
        const at = solve({ ...given, length_m: longest });
        expect(Math.abs(at.lumped_error.as_wire[0]! / allowed - 1)).toBeLessThanOrEqual(1e-9);
        expect(solve({ ...given, length_m: longest! * fraction }).lumped_error.as_wire[0]!).toBeLessThanOrEqual(allowed * (1 + 1e-9));
        expect(solve({ ...given, length_m: longest! * (1 - 1e-6) }).treat_as_line[0]).toBe(false);
        expect(solve({ ...given, length_m: longest! * (1 + 1e-6) }).treat_as_line[0]).toBe(true);
      }),
      400,
    );
  });

  it('of a short line errs in proportion to the length as a wire, to its square as a section and to its third power as a pi section at most', () => {
    run(
      fc.property(rlgc, load, decades(3, 9), (line, termination, frequency_hz) => {
        const w = 2 * Math.PI * frequency_hz;
        const gamma = Math.sqrt(Math.hypot(line.resistance_ohm_per_m, w * line.inductance_h_per_m) * Math.hypot(line.conductance_s_per_m, w * line.capacitance_f_per_m));
        const size = typeof termination === 'number' ? termination : Math.hypot(termination.re, termination.im);
        const zc = Math.sqrt(Math.hypot(line.resistance_ohm_per_m, w * line.inductance_h_per_m) / Math.hypot(line.conductance_s_per_m, w * line.capacitance_f_per_m));
        const length_m = 1e-4 / gamma / Math.max(size / zc, zc / size);
        const [one, half] = [length_m, length_m / 2].map((each) => solve({ line, termination, frequency_hz, length_m: each }).lumped_error);
        const { as_wire, as_section, as_pi_section } = one;
        if (as_wire[0]! > 1e-9) expect(half.as_wire[0]! / as_wire[0]!).toBeCloseTo(1 / 2, 2);
        if (as_section[0]! > 0) expect(half.as_section[0]! / as_section[0]!).toBeCloseTo(1 / 4, 2);
        if (as_pi_section[0]! > 0) expect(half.as_pi_section[0]! / as_pi_section[0]!).toBeLessThan(0.126);
      }),
    );
  });

  it('grows with length and frequency as the phase does', () => {
    run(
      fc.property(rlgc, decades(0, 9), decades(-6, 4), (line, frequency_hz, length_m) => {
        const [one, two] = [length_m, 2 * length_m].map((each) => solve({ line, frequency_hz, length_m: each }));
        expect(two.length_deg[0]).toBeCloseTo(2 * one.length_deg[0], 6);
        expect(two.length_wavelengths[0] * 360).toBeCloseTo(two.length_deg[0], 6);
        expect(two.attenuation_db[0] / one.attenuation_db[0] || 2).toBeCloseTo(2, 12);
        expect(one.rules[0].verdict[0]).toBe(one.length_wavelengths[0] > 0.1);
      }),
    );
  });

  it('is the same at one point as in a sweep', () => {
    run(
      fc.property(rlgc, load, decades(3, 9), decades(-4, 3), (line, termination, frequency_hz, length_m) => {
        const one = solve({ line, termination, frequency_hz, length_m });
        const sweep = solve({ line, termination, frequency_hz: [frequency_hz, frequency_hz], length_m });
        expect(sweep.longest_lumped_length_m[1]).toBe(one.longest_lumped_length_m[0]);
        for (const name of ['as_wire', 'as_section', 'as_pi_section'] as const) {
          const [a, b] = [one.lumped_error[name][0], sweep.lumped_error[name][1]];
          if (a === null) expect(b).toBeNull();
          else expect(Math.abs(a - b!)).toBeLessThanOrEqual(1e-12 * a);
        }
      }),
    );
  });

  it('is finite or null with a warning over all that it accepts', () => {
    const any = (low: number, high: number) => fc.oneof(decades(low, high), fc.constantFrom(0, 10 ** high, 5e-324));
    const line = fc.record({ kind: fc.constant('rlgc'), resistance_ohm_per_m: any(-12, 9), inductance_h_per_m: any(-15, 3), conductance_s_per_m: any(-15, 9), capacitance_f_per_m: any(-20, 3) });
    const termination = fc.oneof(fc.constantFrom('open', 'short', 'matched'), fc.record({ re: any(-12, 12), im: any(-12, 12) }), fc.record({ kind: fc.constantFrom('series_rlc', 'parallel_rlc'), resistance_ohm: any(-12, 12), inductance_h: any(-15, 3), capacitance_f: any(-15, 3) }));
    const calculation = findCalculation('lines', 'electrical-length')!;
    const numbers = (value: unknown): number[] => (typeof value === 'number' ? [value] : typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbers) : []);
    run(
      fc.property(line, termination, fc.array(any(-300, 15), { minLength: 1, maxLength: 3 }), any(-300, 9), decades(-9, -0.31), decades(-15, 6), (given, closedBy, frequency_hz, length_m, allowed, rise_time_s) => {
        const { result, warnings } = calculation.solve(calculation.input.parse({ line: given, termination: closedBy, frequency_hz, length_m, tolerance: allowed, rise_time_s }));
        expect(numbers(result).every(Number.isFinite)).toBe(true);
        if (JSON.stringify(result).includes('null')) expect(warnings.length).toBeGreaterThan(0);
        expect(warnings.length).toBeLessThanOrEqual(100);
      }),
      1500,
    );
  });
});
