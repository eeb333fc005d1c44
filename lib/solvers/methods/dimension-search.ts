/**
 * The dimension of a geometry at which the real part of its characteristic impedance has a wanted value.
 *
 *   Re Zc(x) = Z,   S = d Re Zc / dx
 *
 * x the dimension, m; Z the wanted impedance, ohm; S ohm/m.
 */
import type { Method } from '../calculation';
import { derivative } from '../numeric/derivative';
import type { PartialFunction } from '../numeric/search';

export const dimensionSearch: Method = {
  id: 'dimension-search',
  title: 'Bracketed search for a dimension',
  source:
    'Chandrupatla, A new hybrid quadratic/bisection algorithm for finding the zero of a nonlinear function without using derivatives, Advances in Engineering Software 28 (1997) 145-149; Ridders, Accurate computation of F’(x) and F’(x) F’’(x), Advances in Engineering Software 4 (1982) 75-76 (both from memory)',
  formulas: [String.raw`\operatorname{Re} Z_c(x) = Z`, String.raw`S = \frac{d\,\operatorname{Re} Z_c}{dx} = \lim_{h \to 0} \frac{\operatorname{Re} Z_c(x+h) - \operatorname{Re} Z_c(x-h)}{2h}`],
  symbols: [
    { symbol: 'x', meaning: 'sought dimension', unit: 'm' },
    { symbol: 'Z', meaning: 'wanted impedance', unit: 'ohm' },
    { symbol: 'Z_c', meaning: 'characteristic impedance at the frequency, by the methods of the geometry', unit: 'ohm' },
    { symbol: 'S', meaning: 'sensitivity', unit: 'ohm/m' },
  ],
  range: 'any dimension of a geometry; several solutions are told apart where the impedance turns between two of the 129 or more points that are looked at',
  accuracy: 'the dimension to neighbouring float64 numbers; the sensitivity to about 1e-9 of itself; the impedance is as accurate as the methods of the geometry',
};

const cells = 128;
/** Where a range begins at 0: thirteen decades below its end, as from a kilometre to a tenth of a nanometre. */
const smallestShare = 1e-13;

/** Points from `least` to `greatest`, both included, in equal ratios, as a dimension spans decades; on both sides of 0 where it may be negative. */
export function pointsBetween(least: number, greatest: number): Float64Array {
  if (least > 0) return logarithmic(least, greatest);
  const above = greatest > 0 ? [...logarithmic(greatest * smallestShare, greatest)] : [];
  const below = least < 0 ? [...logarithmic(-least * smallestShare, -least)].map((each) => -each).reverse() : [];
  if (greatest < 0) return logarithmic(-greatest, -least).map((each) => -each).reverse();
  return Float64Array.from([...below, 0, ...above]);
}

function logarithmic(least: number, greatest: number): Float64Array {
  const span = Math.log(greatest / least);
  return Float64Array.from({ length: cells + 1 }, (_, index) => (index === cells ? greatest : least * Math.exp((index / cells) * span)));
}

const firstStep = 0.03;
const mostShrinkings = 40;

/**
 * S at x. Source: Ridders 1982. Symbols: x m. Range: where the impedance is smooth. Accuracy: about 1e-9 of S; 1e-5 at an end of what is
 * possible, where only one side can be looked at. Throws nothing; null where neither side can.
 * The trap: beside an end (conductors that nearly touch) the first step must not reach beyond it.
 */
export function sensitivityAt(impedance: PartialFunction, x: number, greatest: number): number | null {
  let step = firstStep * (Math.abs(x) || greatest * smallestShare);
  for (let shrinking = 0; shrinking < mostShrinkings; shrinking++, step /= 2) {
    if (x + step === x) break;
    // Half the way to the end, since an impedance may leave it like a square root.
    if (impedance.isDefined(x + 2 * step) && impedance.isDefined(x - 2 * step)) return derivative((each) => impedance.valueAt(each), x, step);
  }
  return oneSided(impedance, x, firstStep * 1e-3 * (Math.abs(x) || greatest * smallestShare));
}

/** (-3 f(x) + 4 f(x + h) - f(x + 2h)) / 2h, to whichever side has values. */
function oneSided(f: PartialFunction, x: number, size: number): number | null {
  const here = f.valueAt(x);
  for (const h of [size, -size]) {
    const [near, far] = [f.valueAt(x + h), f.valueAt(x + 2 * h)];
    if (here !== null && near !== null && far !== null) return (4 * near - far - 3 * here) / (2 * h);
  }
  return null;
}
