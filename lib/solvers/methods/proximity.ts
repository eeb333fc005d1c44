/**
 * Crowding of the current in two parallel round wires that carry it there and back.
 *
 * Outside, the vector potential of wire 1 is -ln r + sum b(n) (a/r)^n cos n theta, in units of mu0 I/2 pi; wire 2 is its mirror image with the sign
 * reversed. Around wire 1 the other's field has the harmonics
 *   c(k) = -(a/s)^k/k - sum over n of b(n) binomial(n + k - 1, k) (a/s)^(n + k),
 * and the wire answers with b(n) = chi(n) c(n),
 *   chi(n) = (n (mu_r - 1) - tau(n)) / (n (mu_r + 1) + tau(n)),  tau(n) = z I(n+1)(z)/I(n)(z),  z^2 = j omega mu a^2/rho.
 * The pair then has, beside its isolated wires and (mu0/pi) ln(s/a), the impedance -j omega (mu0/pi) sum b(n) (a/s)^n.
 */
import type { Method } from '../calculation';
import { vacuumPermeabilityHPerM } from '../constants';
import type { ConductorProperties } from '../nouns/conductor';
import { factorize, solveFactorized, type ComplexMatrix, type ComplexVector } from '../numeric/complex-matrix';
import { besselSteps } from '../numeric/round-conductor';
import type { SeriesPart } from './internal-impedance';

export const proximityEffect: Method = {
  id: 'proximity-effect',
  title: 'Proximity effect of two round wires',
  source: 'Carson, Wave propagation over parallel wires: the proximity effect, Philosophical Magazine 41 (1921) 607-633 (from memory; derived anew from the harmonics of the vector potential, and checked by matching the fields at points)',
  formulas: [
    String.raw`b_n = \chi_n c_n, \qquad \chi_n = \frac{n(\mu_r - 1) - \tau_n}{n(\mu_r + 1) + \tau_n}, \qquad \tau_n = \frac{z I_{n+1}(z)}{I_n(z)}, \qquad z^2 = \frac{j\omega\mu a^2}{\rho}`,
    String.raw`c_k = -\frac{1}{k}\Big(\frac{a}{s}\Big)^{k} - \sum_n b_n \binom{n+k-1}{k}\Big(\frac{a}{s}\Big)^{n+k}`,
    String.raw`Z = 2 Z_{\text{wire}} + j\omega\frac{\mu_0}{\pi}\Big(\ln\frac{s}{a} - \sum_n b_n\Big(\frac{a}{s}\Big)^{n}\Big)`,
  ],
  symbols: [
    { symbol: 'a', meaning: 'radius of each wire', unit: 'm' },
    { symbol: 's', meaning: 'distance between the axes', unit: 'm' },
    { symbol: 'b_n', meaning: 'harmonics of the field that a wire sends out' },
    { symbol: 'c_n', meaning: 'harmonics of the field that reaches it from the other' },
    { symbol: String.raw`\mu_r`, meaning: 'relative permeability of the wires' },
  ],
  range: 'equal wires; spacing/diameter of 1.007 or more',
  accuracy: 'exact in the quasi-static field; 1e-11 relative in float64',
};

const mostHarmonics = 160;

/** How many harmonics bring the rest below rounding; their images shrink by exp(-2 arcosh(s/d)) each. */
export function harmonicsFor(arcosh: number): { readonly harmonics: number; readonly isEnough: boolean } {
  const wanted = Math.ceil(18.5 / arcosh) + 6;
  return { harmonics: Math.min(mostHarmonics, wanted), isEnough: wanted <= mostHarmonics };
}

/**
 * What the crowding adds to two isolated wires and to the inductance (mu0/pi) arcosh(s/d) of the field outside perfect ones.
 * Source: Carson 1921. Symbols: diameter and spacing m, omega rad/s. Range: spacing > diameter. Accuracy: 1e-11 of R and L. Throws nothing.
 */
export function crowdedPair(diameterM: number, spacingM: number, { resistivityOhmM: rho, relativePermeability: mu }: ConductorProperties, omega: Float64Array, harmonics: number): SeriesPart {
  const a = 0.5 * diameterM;
  const ratio = a / spacingM;
  const perOmega = (vacuumPermeabilityHPerM * mu * a * a) / rho;
  const x = spacingM / diameterM;
  // ln(s/a) - arcosh(s/d) = ln(2 x / (x + sqrt(x^2 - 1))).
  const beyondPerfect = Math.log((2 * x) / (x + Math.sqrt((x - 1) * (x + 1))));
  const coupling = couplingOf(ratio, harmonics);
  const perTurn = vacuumPermeabilityHPerM / Math.PI;
  const columns = { resistance: new Float64Array(omega.length), inductance: new Float64Array(omega.length), resistanceSlope: new Float64Array(omega.length), inductanceSlope: new Float64Array(omega.length) };
  for (let index = 0; index < omega.length; index++) {
    const { sum, slope } = answerOf(omega[index] * perOmega, mu, ratio, coupling, harmonics);
    columns.resistance[index] = omega[index] * perTurn * sum.im;
    columns.inductance[index] = perTurn * (beyondPerfect - sum.re);
    columns.resistanceSlope[index] = perTurn * (sum.im + omega[index] * perOmega * slope.im);
    columns.inductanceSlope[index] = -perTurn * perOmega * slope.re;
  }
  return columns;
}

interface Part {
  readonly re: number;
  readonly im: number;
}

/** binomial(n + k - 1, k) ratio^(n + k) in row k - 1, column n - 1. */
function couplingOf(ratio: number, harmonics: number): Float64Array {
  const result = new Float64Array(harmonics * harmonics);
  for (let n = 1; n <= harmonics; n++) {
    let entry = ratio ** n;
    for (let k = 1; k <= harmonics; k++) {
      entry *= (ratio * (n + k - 1)) / k;
      result[(k - 1) * harmonics + n - 1] = entry;
    }
  }
  return result;
}

/** The sum of b(n) ratio^n, and its derivative to X. */
function answerOf(X: number, mu: number, ratio: number, coupling: Float64Array, N: number): { readonly sum: Part; readonly slope: Part } {
  const tau = besselSteps(X, N);
  const chi: ComplexVector = { re: new Float64Array(N), im: new Float64Array(N) };
  const chiSlope: ComplexVector = { re: new Float64Array(N), im: new Float64Array(N) };
  for (let n = 1; n <= N; n++) fillAnswer(chi, chiSlope, n, mu, X, tau.re[n], tau.im[n]);

  // (1 + chi M) b = chi c0.
  const matrix: ComplexMatrix = { size: N, re: new Float64Array(N * N), im: new Float64Array(N * N) };
  const b: ComplexVector = { re: new Float64Array(N), im: new Float64Array(N) };
  for (let k = 0; k < N; k++) {
    const c0 = -(ratio ** (k + 1)) / (k + 1);
    for (let n = 0; n < N; n++) {
      matrix.re[k * N + n] = chi.re[k] * coupling[k * N + n] + (k === n ? 1 : 0);
      matrix.im[k * N + n] = chi.im[k] * coupling[k * N + n];
    }
    b.re[k] = chi.re[k] * c0;
    b.im[k] = chi.im[k] * c0;
  }
  const factors = factorize(matrix);
  solveFactorized(factors, b);

  // The derivative: (1 + chi M) b' = chi' c.
  const change: ComplexVector = { re: new Float64Array(N), im: new Float64Array(N) };
  for (let k = 0; k < N; k++) {
    let re = -(ratio ** (k + 1)) / (k + 1);
    let im = 0;
    for (let n = 0; n < N; n++) {
      re -= coupling[k * N + n] * b.re[n];
      im -= coupling[k * N + n] * b.im[n];
    }
    change.re[k] = chiSlope.re[k] * re - chiSlope.im[k] * im;
    change.im[k] = chiSlope.re[k] * im + chiSlope.im[k] * re;
  }
  solveFactorized(factors, change);
  return { sum: weighted(b, ratio), slope: weighted(change, ratio) };
}

/** chi(n) and d chi/dX = -2 n mu tau'/(n (mu + 1) + tau)^2, with X tau' = (j X - tau^2 - 2 n tau)/2. */
function fillAnswer(chi: ComplexVector, chiSlope: ComplexVector, n: number, mu: number, X: number, tRe: number, tIm: number): void {
  const [dRe, dIm] = [n * (mu + 1) + tRe, tIm];
  const size = dRe * dRe + dIm * dIm;
  const [nRe, nIm] = [n * (mu - 1) - tRe, -tIm];
  chi.re[n - 1] = (nRe * dRe + nIm * dIm) / size;
  chi.im[n - 1] = (nIm * dRe - nRe * dIm) / size;
  // tau is j X/(2 (n + 1)) to first order.
  const [pRe, pIm] = X === 0 ? [0, 0.5 / (n + 1)] : [-(tRe * tRe - tIm * tIm + 2 * n * tRe) / (2 * X), (X - 2 * tRe * tIm - 2 * n * tIm) / (2 * X)];
  const [sRe, sIm] = [dRe * dRe - dIm * dIm, 2 * dRe * dIm];
  const factor = (-2 * n * mu) / (size * size);
  chiSlope.re[n - 1] = factor * (pRe * sRe + pIm * sIm);
  chiSlope.im[n - 1] = factor * (pIm * sRe - pRe * sIm);
}

function weighted({ re, im }: ComplexVector, ratio: number): Part {
  let [sumRe, sumIm, weight] = [0, 0, 1];
  for (let n = 0; n < re.length; n++) {
    weight *= ratio;
    sumRe += re[n] * weight;
    sumIm += im[n] * weight;
  }
  return { re: sumRe, im: sumIm };
}
