/** What stands where a formula divides 0 by 0, and that no null is written where there is a value. */
import { describe, expect, it } from 'vitest';
import { findCalculation } from '@/lib/solvers/registry';

interface Column {
  readonly re: readonly (number | null)[];
  readonly im: readonly (number | null)[];
}

function solve<Result>(group: string, id: string, input: object) {
  const calculation = findCalculation(group, id)!;
  const { result, warnings } = calculation.solve(calculation.input.parse(input));
  return { result: result as Result, codes: warnings.map(({ code }) => code) };
}

const cascade = (input: object) =>
  solve<{ s: Record<string, Column>; z: Record<string, Column>; y: Record<string, Column>; abcd: Record<string, Column>; input_impedance_ohm: Column; insertion_loss_db: (number | null)[] }>('networks', 'cascade', { include: ['abcd', 's', 'z', 'y'], ...input });
const terminated = (input: object) => solve<Record<string, Column>>('terminations', 'input-impedance', input);

const lossless = { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 0.66 };
const length = (metres: number) => ({ kind: 'line', line: lossless, length_m: metres });
const wire = { kind: 'rlgc', resistance_ohm_per_m: 0.1, inductance_h_per_m: 0.25e-6, conductance_s_per_m: 0, capacitance_f_per_m: 100e-12 };

describe('a chain that blocks at both ends', () => {
  it.each([
    ['two capacitors in series at direct current', { kind: 'series', capacitance_f: 1e-7 }, 1],
    ['two shorted stubs at direct current', { kind: 'short_stub', line: lossless, length_m: 0.1 }, -1],
    ['two coils across the path at direct current', { kind: 'shunt', inductance_h: 1e-6 }, -1],
  ])('reflects all at either port: %s', (_, end, whole) => {
    for (const frequency_hz of [0, [0, 0]]) {
      for (const between of [[], [length(1)], [length(1), end, length(2)]]) {
        const { s, insertion_loss_db } = cascade({ elements: [end, ...between, end], frequency_hz }).result;
        expect([s.s11.re[0], s.s11.im[0], s.s22.re[0], s.s22.im[0]]).toEqual([whole, 0, whole, 0]);
        expect([s.s21.re[0], s.s21.im[0], insertion_loss_db[0]]).toEqual([0, 0, null]);
      }
    }
  });

  it('passes nothing, exactly, through a quarter-wave open stub, and reflects as a short does', () => {
    const stub = { kind: 'open_stub', line: lossless, length_m: (0.66 * 299792458) / 4e8 };
    for (const elements of [[stub], [stub, stub], [stub, length(0.4), stub]]) {
      const { s, abcd } = cascade({ elements, frequency_hz: 1e8 }).result;
      expect(s.s21.re[0]).toBe(0);
      expect(abcd.a.re[0]).toBeNull();
      expect(s.s11.re[0]).toBeCloseTo(-1, 14);
      expect(s.s22.re[0]).toBeCloseTo(-1, 14);
    }
  });
});

describe('a long chain', () => {
  it('keeps S, Z, Y and the input impedance of 200 lines of a thousand radians each', () => {
    const elements = Array.from({ length: 200 }, () => length(3));
    const { result, codes } = cascade({ elements, frequency_hz: 1e10, termination: 80 });
    const whole = cascade({ elements: [length(600)], frequency_hz: 1e10, termination: 80 }).result;
    // 190,000 rad are known to 4e-11.
    for (const [chain, one] of [[result.s.s21, whole.s.s21], [result.input_impedance_ohm, whole.input_impedance_ohm], [result.z.z11, whole.z.z11], [result.y.y12, whole.y.y12]]) {
      const size = Math.hypot(one.re[0]!, one.im[0]!);
      expect(Math.hypot(chain.re[0]! - one.re[0]!, chain.im[0]! - one.im[0]!) / size).toBeLessThanOrEqual(1e-9);
    }
    expect(codes).toContain('many_turns');
  });

  it('has no Z where half waves leave no current, however many', () => {
    const halfWave = (0.66 * 299792458) / 2e8;
    const { z, y } = cascade({ elements: Array.from({ length: 6 }, () => length(halfWave)), frequency_hz: 1e8 }).result;
    expect([z.z11.re[0], y.y11.re[0]]).toEqual([null, null]);
    const quarters = cascade({ elements: Array.from({ length: 8 }, () => length(halfWave / 2)), frequency_hz: 1e8 }).result;
    expect([quarters.z.z11.re[0], quarters.y.y11.re[0]]).toEqual([null, null]);
  });
});

describe('reflection where Zc is infinite, at direct current without conductance', () => {
  it.each([
    ['open', 1],
    ['short', -1],
    ['matched', 0],
    [50, -1],
  ])('is the limit from above for %s', (termination, limit) => {
    const { result } = terminated({ line: wire, length_m: 3, termination, frequency_hz: [0, 1e-12] });
    for (const name of ['reflection_at_termination', 'reflection_at_input']) {
      expect([result[name].re[0], result[name].im[0]]).toEqual([limit, 0]);
      expect(result[name].re[1]).toBeCloseTo(limit, 5);
    }
  });
});

describe('a phase of many turns', () => {
  it('is warned of, and an ordinary one is not', () => {
    expect(terminated({ line: lossless, length_m: 1e4, termination: 75, frequency_hz: 1e9 }).codes).toContain('many_turns');
    expect(terminated({ line: lossless, length_m: 10, termination: 75, frequency_hz: 1e9 }).codes).toEqual([]);
  });
});
