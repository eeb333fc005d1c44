/** Two-ports given by their matrices: what is refused, what is warned of, and what stands where a matrix does not exist. */
import { describe, expect, it } from 'vitest';
import { ImpossibleInput, type InputProblem } from '@/lib/solvers/errors';
import { findCalculation } from '@/lib/solvers/registry';

interface Column {
  readonly re: readonly (number | null)[];
  readonly im: readonly (number | null)[];
}
interface Answer {
  readonly s: Record<string, Column>;
  readonly z: Record<string, Column>;
  readonly values: Record<string, Column>;
  readonly input_impedance_ohm: Column;
  readonly group_delay_s: readonly (number | null)[];
  readonly stability_measure: readonly (number | null)[];
  readonly rollett_stability_factor: readonly (number | null)[];
  readonly reciprocal: boolean;
  readonly passive: boolean;
}

function solve(id: 'cascade' | 'convert', input: object) {
  const calculation = findCalculation('networks', id)!;
  const { result, warnings } = calculation.solve(calculation.input.parse(input));
  return { result: result as Answer, warnings, codes: warnings.map(({ code }) => code) };
}

function refusals(id: 'cascade' | 'convert', input: object): readonly InputProblem[] {
  try {
    solve(id, input);
  } catch (error) {
    if (error instanceof ImpossibleInput) return error.problems;
    throw error;
  }
  throw new Error('nothing was refused');
}

const pad = { s11: 0, s12: 0.5, s21: 0.5, s22: 0 };
const given = (values: object, representation = 's') => ({ kind: 'two_port', representation, values });
const nest = (depth: number): object => (depth === 0 ? given(pad) : { kind: 'cascade', elements: [nest(depth - 1)] });

describe('what is refused', () => {
  it('names every wrong field at once, with where it stands', () => {
    const problems = refusals('cascade', {
      elements: [
        given({ z11: 1, z12: 1, z21: 1, z22: 1 }),
        { kind: 'cascade', elements: [{ kind: 'series' }, { ...given({ y11: 1, y12: 0, y21: { re: [0, 1], im: [0] }, y22: 1 }, 'y'), reference_impedance_ohm: 50 }] },
        { ...given(pad), reference_impedance_ohm: [50, -3] },
      ],
      frequency_hz: [1e6, 2e6],
    });
    expect(problems).toEqual([
      { pointer: '/elements/0/values', code: 'other_representation', detail: 'values must have s11, s12, s21 and s22, the entries of s; got z11, z12, z21, z22' },
      { pointer: '/elements/1/elements/0', code: 'no_parts', detail: 'elements[1].elements[0] must have impedance_ohm or at least one of resistance_ohm, inductance_h and capacitance_f' },
      { pointer: '/elements/1/elements/1/values/y21/im', code: 'length_differs', detail: 'y21.im must have as many entries as frequency_hz (2); got 1' },
      { pointer: '/elements/1/elements/1/reference_impedance_ohm', code: 'excluded', detail: 'reference_impedance_ohm has no meaning for y; leave it out' },
      { pointer: '/elements/2/reference_impedance_ohm/1', code: 'reference_without_resistance', detail: 'reference_impedance_ohm.1 must have a real part greater than 0; got -3' },
    ]);
    expect(refusals('convert', { from: 's', to: 'z', values: { ...pad, s11: { re: [0, 0], im: [0, 0, 0] } }, reference_impedance_ohm: -50, to_reference_impedance_ohm: { re: 0, im: 5 } }).map(({ pointer }) => pointer)).toEqual([
      '/reference_impedance_ohm',
      '/to_reference_impedance_ohm',
      '/values/s11/im',
    ]);
  });

  it('is a cascade more than eight deep, or longer than a million with its repeats', () => {
    expect(solve('cascade', { elements: [nest(8)], frequency_hz: 1 }).result.s.s21.re[0]).toBeCloseTo(0.5, 14);
    expect(refusals('cascade', { elements: [nest(10)], frequency_hz: 1 }).map(({ code }) => code)).toEqual(['too_deep']);
    const thousand = (inner: object) => ({ kind: 'cascade', elements: [inner], repeat: 1000 });
    expect(solve('cascade', { elements: [thousand(thousand(given({ ...pad, s12: 1, s21: 1 })))], frequency_hz: 1 }).result.s.s21.re[0]).toBeCloseTo(1, 9);
    expect(refusals('cascade', { elements: [thousand(thousand({ kind: 'cascade', elements: [given(pad), given(pad)] }))], frequency_hz: 1 }).map(({ code }) => code)).toEqual(['too_large']);
  });
});

describe('what costs', () => {
  it('is each element once, and the squarings of a repeat', () => {
    const { units } = findCalculation('networks', 'cascade')!.cost;
    const cost = (elements: object[], points: number) => units(findCalculation('networks', 'cascade')!.input.parse({ elements, frequency_hz: { start: 1, stop: 2, points } }));
    expect(cost([given(pad), given(pad)], 1000)).toBe(2);
    expect(cost([{ kind: 'cascade', elements: [given(pad), given(pad)], repeat: 8 }], 1000)).toBe(5);
    expect(cost([{ kind: 'cascade', elements: [given(pad)], repeat: 1000 }], 1000)).toBe(15);
  });
});

describe('a two-port that passes nothing to port 2', () => {
  it('shows at port 1 what it is, whatever closes port 2', () => {
    for (const termination of ['open', 'short', 50]) {
      const { result } = solve('cascade', { elements: [given({ s11: 0.5, s12: 0, s21: 0, s22: 1 })], frequency_hz: 1e6, termination });
      expect(result.input_impedance_ohm.re[0]).toBeCloseTo(150, 12);
    }
    const short = solve('cascade', { elements: [{ kind: 'shunt', inductance_h: 1e-6 }], frequency_hz: 0, termination: 'short' }).result;
    expect([short.input_impedance_ohm.re[0], short.input_impedance_ohm.im[0]]).toEqual([0, 0]);
    const open = solve('cascade', { elements: [{ kind: 'series', capacitance_f: 1e-9 }], frequency_hz: 0, termination: 'open' }).result;
    expect(open.input_impedance_ohm.re[0]).toBeNull();
  });
});

describe('an active two-port', () => {
  const amplifier = { s11: 0.5, s12: 0.1, s21: 8, s22: 0.6 };

  it('is not passive, nor reciprocal, and is said to be conditionally stable where it is', () => {
    const { result, codes } = solve('cascade', { elements: [given(amplifier)], frequency_hz: 1e9 });
    expect([result.passive, result.reciprocal]).toEqual([false, false]);
    expect(result.stability_measure[0]).toBeLessThan(1);
    expect(codes).toEqual(['not_passive', 'conditionally_stable']);
    expect(solve('cascade', { elements: [given({ ...amplifier, s12: 0, s22: 0.1 })], frequency_hz: 1e9 }).codes).toEqual(['one_way', 'not_passive']);
  });

  it('has no S where it drives its references, at the pole as beside it by rounding', () => {
    for (const re of [-100, -100 * (1 + Number.EPSILON)]) {
      const { result, codes } = solve('cascade', { elements: [{ kind: 'series', impedance_ohm: re }], frequency_hz: 1 });
      expect(result.s.s11.re[0]).toBeNull();
      expect(result.passive).toBe(false);
      expect(codes).toContain('does_not_exist');
    }
  });
});

describe('the delay of columns', () => {
  it('is warned of, and none at a single frequency', () => {
    const column = { re: [0.5], im: [0] };
    expect(solve('cascade', { elements: [given({ ...pad, s21: column })], frequency_hz: 1e6 }).codes).toContain('no_delay');
    expect(solve('cascade', { elements: [given({ ...pad, s21: { re: [0.5, 0.5], im: [0, 0] } })], frequency_hz: [1e6, 1e6] }).codes).toContain('no_delay');
    const turning = { re: [0.9, 0, -0.9], im: [0, -0.9, 0] };
    const { result, codes } = solve('cascade', { elements: [given({ s11: 0.1, s12: turning, s21: turning, s22: 0 })], frequency_hz: [1e6, 2e6, 3e6] });
    expect(codes).toEqual(['delay_by_differences']);
    for (const delay of result.group_delay_s) expect(delay! * 4e6).toBeCloseTo(1, 12);
    expect(solve('cascade', { elements: [given(pad)], frequency_hz: [1e6, 2e6] }).result.group_delay_s).toEqual([0, 0]);
  });
});

describe('a determinant that is lost', () => {
  it('is taken as 1, with a warning, and never where it is known', () => {
    const [re, z] = [Math.cosh(20), 50];
    const lossy = { a: re, b: z * Math.sinh(20), c: Math.sinh(20) / z, d: re };
    const { result, codes } = solve('convert', { from: 'abcd', to: 's', values: lossy });
    expect(codes).toEqual(['taken_as_reciprocal']);
    expect(result.values.s12.re[0]).toBe(result.values.s21.re[0]);
    expect(result.values.s21.re[0]! * Math.exp(20)).toBeCloseTo(1, 12);
    expect(solve('convert', { from: 'abcd', to: 's', values: { a: 1e12, b: 0, c: 0, d: 1 } }).codes).toEqual([]);
  });
});
