/** What holds between impedance, reflection, VSWR, return loss and mismatch loss, whatever their numbers. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ImpossibleInput } from '@/lib/solvers/errors';
import { findCalculation } from '@/lib/solvers/registry';
import { decades } from '../support/arbitraries';

type Column = (number | null)[];
interface Parts {
  re: number;
  im: number;
}
interface Result {
  readonly impedance_ohm: { re: Column; im: Column };
  readonly reflection: { re: Column; im: Column };
  readonly reflection_magnitude: Column;
  readonly vswr: Column;
  readonly return_loss_db: Column;
  readonly mismatch_loss_db: Column;
}

const seed = 20261201;
const run = <Values>(property: fc.IProperty<Values>, runs = 500) => fc.assert(property, { seed, numRuns: runs });
const calculation = findCalculation('terminations', 'reflection')!;

function solve(input: object) {
  const { result, warnings } = calculation.solve(calculation.input.parse(input));
  return { result: result as Result, warnings };
}

const value = (column: { re: Column; im: Column }, index = 0): Parts => ({ re: column.re[index]!, im: column.im[index]! });
const size = ({ re, im }: Parts) => Math.hypot(re, im);
const apart = (x: Parts, y: Parts) => Math.hypot(x.re - y.re, x.im - y.im);

const signed = (magnitude: fc.Arbitrary<number>) => fc.tuple(magnitude, fc.constantFrom(1, -1)).map(([each, sign]) => each * sign);
const reactance = fc.oneof(fc.constant(0), signed(decades(-6, 6)));
const passive = fc.record({ re: fc.oneof(decades(-6, 6), decades(-14, 11)), im: reactance });
const reference = fc.record({ re: decades(-1, 4), im: fc.oneof(fc.constant(0), signed(decades(-1, 4))) });

describe('a reflection', () => {
  it('is no more than whole where the one-port is passive, and nothing where it is the conjugate of the reference', () => {
    run(
      fc.property(passive, reference, (z, zr) => {
        const { result } = solve({ impedance_ohm: z, reference_impedance_ohm: zr });
        expect(result.reflection_magnitude[0]).toBeLessThanOrEqual(1 + 4e-16);
        expect(result.vswr[0]).toBeGreaterThanOrEqual(1);
        const matched = solve({ impedance_ohm: { re: zr.re, im: -zr.im }, reference_impedance_ohm: zr }).result;
        expect(value(matched.reflection)).toEqual({ re: 0, im: 0 });
        expect([matched.vswr[0], matched.mismatch_loss_db[0], matched.return_loss_db[0]]).toEqual([1, 0, null]);
      }),
    );
  });

  it('leads back to the impedance it came from', () => {
    run(
      fc.property(passive, reference, (z, zr) => {
        const gamma = value(solve({ impedance_ohm: z, reference_impedance_ohm: zr }).result.reflection);
        const back = solve({ reflection: gamma, reference_impedance_ohm: zr }).result;
        if (back.impedance_ohm.re[0] === null) return;
        // A rounded Gamma knows Z to 1e-16 of |Z + Zr|^2/(2 Rr), the slope of Z to Gamma.
        const slope = apart(z, { re: -zr.re, im: -zr.im }) ** 2 / (2 * zr.re);
        expect(apart(value(back.impedance_ohm), z)).toBeLessThanOrEqual(1e-15 * (slope + size(z)));
      }),
    );
  });

  it('and an impedance to the reflection', () => {
    run(
      fc.property(fc.double({ min: 0, max: 0.999, noNaN: true }), fc.double({ min: -360, max: 360, noNaN: true }), reference, (magnitude, angle_deg, zr) => {
        const there = solve({ reflection: { magnitude, angle_deg }, reference_impedance_ohm: zr }).result;
        const back = solve({ impedance_ohm: value(there.impedance_ohm), reference_impedance_ohm: zr }).result;
        // Z as a number is known to rounding of |Z| or of the reactance that is taken from it.
        const rounding = (size(value(there.impedance_ohm)) + Math.abs(zr.im)) * ((2 * zr.re) / apart(value(there.impedance_ohm), { re: -zr.re, im: -zr.im }) ** 2);
        expect(apart(value(back.reflection), value(there.reflection))).toBeLessThanOrEqual(1e-15 * (1 + rounding));
      }),
    );
  });

  it('says the same by VSWR as by return loss and by its magnitude', () => {
    run(
      fc.property(fc.oneof(decades(-12, 0), decades(0, 12)), (above) => {
        const s = 1 + above;
        const one = solve({ vswr: s }).result;
        if (one.return_loss_db[0] === null) return;
        const other = solve({ return_loss_db: one.return_loss_db[0] }).result;
        // Of a return loss of 1e-12 dB or of 240 dB a number of 16 digits knows the VSWR to these.
        const known = 1e-14 * (1 + one.return_loss_db[0]);
        expect(Math.abs(other.vswr[0]! - s)).toBeLessThanOrEqual(known * s);
        expect(Math.abs(other.mismatch_loss_db[0]! - one.mismatch_loss_db[0]!)).toBeLessThanOrEqual(1e-13 * (1 + one.return_loss_db[0]) * one.mismatch_loss_db[0]!);
        const third = solve({ reflection: one.reflection_magnitude[0]! }).result;
        expect(Math.abs(third.return_loss_db[0]! - one.return_loss_db[0])).toBeLessThanOrEqual(1e-15 * (1 + one.return_loss_db[0]));
      }),
    );
  });

  it('shares the power: what is reflected and what is taken in make the whole', () => {
    run(
      fc.property(passive, reference, (z, zr) => {
        const { return_loss_db, mismatch_loss_db } = solve({ impedance_ohm: z, reference_impedance_ohm: zr }).result;
        if (return_loss_db[0] === null || mismatch_loss_db[0] === null) return;
        expect(10 ** (-return_loss_db[0] / 10) + 10 ** (-mismatch_loss_db[0] / 10)).toBeCloseTo(1, 13);
      }),
    );
  });

  it('does not change when impedance and reference shrink alike', () => {
    run(
      fc.property(passive, reference, (z, zr) => {
        const k = 2 ** -10;
        const one = solve({ impedance_ohm: z, reference_impedance_ohm: zr }).result;
        const other = solve({ impedance_ohm: { re: k * z.re, im: k * z.im }, reference_impedance_ohm: { re: k * zr.re, im: k * zr.im } }).result;
        expect(other.reflection).toEqual(one.reflection);
        expect(other.vswr).toEqual(one.vswr);
      }),
    );
  });
});

describe('lists and columns', () => {
  it('give each entry what it gives alone', () => {
    run(
      fc.property(fc.array(passive, { minLength: 2, maxLength: 5 }), (each) => {
        const frequency_hz = each.map((_, index) => 1e6 * (index + 1));
        const together = solve({ frequency_hz, impedance_ohm: { re: each.map(({ re }) => re), im: each.map(({ im }) => im) } }).result;
        each.forEach((z, index) => {
          const alone = solve({ impedance_ohm: z }).result;
          expect(apart(value(together.reflection, index), value(alone.reflection))).toBeLessThanOrEqual(1e-15);
          expect(together.vswr[index]! / alone.vswr[0]!).toBeCloseTo(1, 13);
        });
      }),
      100,
    );
  });

  it('are refused where they and the frequencies do not agree, or where not exactly one quantity is given', () => {
    const codes = (input: object) => calculation.input.safeParse(input).error?.issues.map(({ path, ...issue }) => [path.join('/'), (issue as { params?: { code: string } }).params?.code ?? issue.code]);
    expect(codes({ frequency_hz: [1, 2, 3], vswr: [1, 2] })).toEqual([['vswr', 'length_differs']]);
    expect(codes({ frequency_hz: 1, reflection: { re: [0, 0.1], im: [0] } })).toEqual([['reflection/re', 'length_differs']]);
    expect(codes({ impedance_ohm: { re: [0, 0.1], im: [0] } })).toEqual([['impedance_ohm/im', 'length_differs']]);
    expect(codes({})).toEqual([['', 'one_of_required']]);
    expect(codes({ vswr: 2, return_loss_db: 3 })).toEqual([
      ['vswr', 'only_one'],
      ['return_loss_db', 'only_one'],
    ]);
    expect(codes({ vswr: 0.99 })).toHaveLength(1);
    expect(codes({ return_loss_db: [3, -1], frequency_hz: [1, 2] })).toHaveLength(1);
  });
});

describe('every accepted input', () => {
  const extreme = fc.oneof(fc.constantFrom(0, 1, -1, 1e-300, 1e12, -1e12, 50, -50, 0.999999999999), fc.double({ min: -1e12, max: 1e12, noNaN: true }), fc.double({ min: -2, max: 2, noNaN: true }));
  const complex = fc.oneof(extreme, fc.record({ re: extreme, im: extreme }), fc.record({ magnitude: extreme.map(Math.abs), angle_deg: fc.constantFrom(-360, -90, 0, 1e-12, 33, 180) }));
  const quantity = fc.oneof(
    complex.map((impedance_ohm) => ({ impedance_ohm })),
    complex.map((reflection) => ({ reflection })),
    fc.oneof(fc.constantFrom(1, 1e15), fc.double({ min: 1, max: 1e15, noNaN: true })).map((vswr) => ({ vswr })),
    fc.oneof(fc.constantFrom(0, 1e-300, 6000), fc.double({ min: 0, max: 6000, noNaN: true })).map((return_loss_db) => ({ return_loss_db })),
  );
  const anyReference = fc.oneof(fc.constantFrom(1e-12, 50, 1e12), fc.record({ re: fc.constantFrom(1e-300, 1e-12, 50, 1e12), im: fc.constantFrom(-1e12, 0, 1e12) }));

  it('gives finite numbers or null with a warning', () => {
    run(
      fc.property(quantity, anyReference, (given, reference_impedance_ohm) => {
        try {
          const { result, warnings } = solve({ ...given, reference_impedance_ohm });
          expect(calculation.output.safeParse(result).error?.issues, JSON.stringify(given)).toBeUndefined();
          for (const [name, column] of Object.entries(result)) if (JSON.stringify(column).includes('null')) expect(warnings.map(({ pointer }) => pointer)).toContain(`/${name}`);
        } catch (error) {
          if (!(error instanceof ImpossibleInput)) throw error;
        }
      }),
      5000,
    );
  });
});
