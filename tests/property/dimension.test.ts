/** A dimension that was found gives the impedance that was wanted; what cannot be reached is refused with what can. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { fieldErrors } from '@/lib/problems/field-errors';
import { ImpossibleInput } from '@/lib/solvers/errors';
import { boundsOf, dimensionNames, geometryKinds } from '@/lib/solvers/lines/geometry';
import { findCalculation } from '@/lib/solvers/registry';

const dimension = findCalculation('lines', 'dimension')!;
const secondary = findCalculation('lines', 'secondary-constants')!;

interface Found {
  value: number;
  achieved_impedance_ohm: { re: number; im: number };
  sensitivity_ohm_per_m: number | null;
  iterations: number;
}

const find = (input: object) => {
  const { result, warnings, methods } = dimension.solve(dimension.input.parse(input));
  return { result: result as Found, codes: warnings.map(({ code }) => code), warnings, methods };
};

/** Problems by pointer and code, from the schema or from the solver. */
const refusalsOf = (input: unknown): { pointer?: string; code: string; detail: string }[] => {
  const parsed = dimension.input.safeParse(input, { reportInput: true });
  if (!parsed.success) return fieldErrors(parsed.error.issues);
  try {
    dimension.solve(parsed.data);
  } catch (error) {
    if (error instanceof ImpossibleInput) return [...error.problems];
    throw error;
  }
  return [];
};

/** Zc at one frequency; null where there is no such line. */
function impedance(line: object, frequency_hz: number): { re: number; im: number } | null {
  const parsed = secondary.input.safeParse({ line, frequency_hz });
  if (!parsed.success) return null;
  try {
    const { characteristic_impedance_ohm: zc } = secondary.solve(parsed.data).result as { characteristic_impedance_ohm: { re: (number | null)[]; im: (number | null)[] } };
    return zc.re[0] === null || zc.im[0] === null ? null : { re: zc.re[0], im: zc.im[0] };
  } catch (error) {
    if (error instanceof ImpossibleInput) return null;
    throw error;
  }
}

/** A line of each kind out of the examples that its fields give. */
const specimens = [...geometryKinds].map(([name, { schema, dimensions }]) => {
  // Around its shape, for a schema that has an id is written as a reference.
  const { properties } = z.toJSONSchema(z.strictObject(schema.shape), { io: 'input' }) as { properties: Record<string, { examples?: unknown[] }> };
  const examples = Object.entries(properties).flatMap(([field, { examples }]) => (examples ? [[field, examples[0]]] : []));
  const line: Record<string, unknown> = { ...Object.fromEntries(examples), kind: name };
  return { name, line, dimensions };
});

const varied = specimens.flatMap(({ name, line, dimensions }) => dimensions.map((vary) => ({ name, line, vary })));
const frequency = fc.constantFrom(1e4, 1e6, 1e8, 1e9);

describe.each(varied)('$name with $vary open', ({ name, line, vary }) => {
  const { least, greatest } = boundsOf(geometryKinds.get(name)!, vary);
  const example = line[vary] as number;
  const share = fc.double({ min: Math.log(0.3), max: Math.log(3), noNaN: true }).map((exponent) => Math.exp(exponent));

  it('is a line out of the examples of its fields', () => {
    expect(impedance(line, 1e8)).not.toBeNull();
  });

  it('gives the impedance back that a line of this dimension has', () => {
    let tried = 0;
    fc.assert(
      fc.property(share, frequency, (factor, frequency_hz) => {
        const size = Math.min(greatest, Math.max(least, example * factor));
        const there = impedance({ ...line, [vary]: size }, frequency_hz);
        if (!there || there.re < 1e-3 || there.re > 1e6) return;
        tried++;
        const { [vary]: _, ...open } = line;
        const { result, codes } = find({ line: open, vary, characteristic_impedance_ohm: there.re, frequency_hz });
        const back = impedance({ ...line, [vary]: result.value }, frequency_hz)!;
        expect(back).toEqual(result.achieved_impedance_ohm);
        if (!codes.includes('not_met')) expect(Math.abs(back.re / there.re - 1)).toBeLessThanOrEqual(1e-9);
        // Of one solution, the dimension itself comes back as far as the impedance can tell it; conductor loss of strips is a difference, good to 1e-12.
        const { sensitivity_ohm_per_m: sensitivity, value } = result;
        if (codes.includes('several_solutions') || sensitivity === null || Math.abs(sensitivity * value) < 1e-3 * there.re) return;
        expect(Math.abs(value / size - 1)).toBeLessThanOrEqual(1e-12 + (1e-12 * there.re) / Math.abs(sensitivity * value));
      }),
      { numRuns: 4, seed: 7 },
    );
    expect(tried).toBeGreaterThan(0);
  });

  it('tells the slope of the impedance', () => {
    const there = impedance(line, 1e8)!.re;
    const { result, codes } = find({ line, vary, characteristic_impedance_ohm: there, frequency_hz: 1e8, minimum: Math.max(least, example * 0.7), maximum: Math.min(greatest, example * 1.4) });
    if (codes.includes('several_solutions') || result.value === 0) return;
    const h = 1e-4 * result.value;
    const [above, below] = [impedance({ ...line, [vary]: result.value + h }, 1e8), impedance({ ...line, [vary]: result.value - h }, 1e8)];
    if (!above || !below) return;
    const slope = (above.re - below.re) / (2 * h);
    expect(Math.abs(result.sensitivity_ohm_per_m! - slope)).toBeLessThanOrEqual(1e-6 * (Math.abs(slope) + there / Math.abs(result.value)));
  });

  it('refuses what is out of reach, and what it says is in reach is', () => {
    const bounded = { line, vary, frequency_hz: 1e8, minimum: Math.max(least, example * 0.9), maximum: Math.min(greatest, example * 1.1) };
    const [problem] = refusalsOf({ ...bounded, characteristic_impedance_ohm: 1e6 });
    expect([problem.pointer, problem.code]).toEqual(['/characteristic_impedance_ohm', 'out_of_reach']);
    const [, low, high] = /must be between (\S+) and (\S+) ohm with/.exec(problem.detail)!;
    if (Number(low) >= Number(high)) return;
    for (const reached of [Number(low), Number(high)]) expect(find({ ...bounded, characteristic_impedance_ohm: reached }).result.achieved_impedance_ohm.re).toBeCloseTo(reached, 6);
  });
});

const coaxial = { kind: 'coaxial', inner_diameter_m: 0.9e-3, outer_diameter_m: 2.95e-3 };
const wanted = { line: coaxial, vary: 'inner_diameter_m', characteristic_impedance_ohm: 50, frequency_hz: 1e8 };

describe('a wrong request', () => {
  it.each(['kind', '__proto__', 'constructor', 'conductor', 'temperature_c', 'toString', '', 'width_m', 'x'.repeat(61)])('that varies %j is refused and hears what can be varied', (vary) => {
    const refusals = refusalsOf({ ...wanted, vary });
    expect(refusals.map(({ pointer }) => pointer)).toEqual(['/vary']);
    if (vary.length < 60) expect(refusals[0].detail).toContain('"inner_diameter_m", "outer_diameter_m"');
  });

  it('hears of all its wrong fields at once, each where it is', () => {
    const wrong = { line: { kind: 'coaxial', inner_diameter_m: 'thin', colour: 'red', dielectric: 'wood' }, vary: 'inner_diameter_m', characteristic_impedance_ohm: -50, frequency_hz: [1e8], minimum: 2, maximum: 1 };
    expect(refusalsOf(wrong).map(({ pointer }) => pointer).sort()).toEqual(['/characteristic_impedance_ohm', '/frequency_hz', '/line/colour', '/line/dielectric', '/line/inner_diameter_m', '/line/outer_diameter_m', '/maximum']);
  });

  it.each([
    ['bounds the wrong way round', { minimum: 2e-3, maximum: 1e-3 }, '/maximum'],
    ['equal bounds', { minimum: 1e-3, maximum: 1e-3 }, '/maximum'],
    ['a minimum beyond every line', { minimum: 1e8 }, '/minimum'],
    ['a minimum beyond this line', { minimum: 3e-3 }, '/minimum'],
    ['a maximum below every line', { maximum: -1 }, '/maximum'],
    ['a number too large to be one', { maximum: 1e300 }, '/maximum'],
    ['an impedance that no such line has', { line: { ...coaxial, conductor: 'perfect' }, characteristic_impedance_ohm: 1e6 }, '/characteristic_impedance_ohm'],
    ['an impedance out of reach of its bounds', { minimum: 0.1e-3, maximum: 0.2e-3 }, '/characteristic_impedance_ohm'],
    ['a material that cannot be so cold', { line: { ...coaxial, temperature_c: -273.15 } }, '/line/temperature_c'],
    ['a library of lines', { line: { kind: 'rlgc' } }, '/line/kind'],
    ['no line at all', { line: null }, '/line'],
  ])('with %s is refused there', (_, change, pointer) => {
    expect(refusalsOf({ ...wanted, ...change }).map((each) => each.pointer)).toContain(pointer);
  });

  it('without the other dimension hears that it is needed, and without the sought one is answered', () => {
    const { outer_diameter_m: _, ...inner } = coaxial;
    expect(refusalsOf({ ...wanted, line: inner })).toMatchObject([{ pointer: '/line/outer_diameter_m', code: 'required_dimension' }]);
    const sought = { ...wanted, line: inner, vary: 'outer_diameter_m' };
    expect(find({ ...sought, line: coaxial }).result).toEqual(find(sought).result);
  });

  it('of any shape is refused or answered with finite numbers, and soon', () => {
    const number = fc.oneof(fc.double({ min: 1e-7, max: 1, noNaN: true }), fc.double({ noNaN: true, noDefaultInfinity: true }), fc.constantFrom(0, -0, 1e-300, 5e-324, 1e308, 1e-6, 1e-3));
    fc.assert(
      fc.property(
        fc.constantFrom(...specimens),
        fc.constantFrom(...dimensionNames),
        fc.dictionary(fc.constantFrom(...dimensionNames), number, { maxKeys: 2 }),
        fc.record({ characteristic_impedance_ohm: fc.oneof(fc.double({ min: 1e-3, max: 1e3, noNaN: true }), number), frequency_hz: fc.oneof(fc.constantFrom(0, 1e3, 1e9, 1e15), number), minimum: number, maximum: number }, { requiredKeys: ['characteristic_impedance_ohm', 'frequency_hz'] }),
        ({ line, dimensions }, anyName, changes, rest) => {
          const vary = dimensions.includes(anyName) ? anyName : dimensions[0];
          const changed = Object.fromEntries(Object.entries(changes).filter(([name]) => dimensions.includes(name)));
          const input = { line: { ...line, ...changed }, vary, ...rest };
          const refusals = refusalsOf(input);
          if (refusals.length > 0) return refusals.forEach(({ detail }) => expect(detail).not.toMatch(/NaN|Infinity|undefined/));
          const { result } = find(input);
          expect(dimension.output.safeParse(result).error).toBeUndefined();
        },
      ),
      { numRuns: 100, seed: 11 },
    );
  });
});
