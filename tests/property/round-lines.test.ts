/** Lines of round and flat conductors keep the laws of their physics, and answer over the whole of their bounds. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ImpossibleInput } from '@/lib/solvers/errors';
import { findCalculation } from '@/lib/solvers/registry';
import { decades } from '../support/arbitraries';

const run = <Arguments>(property: fc.IProperty<Arguments>, runs = 300) => fc.assert(property, { numRuns: runs, seed: 20261201 });

interface Constants {
  readonly resistance_ohm_per_m: number[];
  readonly inductance_h_per_m: number[];
  readonly conductance_s_per_m: number[];
  readonly capacitance_f_per_m: number[];
  readonly external_inductance_h_per_m: number[];
}

function primary(line: object, frequency_hz: unknown): Constants {
  const calculation = findCalculation('lines', 'primary-constants')!;
  return calculation.solve(calculation.input.parse({ line, frequency_hz })).result as Constants;
}

const ratio = fc.double({ min: 1.1, max: 50, noNaN: true });
const size = decades(-5, -1);
const round = fc.oneof(
  fc.tuple(size, ratio, decades(-2, 1)).map(([d, r, wall]) => ({ kind: 'coaxial', inner_diameter_m: d, outer_diameter_m: d * r, shield_thickness_m: d * wall })),
  fc.tuple(size, ratio, fc.boolean()).map(([d, r, proximity]) => ({ kind: 'two_wire', conductor_diameter_m: d, spacing_m: d * r, proximity })),
  fc.tuple(size, ratio).map(([d, r]) => ({ kind: 'wire_over_plane', conductor_diameter_m: d, height_m: d * r })),
  fc.tuple(size, ratio, decades(-3, 0)).map(([w, r, t]) => ({ kind: 'parallel_plate', width_m: w, separation_m: w / r, thickness_m: w * t })),
  fc.tuple(size, fc.double({ min: 1.05, max: 3, noNaN: true })).map(([d, r]) => ({ kind: 'twisted_pair', conductor_diameter_m: d, insulation_diameter_m: d * r, twists_per_m: 0.1 / d })),
);

describe('a line of round or flat conductors', () => {
  it('has an R that grows and an L that falls with frequency, down to that of the field outside', () => {
    run(
      fc.property(round, decades(0, 9), fc.double({ min: 1.1, max: 100, noNaN: true }), (line, f, step) => {
        const { resistance_ohm_per_m: R, inductance_h_per_m: L, external_inductance_h_per_m: outside } = primary(line, [0, f, f * step]);
        expect(R[0]).toBeGreaterThan(0);
        expect(R[1]).toBeGreaterThanOrEqual(R[0] * (1 - 1e-12));
        expect(R[2]).toBeGreaterThanOrEqual(R[1] * (1 - 1e-12));
        expect(L[1]).toBeLessThanOrEqual(L[0] * (1 + 1e-12));
        expect(L[2]).toBeLessThanOrEqual(L[1] * (1 + 1e-12));
        expect(L[2]).toBeGreaterThanOrEqual(outside[2] * (1 - 1e-12));
      }),
    );
  });

  it('scales: k times as large at f/k^2 has R/k^2 and the same L and C', () => {
    run(
      fc.property(round, decades(0, 9), fc.double({ min: 0.2, max: 5, noNaN: true }), (line, f, k) => {
        const scaled = Object.fromEntries(Object.entries(line).map(([name, value]) => [name, typeof value !== 'number' ? value : name === 'twists_per_m' ? value / k : value * k]));
        const [one, other] = [primary(line, f), primary(scaled, f / k ** 2)];
        const same = (p: number, q: number) => expect(Math.abs(p / q - 1)).toBeLessThanOrEqual(1e-10);
        same(other.resistance_ohm_per_m[0] * k ** 2, one.resistance_ohm_per_m[0]);
        same(other.inductance_h_per_m[0], one.inductance_h_per_m[0]);
        same(other.capacitance_f_per_m[0], one.capacitance_f_per_m[0]);
      }),
    );
  });

  it('has L C = mu eps of the field outside, and an internal impedance whose group delay agrees with differences', () => {
    run(
      fc.property(round, decades(2, 9), (line, f) => {
        if (line.kind === 'twisted_pair') return;
        const { external_inductance_h_per_m: L, capacitance_f_per_m: C } = primary(line, f);
        expect(L[0] * C[0] * 299_792_458 ** 2).toBeCloseTo(1, 12);
        const calculation = findCalculation('lines', 'secondary-constants')!;
        const h = 1e-4;
        const { phase_constant_rad_per_m: beta, group_velocity_m_per_s: v } = calculation.solve(calculation.input.parse({ line, frequency_hz: [f, f * (1 - 2 * h), f * (1 - h), f * (1 + h), f * (1 + 2 * h)] })).result as { phase_constant_rad_per_m: number[]; group_velocity_m_per_s: number[] };
        const slope = (8 * (beta[3] - beta[2]) - (beta[4] - beta[1])) / (12 * h * 2 * Math.PI * f);
        expect(Math.abs(slope * v[0] - 1)).toBeLessThanOrEqual(1e-9);
      }),
    );
  });

  it('meets on both sides of every seam of the series inside', () => {
    const line = { kind: 'coaxial', inner_diameter_m: 1e-3, outer_diameter_m: 3e-3, shield_thickness_m: 1e-3 };
    // |m a| of 2, 27 and 30, where one series hands over to the next: X = omega mu a^2/rho.
    for (const [argument, radius] of [[30, 5e-4], [27, 1e-3], [2, 1.5e-3], [30, 1.5e-3]]) {
      const f = argument ** 2 / (2 * Math.PI * 1.25663706127e-6 * 58e6 * radius ** 2);
      const e = 1e-9;
      const { resistance_ohm_per_m: R, inductance_h_per_m: L } = primary(line, [f * (1 - e), f * (1 + e)]);
      expect(R[1] / R[0] - 1).toBeGreaterThan(0);
      expect(R[1] / R[0] - 1).toBeLessThan(1.2 * e * 1.01);
      expect(Math.abs(L[1] / L[0] - 1)).toBeLessThan(e);
    }
  });

  it('with two wires is twice as a wire over a plane, at half the spacing', () => {
    run(
      fc.property(size, ratio, decades(0, 9), (d, r, f) => {
        const pair = primary({ kind: 'two_wire', conductor_diameter_m: d, spacing_m: 2 * d * r, proximity: false }, f);
        const over = primary({ kind: 'wire_over_plane', conductor_diameter_m: d, height_m: d * r }, f);
        expect(pair.resistance_ohm_per_m[0] / (2 * over.resistance_ohm_per_m[0])).toBeCloseTo(1, 12);
        expect(pair.inductance_h_per_m[0] / (2 * over.inductance_h_per_m[0])).toBeCloseTo(1, 12);
      }),
    );
  });
});

describe('two near wires', () => {
  const gap = decades(-3, 1);

  it('have more R than two by themselves, and in the end (s/d)/sqrt((s/d)^2 - 1) times as much', () => {
    run(
      fc.property(size, gap, decades(0, 9), (d, g, f) => {
        const line = { kind: 'two_wire', conductor_diameter_m: d, spacing_m: d * (1 + g) };
        const crowded = primary(line, [0, f]);
        const alone = primary({ ...line, proximity: false }, [0, f]);
        expect(crowded.resistance_ohm_per_m[0] / alone.resistance_ohm_per_m[0]).toBeCloseTo(1, 13);
        expect(crowded.resistance_ohm_per_m[1]).toBeGreaterThanOrEqual(alone.resistance_ohm_per_m[1] * (1 - 1e-13));
        expect(crowded.inductance_h_per_m[1]).toBeGreaterThan(crowded.external_inductance_h_per_m[1]);
        // Skin and gap in one: the limit is reached as the skin depth over the gap.
        const thin = 1e15;
        if (d * g < 1e-5) return;
        const [R] = primary(line, thin).resistance_ohm_per_m;
        const [R0] = primary({ ...line, proximity: false }, thin).resistance_ohm_per_m;
        const x = line.spacing_m / d;
        expect(R / R0 / (x / Math.sqrt((x - 1) * (x + 1)))).toBeCloseTo(1, 2);
      }),
      100,
    );
  });

  it('answer the same in a long sweep as one by one', () => {
    run(
      fc.property(size, gap, fc.constantFrom(1, 50), (d, g, relative_permeability) => {
        const line = { kind: 'two_wire', conductor_diameter_m: d, spacing_m: d * (1 + g), conductor: { resistivity_ohm_m: 2e-8, relative_permeability } };
        const sweep = primary(line, { start: 1, stop: 1e12, points: 601, spacing: 'log' }) as Constants & { frequency_hz: number[] };
        for (let index = 0; index < 601; index += 75) {
          const single = primary(line, sweep.frequency_hz[index]);
          for (const name of ['resistance_ohm_per_m', 'inductance_h_per_m'] as const) expect(Math.abs(sweep[name][index] / single[name][0] - 1)).toBeLessThanOrEqual(2e-14);
        }
      }),
      12,
    );
  });

  it('have an R that grows at every step of 20,001', () => {
    const { resistance_ohm_per_m: R } = primary({ kind: 'two_wire', conductor_diameter_m: 1e-3, spacing_m: 1.02e-3 }, { start: 1, stop: 1e12, points: 20_001, spacing: 'log' });
    for (let index = 1; index < R.length; index++) expect(R[index] >= R[index - 1] * (1 - 1e-13)).toBe(true);
  });
});

describe('every accepted geometry', () => {
  const edge = (...values: number[]) => fc.oneof(fc.constantFrom(...values), decades(-10, 3));
  const conductor = fc.oneof(fc.constantFrom('copper', 'perfect', 'steel'), fc.record({ resistivity_ohm_m: fc.constantFrom(0, 1e-300, 1e-17, 1e-8, 1e3), relative_permeability: fc.constantFrom(1e-3, 1, 1e6), temperature_coefficient_per_k: fc.constantFrom(-0.02, 0, 0.02) }));
  const dielectric = fc.oneof(fc.constantFrom('vacuum', 'fr4'), fc.record({ relative_permittivity: fc.constantFrom(1, 4, 1e4), loss_tangent: fc.constantFrom(0, 1e-3, 10), model: fc.constantFrom('constant', 'wideband_debye'), reference_frequency_hz: fc.constantFrom(1e4, 1e9, 1e11) }));
  const materials = { conductor, dielectric, temperature_c: fc.constantFrom(-273.15, -50, 20, 2000) };
  const length = edge(1e-10, 1e3);
  const anyLine = fc.oneof(
    fc.record({ kind: fc.constant('coaxial'), inner_diameter_m: length, outer_diameter_m: length, shield_thickness_m: length, shield: conductor, ...materials }, { requiredKeys: ['kind', 'inner_diameter_m', 'outer_diameter_m'] }),
    fc.record({ kind: fc.constant('two_wire'), conductor_diameter_m: length, spacing_m: length, proximity: fc.boolean(), ...materials }),
    fc.record({ kind: fc.constant('wire_over_plane'), conductor_diameter_m: length, height_m: length, ...materials }),
    fc.record({ kind: fc.constant('parallel_plate'), width_m: length, separation_m: length, thickness_m: length, ...materials }, { requiredKeys: ['kind', 'width_m', 'separation_m'] }),
    fc.record({ kind: fc.constant('twisted_pair'), conductor_diameter_m: length, insulation_diameter_m: length, twists_per_m: fc.constantFrom(0, 1, 1e5), ...materials }),
  );

  it.each(['primary-constants', 'secondary-constants'])('gives finite numbers, or null with a warning: %s', (id) => {
    const calculation = findCalculation('lines', id)!;
    run(
      fc.property(anyLine, fc.array(fc.oneof(fc.constantFrom(0, 1e-300, 1e15), decades(-3, 12)), { minLength: 1, maxLength: 3 }), (line, frequency_hz) => {
        const parsed = calculation.input.safeParse({ line, frequency_hz });
        if (!parsed.success) return;
        try {
          const { result, warnings } = calculation.solve(parsed.data);
          expect(calculation.output.safeParse(result).error?.issues, JSON.stringify({ line, frequency_hz })).toBeUndefined();
          if (JSON.stringify(result).includes('null')) expect(warnings.length).toBeGreaterThan(0);
        } catch (error) {
          if (!(error instanceof ImpossibleInput)) throw error;
        }
      }),
      3000,
    );
  });
});
