/** What holds for the constants of every planar line, whatever its lossless line is. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { planarConstants, type PlanarLine } from '@/lib/solvers/lines/planar-constants';
import { constantPermittivity, widebandDebyePermittivity } from '@/lib/solvers/methods/permittivity';
import { planarConductorLoss, type PlanarConductor } from '@/lib/solvers/methods/planar-conductor';
import { derivative } from '@/lib/solvers/numeric/derivative';
import { decades } from '../support/arbitraries';

const seed = 20261203;
const run = <Values>(property: fc.IProperty<Values>, runs = 200) => fc.assert(property, { seed, numRuns: runs });

const conductor = fc.record({
  material: fc.record({ resistivityOhmM: decades(-9, -5), relativePermeability: decades(0, 3) }),
  thicknessM: decades(-7, -3),
  directResistance: decades(-2, 3),
  recession: decades(-4, 0),
  roughnessM: fc.oneof(fc.constant(0), decades(-8, -5)),
});
const quantities = ['resistance', 'inductance', 'conductance', 'capacitance'] as const;

function loss(given: PlanarConductor, w: number) {
  const { resistance, inductance, resistanceSlope, inductanceSlope } = planarConductorLoss(given, Float64Array.of(w));
  return { R: resistance[0], L: inductance[0], dR: resistanceSlope[0], dL: inductanceSlope[0] };
}

describe('the loss of planar conductors', () => {
  it('goes from the resistance at direct current to the root of frequency, and never falls between', () => {
    run(
      fc.property(conductor, decades(-3, 15), (given, w) => {
        expect(loss(given, 0).R).toBe(given.directResistance);
        expect(loss(given, w).R).toBeGreaterThanOrEqual(given.directResistance * (1 - 1e-14));
        expect(loss(given, 1.1 * w).R).toBeGreaterThanOrEqual(loss(given, w).R * (1 - 1e-14));
        const smooth = { ...given, roughnessM: 0, directResistance: 1e-12 };
        const { R, L } = loss(smooth, w);
        if (R > 1e-9) expect(R / (w * L)).toBeCloseTo(1, 5);
      }),
    );
  });

  it('has slopes that are those of its values', () => {
    run(
      fc.property(conductor, decades(2, 13), (given, w) => {
        const { R, L, dR, dL } = loss(given, w);
        expect(Math.abs(derivative((x) => loss(given, x).R, w, 0.2 * w)! - dR)).toBeLessThanOrEqual((1e-9 * R) / w);
        expect(Math.abs(derivative((x) => loss(given, x).L, w, 0.2 * w)! - dL)).toBeLessThanOrEqual((1e-9 * L) / w);
      }),
    );
  });

  it('is at most doubled by roughness', () => {
    run(
      fc.property(conductor, decades(0, 14), (given, w) => {
        const ratio = loss(given, w).R / loss({ ...given, roughnessM: 0 }, w).R;
        expect(ratio).toBeGreaterThanOrEqual(1);
        expect(ratio).toBeLessThanOrEqual(2);
      }),
    );
  });
});

describe('the constants of a planar line', () => {
  const perfect: PlanarConductor = { material: { resistivityOhmM: 0, relativePermeability: 1 }, thicknessM: 0, directResistance: 0, recession: 0, roughnessM: 0 };
  /** A line with a tenth of its field in the air, and a dispersion of its own. */
  const line = (given: Partial<PlanarLine> & Pick<PlanarLine, 'omega' | 'permittivity'>): PlanarLine => ({
    lossless: (epsilon, frequency) => {
      const share = 0.9 - 0.3 / (1 + (frequency / 1e10) ** 1.5);
      const effectivePermittivity = 1 + share * (epsilon - 1);
      return { impedance: 100 / Math.sqrt(effectivePermittivity), effectivePermittivity, share };
    },
    isDispersive: true,
    conductor: perfect,
    singleModeLimitHz: Infinity,
    methods: [],
    warnings: [],
    ...given,
  });

  it('have slopes that are those of their values, with a dielectric and a field that vary', () => {
    run(
      fc.property(fc.double({ min: 1.5, max: 12, noNaN: true }), fc.double({ min: 0.0001, max: 0.03, noNaN: true }), decades(6, 12), conductor, (epsilon, tangent, w, metal) => {
        const at = (omega: number) => planarConstants(line({ omega: Float64Array.of(omega), permittivity: widebandDebyePermittivity(epsilon, tangent, 6e9, Float64Array.of(omega)), conductor: metal })).constants;
        const { slope, ...values } = at(w);
        for (const name of quantities) {
          const measured = derivative((x) => at(x)[name][0], w, 0.1 * w)!;
          expect(Math.abs(measured - slope![name][0]), name).toBeLessThanOrEqual((1e-9 * values[name][0]) / w);
        }
      }),
    );
  });

  it('give the lossless line back', () => {
    run(
      fc.property(fc.double({ min: 1, max: 12, noNaN: true }), decades(3, 12), (epsilon, w) => {
        const omega = Float64Array.of(w);
        const given = line({ omega, permittivity: constantPermittivity(epsilon, 0.01, omega) });
        const { constants, geometry } = planarConstants(given);
        const { impedance, effectivePermittivity, share } = given.lossless(epsilon, w / (2 * Math.PI));
        expect(Math.sqrt(constants.inductance[0] / constants.capacitance[0]) / impedance).toBeCloseTo(1, 13);
        expect((constants.inductance[0] * constants.capacitance[0] * 299792458 ** 2) / effectivePermittivity).toBeCloseTo(1, 13);
        expect(constants.conductance[0] / (w * constants.capacitance[0]) / ((0.01 * epsilon * share) / effectivePermittivity)).toBeCloseTo(1, 13);
        expect(geometry!.effectivePermittivity[0]).toBe(effectivePermittivity);
      }),
    );
  });
});
