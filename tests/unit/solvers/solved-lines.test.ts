/** Lines of one request are solved once each, and are refused together where they cost too much. */
import { describe, expect, it } from 'vitest';
import { ImpossibleInput } from '@/lib/solvers/errors';
import { line, lineOverFrequency } from '@/lib/solvers/lines/line';
import { findCalculation } from '@/lib/solvers/registry';

const cable = (inner: number) => line.parse({ kind: 'coaxial', inner_diameter_m: inner, outer_diameter_m: 2.95e-3, shield_thickness_m: 1.5e-4 });
const near = (gap: number) => ({ kind: 'two_wire', conductor_diameter_m: 1e-3, spacing_m: 1e-3 * (1 + gap) });

describe('lines over the same frequencies', () => {
  it('are solved once where they are equal, each with its own pointers', () => {
    const frequencies = Float64Array.of(0, 1e6, 1e12);
    const [first, again, other] = [lineOverFrequency(cable(9e-4), frequencies, '/a'), lineOverFrequency(cable(9e-4), frequencies, '/b'), lineOverFrequency(cable(8e-4), frequencies, '/c')];
    expect(again.constants).toBe(first.constants);
    expect(other.constants).not.toBe(first.constants);
    expect(lineOverFrequency(cable(9e-4), frequencies.slice(), '/a').constants).not.toBe(first.constants);
    expect(first.warnings.map(({ code, pointer }) => [code, pointer])).toEqual([['higher_modes', '/a']]);
    expect(again.warnings.map(({ code, pointer }) => [code, pointer])).toEqual([['higher_modes', '/b']]);
  });

  it('are refused where many that differ take too long, by the pointer of the first too many', () => {
    const cascade = findCalculation('networks', 'cascade')!;
    const chain = (gaps: number[]) => () => cascade.solve(cascade.input.parse({ elements: gaps.map((gap) => ({ kind: 'line', line: near(gap), length_m: 0.1 })), frequency_hz: { start: 1, stop: 1e12, points: 401, spacing: 'log' } }));
    expect(chain([1e-4, 1e-4, 1e-4, 1e-4, 1e-4])).not.toThrow();
    expect(chain([1, 1.1, 1.2, 1.3, 1.4])).not.toThrow();
    try {
      chain([1e-4, 1.01e-4, 1.02e-4, 1.03e-4, 1.04e-4])();
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(ImpossibleInput);
      expect((error as ImpossibleInput).problems.map(({ code, pointer }) => [code, pointer])).toEqual([['too_large', '/elements/2/line']]);
    }
  });

  it('let every single line through, at 20,001 frequencies', () => {
    const primary = findCalculation('lines', 'primary-constants')!;
    for (const given of [near(1e-9), { kind: 'coaxial', inner_diameter_m: 1e-10, outer_diameter_m: 2e-10, shield_thickness_m: 1e3 }]) {
      expect(() => primary.solve(primary.input.parse({ line: given, frequency_hz: { start: 1, stop: 1e12, points: 20_001, spacing: 'log' } }))).not.toThrow();
    }
  });
});
