/** What holds for every conversion of two-ports, and for cascades that hold two-ports given by their matrices. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findCalculation } from '@/lib/solvers/registry';
import { decades, holdsOnlyFiniteNumbers } from '../support/arbitraries';

interface Parts {
  re: number;
  im: number;
}
interface Column {
  re: (number | null)[];
  im: (number | null)[];
}
type Values = Record<string, Column>;

const seed = 20261201;
const run = <Given>(property: fc.IProperty<Given>, runs = 300) => fc.assert(property, { seed, numRuns: runs });

/** The shapes of results are held by the declarations' own test; here they are taken at their word. */
function solve(id: string, input: object) {
  const calculation = findCalculation('networks', id)!;
  const { result, warnings } = calculation.solve(calculation.input.parse(input));
  return { result: result as Record<string, unknown>, warnings };
}
const converted = (input: object) => solve('convert', input).result.values as Values;

const names = { abcd: ['a', 'b', 'c', 'd'], s: ['s11', 's12', 's21', 's22'], z: ['z11', 'z12', 'z21', 'z22'], y: ['y11', 'y12', 'y21', 'y22'], t: ['t11', 't12', 't21', 't22'] } as const;
type Kind = keyof typeof names;
const kinds = Object.keys(names) as Kind[];

/** Back into a request, one number an entry. */
const asGiven = (values: Values, index = 0) => Object.fromEntries(Object.entries(values).map(([name, { re, im }]) => [name, { re: re[index]!, im: im[index]! }]));
/** And can stand in a request again. */
const exists = (values: Values) => Object.values(values).every(({ re, im }) => re[0] !== null && Math.abs(re[0]) < 1e60 && Math.abs(im[0]!) < 1e60);
const entry = (column: Column, index = 0): Parts => ({ re: column.re[index]!, im: column.im[index]! });
const apart = (x: Parts, y: Parts) => Math.hypot(x.re - y.re, x.im - y.im);

/** Every entry in units of 50 ohm, the largest of them. */
function largest(values: Values): number {
  const unit = (name: string) => (name.startsWith('z') || name === 'b' ? 1 / 50 : name.startsWith('y') || name === 'c' ? 50 : 1);
  return Math.max(...Object.entries(values).map(([name, column]) => Math.hypot(column.re[0]!, column.im[0]!) * unit(name)));
}

const inDisc = (radius: number) => fc.tuple(fc.double({ min: 0, max: radius, noNaN: true }), fc.double({ min: -Math.PI, max: Math.PI, noNaN: true })).map(([size, angle]): Parts => ({ re: size * Math.cos(angle), im: size * Math.sin(angle) }));
const passage = fc.oneof(inDisc(0.9), inDisc(5), fc.constant({ re: 1e-4, im: -1e-5 }));
const scattering = fc.record({ s11: inDisc(0.95), s12: passage, s21: passage, s22: inDisc(0.95) });
const reference = fc.oneof(
  fc.constantFrom(50, 75),
  fc.record({ re: fc.double({ min: 5, max: 300, noNaN: true }), im: fc.double({ min: -100, max: 100, noNaN: true }) }),
);
const references = fc.oneof(reference, fc.tuple(reference, reference));

describe('a conversion', () => {
  it('there and back is where it began, for every pair', () => {
    run(
      fc.property(scattering, references, fc.constantFrom(...kinds), (s, refer, kind) => {
        const there = converted({ from: 's', to: kind, values: s, reference_impedance_ohm: refer });
        if (!exists(there)) return;
        const back = converted({ from: kind, to: 's', values: asGiven(there), reference_impedance_ohm: refer });
        const magnified = 1 + largest(there);
        for (const name of names.s) expect(apart(entry(back[name]), s[name])).toBeLessThanOrEqual(1e-13 * magnified * magnified);
      }),
      400,
    );
  });

  it('by way of a third is the same as at once', () => {
    run(
      fc.property(scattering, references, fc.constantFrom(...kinds), fc.constantFrom(...kinds), (s, refer, by, to) => {
        const between = converted({ from: 's', to: by, values: s, reference_impedance_ohm: refer });
        if (!exists(between)) return;
        const once = converted({ from: 's', to, values: s, reference_impedance_ohm: refer });
        const twice = converted({ from: by, to, values: asGiven(between), reference_impedance_ohm: refer });
        if (!exists(once) || !exists(twice)) return;
        const magnified = (1 + largest(between)) ** 2 * (1 + largest(once));
        for (const name of names[to]) expect(apart(entry(once[name]), entry(twice[name]))).toBeLessThanOrEqual(1e-13 * magnified * (1 + Math.hypot(once[name].re[0]!, once[name].im[0]!)));
      }),
      400,
    );
  });

  it('to other references and back, or by way of a third, changes nothing', () => {
    run(
      fc.property(scattering, references, references, references, fc.constantFrom('s', 't'), (given, one, two, three, kind) => {
        const refer = (values: object, from: unknown, to: unknown) => converted({ from: kind, to: kind, values, reference_impedance_ohm: from, to_reference_impedance_ohm: to });
        const start = converted({ from: 's', to: kind, values: given, reference_impedance_ohm: one });
        if (!exists(start)) return;
        const there = refer(asGiven(start), one, two);
        if (!exists(there)) return;
        const back = refer(asGiven(there), two, one);
        const on = refer(asGiven(there), two, three);
        const atOnce = refer(asGiven(start), one, three);
        if (!exists(back) || !exists(on) || !exists(atOnce)) return;
        const magnified = (1 + largest(start)) ** 2 * (1 + largest(there)) ** 2 * (1 + largest(atOnce));
        for (const name of names[kind as Kind]) {
          expect(apart(entry(back[name]), entry(start[name]))).toBeLessThanOrEqual(1e-13 * magnified);
          expect(apart(entry(on[name]), entry(atOnce[name]))).toBeLessThanOrEqual(1e-13 * magnified);
        }
      }),
      400,
    );
  });

  it('has Z and Y that are inverse to each other, and the same in a sweep as at one point', () => {
    run(
      fc.property(scattering, references, (s, refer) => {
        const z = converted({ from: 's', to: 'z', values: s, reference_impedance_ohm: refer });
        if (!exists(z)) return;
        const y = converted({ from: 's', to: 'y', values: s, reference_impedance_ohm: refer });
        if (!exists(y)) return;
        const times = (p: Parts, q: Parts): Parts => ({ re: p.re * q.re - p.im * q.im, im: p.re * q.im + p.im * q.re });
        const sum = (p: Parts, q: Parts): Parts => ({ re: p.re + q.re, im: p.im + q.im });
        const one = sum(times(entry(z.z11), entry(y.y11)), times(entry(z.z12), entry(y.y21)));
        expect(apart(one, { re: 1, im: 0 })).toBeLessThanOrEqual(1e-13 * (1 + largest(z)) * (1 + largest(y)));
        const columns = Object.fromEntries(Object.entries(s).map(([name, { re, im }]) => [name, { re: [0, re], im: [0, im] }]));
        const sweep = converted({ from: 's', to: 'z', values: columns, reference_impedance_ohm: refer, frequency_hz: [1e6, 2e6] });
        for (const name of names.z) expect(entry(sweep[name], 1)).toEqual(entry(z[name]));
      }),
    );
  });
});

interface CascadeResult {
  readonly abcd: Values;
  readonly s: Values;
  readonly z: Values;
  readonly y: Values;
  readonly t: Values;
  readonly group_delay_s: (number | null)[];
  readonly rollett_stability_factor: (number | null)[];
  readonly stability_measure: (number | null)[];
  readonly reciprocal: boolean;
  readonly passive: boolean;
}
const cascaded = (input: object) => solve('cascade', { include: kinds, ...input }).result as unknown as CascadeResult;
const given = (representation: Kind, values: object, reference_impedance_ohm?: unknown) => ({ kind: 'two_port', representation, values, ...((representation === 's' || representation === 't') && { reference_impedance_ohm }) });

const line = fc.record({ kind: fc.constant('rlgc'), resistance_ohm_per_m: decades(-4, 2), inductance_h_per_m: decades(-7.5, -6), conductance_s_per_m: decades(-9, -3), capacitance_f_per_m: decades(-11, -9.5) });
const part = fc.oneof(
  fc.record({ kind: fc.constant('line'), line, length_m: decades(-3, -0.5) }),
  fc.record({ kind: fc.constantFrom('series', 'shunt'), impedance_ohm: fc.record({ re: decades(0, 3), im: fc.double({ min: -300, max: 300, noNaN: true }) }) }),
  fc.record({ kind: fc.constant('transformer'), turns_ratio: decades(-0.5, 0.5) }),
);
const parts = fc.array(part, { minLength: 1, maxLength: 4 });
const frequency = decades(6, 9);

function areClose(one: Values, other: Values, within: number): void {
  for (const name of Object.keys(one)) expect(apart(entry(one[name]), entry(other[name])), name).toBeLessThanOrEqual(within);
}

describe('a cascade with two-ports by their matrices', () => {
  it('of one alone is that one, in every representation', () => {
    run(
      fc.property(scattering, references, references, fc.constantFrom(...kinds), (s, own, outer, kind) => {
        const values = converted({ from: 's', to: kind, values: s, reference_impedance_ohm: own });
        if (!exists(values)) return;
        const wanted = converted({ from: kind, to: 's', values: asGiven(values), reference_impedance_ohm: own, to_reference_impedance_ohm: outer });
        if (!exists(wanted)) return;
        const got = cascaded({ elements: [given(kind, asGiven(values), own)], frequency_hz: 1e9, reference_impedance_ohm: outer });
        areClose(got.s, wanted, 1e-13 * (1 + largest(wanted)) ** 2);
      }),
      400,
    );
  });

  it('is the whole, whichever part is given by its matrix', () => {
    run(
      fc.property(parts, parts, parts, frequency, references, fc.constantFrom(...kinds), (before, middle, after, frequency_hz, refer, kind) => {
        const whole = cascaded({ elements: [...before, ...middle, ...after], frequency_hz, reference_impedance_ohm: refer });
        const matrix = cascaded({ elements: middle, frequency_hz, reference_impedance_ohm: 75 })[kind];
        if (!exists(matrix)) return;
        const joined = cascaded({ elements: [...before, given(kind, asGiven(matrix), 75), ...after], frequency_hz, reference_impedance_ohm: refer });
        // Z and Y of what hardly hinders or hardly passes are large, and their differences are what counts.
        const magnified = kind === 's' ? 1 : 1 + largest(matrix);
        areClose(joined.s, whole.s, 1e-13 * magnified * magnified);
        expect(joined.passive).toBe(true);
      }),
    );
  });

  it('is the same nested as flat, and repeated as written out', () => {
    run(
      fc.property(parts, scattering, fc.integer({ min: 1, max: 9 }), fc.integer({ min: 1, max: 4 }), frequency, (some, s, times, more, frequency_hz) => {
        const inner = [...some, given('s', s, 50)];
        const nested = cascaded({ elements: [{ kind: 'cascade', elements: [{ kind: 'cascade', elements: inner, repeat: times }, some[0]], repeat: more }], frequency_hz });
        const flat = cascaded({ elements: Array.from({ length: more }, () => [...Array.from({ length: times }, () => inner).flat(), some[0]]).flat(), frequency_hz });
        for (const name of names.s) {
          const [one, other] = [entry(nested.s[name]), entry(flat.s[name])];
          expect(apart(one, other)).toBeLessThanOrEqual(1e-10 * (Math.hypot(one.re, one.im) + (name === 's11' || name === 's22' ? 1 + largest(flat.s) : 0)));
        }
        expect(nested.reciprocal).toBe(flat.reciprocal);
      }),
    );
  });

  it('passes both ways what its parts pass, and keeps K whatever the references', () => {
    run(
      fc.property(scattering, part, references, references, frequency, (s, other, one, two, frequency_hz) => {
        const elements = [given('s', s, 50), other, given('s', s, 75)];
        const first = cascaded({ elements, frequency_hz, reference_impedance_ohm: one });
        const second = cascaded({ elements, frequency_hz, reference_impedance_ohm: two });
        if (!exists(first.s) || !exists(second.s)) return;
        // S12/S21 is det ABCD, a product of those of the parts.
        const times = (p: Parts, q: Parts): Parts => ({ re: p.re * q.re - p.im * q.im, im: p.re * q.im + p.im * q.re });
        const left = times(entry(first.s.s12), times(s.s21, s.s21));
        const right = times(entry(first.s.s21), times(s.s12, s.s12));
        expect(apart(left, right)).toBeLessThanOrEqual(1e-12 * Math.hypot(left.re, left.im));
        const [k, again] = [first.rollett_stability_factor[0], second.rollett_stability_factor[0]];
        if (k !== null && again !== null) expect(Math.abs(k - again)).toBeLessThanOrEqual(1e-9 * (1 + Math.abs(k)));
        const [mu, other_mu] = [first.stability_measure[0], second.stability_measure[0]];
        if (mu !== null && other_mu !== null && Math.abs(mu - 1) > 1e-6) expect(mu > 1).toBe(other_mu > 1);
      }),
    );
  });

  it('has the delay of the line whose columns it is given, to the second order of the step', () => {
    run(
      fc.property(line, decades(-2, 0), fc.constantFrom(...kinds), references, (given_line, length_m, kind, refer) => {
        const elements = [{ kind: 'line', line: given_line, length_m }];
        const turns = 2 * Math.PI * length_m * Math.sqrt(given_line.inductance_h_per_m * given_line.capacitance_f_per_m);
        const centre = 0.8 / turns;
        const frequency_hz = [0.999, 1, 1.0012].map((each) => each * centre);
        const exact = cascaded({ elements, frequency_hz, reference_impedance_ohm: refer });
        const matrix = exact[kind];
        if (!Object.values(matrix).every(({ re }) => re.every((each) => each !== null && Math.abs(each) < 1e6))) return;
        const columns = cascaded({ elements: [given(kind, matrix, refer)], frequency_hz, reference_impedance_ohm: refer });
        expect(Math.abs(columns.group_delay_s[1]! / exact.group_delay_s[1]! - 1)).toBeLessThanOrEqual(1e-4);
      }),
    );
  });
});

describe('every accepted input', () => {
  const edges = fc.constantFrom(0, 1, -1, 0.5, 1e-12, 1e12, -1e12, 1e60, -1e60, 1e-300, Number.MIN_VALUE);
  const anyEntry = fc.oneof(edges, fc.record({ re: edges, im: edges }), fc.record({ magnitude: fc.constantFrom(0, 1, 1e60, 1e-300), angle_deg: fc.constantFrom(-360, -90, 0, 33, 180) }), inDisc(2));
  const anyReference = fc.oneof(fc.constantFrom(Number.MIN_VALUE, 1e-12, 50, 1e12), fc.record({ re: fc.constantFrom(1e-300, 1e-12, 50, 1e12), im: fc.constantFrom(-1e12, 0, 1e12) }));
  const anyReferences = fc.oneof(anyReference, fc.tuple(anyReference, anyReference));
  const anyMatrix = fc.constantFrom(...kinds).chain((kind) => fc.tuple(anyEntry, anyEntry, anyEntry, anyEntry).map((entries) => ({ kind, values: Object.fromEntries(names[kind].map((name, index) => [name, entries[index]])) })));

  it('to convert gives finite numbers or null with a warning', () => {
    run(
      fc.property(anyMatrix, fc.constantFrom(...kinds), anyReferences, anyReferences, ({ kind, values }, to, refer, wanted) =>
        holdsOnlyFiniteNumbers('networks', 'convert', { from: kind, to, values, reference_impedance_ohm: refer, to_reference_impedance_ohm: wanted }),
      ),
      2000,
    );
  });

  const extreme = (high: number) => fc.oneof(fc.constantFrom(0, Number.MIN_VALUE, 1e-300, 1e-30, high), fc.double({ min: 0, max: high, noNaN: true }));
  const anyLeaf = fc.oneof(
    { weight: 3, arbitrary: fc.tuple(anyMatrix, anyReferences).map(([{ kind, values }, refer]) => given(kind, values, refer)) },
    { weight: 1, arbitrary: fc.tuple(fc.constantFrom('series', 'shunt'), fc.constantFrom('series', 'parallel'), extreme(1e12), extreme(1e3)).map(([kind, connection, resistance_ohm, capacitance_f]) => ({ kind, connection, resistance_ohm, capacitance_f })) },
    { weight: 1, arbitrary: fc.record({ kind: fc.constant('line'), line: fc.record({ kind: fc.constant('rlgc'), resistance_ohm_per_m: extreme(1e9), inductance_h_per_m: extreme(1e3), conductance_s_per_m: extreme(1e9), capacitance_f_per_m: extreme(1e3) }), length_m: extreme(1e9) }) },
  );
  const anyChain = fc.array(fc.oneof({ weight: 3, arbitrary: anyLeaf }, { weight: 1, arbitrary: fc.tuple(fc.array(anyLeaf, { minLength: 1, maxLength: 3 }), fc.constantFrom(1, 2, 7, 1000)).map(([elements, repeat]) => ({ kind: 'cascade', elements, repeat })) }), { minLength: 1, maxLength: 4 });

  it('to cascade gives finite numbers or null with a warning', () => {
    run(
      fc.property(anyChain, anyReferences, fc.constantFrom('open', 'short', 50, { re: -1e12, im: 3 }), fc.array(extreme(1e15), { minLength: 1, maxLength: 3 }), (elements, refer, termination, frequency_hz) =>
        holdsOnlyFiniteNumbers('networks', 'cascade', { elements, frequency_hz, reference_impedance_ohm: refer, termination, include: kinds }),
      ),
      2000,
    );
  });
});
