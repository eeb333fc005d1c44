/** Coplanar lines keep the laws of their fields, and answer over the whole of their bounds. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ImpossibleInput } from '@/lib/solvers/errors';
import { line as lineSchema, lineOverFrequency } from '@/lib/solvers/lines/line';
import { findCalculation } from '@/lib/solvers/registry';
import { decades } from '../support/arbitraries';

const run = <Arguments>(property: fc.IProperty<Arguments>, runs = 100) => fc.assert(property, { numRuns: runs, seed: 20261201 });

function impedance(line: object, frequency_hz = 1e6): number {
  const calculation = findCalculation('lines', 'secondary-constants')!;
  const { result } = calculation.solve(calculation.input.parse({ line: { conductor: 'perfect', ...line }, frequency_hz }));
  return (result as { characteristic_impedance_ohm: { re: number[] } }).characteristic_impedance_ohm.re[0];
}

const ratio = decades(-2, 1);

describe('a coplanar line', () => {
  it('scales, and has less impedance the wider the strip', () => {
    run(
      fc.property(ratio, decades(-1, 1), fc.boolean(), decades(-2, 2), (w, h, backed, k) => {
        const at = (width: number, scale: number) => impedance({ kind: 'coplanar', width_m: width * scale * 1e-3, gap_m: scale * 1e-3, height_m: h * scale * 1e-3, backed, dielectric: 'alumina' });
        expect(at(w, k) / at(w, 1)).toBeCloseTo(1, 10);
        expect(at(1.1 * w, 1)).toBeLessThan(at(w, 1));
      }),
    );
  });

  it('over a plane, or on a substrate, far away is one on a half space', () => {
    run(
      fc.property(ratio, (w) => {
        const line = { kind: 'coplanar', width_m: w * 1e-3, gap_m: 1e-3, dielectric: 'alumina' };
        const half = impedance(line);
        for (const backed of [true, false]) expect(Math.abs(impedance({ ...line, height_m: 100, backed }) / half - 1)).toBeLessThan(1e-8);
      }),
    );
  });

  it('of permittivity 1 has the velocity of light, with and without a plane', () => {
    const calculation = findCalculation('lines', 'primary-constants')!;
    run(
      fc.property(ratio, decades(-2, 2), fc.boolean(), (w, h, backed) => {
        const { result } = calculation.solve(calculation.input.parse({ line: { kind: 'coplanar', width_m: w * 1e-3, gap_m: 1e-3, height_m: h * 1e-3, backed, conductor: 'perfect' }, frequency_hz: 1e6 }));
        expect((result as { effective_permittivity: number[] }).effective_permittivity[0]).toBeCloseTo(1, 12);
      }),
    );
  });

  it('loses what its permittivity has a share in: tan d eps_r d eps_eff/d eps_r over eps_eff', () => {
    const calculation = findCalculation('lines', 'primary-constants')!;
    const at = (er: number, more: object) => {
      const { result } = calculation.solve(calculation.input.parse({ line: { kind: 'coplanar', width_m: 3e-4, gap_m: 2e-4, conductor: 'perfect', dielectric: { relative_permittivity: er, loss_tangent: 0.01 }, ...more }, frequency_hz: 1e9 }));
      const { conductance_s_per_m: G, capacitance_f_per_m: C, effective_permittivity: effective } = result as Record<string, number[]>;
      return { tangent: G[0] / (2 * Math.PI * 1e9 * C[0]), effective: effective[0] };
    };
    run(
      fc.property(fc.double({ min: 1, max: 20, noNaN: true }), fc.constantFrom({}, { height_m: 3e-4 }, { height_m: 3e-4, backed: true }, { height_m: 3e-4, thickness_m: 1e-5 }), (er, more) => {
        const slope = at(er + 1, more).effective - at(er, more).effective;
        expect(at(er, more).tangent / ((0.01 * er * slope) / at(er, more).effective)).toBeCloseTo(1, 10);
      }),
    );
  });
});

describe('the loss of a coplanar line', () => {
  const constants = (line: object, frequency = 1e9) => lineOverFrequency(lineSchema.parse({ kind: 'coplanar', gap_m: 1e-3, conductor: 'perfect', ...line }), Float64Array.of(frequency)).constants;

  it('is that of its dielectric: omega tan d times what the capacitance grows by in proportion to the permittivity, and never more than that of a filled line', () => {
    run(
      fc.property(ratio, decades(-1, 1), decades(0.1, 2), fc.constantFrom({}, { height: true }, { height: true, backed: true }), (w, h, er, { height, ...below }: { height?: boolean; backed?: boolean }) => {
        const line = { width_m: w * 1e-3, ...(height && { height_m: h * 1e-3 }), ...below };
        const at = (relative_permittivity: number) => constants({ ...line, dielectric: { relative_permittivity, loss_tangent: 0.01 } });
        const { conductance, capacitance } = at(er);
        const growth = (at(er * 1.001).capacitance[0] - at(er * 0.999).capacitance[0]) / 0.002;
        expect(conductance[0] / (2 * Math.PI * 1e9 * 0.01 * growth)).toBeCloseTo(1, 8);
        expect(conductance[0]).toBeLessThan(2 * Math.PI * 1e9 * 0.01 * capacitance[0]);
      }),
    );
  });
});

describe('every accepted coplanar line', () => {
  const length = fc.oneof(fc.constantFrom(1e-10, 1e-6, 1, 1e3), decades(-10, 3));
  const maybeZero = fc.oneof(fc.constant(0), length);
  const dielectric = fc.oneof(fc.constantFrom('vacuum', 'fr4'), fc.record({ relative_permittivity: fc.constantFrom(1, 4, 1e4), loss_tangent: fc.constantFrom(0, 1e-3, 10), model: fc.constantFrom('constant', 'wideband_debye') }));
  const shared = { thickness_m: maybeZero, conductor: fc.constantFrom('copper', 'perfect', 'steel'), dielectric, roughness_rms_m: fc.constantFrom(0, 1e-6, 1e-3) };
  const anyLine = fc.record({ kind: fc.constant('coplanar'), width_m: length, gap_m: length, height_m: length, backed: fc.boolean(), ...shared }, { requiredKeys: ['kind', 'width_m', 'gap_m'] });

  it.each(['primary-constants', 'secondary-constants'])('gives finite numbers, or null with a warning: %s', (id) => {
    const calculation = findCalculation('lines', id)!;
    run(
      fc.property(anyLine, fc.array(fc.oneof(fc.constantFrom(0, 1e-300, 1e15), decades(-3, 12)), { minLength: 1, maxLength: 3 }), (line, frequency_hz) => {
        const parsed = calculation.input.safeParse({ line, frequency_hz });
        if (!parsed.success) return;
        try {
          const { result, warnings } = calculation.solve(parsed.data);
          const told = JSON.stringify({ line, frequency_hz });
          expect(calculation.output.safeParse(result).error?.issues, told).toBeUndefined();
          if (JSON.stringify(result).includes('null')) expect(warnings.length).toBeGreaterThan(0);
          if (id === 'primary-constants') for (const name of ['inductance_h_per_m', 'capacitance_f_per_m'] as const) expect(Math.min(...(result as Record<string, number[]>)[name]), told).toBeGreaterThan(0);
        } catch (error) {
          if (!(error instanceof ImpossibleInput)) throw error;
        }
      }),
      1000,
    );
  });
});
