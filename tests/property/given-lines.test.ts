/** What holds for every line given by a table or by a data sheet, whatever its numbers. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { line as lineSchema, lineOverFrequency } from '@/lib/solvers/lines/line';
import { monotoneInterpolant } from '@/lib/solvers/numeric/monotone-interpolation';
import { findCalculation } from '@/lib/solvers/registry';
import { decades, numbersIn } from '../support/arbitraries';

const seed = 20261202;
const run = <Values>(property: fc.IProperty<Values>, runs = 300) => fc.assert(property, { seed, numRuns: runs });
const ascending = (values: fc.Arbitrary<number>, least: number, most: number, step: (before: number) => number) =>
  fc.array(values, { minLength: least, maxLength: most }).map((each) => each.sort((a, b) => a - b).filter((value, index, all) => index === 0 || value > step(all[index - 1])));

/** Nodes some ten apart from 0 on, values from 0 to 10 with equal ones among them, and a place as a fraction of the whole. */
const nodes = fc.tuple(
  fc.array(fc.integer({ min: 1, max: 2000 }), { minLength: 1, maxLength: 12 }).map((steps) => steps.reduce((x, step) => [...x, x[x.length - 1] + step / 100], [0])),
  fc.array(fc.oneof(fc.integer({ min: 0, max: 10_000 }).map((each) => each / 1000), fc.integer({ min: 0, max: 3 })), { minLength: 13, maxLength: 13 }),
  fc.integer({ min: 1, max: 999 }).map((each) => each / 1000),
);

describe('monotone interpolation', () => {
  it('goes through its nodes, stays between neighbours, and does not turn between them', () => {
    run(
      fc.property(nodes, ([x, y, fraction]) => {
        const read = monotoneInterpolant(x, y);
        x.forEach((each, index) => expect(read(each).value).toBe(y[index]));
        for (let index = 0; index + 1 < x.length; index++) {
          const inside = [0, fraction / 2, fraction, 1].map((t) => read(x[index] + t * (x[index + 1] - x[index])));
          const direction = Math.sign(y[index + 1] - y[index]);
          const size = Math.abs(y[index + 1] - y[index]);
          for (const { value, slope } of inside.slice(1, 3)) {
            expect((value - y[index]) * direction).toBeGreaterThanOrEqual(0);
            expect((y[index + 1] - value) * direction).toBeGreaterThanOrEqual(0);
            expect(slope * direction).toBeGreaterThanOrEqual((-1e-12 * size) / (x[index + 1] - x[index]));
          }
          expect((inside[2].value - inside[1].value) * direction).toBeGreaterThanOrEqual(-1e-14 * (y[index] + y[index + 1]));
        }
      }),
    );
  });

  it('keeps straight lines and parabolas that do not turn', () => {
    run(
      fc.property(nodes, fc.double({ min: 0, max: 2, noNaN: true }), fc.double({ min: 0, max: 2, noNaN: true }), ([x, , fraction], first, second) => {
        fc.pre(x.length > 2);
        const law = (at: number) => 1 + first * at + (second * at * at) / 100;
        const at = x[0] + fraction * (x[x.length - 1] - x[0]);
        const { value, slope } = monotoneInterpolant(x, x.map(law))(at);
        expect(Math.abs(value - law(at))).toBeLessThanOrEqual(1e-12 * law(240));
        expect(Math.abs(slope - (first + (2 * second * at) / 100))).toBeLessThanOrEqual(1e-9 * (1 + first + second));
      }),
    );
  });

  it('has the slope that its values have, without a step at a node', () => {
    run(
      fc.property(nodes, ([x, y, fraction]) => {
        const read = monotoneInterpolant(x, y);
        const at = x[0] + fraction * (x[x.length - 1] - x[0]);
        const gap = Math.min(...x.map((each) => Math.abs(each - at)));
        fc.pre(gap > 1e-3);
        const h = 1e-5 * gap;
        const measured = (read(at + h).value - read(at - h).value) / (2 * h);
        expect(Math.abs(measured - read(at).slope)).toBeLessThanOrEqual(1e-14 / h + 1e-5 * Math.abs(read(at).slope) + 1e-5);
        for (const node of x.slice(1, -1)) expect(read(node - 1e-13 * node).slope).toBeCloseTo(read(node).slope, 5);
      }),
    );
  });
});

const anyValue = (most: number) => fc.oneof({ weight: 5, arbitrary: decades(-15, Math.log10(most)) }, { weight: 2, arbitrary: fc.constantFrom(0, most) });
const table = ascending(fc.oneof(decades(-6, 15), fc.constantFrom(0, 1e15)), 1, 8, (before) => before + 1e-6).chain((frequency_hz) => {
  const column = (most: number) => fc.array(anyValue(most), { minLength: frequency_hz.length, maxLength: frequency_hz.length });
  return fc.record({ kind: fc.constant('rlgc_table'), frequency_hz: fc.constant(frequency_hz), resistance_ohm_per_m: column(1e9), inductance_h_per_m: column(1e3), conductance_s_per_m: column(1e9), capacitance_f_per_m: column(1e3) });
});
const points = ascending(decades(-3, 15), 1, 8, (before) => before * (1 + 1e-8)).chain((frequencies) =>
  fc.array(anyValue(1e6), { minLength: frequencies.length, maxLength: frequencies.length }).map((values) => ({ points: frequencies.map((frequency_hz, index) => ({ frequency_hz, attenuation_db_per_m: values[index] })) })),
);
const law = fc.record({ sqrt_db_per_m: anyValue(1e6), linear_db_per_m: anyValue(1e6), reference_frequency_hz: decades(-3, 15) });
const sheet = fc.record({ kind: fc.constant('datasheet'), characteristic_impedance_ohm: decades(-3, 6), velocity_factor: decades(-3, 0), attenuation: fc.oneof(points, law) });
const anyFrequency = fc.oneof(decades(-300, 15), fc.constantFrom(0, 1e15, 5e-324));

describe('a given line', () => {
  it('is finite in every calculation, over all that its schema accepts', () => {
    run(
      fc.property(fc.oneof(table, sheet), fc.array(anyFrequency, { minLength: 1, maxLength: 4 }), decades(-12, 9), (given, frequency_hz, length_m) => {
        for (const [group, id, input] of [
          ['lines', 'secondary-constants', { line: given, frequency_hz }],
          ['terminations', 'input-impedance', { line: given, length_m, termination: 75, frequency_hz }],
          ['networks', 'cascade', { elements: [{ kind: 'line', line: given, length_m }], frequency_hz }],
        ] as const) {
          const calculation = findCalculation(group, id)!;
          const { result } = calculation.solve(calculation.input.parse(input));
          expect(numbersIn(result).every(Number.isFinite), `${group}/${id}`).toBe(true);
        }
      }),
    );
  });

  it('says when a table is left, and only then', () => {
    run(
      fc.property(table, decades(-6, 15), (given, frequency) => {
        const outside = frequency < given.frequency_hz[0] || frequency > given.frequency_hz[given.frequency_hz.length - 1];
        const { methods, warnings } = lineOverFrequency(lineSchema.parse(given), Float64Array.of(frequency));
        expect(warnings.some(({ code }) => code === 'outside_table')).toBe(outside);
        expect(methods.every(({ inRange }) => inRange)).toBe(!outside);
      }),
    );
  });

  it('by a data sheet has the impedance and velocity it was given, and no dispersion', () => {
    run(
      fc.property(sheet, decades(0, 12), (given, frequency) => {
        const calculation = findCalculation('lines', 'secondary-constants')!;
        const { result } = calculation.solve(calculation.input.parse({ line: given, frequency_hz: frequency }));
        const { characteristic_impedance_ohm: zc, phase_velocity_m_per_s: phase, group_velocity_m_per_s: group } = result as { characteristic_impedance_ohm: { re: number[]; im: number[] }; phase_velocity_m_per_s: number[]; group_velocity_m_per_s: number[] };
        expect(Math.hypot(zc.re[0] - given.characteristic_impedance_ohm, zc.im[0])).toBeLessThanOrEqual(1e-14 * given.characteristic_impedance_ohm);
        expect(phase[0] / (given.velocity_factor * 299792458)).toBeCloseTo(1, 12);
        // Loss far above a neper a radian turns the slope of alpha into the slope of beta, by rounding.
        expect(group[0] / (given.velocity_factor * 299792458)).toBeCloseTo(1, 6);
      }),
    );
  });
});

describe('a table that is none', () => {
  const right = { kind: 'rlgc_table', frequency_hz: [1, 2], resistance_ohm_per_m: [1, 1], inductance_h_per_m: [1, 1], conductance_s_per_m: [1, 1], capacitance_f_per_m: [1, 1] };
  const codes = (given: object) => lineSchema.safeParse(given).error?.issues.map(({ path, ...issue }) => [path.join('/'), 'params' in issue ? (issue.params as { code: string }).code : issue.code]) ?? [];

  it('is refused with every wrong field at once', () => {
    expect(codes(right)).toEqual([]);
    expect(codes({ ...right, frequency_hz: [2, 1], resistance_ohm_per_m: [1], capacitance_f_per_m: [1, 2, 3] })).toEqual([
      ['frequency_hz/1', 'not_ascending'],
      ['resistance_ohm_per_m', 'length_differs'],
      ['capacitance_f_per_m', 'length_differs'],
    ]);
    expect(codes({ ...right, frequency_hz: [1, 1] })).toEqual([['frequency_hz/1', 'not_ascending']]);
    expect(codes({ ...right, conductance_s_per_m: [1, -1] })).toEqual([['conductance_s_per_m/1', 'too_small']]);
    expect(codes({ kind: 'datasheet', characteristic_impedance_ohm: 50, velocity_factor: 0.7, attenuation: { points: [{ frequency_hz: 2e6, attenuation_db_per_m: 1 }, { frequency_hz: 2e6, attenuation_db_per_m: 1 }] } })).not.toEqual([]);
  });
});
