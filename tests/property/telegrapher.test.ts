/** What holds for every line, termination and cascade, whatever its numbers. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findCalculation } from '@/lib/solvers/registry';
import { decades, rlgcUpTo, lossless, holdsOnlyFiniteNumbers } from '../support/arbitraries';

type Column = (number | null)[];
interface ComplexColumn {
  re: Column;
  im: Column;
}

const seed = 20261201;
const run = <Values>(property: fc.IProperty<Values>, runs = 300) => fc.assert(property, { seed, numRuns: runs });

interface SecondaryResult {
  readonly propagation_constant_per_m: ComplexColumn;
  readonly characteristic_impedance_ohm: ComplexColumn;
  readonly attenuation_np_per_m: number[];
  readonly phase_constant_rad_per_m: number[];
  readonly phase_velocity_m_per_s: number[];
  readonly group_velocity_m_per_s: number[];
}

interface TerminatedResult {
  readonly input_impedance_ohm: ComplexColumn;
  readonly reflection_at_reference: ComplexColumn;
}

type Matrix = Readonly<Record<string, ComplexColumn>>;

interface CascadeResult {
  readonly abcd: Matrix;
  readonly s: Matrix;
  readonly z: Matrix;
  readonly y: Matrix;
  readonly group_delay_s: Column;
  readonly reciprocal: boolean;
  readonly passive: boolean;
}

/** The shapes of results are held by the declarations' own test; here they are taken at their word. */
function solve(group: string, id: string, input: object): unknown {
  const calculation = findCalculation(group, id)!;
  return calculation.solve(calculation.input.parse(input)).result;
}
const secondary = (input: object) => solve('lines', 'secondary-constants', input) as SecondaryResult;
const terminated = (input: object) => solve('terminations', 'input-impedance', input) as TerminatedResult;
const cascaded = (input: object) => solve('networks', 'cascade', input) as CascadeResult;

const rlgc = rlgcUpTo(3);
const line = fc.oneof(rlgc, lossless);
const frequency = decades(3, 9);
const length = decades(-4, 1);
const part = fc.record({ resistance_ohm: decades(-2, 4), inductance_h: decades(-12, -6), capacitance_f: decades(-15, -8) }, { requiredKeys: [] }).filter((each) => Object.keys(each).length > 0);
const element = fc.oneof(
  fc.record({ kind: fc.constant('line'), line, length_m: length }),
  fc.record({ kind: fc.constantFrom('open_stub', 'short_stub', 'series_open_stub', 'series_short_stub'), line, length_m: length }),
  fc.tuple(fc.constantFrom('series', 'shunt'), fc.constantFrom('series', 'parallel'), part).map(([kind, connection, parts]) => ({ kind, connection, ...parts })),
  fc.record({ kind: fc.constant('transformer'), turns_ratio: decades(-1, 1) }),
);
const elements = fc.array(element, { minLength: 1, maxLength: 6 });

const value = (column: ComplexColumn, index = 0) => ({ re: column.re[index]!, im: column.im[index]! });
const size = ({ re, im }: { re: number; im: number }) => Math.hypot(re, im);
const apart = (x: { re: number; im: number }, y: { re: number; im: number }) => Math.hypot(x.re - y.re, x.im - y.im);

describe('a line', () => {
  it('has Re gamma >= 0 and Re Zc >= 0, and gamma Zc = Z, gamma / Zc = Y', () => {
    run(
      fc.property(rlgc, frequency, (given, f) => {
        const { propagation_constant_per_m, characteristic_impedance_ohm } = secondary({ line: given, frequency_hz: f });
        const gamma = value(propagation_constant_per_m);
        const zc = value(characteristic_impedance_ohm);
        expect(gamma.re).toBeGreaterThanOrEqual(0);
        expect(zc.re).toBeGreaterThanOrEqual(0);
        const w = 2 * Math.PI * f;
        const z = { re: given.resistance_ohm_per_m, im: w * given.inductance_h_per_m };
        const y = { re: given.conductance_s_per_m, im: w * given.capacitance_f_per_m };
        const product = { re: gamma.re * zc.re - gamma.im * zc.im, im: gamma.re * zc.im + gamma.im * zc.re };
        const quotient = { re: (gamma.re * zc.re + gamma.im * zc.im) / size(zc) ** 2, im: (gamma.im * zc.re - gamma.re * zc.im) / size(zc) ** 2 };
        expect(apart(product, z)).toBeLessThanOrEqual(1e-14 * size(z));
        expect(apart(quotient, y)).toBeLessThanOrEqual(1e-14 * size(y));
      }),
    );
  });

  it('does not disperse where R/L = G/C', () => {
    run(
      fc.property(decades(-3, 2), decades(-8, -5), decades(-12, -9), frequency, (R, L, C, f) => {
        const given = { kind: 'rlgc', resistance_ohm_per_m: R, inductance_h_per_m: L, conductance_s_per_m: (R * C) / L, capacitance_f_per_m: C };
        const result = secondary({ line: given, frequency_hz: [f, 3 * f] });
        expect(result.attenuation_np_per_m[0] / (R * Math.sqrt(C / L))).toBeCloseTo(1, 11);
        expect(result.phase_velocity_m_per_s[0] * Math.sqrt(L * C)).toBeCloseTo(1, 11);
        expect(result.group_velocity_m_per_s[1] * Math.sqrt(L * C)).toBeCloseTo(1, 11);
      }),
    );
  });

  it('scales: k times the constants over a k-th of the length is the same line', () => {
    run(
      fc.property(rlgc, frequency, length, decades(-2, 2), (given, f, l, k) => {
        const scaled = {
          kind: 'rlgc',
          resistance_ohm_per_m: given.resistance_ohm_per_m * k,
          inductance_h_per_m: given.inductance_h_per_m * k,
          conductance_s_per_m: given.conductance_s_per_m * k,
          capacitance_f_per_m: given.capacitance_f_per_m * k,
        };
        const one = terminated({ line: given, length_m: l, termination: { re: 30, im: 12 }, frequency_hz: f });
        const other = terminated({ line: scaled, length_m: l / k, termination: { re: 30, im: 12 }, frequency_hz: f });
        const turns = secondary({ line: given, frequency_hz: f }).phase_constant_rad_per_m[0] * l;
        expect(apart(value(one.reflection_at_reference), value(other.reflection_at_reference))).toBeLessThanOrEqual(1e-13 * (1 + turns));
      }),
    );
  });

  it('comes to direct current without a step', () => {
    run(
      fc.property(rlgc, length, (given, l) => {
        const result = terminated({ line: given, length_m: l, termination: 75, frequency_hz: [0, 1e-9] });
        expect(apart(value(result.reflection_at_reference, 0), value(result.reflection_at_reference, 1))).toBeLessThanOrEqual(1e-10);
      }),
    );
  });
});

describe('a terminated line', () => {
  it('reflects no more than it is given, and gives the same at one point as in a sweep', () => {
    run(
      fc.property(line, length, frequency, fc.oneof(fc.constantFrom('open', 'short', 'matched'), part.map((each) => ({ kind: 'series_rlc', ...each })), part.map((each) => ({ kind: 'parallel_rlc', ...each }))), (given, l, f, termination) => {
        const one = terminated({ line: given, length_m: l, termination, frequency_hz: f });
        const sweep = terminated({ line: given, length_m: l, termination, frequency_hz: [f, f] });
        const gamma = value(one.reflection_at_reference);
        expect(size(gamma)).toBeLessThanOrEqual(1 + 1e-12);
        for (const index of [0, 1]) expect(apart(gamma, value(sweep.reflection_at_reference, index))).toBeLessThanOrEqual(1e-13);
        if (one.input_impedance_ohm.re[0] !== null && sweep.input_impedance_ohm.re[0] !== null) {
          const zin = value(one.input_impedance_ohm);
          // Beside a pole a difference of rounding is magnified by the impedance itself.
          expect(apart(zin, value(sweep.input_impedance_ohm))).toBeLessThanOrEqual(1e-13 * size(zin) * (1 + size(zin)));
        }
      }),
    );
  });
});

describe('a cascade', () => {
  it('of two parts is the whole, and is reciprocal and passive', () => {
    run(
      fc.property(line, length, frequency, fc.double({ min: 0.05, max: 0.95, noNaN: true }), (given, l, f, share) => {
        const whole = cascaded({ elements: [{ kind: 'line', line: given, length_m: l }], frequency_hz: f });
        const halves = cascaded({ elements: [{ kind: 'line', line: given, length_m: l * share }, { kind: 'line', line: given, length_m: l - l * share }], frequency_hz: f });
        const turns = secondary({ line: given, frequency_hz: f }).phase_constant_rad_per_m[0] * l;
        for (const name of ['s11', 's21', 's22']) expect(apart(value(whole.s[name]), value(halves.s[name]))).toBeLessThanOrEqual(1e-14 * (10 + turns));
        expect(whole.passive && whole.reciprocal && halves.passive).toBe(true);
        if (whole.group_delay_s[0] !== null) expect(halves.group_delay_s[0]! / whole.group_delay_s[0]).toBeCloseTo(1, 9);
      }),
    );
  });

  it('passes no more power than it is given, at one point as in a sweep', () => {
    run(
      fc.property(elements, frequency, (chain, f) => {
        const one = cascaded({ elements: chain, frequency_hz: f });
        const sweep = cascaded({ elements: chain, frequency_hz: [f, f] });
        const s11 = value(one.s.s11);
        const s21 = value(one.s.s21);
        expect(size(s11) ** 2 + size(s21) ** 2).toBeLessThanOrEqual(1 + 1e-10);
        expect(one.passive).toBe(true);
        expect(apart(s11, value(sweep.s.s11))).toBeLessThanOrEqual(1e-12);
        expect(apart(s21, value(sweep.s.s21))).toBeLessThanOrEqual(1e-12);
      }),
    );
  });

  it('without loss passes what it does not reflect', () => {
    run(
      fc.property(fc.array(fc.record({ kind: fc.constantFrom('line', 'open_stub', 'short_stub'), line: lossless, length_m: length }), { minLength: 1, maxLength: 5 }), frequency, (chain, f) => {
        const { s } = cascaded({ elements: chain, frequency_hz: f });
        expect(size(value(s.s11)) ** 2 + size(value(s.s21)) ** 2).toBeCloseTo(1, 10);
      }),
    );
  });

  it('has det ABCD = 1, and Z and Y that are inverse to each other', () => {
    run(
      fc.property(fc.array(fc.record({ kind: fc.constant('line'), line: rlgc, length_m: decades(-2, 0) }), { minLength: 1, maxLength: 3 }), decades(6, 8), (chain, f) => {
        const { abcd, z, y } = cascaded({ elements: chain, frequency_hz: f, include: ['abcd', 'z', 'y'] });
        if (abcd.a.re[0] === null || z.z11.re[0] === null || y.y11.re[0] === null) return;
        const times = (p: ComplexColumn, q: ComplexColumn) => ({ re: p.re[0]! * q.re[0]! - p.im[0]! * q.im[0]!, im: p.re[0]! * q.im[0]! + p.im[0]! * q.re[0]! });
        const ad = times(abcd.a, abcd.d);
        const bc = times(abcd.b, abcd.c);
        expect(apart({ re: ad.re - bc.re, im: ad.im - bc.im }, { re: 1, im: 0 })).toBeLessThanOrEqual(1e-13 * (1 + size(ad)));
        const first = times(z.z11, y.y11);
        const second = times(z.z12, y.y21);
        expect(apart({ re: first.re + second.re, im: first.im + second.im }, { re: 1, im: 0 })).toBeLessThanOrEqual(1e-12 * (1 + size(first)));
      }),
    );
  });
});

describe('every accepted input', () => {
  const extreme = (high: number) => fc.oneof(fc.constantFrom(0, Number.MIN_VALUE, 1e-300, 1e-30, high), fc.double({ min: 0, max: high, noNaN: true }));
  const anyLine = fc.oneof(
    fc.record({ kind: fc.constant('rlgc'), resistance_ohm_per_m: extreme(1e9), inductance_h_per_m: extreme(1e3), conductance_s_per_m: extreme(1e9), capacitance_f_per_m: extreme(1e3) }),
    fc.record({ kind: fc.constant('lossless'), characteristic_impedance_ohm: fc.constantFrom(1e-3, 50, 1e6), velocity_factor: fc.constantFrom(1e-3, 1) }),
  );
  const anyComplex = fc.oneof(fc.constantFrom(0, 50, -1e12, 1e12), fc.record({ re: fc.constantFrom(-1e12, -50, 0, 1e-12, 50, 1e12), im: fc.constantFrom(-1e12, -3, 0, 3, 1e12) }), fc.record({ magnitude: extreme(1e12), angle_deg: fc.constantFrom(-360, -90, 0, 33, 180) }));
  const anyParts = fc.record({ resistance_ohm: extreme(1e12), inductance_h: extreme(1e3), capacitance_f: extreme(1e3) }, { requiredKeys: [] });
  const anyReference = fc.oneof(fc.constantFrom(1e-12, 50, 1e12), fc.record({ re: fc.constantFrom(1e-12, 50, 1e12), im: fc.constantFrom(-1e12, 0, 1e12) }));
  const anyFrequencies = fc.array(extreme(1e15), { minLength: 1, maxLength: 3 });
  const anyLength = extreme(1e9);
  const anyElement = fc.oneof(
    fc.record({ kind: fc.constantFrom('line', 'open_stub', 'short_stub'), line: anyLine, length_m: anyLength }),
    fc.tuple(fc.constantFrom('series', 'shunt'), fc.constantFrom('series', 'parallel'), anyParts).map(([kind, connection, parts]) => ({ kind, connection, ...parts })),
    fc.record({ kind: fc.constantFrom('series', 'shunt'), impedance_ohm: anyComplex }),
    fc.record({ kind: fc.constant('transformer'), turns_ratio: fc.constantFrom(1e-6, 1, 1e6) }),
  );

  it('gives finite numbers or null with a warning, over the whole of its bounds', () => {
    run(fc.property(anyLine, anyFrequencies, (given, f) => holdsOnlyFiniteNumbers('lines', 'secondary-constants', { line: given, frequency_hz: f })), 3000);
    run(
      fc.property(anyLine, anyLength, fc.oneof(anyComplex, fc.constantFrom('open', 'short', 'matched'), anyParts.map((parts) => ({ kind: 'series_rlc', ...parts })), anyParts.map((parts) => ({ kind: 'parallel_rlc', ...parts }))), anyFrequencies, anyReference, (given, l, termination, f, reference) =>
        holdsOnlyFiniteNumbers('terminations', 'input-impedance', { line: given, length_m: l, termination, frequency_hz: f, reference_impedance_ohm: reference }),
      ),
      3000,
    );
    run(
      fc.property(fc.array(anyElement, { minLength: 1, maxLength: 5 }), anyFrequencies, anyReference, (chain, f, reference) =>
        holdsOnlyFiniteNumbers('networks', 'cascade', { elements: chain, frequency_hz: f, reference_impedance_ohm: reference, include: ['abcd', 's', 'z', 'y', 't'] }),
      ),
      3000,
    );
  });
});

describe('what an answer says in two ways', () => {
  const unequal = [{ re: 50, im: 10 }, { re: 75, im: -20 }];
  const root = (z: { re: number }, w: { re: number }) => 2 * Math.sqrt(z.re * w.re);
  const times = (p: { re: number; im: number }, q: { re: number; im: number }) => ({ re: p.re * q.re - p.im * q.im, im: p.re * q.im + p.im * q.re });
  const minus = (p: { re: number; im: number }) => ({ re: -p.re, im: -p.im });
  const sum = (...all: { re: number; im: number }[]) => all.reduce((p, q) => ({ re: p.re + q.re, im: p.im + q.im }));

  it('is one cascade: T from S, S from ABCD, return loss from S11, input impedance from S11', () => {
    run(
      fc.property(fc.array(fc.record({ kind: fc.constant('line'), line: rlgc, length_m: decades(-2, 0) }), { minLength: 1, maxLength: 3 }), decades(6, 8), (chain, f) => {
        const answer = solve('networks', 'cascade', { elements: chain, frequency_hz: f, reference_impedance_ohm: unequal, include: ['abcd', 's', 't'] }) as CascadeResult & { t: Matrix; return_loss_db: Column; insertion_loss_db: Column; input_impedance_ohm: ComplexColumn };
        if (answer.abcd.a.re[0] === null || answer.t.t22.re[0] === null) return;
        const [s11, s21, s22] = [value(answer.s.s11), value(answer.s.s21), value(answer.s.s22)];
        const near = (p: { re: number; im: number }, q: { re: number; im: number }, scale: number) => expect(apart(p, q)).toBeLessThanOrEqual(1e-11 * scale);
        const t22 = value(answer.t.t22);
        near(times(t22, s21), { re: 1, im: 0 }, 1);
        near(value(answer.t.t12), times(s11, t22), size(t22));
        near(value(answer.t.t21), minus(times(s22, t22)), size(t22));
        near(value(answer.t.t11), times(sum(times(s21, s21), minus(times(s11, s22))), t22), size(t22));
        const [z1, z2] = unequal as [{ re: number; im: number }, { re: number; im: number }];
        const [a, b, c, d] = [answer.abcd.a, answer.abcd.b, answer.abcd.c, answer.abcd.d].map((column) => value(column)) as [ReturnType<typeof value>, ReturnType<typeof value>, ReturnType<typeof value>, ReturnType<typeof value>];
        const n = sum(times(a, z2), b, times(times(c, z1), z2), times(d, z1));
        near(times(s21, n), { re: root(z1, z2), im: 0 }, size(n));
        expect(answer.return_loss_db[0]! + 20 * Math.log10(size(s11))).toBeCloseTo(0, 8);
        expect(answer.insertion_loss_db[0]! + 20 * Math.log10(size(s21))).toBeCloseTo(0, 8);
        const zin = value(answer.input_impedance_ohm);
        near(times(s11, sum(zin, z1)), sum(zin, { re: -z1.re, im: z1.im }), size(zin) + size(z1));
      }),
    );
  });

  it('is one line: wavelength and delay from the phase constant', () => {
    run(
      fc.property(rlgc, frequency, (given, f) => {
        const { phase_constant_rad_per_m, wavelength_m, delay_s_per_m } = solve('lines', 'secondary-constants', { line: given, frequency_hz: f }) as SecondaryResult & { wavelength_m: number[]; delay_s_per_m: number[] };
        expect((wavelength_m[0] * phase_constant_rad_per_m[0]) / (2 * Math.PI)).toBeCloseTo(1, 12);
        expect((delay_s_per_m[0] * 2 * Math.PI * f) / phase_constant_rad_per_m[0]).toBeCloseTo(1, 12);
      }),
    );
  });

  it('is one sweep: steps of equal size, or of equal ratio', () => {
    const given = { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 0.7 };
    const frequencies = (sweep: object) => (solve('lines', 'secondary-constants', { line: given, frequency_hz: sweep }) as { frequency_hz: number[] }).frequency_hz;
    const log = frequencies({ start: 1e3, stop: 1e9, points: 7, spacing: 'log' });
    [1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9].forEach((expected, index) => expect(log[index] / expected).toBeCloseTo(1, 12));
    expect(frequencies({ start: 0, stop: 12, points: 4 })).toEqual([0, 4, 8, 12]);
  });

  it('is one termination: in parts or polar, in a table or as a number, matched or as the reference', () => {
    const given = { kind: 'rlgc', resistance_ohm_per_m: 1, inductance_h_per_m: 2.5e-7, conductance_s_per_m: 1e-5, capacitance_f_per_m: 1e-10 };
    const at = (termination: unknown) => value(terminated({ line: given, length_m: 1.3, termination, frequency_hz: 3e8 }).input_impedance_ohm);
    const plain = at({ re: 30, im: 40 });
    expect(apart(at({ magnitude: 50, angle_deg: (Math.atan2(4, 3) * 180) / Math.PI }), plain)).toBeLessThanOrEqual(1e-12 * size(plain));
    const table = { kind: 'table', frequency_hz: [1e8, 5e8], impedance_ohm: { re: [10, 50], im: [80, 0] } };
    expect(apart(at(table), plain)).toBeLessThanOrEqual(1e-12 * size(plain));
    const closed = (termination: unknown) => value((cascaded({ elements: [{ kind: 'line', line: given, length_m: 1.3 }], frequency_hz: 3e8, reference_impedance_ohm: unequal, termination }) as CascadeResult & { input_impedance_ohm: ComplexColumn }).input_impedance_ohm);
    expect(apart(closed('matched'), closed(unequal[1]))).toBeLessThanOrEqual(1e-12 * size(closed('matched')));
    expect(apart(closed({ re: 30, im: 40 }), plain)).toBeLessThanOrEqual(1e-12 * size(plain));
  });

  it('knows an active chain, also at its pole and in a sweep', () => {
    const passive = (ohm: unknown, f: unknown) => cascaded({ elements: [{ kind: 'series', impedance_ohm: ohm }], frequency_hz: f }).passive;
    for (const f of [1e6, [1e6, 1e6]]) {
      expect(passive(-100, f)).toBe(false);
      expect(passive(-20, f)).toBe(false);
      expect(passive(20, f)).toBe(true);
    }
  });
});
