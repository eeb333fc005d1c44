/** What holds for every match, whatever load, source and line. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ImpossibleInput } from '@/lib/solvers/errors';
import { findCalculation } from '@/lib/solvers/registry';
import { decades } from '../support/arbitraries';

const seed = 20261201;
const run = <Values>(property: fc.IProperty<Values>, runs = 200) => fc.assert(property, { seed, numRuns: runs });

interface Solution {
  readonly topology: string;
  readonly description: string;
  readonly elements: readonly (Record<string, unknown> & { readonly kind: string; readonly length_m?: number })[];
  readonly reflection: { readonly re: number; readonly im: number };
  readonly bandwidth_hz: { readonly at_10_db: number | null; readonly at_20_db: number | null };
  readonly response?: { readonly frequency_hz: number[]; readonly return_loss_db: (number | null)[] };
}

interface Answer {
  readonly solution_count: number;
  readonly solutions: readonly Solution[];
  readonly impossible: readonly { readonly topology: string; readonly reason: string }[];
}

const calculation = findCalculation('terminations', 'matching')!;
const cascade = findCalculation('networks', 'cascade')!;

function match(input: object): Answer & { readonly result: unknown; readonly codes: readonly string[]; readonly pointers: readonly string[] } {
  const { result, warnings } = calculation.solve(calculation.input.parse(input));
  return { ...(result as Answer), result, codes: warnings.map(({ code }) => code), pointers: warnings.map(({ pointer }) => pointer) };
}

/** |Gamma| at the source by the public cascade, from the input impedance that it answers; the source's own power wave. */
function reflectionByCascade({ elements }: Solution, load: object | number, source: { re: number; im: number }, frequency_hz: number | number[]): number[] {
  const { input_impedance_ohm: z } = cascade.solve(cascade.input.parse({ elements, frequency_hz, termination: load })).result as { input_impedance_ohm: { re: number[]; im: number[] } };
  return z.re.map((re, index) => Math.hypot(re - source.re, z.im[index] + source.im) / Math.hypot(re + source.re, z.im[index] + source.im));
}

/** The nearest frequency on one side of the design frequency where |Gamma| by the cascade passes the limit: steps, then halves. */
function edgeByCascade(solution: Solution, load: object, side: 1 | -1, limit: number): number {
  const source = { re: 50, im: 0 };
  const steps = Array.from({ length: 900 }, (_, index) => frequency_hz * (1 + (side * (index + 1)) / 1000));
  const index = reflectionByCascade(solution, load, source, steps).findIndex((each) => each > limit);
  let [inside, outside] = [index === 0 ? frequency_hz : steps[index - 1], steps[index]];
  for (let halving = 0; halving < 60; halving++) {
    const middle = (inside + outside) / 2;
    if (reflectionByCascade(solution, load, source, middle)[0] <= limit) inside = middle;
    else outside = middle;
  }
  return (inside + outside) / 2;
}

const reactance = fc.oneof({ weight: 1, arbitrary: fc.constant(0) }, { weight: 4, arbitrary: fc.double({ min: -300, max: 300, noNaN: true }) });
const impedance = fc.record({ re: decades(0, 3), im: reactance });
const lossless = fc.record({ kind: fc.constant('lossless'), characteristic_impedance_ohm: decades(1, 2.5), velocity_factor: fc.double({ min: 0.2, max: 1, noNaN: true }) });
/** Up to some decibels a wavelength at 100 MHz. */
const lossy = fc.record({
  kind: fc.constant('rlgc'),
  resistance_ohm_per_m: decades(-3, 0.7),
  inductance_h_per_m: fc.constant(2.5e-7),
  conductance_s_per_m: decades(-7, -3.3),
  capacitance_f_per_m: fc.constant(1e-10),
});
const frequency_hz = 1e8;

describe('every match', () => {
  it('has no reflection at the design frequency, through the public cascade as well', () => {
    run(
      fc.property(impedance, impedance, fc.oneof(lossless, lossy), (load, source, line) => {
        const { solution_count, solutions, impossible } = match({ load_impedance_ohm: load, source_impedance_ohm: source, frequency_hz, line });
        expect(solution_count + impossible.length).toBeGreaterThan(0);
        expect(solution_count).toBe(solutions.length);
        for (const solution of solutions) {
          expect(Math.hypot(solution.reflection.re, solution.reflection.im)).toBeLessThan(1e-9);
          if (solution.elements.length > 0) expect(reflectionByCascade(solution, load, source, frequency_hz)[0], solution.description).toBeLessThan(1e-9);
          for (const each of solution.elements) expect(each.length_m ?? 0).toBeGreaterThanOrEqual(0);
        }
        expect(new Set(solutions.map(({ topology, elements }) => topology + JSON.stringify(elements))).size).toBe(solutions.length);
      }),
      40,
    );
  });

  it('is reached to 1e-12 with a good line', () => {
    run(
      fc.property(fc.record({ re: fc.double({ min: 5, max: 500, noNaN: true }), im: reactance }), fc.oneof(lossless, lossy), (load, line) => {
        for (const { reflection, description } of match({ load_impedance_ohm: load, frequency_hz, line }).solutions) {
          expect(Math.hypot(reflection.re, reflection.im), description).toBeLessThan(1e-12);
        }
      }),
      60,
    );
  });
});

describe('the number of L sections', () => {
  it('is two for each place of the shunt part that can bring the resistance down, and at least two in all', () => {
    run(
      fc.property(impedance, impedance, (load, source) => {
        const atLoad = load.re * (load.re - source.re) + load.im ** 2;
        const atSource = source.re * (source.re - load.re) + source.im ** 2;
        // With equal resistances both places may lead to one network.
        fc.pre(Math.abs(atLoad) > 1e-9 && Math.abs(atSource) > 1e-9 && Math.abs(load.re - source.re) > 1e-9);
        const { solutions, impossible } = match({ load_impedance_ohm: load, source_impedance_ohm: source, frequency_hz, topologies: ['l_section'] });
        const places = (atLoad > 0 ? 1 : 0) + (atSource > 0 ? 1 : 0);
        expect(places).toBeGreaterThanOrEqual(1);
        expect(solutions.length).toBe(2 * places);
        expect(impossible.length).toBe(2 - places);
      }),
    );
  });

  it('is one, of nothing, where load and source are the same resistance', () => {
    const { solutions, impossible, codes } = match({ load_impedance_ohm: 75, source_impedance_ohm: 75, frequency_hz, topologies: ['l_section'] });
    expect(solutions.map(({ elements }) => elements)).toEqual([[]]);
    expect(impossible).toEqual([]);
    expect(solutions[0].bandwidth_hz).toEqual({ at_10_db: null, at_20_db: null });
    expect(codes).toEqual(['no_band_edge', 'no_band_edge']);
  });

  it('has the match of nothing among the rest where the load is the conjugate of the source', () => {
    const { solutions } = match({ load_impedance_ohm: { re: 30, im: 41 }, source_impedance_ohm: { re: 30, im: -41 }, frequency_hz, topologies: ['l_section'] });
    expect(solutions.filter(({ elements }) => elements.length === 0)).toHaveLength(1);
    expect(solutions.length).toBeGreaterThan(1);
  });
});

describe('one stub on a line without loss', () => {
  it('has two distances and two kinds, each within half a wave, where the source is the line’s own impedance', () => {
    run(
      fc.property(impedance, lossless, fc.constantFrom('single_shunt_stub', 'single_series_stub'), (load, line, topology) => {
        const Z0 = line.characteristic_impedance_ohm;
        fc.pre(Math.hypot(load.re - Z0, load.im) > 1e-6 * Z0);
        const { solutions, impossible } = match({ load_impedance_ohm: load, source_impedance_ohm: Z0, frequency_hz, line, topologies: [topology] });
        expect([solutions.length, impossible]).toEqual([4, []]);
        const half = (line.velocity_factor * 299792458) / (2 * frequency_hz);
        for (const { elements } of solutions) for (const each of elements) expect(each.length_m).toBeLessThan(half);
      }),
    );
  });

  it('keeps its two distances where RL = Z0, one of them a quarter wave only where the load turns so', () => {
    const line = { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 };
    for (const topology of ['single_shunt_stub', 'single_series_stub']) {
      for (const load of [{ re: 50, im: 60 }, { re: 50, im: -60 }, { re: 50 * (1 + 1e-14), im: 60 }]) {
        const { solutions } = match({ load_impedance_ohm: load, frequency_hz: 299792458, line, topologies: [topology] });
        expect(solutions).toHaveLength(4);
      }
    }
    // |y|^2 = g: in admittance the same happens at G = Y0.
    const z = 1 / 50;
    const y = { re: z, im: 0.03 };
    const size = y.re ** 2 + y.im ** 2;
    expect(match({ load_impedance_ohm: { re: y.re / size, im: -y.im / size }, frequency_hz: 299792458, line, topologies: ['single_shunt_stub'] }).solutions).toHaveLength(4);
  });

  it('is nothing where the load is the line’s own impedance and the source’s', () => {
    const line = { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 };
    const { solutions } = match({ load_impedance_ohm: 50, frequency_hz, line, topologies: ['single_shunt_stub', 'single_series_stub'] });
    expect(solutions.map(({ elements }) => elements.map(({ kind }) => kind))).toEqual([[], ['short_stub'], ['series_open_stub'], []]);
  });

  it('cannot be where the source asks for more than the line makes of the load, and says between what', () => {
    const line = { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 };
    run(
      fc.property(fc.double({ min: 1.05, max: 20, noNaN: true }), fc.double({ min: 1.001, max: 10, noNaN: true }), (ratio, beyond) => {
        for (const [factor, count] of [[ratio * beyond, 0], [ratio / beyond, beyond < ratio * ratio ? 4 : 0]] as const) {
          const { solutions, impossible } = match({ load_impedance_ohm: 50 * ratio, source_impedance_ohm: 50 * factor, frequency_hz, line, topologies: ['single_series_stub'] });
          expect([solutions.length, impossible.length]).toEqual([count, count > 0 ? 0 : 1]);
        }
      }),
    );
  });
});

describe('two stubs', () => {
  it('have all eight networks below the forbidden region, none above it, and its bound in the reason', () => {
    run(
      fc.property(fc.double({ min: 0.02, max: 0.48, noNaN: true }), reactance, fc.double({ min: 1e-6, max: 0.9, noNaN: true }), fc.boolean(), (wavelengths, susceptance, margin, above) => {
        const line = { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 };
        const bound = 1 / (50 * Math.sin(2 * Math.PI * wavelengths) ** 2);
        const y = { re: bound * (above ? 1 + margin : 1 - margin), im: susceptance / 1e4 };
        const size = y.re ** 2 + y.im ** 2;
        const { solutions, impossible } = match({ load_impedance_ohm: { re: y.re / size, im: -y.im / size }, frequency_hz: 299792458, line, topologies: ['double_shunt_stub'], stub_spacing_m: wavelengths });
        expect([solutions.length, impossible.length]).toEqual(above ? [0, 1] : [8, 0]);
        if (above) expect(impossible[0].reason).toContain(`${Number(bound.toPrecision(6))} S`);
      }),
    );
  });

  it.each([0, 0.5, 1, 7.5])('cannot stand %s wavelengths apart', (stub_spacing_m) => {
    const line = { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 };
    const { solutions, impossible } = match({ load_impedance_ohm: 100, frequency_hz: 299792458, line, topologies: ['double_shunt_stub'], stub_spacing_m });
    expect(solutions).toEqual([]);
    expect(impossible[0].reason).toContain('half a wavelength');
  });
});

describe('a quarter wave', () => {
  it('is the root of the two resistances, and with a complex load has a maximum and a minimum', () => {
    run(
      fc.property(impedance, decades(0, 3), lossless, (load, source, line) => {
        fc.pre(Math.abs(load.im) > 1e-3 * load.re);
        const real = match({ load_impedance_ohm: load.re, source_impedance_ohm: source, frequency_hz, line, topologies: ['quarter_wave'] }).solutions;
        expect(real).toHaveLength(1);
        expect((real[0].elements[0].line as { characteristic_impedance_ohm: number }).characteristic_impedance_ohm).toBeCloseTo(Math.sqrt(load.re * source), 9);
        expect(match({ load_impedance_ohm: load, source_impedance_ohm: source, frequency_hz, line, topologies: ['quarter_wave'] }).solutions).toHaveLength(2);
        expect(match({ load_impedance_ohm: load, source_impedance_ohm: source, frequency_hz, topologies: ['quarter_wave'] }).solutions).toHaveLength(0);
        expect(match({ load_impedance_ohm: load.re, source_impedance_ohm: { re: source, im: 5 }, frequency_hz, topologies: ['quarter_wave'] }).impossible).toHaveLength(1);
      }),
      100,
    );
  });
});

describe('the bandwidth', () => {
  const limitOf = { at_10_db: 10, at_20_db: 20 } as const;
  it('ends where the public cascade has exactly 10 or 20 dB of return loss', () => {
    const load = fc.record({ kind: fc.constant('series_rlc'), resistance_ohm: decades(1, 2.3), inductance_h: decades(-8.5, -7.5), capacitance_f: decades(-11.5, -10.5) });
    run(
      fc.property(load, fc.oneof(lossless, lossy), fc.constantFrom('l_section', 'single_shunt_stub', 'single_series_stub'), (given, line, topology) => {
        for (const solution of match({ load_impedance_ohm: given, frequency_hz, line, topologies: [topology] }).solutions) {
          const width = solution.bandwidth_hz.at_10_db;
          if (width === null || width > 0.8 * frequency_hz) continue;
          for (const [name, limit] of [['at_10_db', Math.sqrt(0.1)], ['at_20_db', 0.1]] as const) {
            const expected = edgeByCascade(solution, given, 1, limit) - edgeByCascade(solution, given, -1, limit);
            expect(Math.abs(solution.bandwidth_hz[name]! / expected - 1), solution.description).toBeLessThan(1e-9);
          }
        }
      }),
      6,
    );
  });

  it('is nested, and between its edges the return loss stays at the limit or above', () => {
    const parts = fc.record({ kind: fc.constantFrom('series_rlc', 'parallel_rlc'), resistance_ohm: decades(0.5, 2.7), inductance_h: decades(-9, -7), capacitance_f: decades(-12.5, -10.5) });
    run(
      fc.property(fc.oneof(parts, impedance), fc.oneof(lossless, lossy), (load, line) => {
        const wide = match({ load_impedance_ohm: load, frequency_hz, line, band: { start: 5e7, stop: 1.5e8, points: 401 } });
        for (const { bandwidth_hz: width, response } of wide.solutions) {
          if (width.at_10_db !== null && width.at_20_db !== null) expect(width.at_20_db).toBeLessThan(width.at_10_db);
          for (const name of ['at_10_db', 'at_20_db'] as const) {
            // Outside the width on one side at least, and never more than the run of good points that holds the design frequency.
            const good = response!.return_loss_db.map((each) => each === null || each >= limitOf[name]);
            let [first, last] = [200, 200];
            while (first > 0 && good[first - 1]) first--;
            while (last < 400 && good[last + 1]) last++;
            const length = response!.frequency_hz[last] - response!.frequency_hz[first];
            const step = 2.5e5;
            const isInside = first > 0 && last < 400;
            if (isInside && width[name] !== null) expect(Math.abs(width[name] - length)).toBeLessThanOrEqual(2 * step);
          }
        }
      }),
      40,
    );
  });
});

describe('what cannot be matched', () => {
  const refused = (input: object) => {
    try {
      calculation.solve(calculation.input.parse(input));
    } catch (error) {
      if (error instanceof ImpossibleInput) return error.problems.map(({ pointer, code }) => `${pointer} ${code}`);
      throw error;
    }
    return [];
  };

  it.each([
    [{ re: 0, im: 30 }],
    [{ re: -5, im: 30 }],
    [0],
    [{ kind: 'series_rlc', inductance_h: 1e-8, capacitance_f: 1e-12 }],
    [{ kind: 'parallel_rlc', inductance_h: 1e-8, capacitance_f: 1e-12 }],
    [{ kind: 'parallel_rlc', inductance_h: 1, capacitance_f: 1 }],
    [{ kind: 'parallel_rlc', resistance_ohm: 0, capacitance_f: 1e-12 }],
    [{ kind: 'series_rlc', resistance_ohm: 10, capacitance_f: 0 }],
  ])('a load without resistance: %j', (load_impedance_ohm) => {
    expect(refused({ load_impedance_ohm, frequency_hz })).toEqual(['/load_impedance_ohm load_without_resistance']);
  });

  it('a source without resistance, a table that does not reach, and a band too long, all at once', () => {
    const table = { kind: 'table', frequency_hz: [1e9, 2e9], impedance_ohm: { re: [50, 60], im: [0, 5] } };
    expect(refused({ load_impedance_ohm: table, source_impedance_ohm: { re: 0, im: 5 }, frequency_hz, band: { start: 1, stop: 2, points: 2002 } })).toEqual([
      '/load_impedance_ohm/frequency_hz outside_table',
      '/source_impedance_ohm source_without_resistance',
      '/band too_large',
    ]);
  });

  it('stubs without a line', () => {
    const parsed = calculation.input.safeParse({ load_impedance_ohm: 100, frequency_hz, topologies: ['l_section', 'single_shunt_stub'] });
    expect(parsed.error?.issues.map(({ path }) => path)).toEqual([['line']]);
  });
});

describe('any input that the schema accepts', () => {
  const wide = fc.oneof(decades(-12, 12), decades(-3, 6));
  const any = fc.record({ re: wide, im: fc.oneof(wide, wide.map((each) => -each), fc.constant(0)) });
  const anyLine = fc.oneof(
    fc.record({ kind: fc.constant('lossless'), characteristic_impedance_ohm: decades(-3, 6), velocity_factor: decades(-3, 0) }),
    fc.record({ kind: fc.constant('rlgc'), resistance_ohm_per_m: decades(-9, 9), inductance_h_per_m: decades(-12, 3), conductance_s_per_m: decades(-12, 9), capacitance_f_per_m: decades(-15, 3) }),
  );
  it('is answered with finite numbers, or null and a warning, in the declared shape, and in a second', () => {
    run(
      fc.property(any, any, decades(-3, 15), anyLine, fc.option(decades(-6, 9), { nil: undefined }), (load, source, frequency, line, stub_spacing_m) => {
        const began = performance.now();
        let answer: ReturnType<typeof match>;
        try {
          answer = match({ load_impedance_ohm: load, source_impedance_ohm: source, frequency_hz: frequency, line, ...(stub_spacing_m !== undefined && { stub_spacing_m }), band: [0, frequency, 2 * Math.min(frequency, 4e14)] });
        } catch (error) {
          expect(error).toBeInstanceOf(ImpossibleInput);
          return;
        }
        expect(performance.now() - began).toBeLessThan(2000);
        expect(calculation.output.safeParse(answer.result).error).toBeUndefined();
        for (const [index, { bandwidth_hz, elements, reflection }] of answer.solutions.entries()) {
          expect(Math.hypot(reflection.re, reflection.im)).toBeLessThan(1e-9);
          for (const [name, value] of Object.entries(bandwidth_hz)) {
            if (value === null) expect(answer.pointers.length === 100 || answer.pointers.includes(`/solutions/${index}/bandwidth_hz/${name}`)).toBe(true);
          }
          if (elements.length > 0) expect(cascade.input.safeParse({ elements, frequency_hz: frequency }).error).toBeUndefined();
        }
      }),
      150,
    );
  });
});
