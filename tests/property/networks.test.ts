/** What holds for every conversion of two-ports, and for cascades that hold two-ports given by their matrices. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findCalculation } from '@/lib/solvers/registry';
import { ImpossibleInput } from '@/lib/solvers/errors';

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
      1000,
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
      1000,
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
      1000,
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

describe('every accepted input', () => {
  const edges = fc.constantFrom(0, 1, -1, 0.5, 1e-12, 1e12, -1e12, 1e60, -1e60, 1e-300, Number.MIN_VALUE);
  const anyEntry = fc.oneof(edges, fc.record({ re: edges, im: edges }), fc.record({ magnitude: fc.constantFrom(0, 1, 1e60, 1e-300), angle_deg: fc.constantFrom(-360, -90, 0, 33, 180) }), inDisc(2));
  const anyReference = fc.oneof(fc.constantFrom(Number.MIN_VALUE, 1e-12, 50, 1e12), fc.record({ re: fc.constantFrom(1e-300, 1e-12, 50, 1e12), im: fc.constantFrom(-1e12, 0, 1e12) }));
  const anyReferences = fc.oneof(anyReference, fc.tuple(anyReference, anyReference));
  const anyMatrix = fc.constantFrom(...kinds).chain((kind) => fc.tuple(anyEntry, anyEntry, anyEntry, anyEntry).map((entries) => ({ kind, values: Object.fromEntries(names[kind].map((name, index) => [name, entries[index]])) })));

  /** JSON has no NaN and no infinity; a warning stands for each null. */
  function holdsOnlyFiniteNumbers(id: string, input: object): void {
    const calculation = findCalculation('networks', id)!;
    try {
      const { result, warnings } = calculation.solve(calculation.input.parse(input));
      const parsed = calculation.output.safeParse(result);
      expect(parsed.error?.issues, JSON.stringify(input)).toBeUndefined();
      if (JSON.stringify(result).includes('null')) expect(warnings.length).toBeGreaterThan(0);
    } catch (error) {
      if (!(error instanceof ImpossibleInput)) throw error;
    }
  }

  it('to convert gives finite numbers or null with a warning', () => {
    run(
      fc.property(anyMatrix, fc.constantFrom(...kinds), anyReferences, anyReferences, ({ kind, values }, to, refer, wanted) =>
        holdsOnlyFiniteNumbers('convert', { from: kind, to, values, reference_impedance_ohm: refer, to_reference_impedance_ohm: wanted }),
      ),
      4000,
    );
  });
});
