/**
 * The Bessel functions of diffusion, in the ratios that impedances are made of, against 17 digits of an arbitrary-precision library: each part, and its
 * derivative to X, on both sides of every seam between series.
 */
import { describe, expect, it } from 'vitest';
import { coaxialTe11 } from '@/lib/solvers/numeric/coaxial-mode';
import { alongSweep } from '@/lib/solvers/numeric/long-sweep';
import { sheet } from '@/lib/solvers/numeric/plane-conductor';
import { besselSteps, solidWire, wholeSpace, type Diffused } from '@/lib/solvers/numeric/round-conductor';
import { tubeWall } from '@/lib/solvers/numeric/round-tube';
import { excessOfPair, wirePair } from '@/lib/solvers/numeric/wire-pair';

type Four = readonly [re: number, im: number, reSlope: number, imSlope: number];

/** Each part to its own digits; the derivatives to those of the value, over X. */
function expectDiffused(got: Diffused, [re, im, reSlope, imSlope]: Four, X: number): void {
  expect(Math.abs(got.re / re - 1)).toBeLessThanOrEqual(1e-14);
  expect(Math.abs(got.im / im - 1)).toBeLessThanOrEqual(1e-14);
  const size = Math.hypot(re, im);
  // A derivative is the difference of terms of the size of |z| times the value.
  const rounding = (1e-15 * size * (1 + Math.sqrt(X))) / X;
  expect(Math.abs(got.reSlope - reSlope)).toBeLessThanOrEqual(rounding);
  expect(Math.abs(got.imSlope - imSlope)).toBeLessThanOrEqual(rounding);
}

describe('the impedance of a solid wire', () => {
  it.each<[number, Four]>([
    [1e-12, [1.0, 1.25e-13, 1.0416666666666653e-14, 0.125]],
    [0.001, [1.0000000052083333, 0.00012499999967447917, 1.0416666579861112e-05, 0.12499999902343752]],
    [4, [1.0781587461306228, 0.4805675596738884, 0.03666941092089561, 0.1110778311339457]],
    [25, [2.042725062456288, 1.7374003746597377, 0.03554237774148154, 0.03557351187931821]],
    [899, [10.855122393751746, 10.596070658886124, 0.005893385560098458, 0.005898534892975479]],
    [901, [10.866902622068142, 10.60786116846392, 0.005886846386194647, 0.005891978331002336]],
    [1000000, [353.8035231756208, 353.5532578230783, 0.000176776629005638, 0.00017677676177565863]],
  ])('is (z/2) I0/I1 at X = %d', (X, expected) => expectDiffused(solidWire(X), expected, X));
});

describe('the impedance of a hole in a whole space', () => {
  it.each<[number, Four]>([
    [1e-12, [7.853981632934985e-13, 1.3931442073634021e-11, 0.7853981631967644, 13.431442073644963]],
    [0.001, [0.0007772898382599913, 0.0035729892075217506, 0.771208802067789, 3.07576645572497]],
    [3.99, [1.028329534238927, 1.3402836042779926, 0.16513290220169116, 0.1813375485747496]],
    [4.01, [1.0316285297467762, 1.3439057452176724, 0.16476706120348888, 0.18087712051741286]],
    [25, [3.086773116149353, 3.4949303241924157, 0.0697435306384278, 0.07131949166898828]],
    [899, [20.710246875280422, 21.192975564130737, 0.011786766475962588, 0.011796141845454652]],
    [901, [20.733807322655647, 21.216554731524734, 0.011773688159009773, 0.011783032836333675]],
    [1000000, [706.6070463512433, 707.1065163961565, 0.00035355325801127266, 0.00035355352280131726]],
  ])('is z K0/K1 at X = %d', (X, expected) => expectDiffused(wholeSpace(X), expected, X));
});

describe('the impedance of a flat sheet', () => {
  it.each<[number, Four]>([
    [1e-12, [1.0, 3.3333333333333334e-13, 4.444444444444443e-14, 0.3333333333333333]],
    [1, [1.0220127244259882, 0.3312380919845213, 0.04361069455945177, 0.327089501169494]],
    [728, [19.078784028338912, 19.078784028338912, 0.013103560459023956, 0.01310356045902393]],
    [730, [19.104973174542803, 19.104973174542803, 0.01308559806475532, 0.013085598064755299]],
    [1000000, [707.1067811865476, 707.1067811865476, 0.00035355339059327376, 0.00035355339059327376]],
  ])('is x coth x at Y = %d', (Y, expected) => expectDiffused(sheet(Y), expected, Y));
});

describe('the impedance of a tube', () => {
  it.each<[number, number, Four]>([
    [1e-12, 1e-06, [999999.5000002501, 3.3333333333329997e-19, 4.444444444443491e-32, 3.333333333333e-07]],
    [1, 0.001, [999.5002498750847, 0.0003333333000249836, 4.4444434928565986e-11, 0.00033333330002497936]],
    [25, 0.1, [9.537662760168406, 0.8322295294237988, 0.0011076006652500873, 0.03326283218178956]],
    [25, 2, [3.0867781175243794, 3.4949258216104115, 0.06974094516504938, 0.07131924990959053]],
    [0.001, 1000, [0.0007772898382599913, 0.0035729892075217506, 0.771208802067789, 3.07576645572497]],
    [1000000, 0.02, [706.6070463505001, 707.106516395428, 0.0003535532580111077, 0.00035355352282176586]],
    [1000000, 0.0269, [706.6070463512433, 707.1065163961566, 0.0003535532580112721, 0.00035355352280131574]],
    [1000000, 0.0271, [706.6070463512433, 707.1065163961565, 0.00035355325801127196, 0.0003535535228013163]],
  ])('is that of I and K at X = %d and a wall of %d', (X, wall, expected) => expectDiffused(tubeWall(X, wall), expected, X));
});

describe('z I(n + 1)/I(n)', () => {
  it.each<[number, number, Four]>([
    [1e-12, 1, [1.0416666666666666e-26, 2.5e-13, 2.0833333333333334e-14, 0.25]],
    [25, 5, [0.2881615044324916, 2.0094094411944305, 0.021461484107991997, 0.07495673385729634]],
    [899, 30, [2.711602174193593, 13.385588714315796, 0.005075121482820584, 0.012943211468215986]],
    [10000, 9, [61.49673584600678, 70.4216815356584, 0.003521173268401662, 0.003550131894907699]],
    [10000, 11, [59.638883602957854, 70.27895638695098, 0.003513991708336508, 0.003557298004481786]],
    [100000000.0, 160, [6911.472957643396, 7070.162653944534, 3.535081275097968e-05, 3.5359864909662734e-05]],
    [1000000, 40, [667.1726046774716, 706.5406098096453, 0.0003532702519330132, 0.0003538366505040528]],
  ])('at X = %d, n = %d', (X, n, [re, im]) => {
    const steps = besselSteps(X, n);
    expect(Math.abs(steps.re[n] / re - 1)).toBeLessThanOrEqual(1e-14);
    expect(Math.abs(steps.im[n] / im - 1)).toBeLessThanOrEqual(1e-14);
  });
});

describe('TE11 between two cylinders', () => {
  it.each([
    [1e-10, 1.00000000005],
    [0.001, 1.0005002918542805],
    [0.2, 1.1133663363219515],
    [0.5, 1.354672010273168],
    [0.7, 1.5820647355584174],
    [0.9, 1.8034700848053937],
    [0.99, 1.8407980375389896],
    [0.999999, 1.8411837813368026],
  ])('with a gap of %d of the outer radius', (gap, expected) => expect(Math.abs(coaxialTe11(gap) / expected - 1)).toBeLessThanOrEqual(1e-14));
});

describe('a long sweep', () => {
  it.each([1, 1e-3, 1e3])('of two wires is the same as its single points, mu = %d', (mu) => {
    for (const ratio of [1.05, 1.5, 20]) {
      const arcosh = Math.acosh(ratio);
      const pair = wirePair(0.5 / ratio, arcosh, mu, Math.ceil(18.5 / arcosh) + 6);
      const X = Float64Array.from({ length: 900 }, (_, index) => (index === 0 ? 0 : 10 ** (-4 + index / 50)));
      let calls = 0;
      const swept = alongSweep(X, (1e3 * pair.harmonics * (1 + mu)) ** 2, (each) => {
        calls++;
        return excessOfPair(pair, each);
      });
      expect(calls).toBeLessThan(600);
      for (let index = 0; index < X.length; index += 7) {
        const single = excessOfPair(pair, X[index]);
        const size = Math.hypot(single.re, single.im);
        expect(Math.hypot(swept[index].re - single.re, swept[index].im - single.im) / size).toBeLessThanOrEqual(1e-14);
        const steepness = Math.hypot(single.reSlope, single.imSlope);
        // The derivative's own rounding is that of its terms, |z| times as large.
        expect(Math.hypot(swept[index].reSlope - single.reSlope, swept[index].imSlope - single.imSlope) / steepness).toBeLessThanOrEqual(1e-13 + 2e-15 * (1 + mu) * Math.sqrt(X[index]));
      }
    }
  });
});
