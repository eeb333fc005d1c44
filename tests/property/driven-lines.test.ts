/** What holds for power and standing waves on every driven line, whatever its numbers. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ImpossibleInput } from '@/lib/solvers/errors';
import { findCalculation } from '@/lib/solvers/registry';
import { decades, rlgcUpTo, lossless } from '../support/arbitraries';

type Column = (number | null)[];
interface ComplexColumn {
  re: Column;
  im: Column;
}
interface Budget {
  readonly power_into_line_w: Column;
  readonly power_delivered_w: Column;
  readonly matched_line_loss_db: number[];
  readonly total_line_loss_db: Column;
  readonly additional_loss_db: Column;
  readonly source_mismatch_loss_db: Column;
  readonly transducer_loss_db: Column;
  readonly peak_voltage_v: Column;
}
interface Place {
  readonly position_m: number;
  readonly voltage_v: number;
  readonly current_a: number;
}
interface Wave {
  readonly position_m: number[];
  readonly voltage_v: ComplexColumn;
  readonly current_a: ComplexColumn;
  readonly power_w: number[];
  readonly voltage_magnitude_v: number[];
  readonly current_magnitude_a: number[];
  readonly maxima: Place[];
  readonly minima: Place[];
  readonly vswr_at_termination: number | null;
}

const seed = 20261201;
const run = <Values>(property: fc.IProperty<Values>, runs = 300) => fc.assert(property, { seed, numRuns: runs });

function solve(id: string, input: object) {
  const calculation = findCalculation('terminations', id)!;
  return calculation.solve(calculation.input.parse(input));
}
const budget = (input: object) => solve('power-budget', input).result as Budget;
const wave = (input: object) => solve('standing-wave', input).result as Wave;

const rlgc = rlgcUpTo(3);
const line = fc.oneof(rlgc, lossless);
const frequency = fc.oneof(decades(3, 9), fc.constant(0));
const length = decades(-4, 1);
const reactance = fc.oneof(fc.constant(0), fc.double({ min: -300, max: 300, noNaN: true }));
const resistive = fc.record({ re: decades(-2, 4), im: reactance });
const closing = fc.oneof(resistive, fc.constantFrom('open', 'short', 'matched'));
const source = fc.record({ re: decades(-1, 3), im: reactance });

const phaseOf = (given: object, f: number, l: number) => (solveLine(given, f).phase_constant_rad_per_m[0] ?? 0) * l;
function solveLine(given: object, f: number) {
  const calculation = findCalculation('lines', 'secondary-constants')!;
  return calculation.solve(calculation.input.parse({ line: given, frequency_hz: f })).result as { phase_constant_rad_per_m: number[] };
}

describe('a power budget', () => {
  it('adds up, and a passive line and load take no more than there is', () => {
    run(
      fc.property(line, length, resistive, frequency, source, (given, l, termination, f, zs) => {
        const result = budget({ line: given, length_m: l, termination, frequency_hz: f, source_impedance_ohm: zs, available_power_w: 8 });
        const [into, delivered] = [result.power_into_line_w[0]!, result.power_delivered_w[0]!];
        expect(into).toBeLessThanOrEqual(8 * (1 + 1e-14));
        expect(delivered).toBeGreaterThanOrEqual(0);
        expect(delivered).toBeLessThanOrEqual(into * (1 + 1e-14));
        const [matched, total, additional, mismatch, transducer] = [result.matched_line_loss_db[0], result.total_line_loss_db[0]!, result.additional_loss_db[0]!, result.source_mismatch_loss_db[0]!, result.transducer_loss_db[0]!];
        expect(total).toBeGreaterThanOrEqual(0);
        expect(mismatch).toBeGreaterThanOrEqual(0);
        expect(Math.abs(total - matched - additional)).toBeLessThanOrEqual(1e-12 * (total + matched));
        expect(Math.abs(transducer - mismatch - total)).toBeLessThanOrEqual(1e-13 * transducer);
        expect(Math.abs(10 ** (-transducer / 10) - delivered / 8)).toBeLessThanOrEqual(1e-12 * (delivered / 8) * (1 + transducer));
      }),
    );
  });

  it('has no additional loss where the load is the line’s own impedance, and none but that of mismatch where the line has no loss', () => {
    run(
      fc.property(rlgc, length, frequency, (given, l, f) => {
        const { total_line_loss_db, matched_line_loss_db, additional_loss_db } = budget({ line: given, length_m: l, termination: 'matched', frequency_hz: f });
        if (total_line_loss_db[0] === null) return;
        expect(additional_loss_db[0]).toBe(0);
        expect(Math.abs(total_line_loss_db[0] - matched_line_loss_db[0])).toBeLessThanOrEqual(1e-13 * matched_line_loss_db[0]);
      }),
    );
    run(
      fc.property(lossless, length, resistive, frequency, (given, l, termination, f) => {
        const { total_line_loss_db, power_into_line_w, power_delivered_w } = budget({ line: given, length_m: l, termination, frequency_hz: f });
        expect(total_line_loss_db[0]).toBe(0);
        expect(power_delivered_w).toEqual(power_into_line_w);
      }),
    );
  });

  it('is the same at one point as in a sweep, and grows with the power', () => {
    run(
      fc.property(line, length, closing, frequency, source, (given, l, termination, f, zs) => {
        const one = budget({ line: given, length_m: l, termination, frequency_hz: f, source_impedance_ohm: zs });
        const sweep = budget({ line: given, length_m: l, termination, frequency_hz: [f, f], source_impedance_ohm: zs, available_power_w: 4 });
        const near = (x: number | null, y: number | null) => (x === null || y === null ? expect(x).toBe(y) : expect(Math.abs(x - y)).toBeLessThanOrEqual(1e-12 * Math.max(Math.abs(x), Math.abs(y))));
        near(4 * one.power_into_line_w[0]!, sweep.power_into_line_w[1]);
        near(2 * one.peak_voltage_v[0]!, sweep.peak_voltage_v[1]);
        near(one.total_line_loss_db[0], sweep.total_line_loss_db[1]);
      }),
    );
  });
});

describe('a standing wave', () => {
  it('loses power along the line by what the line dissipates, and agrees with the power budget', () => {
    run(
      fc.property(line, length, closing, frequency, source, (given, l, termination, f, zs) => {
        const shared = { line: given, length_m: l, termination, frequency_hz: f, source_impedance_ohm: zs };
        const along = wave({ ...shared, source_voltage_v: 2, points: 33 });
        const powers = budget({ ...shared, available_power_w: 1 / zs.re });
        along.power_w.forEach((power, index) => {
          if (index > 0) expect(power).toBeLessThanOrEqual(along.power_w[index - 1] * (1 + 1e-13));
          const [v, i] = [along.voltage_magnitude_v[index], along.current_magnitude_a[index]];
          const product = along.voltage_v.re[index]! * along.current_a.re[index]! + along.voltage_v.im[index]! * along.current_a.im[index]!;
          const largest = Math.max(...along.voltage_magnitude_v) * Math.max(...along.current_magnitude_a);
          expect(Math.abs(power - product)).toBeLessThanOrEqual(1e-13 * (v * i + largest));
        });
        expect(Math.abs(along.power_w[0] - powers.power_into_line_w[0]!)).toBeLessThanOrEqual(1e-12 * along.power_w[0]);
        expect(Math.abs(along.power_w[32] - powers.power_delivered_w[0]!)).toBeLessThanOrEqual(1e-12 * along.power_w[32]);
      }),
    );
  });

  it('starts as the source and ends as the load says', () => {
    run(
      fc.property(line, length, resistive, frequency, source, (given, l, termination, f, zs) => {
        const { voltage_v: v, current_a: i } = wave({ line: given, length_m: l, termination, frequency_hz: f, source_impedance_ohm: zs, source_voltage_v: { re: 3, im: -4 }, points: 2 });
        const drop = { re: zs.re * i.re[0]! - zs.im * i.im[0]!, im: zs.re * i.im[0]! + zs.im * i.re[0]! };
        expect(Math.hypot(v.re[0]! + drop.re - 3, v.im[0]! + drop.im + 4)).toBeLessThanOrEqual(1e-13 * (5 + Math.hypot(drop.re, drop.im)));
        const load = { re: termination.re * i.re[1]! - termination.im * i.im[1]!, im: termination.re * i.im[1]! + termination.im * i.re[1]! };
        expect(Math.hypot(v.re[1]! - load.re, v.im[1]! - load.im)).toBeLessThanOrEqual(1e-13 * Math.hypot(load.re, load.im));
      }),
    );
  });

  it('has maxima and minima that alternate, bound every voltage between them, and hold the highest of the power budget', () => {
    run(
      fc.property(line, length, closing, frequency, source, (given, l, termination, f, zs) => {
        if (phaseOf(given, f, l) > 200) return;
        const shared = { line: given, length_m: l, termination, frequency_hz: f, source_impedance_ohm: zs };
        const along = wave({ ...shared, points: 401 });
        const both = [...along.maxima.map((each) => ({ ...each, top: true })), ...along.minima.map((each) => ({ ...each, top: false }))].sort((x, y) => x.position_m - y.position_m);
        both.forEach((each, index) => {
          expect(each.position_m >= 0 && each.position_m <= l).toBe(true);
          if (index > 0) expect(each.top).toBe(!both[index - 1].top);
        });
        const voltages = along.voltage_magnitude_v;
        const ends = [voltages[0], voltages[400]];
        const highest = Math.max(...ends, ...along.maxima.map(({ voltage_v }) => voltage_v));
        const lowest = Math.min(...ends, ...along.minima.map(({ voltage_v }) => voltage_v));
        for (const each of voltages) expect(each <= highest * (1 + 1e-13) && each >= lowest - 1e-13 * highest).toBe(true);
        const peak = budget({ ...shared, available_power_w: 1 / (4 * zs.re) }).peak_voltage_v[0]!;
        expect(Math.abs(peak / Math.SQRT2 - highest)).toBeLessThanOrEqual(1e-12 * highest);
      }),
    );
  });

  it('misses no extremum that a dense row of places shows', () => {
    run(
      fc.property(line, length, closing, frequency, (given, l, termination, f) => {
        if (phaseOf(given, f, l) > 60) return;
        const along = wave({ line: given, length_m: l, termination, frequency_hz: f, points: 2001 });
        const v = along.voltage_magnitude_v;
        const noise = 1e-12 * Math.max(...v);
        const step = l / 2000;
        for (let index = 1; index < 2000; index++) {
          const isTop = v[index] > v[index - 1] + noise && v[index] > v[index + 1] + noise;
          const isBottom = v[index] < v[index - 1] - noise && v[index] < v[index + 1] - noise;
          if (!isTop && !isBottom) continue;
          const listed = isTop ? along.maxima : along.minima;
          expect(listed.some(({ position_m }) => Math.abs(position_m - along.position_m[index]) <= step)).toBe(true);
        }
      }),
      150,
    );
  });

  it('has a ratio of maximum to minimum that is the VSWR, half a wave apart, where the line has no loss', () => {
    run(
      fc.property(lossless, resistive, decades(7, 9), fc.double({ min: 0.6, max: 5, noNaN: true }), (given, termination, f, turns) => {
        const wavelength = (given.velocity_factor * 299792458) / f;
        const { maxima, minima, vswr_at_termination: ratio } = wave({ line: given, length_m: turns * wavelength, termination, frequency_hz: f, points: 2 });
        if (ratio! > 1e6 || ratio! < 1 + 1e-9) return;
        expect(maxima.length).toBeGreaterThan(0);
        for (const top of maxima) for (const bottom of minima) expect(Math.abs(top.voltage_v / bottom.voltage_v / ratio! - 1)).toBeLessThanOrEqual(1e-14 * ratio! * (10 + turns * 10));
        // A flat top is found less well than a sharp one: by rounding over the depth of the wave.
        for (const list of [maxima, minima]) list.slice(1).forEach((each, index) => expect(Math.abs(each.position_m - list[index].position_m - wavelength / 2)).toBeLessThanOrEqual(1e-13 * wavelength * (1 + turns) * (1 + 1 / (ratio! - 1))));
      }),
    );
  });

  it('scales: k times the constants over a k-th of the length is the same line', () => {
    run(
      fc.property(rlgc, length, closing, frequency, decades(-2, 2), (given, l, termination, f, k) => {
        if (phaseOf(given, f, l) > 200) return;
        const scaled = Object.fromEntries(Object.entries(given).map(([name, each]) => [name, typeof each === 'number' ? each * k : each]));
        const one = wave({ line: given, length_m: l, termination, frequency_hz: f, points: 5 });
        const other = wave({ line: scaled, length_m: l / k, termination, frequency_hz: f, points: 5 });
        const largest = Math.max(...one.voltage_magnitude_v);
        one.voltage_magnitude_v.forEach((each, index) => expect(Math.abs(each - other.voltage_magnitude_v[index])).toBeLessThanOrEqual(1e-11 * largest));
        expect(Math.abs(other.minima.length - one.minima.length)).toBeLessThanOrEqual(1);
      }),
    );
  });

  it('comes to direct current without a step', () => {
    run(
      fc.property(rlgc, length, closing, (given, l, termination) => {
        if (termination === 'matched') return;
        const direct = wave({ line: given, length_m: l, termination, frequency_hz: 0, points: 3 });
        const slow = wave({ line: given, length_m: l, termination, frequency_hz: 1e-9, points: 3 });
        direct.voltage_magnitude_v.forEach((each, index) => expect(Math.abs(each - slow.voltage_magnitude_v[index])).toBeLessThanOrEqual(1e-10));
      }),
    );
  });
});

describe('every accepted input', () => {
  const extreme = (high: number, low = 0) => fc.oneof(fc.constantFrom(low, 1e-300, 1e-30, high), fc.double({ min: low, max: high, noNaN: true }), decades(-15, Math.log10(high)));
  const anyLine = fc.oneof(
    fc.record({ kind: fc.constant('rlgc'), resistance_ohm_per_m: extreme(1e9), inductance_h_per_m: extreme(1e3), conductance_s_per_m: extreme(1e9), capacitance_f_per_m: extreme(1e3) }),
    fc.record({ kind: fc.constant('lossless'), characteristic_impedance_ohm: fc.constantFrom(1e-3, 50, 1e6), velocity_factor: fc.constantFrom(1e-3, 1) }),
  );
  const anyComplex = fc.oneof(fc.constantFrom(0, 50, -50, -1e12, 1e12), fc.record({ re: fc.constantFrom(-1e12, -50, 0, 1e-12, 50, 1e12), im: fc.constantFrom(-1e12, -3, 0, 3, 1e12) }));
  const anyParts = fc.record({ resistance_ohm: extreme(1e12), inductance_h: extreme(1e3), capacitance_f: extreme(1e3) }, { requiredKeys: [] });
  const anyTermination = fc.oneof(anyComplex, fc.constantFrom('open', 'short', 'matched'), anyParts.map((parts) => ({ kind: 'series_rlc', ...parts })), anyParts.map((parts) => ({ kind: 'parallel_rlc', ...parts })));
  const anySource = fc.oneof(fc.constantFrom(0, 1e-12, 50, 1e12), fc.record({ re: fc.constantFrom(0, 1e-300, 50, 1e12), im: fc.constantFrom(-1e12, 0, 1e12) }));

  function holdsOnlyFiniteNumbers(id: string, input: object): void {
    const calculation = findCalculation('terminations', id)!;
    try {
      const { result, warnings } = calculation.solve(calculation.input.parse(input));
      expect(calculation.output.safeParse(result).error?.issues, JSON.stringify(input)).toBeUndefined();
      for (const [name, column] of Object.entries(result as object)) if (JSON.stringify(column).includes('null')) expect(warnings.map(({ pointer }) => pointer), JSON.stringify(input)).toContain(`/${name}`);
    } catch (error) {
      if (!(error instanceof ImpossibleInput)) throw error;
    }
  }

  it('gives finite numbers or null with a warning, over the whole of its bounds', () => {
    run(
      fc.property(anyLine, extreme(1e9), anyTermination, fc.array(extreme(1e15), { minLength: 1, maxLength: 3 }), anySource, fc.constantFrom(5e-324, 1, 1e12), (given, l, termination, f, zs, power) =>
        holdsOnlyFiniteNumbers('power-budget', { line: given, length_m: l, termination, frequency_hz: f, source_impedance_ohm: zs, available_power_w: power }),
      ),
      3000,
    );
    run(
      fc.property(anyLine, extreme(1e9, 5e-324), anyTermination, extreme(1e15), anySource, fc.constantFrom(5e-324, 1, 1e12), fc.integer({ min: 2, max: 9 }), (given, l, termination, f, zs, voltage, points) =>
        holdsOnlyFiniteNumbers('standing-wave', { line: given, length_m: l, termination, frequency_hz: f, source_impedance_ohm: zs, source_voltage_v: voltage, points }),
      ),
      3000,
    );
  });
});
