/** Complete elliptic integrals of the first kind, as the ratio that capacitances are made of. */

/** Below exp of this a modulus is so small that its square is lost beside 1. */
const smallLogarithm = -20;
/** The mean doubles its digits each round; from moduli of exp(-20) it takes six. */
const mostRounds = 12;

/**
 * K(k)/K(k') = M(1, k)/M(1, k'), M the arithmetic-geometric mean.
 * Source: Abramowitz and Stegun, 17.6 (from memory); Gauss. Symbols: the natural logarithms of k and of k' = sqrt(1 - k^2), both at most 0 and each
 * given by itself, since neither follows from the other without cancellation. Range: any, also moduli that underflow: there
 * K(k) = pi/2 and K(k') = ln(4/k). Accuracy: a few units of rounding. Throws nothing. The trap: k' from 1 - k^2.
 */
export function quarterPeriodRatio(logModulus: number, logComplement: number): number {
  if (logModulus < smallLogarithm) return Math.PI / (2 * (Math.log(4) - logModulus));
  if (logComplement < smallLogarithm) return (2 * (Math.log(4) - logComplement)) / Math.PI;
  return arithmeticGeometricMean(Math.exp(logModulus)) / arithmeticGeometricMean(Math.exp(logComplement));
}

/** M(1, b) for b above 0. */
function arithmeticGeometricMean(b: number): number {
  let [arithmetic, geometric] = [1, b];
  for (let round = 0; round < mostRounds && Math.abs(arithmetic - geometric) > 1e-8 * arithmetic; round++) {
    [arithmetic, geometric] = [0.5 * (arithmetic + geometric), Math.sqrt(arithmetic * geometric)];
  }
  return 0.5 * (arithmetic + geometric);
}

/** ln tanh x, x > 0. */
export function logTanh(x: number): number {
  return x > 1 ? Math.log1p(-2 / (Math.exp(2 * x) + 1)) : Math.log(Math.tanh(x));
}

/** ln sech x, x >= 0, without overflow. */
export function logSech(x: number): number {
  return Math.LN2 - x - Math.log1p(Math.exp(-2 * x));
}
