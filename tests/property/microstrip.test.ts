/** What holds for every microstrip line, whatever its dimensions. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { line as lineSchema, lineOverFrequency } from '@/lib/solvers/lines/line';
import { dispersedMicrostrip, microstripSingleModeLimitHz } from '@/lib/solvers/methods/microstrip-dispersion';
import { microstripInductance, microstripLine, microstripRecession } from '@/lib/solvers/methods/microstrip-static';
import { derivative } from '@/lib/solvers/numeric/derivative';
import { decades, isFiniteEverywhere } from '../support/arbitraries';

const seed = 20261204;
const run = <Values>(property: fc.IProperty<Values>, runs = 300) => fc.assert(property, { seed, numRuns: runs });

/** Within the method's range. */
const shape = fc.record({ u: decades(-2, 2), tau: fc.oneof(fc.constant(0), decades(-5, Math.log10(0.2))) });
const permittivity = fc.oneof({ weight: 4, arbitrary: fc.double({ min: 1, max: 20, noNaN: true }) }, { weight: 1, arbitrary: fc.constantFrom(1, 1 + 2 ** -20, 1.0001, 128) });
const freeSpace = 1.25663706127e-6 * 299792458;

const anyLength = fc.oneof({ weight: 4, arbitrary: decades(-10, 3) }, { weight: 1, arbitrary: fc.constantFrom(1e-10, 1e3) });
const anyMicrostrip = fc.record({
  kind: fc.constant('microstrip'),
  width_m: anyLength,
  height_m: anyLength,
  thickness_m: fc.oneof(anyLength, fc.constant(0)),
  conductor: fc.oneof(
    fc.constantFrom('copper', 'steel', 'perfect'),
    fc.record({ resistivity_ohm_m: fc.oneof(decades(-300, 3), fc.constantFrom(0, 1e3)), relative_permeability: decades(-3, 6) }),
  ),
  dielectric: fc.oneof(
    fc.constantFrom('vacuum', 'air', 'fr4'),
    fc.record({
      relative_permittivity: fc.oneof(decades(0, 4), fc.constant(1)),
      loss_tangent: fc.oneof(decades(-6, 1), fc.constantFrom(0, 10)),
      model: fc.constantFrom('constant', 'wideband_debye'),
      reference_frequency_hz: decades(4, 11),
    }),
  ),
  roughness_rms_m: fc.oneof(decades(-12, -3), fc.constant(0)),
  dispersion: fc.boolean(),
});
const anyFrequency = fc.oneof(decades(-300, 15), decades(3, 12), fc.constantFrom(0, 1e15, 5e-324));

const model = (given: object, frequency: number) => lineOverFrequency(lineSchema.parse({ kind: 'microstrip', ...given }), Float64Array.of(frequency));

describe('a microstrip line', () => {
  it('is finite in every calculation, over all that its schema accepts', () => {
    run(
      fc.property(anyMicrostrip, fc.array(anyFrequency, { minLength: 1, maxLength: 4 }), (given, frequency_hz) => {
        isFiniteEverywhere(given, frequency_hz, [
          ['lines', 'primary-constants', {}],
          ['lines', 'secondary-constants', {}],
          ['terminations', 'input-impedance', { length_m: 0.1, termination: 75 }],
        ]);
      }),
      600,
    );
  });

  it('stays the same when all its lengths grow alike', () => {
    run(
      fc.property(shape, permittivity, decades(-1, 3), ({ u, tau }, er, factor) => {
        const at = (scale: number) => model({ width_m: u * 1e-3 * scale, height_m: 1e-3 * scale, thickness_m: tau * 1e-3 * scale, conductor: 'perfect', dielectric: { relative_permittivity: er, loss_tangent: 0.01 }, dispersion: true }, 1e9 / scale).constants;
        const [one, other] = [at(1), at(factor)];
        for (const name of ['inductance', 'capacitance'] as const) expect(other[name][0] / one[name][0]).toBeCloseTo(1, 11);
        expect((other.conductance[0] * factor) / one.conductance[0]).toBeCloseTo(1, 11);
      }),
    );
  });

  it('has less impedance and more effective permittivity the wider it is', () => {
    run(
      fc.property(shape, permittivity, fc.double({ min: 1.001, max: 2, noNaN: true }), (given, er, factor) => {
        fc.pre(given.tau <= given.u);
        const wider = { ...given, u: given.u * factor };
        expect(microstripLine(wider, er).impedance).toBeLessThan(microstripLine(given, er).impedance);
        expect(microstripLine(wider, er).effectivePermittivity).toBeGreaterThanOrEqual(microstripLine(given, er).effectivePermittivity * (1 - 1e-14));
      }),
    );
  });

  it('has an effective permittivity between half and all of the substrate’s, and 1 in vacuum', () => {
    run(
      fc.property(decades(-2, 2), permittivity, decades(0, 12), (u, er, frequency) => {
        const still = microstripLine({ u, tau: 0 }, er);
        const moving = dispersedMicrostrip(still, { u, tau: 0 }, er, 1e-3, frequency);
        for (const { share, effectivePermittivity } of [still, moving]) {
          expect(share).toBeGreaterThanOrEqual(0.5);
          expect(share).toBeLessThanOrEqual(1);
          expect(effectivePermittivity).toBeLessThanOrEqual(er * (1 + 1e-14));
        }
        expect(moving.effectivePermittivity).toBeGreaterThanOrEqual(still.effectivePermittivity * (1 - 1e-14));
        expect(microstripLine({ u, tau: 0 }, 1).effectivePermittivity).toBe(1);
      }),
    );
  });

  it('is a parallel plate where it is very wide, and thickness that vanishes leaves nothing', () => {
    run(
      fc.property(decades(4, 8), permittivity, (u, er) => {
        const { impedance, effectivePermittivity } = microstripLine({ u, tau: 0 }, er);
        expect((impedance * Math.sqrt(effectivePermittivity) * u) / freeSpace).toBeCloseTo(1, 2);
        expect(effectivePermittivity / er).toBeCloseTo(1, 2);
        expect((microstripInductance({ u, tau: 0 }) * u) / 1.25663706127e-6).toBeCloseTo(1, 2);
      }),
    );
    run(
      fc.property(shape, permittivity, ({ u }, er) => {
        const [none, little] = [microstripLine({ u, tau: 0 }, er), microstripLine({ u, tau: 1e-13 * u }, er)];
        expect(little.impedance / none.impedance).toBeCloseTo(1, 10);
        expect(little.effectivePermittivity / none.effectivePermittivity).toBeCloseTo(1, 10);
      }),
    );
  });

  it('does not step at a permittivity of 1, nor where dispersion begins', () => {
    run(
      fc.property(shape, decades(-12, -6), (given, step) => {
        const [at, above] = [microstripLine(given, 1), microstripLine(given, 1 + step)];
        expect(above.share / at.share).toBeCloseTo(1, 5);
        expect(above.impedance / at.impedance).toBeCloseTo(1, 5);
        const moved = dispersedMicrostrip(above, given, 1 + step, 1e-3, 1e12);
        expect(moved.impedance / above.impedance / (moved.share / above.share)).toBeCloseTo(1, 5);
      }),
    );
    run(
      fc.property(shape, permittivity, (given, er) => {
        const still = microstripLine(given, er);
        const { impedance, effectivePermittivity } = dispersedMicrostrip(still, given, er, 1e-3, 0);
        expect(impedance / still.impedance).toBeCloseTo(1, 14);
        expect(effectivePermittivity / still.effectivePermittivity).toBeCloseTo(1, 14);
      }),
    );
  });

  it('does not step where one relation for the impedance leads over to the other, nor at the ends of their range', () => {
    run(
      fc.property(decades(-2, 3), fc.constantFrom(1.1, 1.3, 20), fc.constantFrom(0.1, 100), decades(9, 13), (u, er, ratio, frequency) => {
        const impedance = (width: number, epsilon: number) => {
          const given = { u: width, tau: 0 };
          return dispersedMicrostrip(microstripLine(given, epsilon), given, epsilon, 1e-3, frequency).impedance;
        };
        expect(impedance(u, er * (1 + 1e-9)) / impedance(u, er * (1 - 1e-9))).toBeCloseTo(1, 6);
        expect(impedance(ratio * (1 + 1e-9), er) / impedance(ratio * (1 - 1e-9), er)).toBeCloseTo(1, 6);
        expect(impedance(u, er)).toBeGreaterThan(0);
      }),
    );
  });

  it('recedes by the derivative of its inductance', () => {
    run(
      fc.property(decades(-2, 2), decades(-3, 0), decades(-4, -1), (u, tau, h) => {
        const inductance = (n: number) => microstripInductance({ u: (u * h - 2 * n) / (h + 2 * n), tau: (tau * h - 2 * n) / (h + 2 * n) });
        const measured = derivative(inductance, 0, 0.1 * h * Math.min(u, tau))!;
        expect(microstripRecession({ u, tau }, h) / measured).toBeCloseTo(1, 7);
        expect(measured).toBeGreaterThan(0);
      }),
    );
  });

  it('says where its method ends, and only there', () => {
    const codes = (given: object, frequency = 1e6) => model({ height_m: 1e-3, width_m: 1e-3, conductor: 'perfect', ...given }, frequency).warnings.map(({ code, pointer }) => `${code} ${pointer}`);
    expect(codes({})).toEqual([]);
    expect(codes({ width_m: 0.0101e-3 })).toEqual([]);
    expect(codes({ width_m: 0.0099e-3 })).toEqual(['outside_range /line/width_m']);
    expect(codes({ width_m: 100.1e-3 })).toEqual(['outside_range /line/width_m']);
    expect(codes({ dielectric: { relative_permittivity: 128.1 } })).toEqual(['outside_range /line/dielectric']);
    expect(codes({ thickness_m: 0.19e-3 })).toEqual([]);
    expect(codes({ thickness_m: 0.21e-3 })).toEqual(['narrow_and_thick /line/thickness_m']);
    expect(codes({ width_m: 0.05e-3, thickness_m: 0.026e-3 })).toEqual(['narrow_and_thick /line/thickness_m']);
    expect(codes({ width_m: 0.05e-3, thickness_m: 0.024e-3 })).toEqual([]);
    expect(codes({ conductor: 'copper' })).toEqual(['conductor_loss_left_out /line/thickness_m']);
    expect(codes({ conductor: 'copper', thickness_m: 35e-6 }, 20e6)).toEqual(['thin_conductor /line/thickness_m']);
    expect(codes({ conductor: 'copper', thickness_m: 35e-6 }, 40e6)).toEqual([]);
    expect(codes({ dielectric: { relative_permittivity: 9.8 } }, 1e10)).toEqual(['dispersion_left_out /line/dispersion']);
    expect(codes({ dielectric: { relative_permittivity: 9.8 }, dispersion: true }, 1e10)).toEqual([]);
    expect(codes({ dielectric: { relative_permittivity: 9.8 }, dispersion: true }, 38e9)).toEqual(['higher_modes /line']);
    expect(codes({ dielectric: { relative_permittivity: 2.2 }, dispersion: true }, 39.5e9)).toEqual(['outside_range /line/height_m']);
    expect(codes({ width_m: 0.09e-3, dispersion: true })).toEqual(['outside_range /line/width_m']);
    expect(codes({ dielectric: { relative_permittivity: 20.1 }, dispersion: true })).toEqual(['outside_range /line/dielectric']);
  });

  it('is refused with every wrong field at once', () => {
    const refused = (given: object) => lineSchema.safeParse({ kind: 'microstrip', width_m: 1e-3, height_m: 1e-3, ...given }).error?.issues.map(({ path }) => path.join('/')) ?? [];
    expect(refused({})).toEqual([]);
    expect(refused({ width_m: 0, height_m: -1, thickness_m: -1, roughness_rms_m: -1 })).toEqual(['width_m', 'height_m', 'thickness_m', 'roughness_rms_m']);
    expect(refused({ thickness_m: 1e-11 })).toEqual(['thickness_m']);
    expect(refused({ temperature_c: -273, conductor: 'copper', thickness_m: 1e-300 })).toEqual(['thickness_m', 'temperature_c']);
    expect(refused({ width_m: Infinity })).toEqual(['width_m']);
  });

  it('has a single mode up to the lower of two limits', () => {
    const c = 299792458;
    expect(microstripSingleModeLimitHz(3e-3, 1e-3, 2.2, c)).toBeCloseTo(c / (Math.sqrt(2.2) * 6.8e-3), 0);
    expect(microstripSingleModeLimitHz(1e-5, 1e-3, 9.8, c)).toBeCloseTo((c * Math.atan(9.8)) / (Math.SQRT2 * Math.PI * 1e-3 * Math.sqrt(8.8)), 0);
  });
});
