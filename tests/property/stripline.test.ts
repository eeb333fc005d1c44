/** What holds for every stripline, whatever its dimensions. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { line as lineSchema, lineOverFrequency } from '@/lib/solvers/lines/line';
import { striplineImpedance, striplineRecession } from '@/lib/solvers/methods/stripline';
import { quarterPeriodRatio } from '@/lib/solvers/numeric/elliptic';
import { flatStripCapacitance } from '@/lib/solvers/numeric/flat-strip-between-planes';
import { thickStripCapacitance } from '@/lib/solvers/numeric/thick-strip-between-planes';
import { decades, isFiniteEverywhere } from '../support/arbitraries';

const seed = 20261205;
const run = <Values>(property: fc.IProperty<Values>, runs = 300) => fc.assert(property, { seed, numRuns: runs });
const apart = (value: number, wanted: number) => Math.abs(value / wanted - 1);

const anyLength = fc.oneof({ weight: 4, arbitrary: decades(-10, 3) }, { weight: 1, arbitrary: fc.constantFrom(1e-10, 1e3) });
/** Thickness and offset as shares of the room that there is. */
const anyStripline = fc
  .record({
    kind: fc.constant('stripline'),
    width_m: anyLength,
    plane_spacing_m: anyLength,
    thickness: fc.oneof(fc.constant(0), fc.double({ min: 0, max: 0.999999, noNaN: true }), decades(-12, -1), fc.constant(1 - 2.1e-9)),
    offset: fc.oneof(fc.constant(0), fc.double({ min: -0.999999, max: 0.999999, noNaN: true }), decades(-8.9, -1).map((each) => 1 - each)),
    conductor: fc.oneof(fc.constantFrom('copper', 'steel', 'perfect'), fc.record({ resistivity_ohm_m: fc.oneof(decades(-300, 3), fc.constantFrom(0, 1e3)), relative_permeability: decades(-3, 6) })),
    dielectric: fc.oneof(
      fc.constantFrom('vacuum', 'air', 'fr4'),
      fc.record({ relative_permittivity: fc.oneof(decades(0, 4), fc.constant(1)), loss_tangent: fc.oneof(decades(-6, 1), fc.constantFrom(0, 10)), model: fc.constantFrom('constant', 'wideband_debye'), reference_frequency_hz: decades(4, 11) }),
    ),
    roughness_rms_m: fc.oneof(decades(-12, -3), fc.constant(0)),
  })
  .map(({ thickness, offset, ...line }) => {
    const thickness_m = thickness * line.plane_spacing_m < 1e-10 ? 0 : thickness * line.plane_spacing_m;
    const room = 0.5 * (line.plane_spacing_m - thickness_m);
    return { ...line, thickness_m, offset_m: Math.sign(offset) * Math.max(0, Math.min(room * Math.abs(offset), room - 1.01e-9 * line.plane_spacing_m)) };
  });
const anyFrequency = fc.oneof(decades(-300, 15), decades(3, 12), fc.constantFrom(0, 1e15, 5e-324));
const strip = fc.record({ width: decades(-3, 2), thickness: decades(-3, 1), gapBelow: decades(-2, 1), gapAbove: decades(-2, 1) });

const model = (given: object, frequency: number) => lineOverFrequency(lineSchema.parse({ kind: 'stripline', ...given }), Float64Array.of(frequency));

describe('a stripline', () => {
  it('is finite in every calculation, over all that its schema accepts', () => {
    run(
      fc.property(anyStripline, fc.array(anyFrequency, { minLength: 1, maxLength: 4 }), (given, frequency_hz) => {
        isFiniteEverywhere(given, frequency_hz, [
          ['lines', 'primary-constants', {}],
          ['lines', 'secondary-constants', {}],
        ]);
      }),
      200,
    );
  });

  it('stays the same when all its lengths grow alike, and when it is turned over', () => {
    run(
      fc.property(strip, decades(-3, 3), (given, factor) => {
        const { width, thickness, gapBelow, gapAbove } = given;
        const impedance = striplineImpedance(given);
        expect(apart(striplineImpedance({ width: width * factor, thickness: thickness * factor, gapBelow: gapBelow * factor, gapAbove: gapAbove * factor }), impedance)).toBeLessThan(1e-11);
        expect(apart(striplineImpedance({ ...given, gapBelow: gapAbove, gapAbove: gapBelow }), impedance)).toBeLessThan(1e-11);
      }),
    );
  });

  it('has less impedance the wider, the thicker and the nearer to a plane it is', () => {
    run(
      fc.property(strip, fc.boolean(), (given, isFlat) => {
        const strip = isFlat ? { ...given, thickness: 0 } : given;
        const { width, thickness, gapBelow, gapAbove } = strip;
        const impedance = striplineImpedance(strip);
        expect(striplineImpedance({ ...strip, width: 1.01 * width })).toBeLessThan(impedance);
        expect(striplineImpedance({ ...strip, gapBelow: 0.99 * gapBelow })).toBeLessThan(impedance);
        if (!isFlat) expect(striplineImpedance({ ...strip, thickness: 1.01 * thickness, gapAbove: gapAbove - 0.01 * thickness > 0 ? gapAbove - 0.01 * thickness : gapAbove })).toBeLessThan(impedance);
        const middle = 0.5 * (gapBelow + gapAbove);
        expect(impedance).toBeLessThanOrEqual(striplineImpedance({ ...strip, gapBelow: middle, gapAbove: middle }) * (1 + 1e-12));
      }),
    );
  });

  it('is two plate capacitors where it is very wide, each edge adding a constant', () => {
    run(
      fc.property(decades(2, 8), fc.constantFrom(0, 0.03, 0.4), fc.double({ min: 0.05, max: 0.95, noNaN: true }), (width, thickness, share) => {
        const [gapBelow, gapAbove] = [share * (1 - thickness), (1 - share) * (1 - thickness)];
        const at = (w: number) => (thickness === 0 ? flatStripCapacitance(w, gapBelow, gapAbove) : thickStripCapacitance({ width: w, thickness, gapBelow, gapAbove })!.capacitance);
        const plates = (w: number) => w / gapBelow + w / gapAbove;
        expect((at(2 * width) - at(width)) / plates(width)).toBeCloseTo(1, 11);
        expect(at(width)).toBeGreaterThan(plates(width));
      }),
    );
  });

  it('comes to the strip without thickness, found by another map, as thickness vanishes', () => {
    run(
      fc.property(decades(-6, 4), decades(-6, 0), (width, share) => {
        const flat = flatStripCapacitance(width, 0.5 * share, 1 - 0.5 * share);
        const thin = thickStripCapacitance({ width, thickness: 1e-13 * Math.min(1, width, share), gapBelow: 0.5 * share, gapAbove: 1 - 0.5 * share });
        expect(apart(thin!.capacitance, flat)).toBeLessThan(2e-12);
      }),
    );
  });

  it('does not step at the middle, nor where the wall under a wide strip is moved, nor between series', () => {
    run(
      fc.property(decades(-4, 4), decades(-12, -9), (width, step) => {
        expect(apart(flatStripCapacitance(width, 0.5 - step, 0.5 + step), flatStripCapacitance(width, 0.5, 0.5))).toBeLessThan(1e-13);
      }),
    );
    for (const gap of [0.5, 0.1, 1e-3]) {
      const width = 12 * (1 - gap);
      const [before, after] = [1 - 1e-9, 1 + 1e-9].map((each) => flatStripCapacitance(width * each, gap, 1 - gap));
      const plates = (2e-9 * width) / gap + (2e-9 * width) / (1 - gap);
      expect(Math.abs(after - before - plates)).toBeLessThan(1e-12 * after);
    }
    // s = 1: C/eps = 2.
    for (const gap of [0.3, 0.01]) {
      let [narrow, wide] = [1e-4, 10];
      for (let halving = 0; halving < 100; halving++) {
        const middle = Math.sqrt(narrow * wide);
        if (flatStripCapacitance(middle, gap, 1 - gap) < 2) narrow = middle;
        else wide = middle;
      }
      const [below, above] = [1 - 1e-7, 1 + 1e-7].map((each) => flatStripCapacitance(narrow * each, gap, 1 - gap));
      expect(Math.abs(above + below - 4)).toBeLessThan(1e-12);
    }
  });

  it('of half the line is the whole, by the symmetry of elliptic integrals, also where moduli underflow', () => {
    run(
      fc.property(decades(-8, 5), (x) => {
        const [logModulus, logComplement] = [Math.LN2 - x - Math.log1p(Math.exp(-2 * x)), x > 1 ? Math.log1p(-2 / (Math.exp(2 * x) + 1)) : Math.log(Math.tanh(x))];
        expect(quarterPeriodRatio(logModulus, logComplement) * quarterPeriodRatio(logComplement, logModulus)).toBeCloseTo(1, 13);
      }),
    );
    expect(apart(quarterPeriodRatio(-20 - 1e-12, 0), quarterPeriodRatio(-20 + 1e-12, 0))).toBeLessThan(1e-12);
  });

  it('has an inductance that grows as its surfaces recede', () => {
    run(
      fc.property(strip, (given) => {
        expect(striplineRecession(given)).toBeGreaterThan(0);
      }),
      100,
    );
  });

  it('has slopes that agree with differences, and says what it leaves out', () => {
    const given = { width_m: 3e-4, plane_spacing_m: 8e-4, thickness_m: 1.7e-5, offset_m: 5e-5, dielectric: { relative_permittivity: 3.7, loss_tangent: 0.01, model: 'wideband_debye' }, roughness_rms_m: 1e-6 };
    run(
      fc.property(decades(4, 10.5), (f) => {
        const h = 1e-3;
        const at = [-3, -2, -1, 1, 2, 3].map((step) => model(given, f * (1 + step * h)).constants);
        const { constants } = model(given, f);
        for (const name of ['resistance', 'inductance', 'conductance', 'capacitance'] as const) {
          const [a, b, c, d, e, g] = at.map((each) => each[name][0]);
          const slope = (g - a - 9 * (e - b) + 45 * (d - c)) / (60 * h * 2 * Math.PI * f);
          expect(Math.abs(slope - constants.slope![name][0])).toBeLessThan((1e-9 * constants[name][0]) / (2 * Math.PI * f));
        }
      }),
      50,
    );
    const codes = (more: object, f: number) => model({ width_m: 3e-4, plane_spacing_m: 8e-4, ...more }, f).warnings.map(({ code, pointer }) => `${code} ${pointer}`);
    expect(codes({}, 1e9)).toEqual(['conductor_loss_left_out /line/thickness_m']);
    expect(codes({ conductor: 'perfect' }, 1e9)).toEqual([]);
    expect(codes({ thickness_m: 1.7e-5 }, 1e9)).toEqual([]);
    expect(codes({ thickness_m: 1.7e-5 }, 1e8)).toEqual(['thin_conductor /line/thickness_m']);
    expect(codes({ conductor: 'perfect' }, 1.63e11)).toEqual(['higher_modes /line']);
  });

  it('is refused with every wrong field at once', () => {
    const refused = (given: object) => lineSchema.safeParse({ kind: 'stripline', width_m: 1e-3, plane_spacing_m: 1e-3, ...given }).error?.issues.map(({ path }) => path.join('/')) ?? [];
    expect(refused({})).toEqual([]);
    expect(refused({ thickness_m: 1e-3 })).toEqual(['plane_spacing_m']);
    expect(refused({ thickness_m: 9.99e-4 })).toEqual([]);
    expect(refused({ thickness_m: 5e-4, offset_m: 2.4e-4 })).toEqual([]);
    expect(refused({ thickness_m: 5e-4, offset_m: 2.5e-4 - 1.1e-12 })).toEqual([]);
    expect(refused({ thickness_m: 5e-4, offset_m: 2.5e-4 - 0.9e-12 })).toEqual(['offset_m']);
    expect(refused({ thickness_m: 1e-3 * (1 - 1e-9) })).toEqual(['offset_m']);
    expect(refused({ thickness_m: 5e-4, offset_m: -2.6e-4 })).toEqual(['offset_m']);
    expect(refused({ offset_m: 5e-4 })).toEqual(['offset_m']);
    expect(refused({ thickness_m: 1e-11, offset_m: 1, temperature_c: -273 })).toEqual(['thickness_m', 'offset_m', 'temperature_c']);
    expect(refused({ width_m: -1, thickness_m: -1, offset_m: 'left' })).toEqual(['width_m', 'thickness_m', 'offset_m']);
  });
});
