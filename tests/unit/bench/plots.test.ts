import { describe, expect, it } from 'vitest';
import { reducedIndices } from '@/app/console/bench/_plot/reduce';
import { axisScale, isLogarithmic, valueScale } from '@/app/console/bench/_plot/scales';
import { rimOf, reactanceCircle, resistanceCircle } from '@/app/console/bench/_plot/smith-grid';

const many = Array.from({ length: 20_001 }, (_, index) => index / 20_000);

describe('a long sweep is drawn with fewer points and all its extremes', () => {
  it('keeps a resonance of a single point, the ends and the gaps', () => {
    const values = many.map((x, index) => (index === 7777 ? 100 : index === 12_345 ? -50 : index === 15_000 ? null : Math.sin(x)));
    const kept = reducedIndices(many, values, 500);
    expect(kept.length).toBeLessThan(2600);
    expect(kept).toEqual(expect.arrayContaining([0, 7777, 12_345, 15_000, 20_000]));
    expect(kept).toEqual([...new Set(kept)].sort((a, b) => a - b));
  });

  it('leaves a short one as it is', () => {
    expect(reducedIndices([0, 0.5, 1], [1, null, 2], 500)).toEqual([0, 1, 2]);
  });
});

describe('scales', () => {
  it('an axis is logarithmic when its sweep is', () => {
    expect(isLogarithmic(Array.from({ length: 201 }, (_, index) => 10 ** (6 + index / 100)))).toBe(true);
    expect(isLogarithmic(Array.from({ length: 201 }, (_, index) => 1e6 * (1 + index)))).toBe(false);
    expect(isLogarithmic([0, 1, 2])).toBe(false);
    expect(axisScale([10e6, 105e6, 200e6], 'Hz')).toMatchObject({ domain: [10e6, 200e6], unit: 'MHz', divisor: 1e6, logarithmic: false });
  });

  it('poles are cut off and said to be', () => {
    const reactance = many.map((x) => 50 * Math.tan(10 * x));
    const scale = valueScale([reactance], 'ohm', false);
    expect(scale.clipped).toBe(true);
    expect(scale.domain[1]).toBeLessThan(5000);
    expect(valueScale([many], 'ohm', false).clipped).toBe(false);
  });

  it('rounding around zero is drawn as zero', () => {
    const noise = many.map((_, index) => (index % 2 ? 1e-15 : -2e-15));
    expect(valueScale([noise], 'dB', false).domain).toEqual([-1, 1]);
    expect(valueScale([noise.map((each) => 50 + each)], 'ohm', false).domain[0]).toBe(0);
  });
});

describe('the Smith chart', () => {
  const reflectionOf = (r: number, x: number) => {
    const size = (r + 1) ** 2 + x * x;
    return { re: (r * r + x * x - 1) / size, im: (2 * x) / size };
  };
  const distance = (a: { re: number; im: number }, b: { re: number; im: number }) => Math.hypot(a.re - b.re, a.im - b.im);

  it('has each impedance where its circles of resistance and reactance cross', () => {
    for (const r of [0.2, 1, 5]) {
      for (const x of [-2, 0.5, 1]) {
        const reflection = reflectionOf(r, x);
        expect(distance(reflection, resistanceCircle(r))).toBeCloseTo(resistanceCircle(r).radius, 12);
        expect(distance(reflection, reactanceCircle(x))).toBeCloseTo(reactanceCircle(x).radius, 12);
      }
    }
    expect(distance(rimOf(2), reflectionOf(0, 2))).toBeCloseTo(0, 12);
  });
});
