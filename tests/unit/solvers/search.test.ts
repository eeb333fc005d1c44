/** Roots, derivatives and the search for every place where a function takes a value. */
import { describe, expect, it } from 'vitest';
import { pointsBetween } from '@/lib/solvers/methods/dimension-search';
import { derivative } from '@/lib/solvers/numeric/derivative';
import { bracketedRoot } from '@/lib/solvers/numeric/roots';
import { searchFor as search } from '@/lib/solvers/numeric/search';

/** Half of the points without a value say so at once, the others only when asked for it. */
const searchFor = (wanted: number, f: (x: number) => number | null, points: Float64Array) => search(wanted, { isDefined: (x) => x > 0 || f(x) !== null, valueAt: f }, points);

const grid = Float64Array.from({ length: 41 }, (_, index) => -4 + 0.2 * index);

describe('bracketedRoot', () => {
  const from = (f: (x: number) => number, a: number, b: number) => bracketedRoot(f, { x: a, value: f(a) }, { x: b, value: f(b) })!;

  it.each<[string, (x: number) => number, number, number, number]>([
    ['a line', (x) => 3 * x - 1, 0, 1, 1 / 3],
    ['cos x = x', (x) => Math.cos(x) - x, 0, 2, 0.7390851332151607],
    ['a root of ninth order', (x) => (x - 1) ** 9, 0, 3.3, 1],
    ['a steep step', (x) => Math.atan(1e9 * (x - 0.3)), 0, 1, 0.3],
    ['a pole beside it', (x) => 1 / (x - 2) + 1e6, -5, 1.9999999999, 1.999999],
    ['twelve decades', (x) => Math.log(x / 1e-9), 1e-12, 1, 1e-9],
    ['the ends the other way round', (x) => x * x - 2, 2, 0, Math.SQRT2],
  ])('ends at neighbouring numbers for %s', (_, f, a, b, root) => {
    const found = from(f, a, b);
    // Of a root of ninth order float64 sees zeros around it.
    const tolerance = f(root * (1 + 1e-15)) === f(root) ? 1e-2 : 1e-14;
    expect(Math.abs(found.x / root - 1)).toBeLessThanOrEqual(tolerance);
    expect(found.iterations).toBeLessThan(100);
  });

  it('ends at a jump, and has no answer where the function has none', () => {
    expect(from((x) => (x < 0.6 ? -1 : 2), 0, 1).x).toBeCloseTo(0.6, 14);
    expect(bracketedRoot((x) => (x > 0.4 && x < 0.6 ? null : x - 0.5), { x: 0, value: -0.5 }, { x: 1, value: 0.5 })).toBeNull();
  });
});

describe('derivative', () => {
  it.each<[string, (x: number) => number, number, number]>([
    ['exp', Math.exp, 1, Math.E],
    ['log', Math.log, 1e-6, 1e6],
    ['a power', (x) => x ** 7, 2, 448],
    ['a constant', () => 4, 3, 0],
  ])('of %s is right to 1e-10', (_, f, x, slope) => {
    expect(Math.abs(derivative(f, x, 0.03 * x)! - slope)).toBeLessThanOrEqual(1e-10 * Math.max(slope, 1));
  });

  it('is null beside the end of the function', () => {
    expect(derivative((x) => (x < 1 ? x : null), 0.99, 0.03)).toBeNull();
  });
});

describe('searchFor', () => {
  it('finds every root of a function that turns, in order', () => {
    const { roots } = searchFor(0.5, Math.sin, grid)!;
    expect(roots.map(({ x }) => x)).toEqual([-7, 1, 5].map((sixths) => expect.closeTo((sixths * Math.PI) / 6, 12)));
  });

  it('finds the two roots beside a peak that no sample reaches', () => {
    const f = (x: number) => 1 - (x - 0.51) ** 2;
    const roots = searchFor(0.99999, f, grid)!.roots.map(({ x }) => x);
    expect(roots).toEqual([expect.closeTo(0.51 - Math.sqrt(1e-5), 10), expect.closeTo(0.51 + Math.sqrt(1e-5), 10)]);
    expect(searchFor(1.1, f, grid)!.greatest.value).toBeCloseTo(1, 14);
    expect(searchFor(1, f, grid)!.roots.map(({ x }) => x)[0]).toBeCloseTo(0.51, 7);
  });

  it('follows a stretch to its end, and looks into every stretch', () => {
    const f = (x: number) => (Math.abs(x) < 1.03 ? null : x * x);
    const found = searchFor(1.0609 + 1e-6, f, grid)!;
    expect(found.roots).toHaveLength(2);
    expect(found.least.value).toBeCloseTo(1.0609, 6);
    expect([found.first, found.last]).toEqual([-4, 4]);
    expect(searchFor(1, f, grid)!.roots).toEqual([]);
    expect(searchFor(1, () => null, grid)).toBeNull();
  });

  it('counts a flat stretch at the value once', () => {
    expect(searchFor(3, () => 3, grid)!.roots).toEqual([{ x: -4, value: 3, iterations: 0 }]);
    expect(searchFor(3, (x) => Math.max(x, 3), grid)!.roots).toHaveLength(1);
  });

  it('takes an end that misses by rounding alone', () => {
    expect(searchFor(16 * (1 + 1e-15), (x) => x * x * (x < 0 ? 0.1 : 1), grid)!.roots).toEqual([{ x: 4, value: 16, iterations: 0 }]);
  });
});

describe('pointsBetween', () => {
  it.each([[1e-6, 10], [0, 2], [-3, 5], [-2, 0], [-5, -1e-3]])('runs from %f to %f, rising', (least, greatest) => {
    const points = pointsBetween(least, greatest);
    expect(points.length).toBeGreaterThanOrEqual(129);
    expect([points[0], points[points.length - 1]]).toEqual([least, greatest]);
    for (let index = 1; index < points.length; index++) expect(points[index]).toBeGreaterThan(points[index - 1]);
  });
});
