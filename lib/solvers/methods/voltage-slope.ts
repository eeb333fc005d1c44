/**
 * The slope of the voltage along a terminated line, and the stretches in which it has at most one root.
 *
 *   |V(x)|^2 = P e^(2 alpha x) + Q e^(-2 alpha x) + 2 Re(A B* e^(2 j beta x)),   A, B = (v +- Zc i)/2,   P = |A|^2, Q = |B|^2
 *   -(1/2) d|V|^2/dx = 2 beta |A B*| (sin psi - r sinh u),   psi = 2 beta x + arg(A B*),  u = 2 alpha x + ln(P/Q)/2,  r = alpha/beta
 *
 * x from the termination in m, whose voltage and current are v and i. Between two roots of cos psi = r^2 cosh u, where sin psi - r sinh u turns, the
 * slope has at most one root; those are two in each period of psi at most, for r^2 cosh u is convex and cos psi concave where it is positive. So the
 * brackets are known beforehand, and no extremum is missed or found twice. Maxima and minima alternate.
 * Source: the telegrapher equations (Pozar, Microwave Engineering, 4th ed., section 2.1, from memory); the rest is elementary.
 */
import { magnitude, type ComplexParts } from '../numeric/phasor';
import { bracketedRoot } from '../numeric/roots';

/** A line and what closes it, at one frequency. */
export interface TerminatedLine {
  readonly alpha: number;
  readonly beta: number;
  /** R + j w L, ohm/m. */
  readonly series: ComplexParts;
  /** null where it is infinite. */
  readonly characteristicImpedance: ComplexParts | null;
  readonly v: ComplexParts;
  readonly i: ComplexParts;
}

interface Slope {
  readonly value: number;
  /** The sum of its terms' magnitudes: what a vanishing slope is measured against. */
  readonly scale: number;
}

/** A stretch in which the slope has at most one root. */
interface Piece {
  readonly from: number;
  readonly to: number;
  /** Whether sin psi - r sinh u goes from below 0 to above. */
  readonly rises: boolean;
}

interface Turn {
  readonly x: number;
  /** Whether sin psi - r sinh u rises beyond it. */
  readonly rises: boolean;
}

const vanishing = 8 * Number.EPSILON;
/** Of a sum of two waves that cancel to less than this part, two digits are lost. */
const smallPart = 0.01;

export class VoltageSlope {
  private readonly alpha: number;
  private readonly beta: number;
  /** alpha and beta over the larger of them. */
  private readonly a: number;
  private readonly b: number;
  /** Zc i v*, and Re(Z i v*): all over the square of the larger of |v| and |Zc i|. */
  private readonly product: ComplexParts;
  private readonly start: number;
  /** |v|^2 + |Zc i|^2 and |v|^2 - |Zc i|^2. */
  private readonly sum: number;
  private readonly difference: number;
  /** |A B*|, of which the reflection is the ratio to P. */
  private readonly both: number;
  /** The larger of |v| and |Zc i|. */
  private readonly unit: number;
  private readonly r: number;
  private readonly phase: number;
  private readonly offset: number;

  constructor({ alpha, beta, series, v, i }: TerminatedLine, zc: ComplexParts) {
    this.alpha = alpha;
    this.beta = beta;
    const fastest = Math.max(alpha, beta);
    this.a = alpha / fastest;
    this.b = beta / fastest;
    const u = { re: zc.re * i.re - zc.im * i.im, im: zc.re * i.im + zc.im * i.re };
    const sizeV = magnitude(v.re, v.im);
    const sizeU = magnitude(u.re, u.im);
    const unit = Math.max(sizeV, sizeU);
    this.unit = unit;
    const [vr, vi, ur, ui] = [v.re / unit, v.im / unit, u.re / unit, u.im / unit];
    this.product = { re: ur * vr + ui * vi, im: ui * vr - ur * vi };
    const [ir, ii] = [i.re / unit, i.im / unit];
    const [zr, zi] = [series.re / fastest, series.im / fastest];
    this.start = (zr * ir - zi * ii) * vr + (zr * ii + zi * ir) * vi;
    this.sum = (sizeV / unit) ** 2 + (sizeU / unit) ** 2;
    this.difference = ((sizeV - sizeU) / unit) * ((sizeV + sizeU) / unit);
    this.both = magnitude(this.difference / 4, this.product.im / 2);
    this.r = alpha / beta;
    this.phase = Math.atan2(this.product.im / 2, this.difference / 4);
    this.offset = Math.asinh(this.product.re / (2 * this.both));
  }

  /** Whether there are a forward and a backward wave, beyond rounding, and the voltage changes along the line at all. */
  private get isStanding(): boolean {
    return Math.max(this.alpha, this.beta) > 0 && this.both > (vanishing / 2) * this.sum;
  }

  /** The stretches between two places, in which the slope has at most one root each. */
  pieces(from: number, to: number, mostPeriods: number): { pieces: Piece[]; isCut: boolean } {
    if (!this.isStanding) return { pieces: [], isCut: false };
    const { turns, isCut } = this.turns(from, to, mostPeriods);
    const end = isCut ? turns[turns.length - 1].x : to;
    const inside = turns.filter(({ x }) => x > from && x < end);
    const bounds = [{ x: from, rises: turns.findLast(({ x }) => x <= from)?.rises ?? false }, ...inside];
    return { pieces: bounds.map(({ x, rises }, index) => ({ from: x, to: bounds[index + 1]?.x ?? end, rises })), isCut };
  }

  /** |V|^2 at x over its greatest possible growth, exp(2 alpha l), and in units of its own: to compare places by. */
  level(x: number, lengthM: number): number {
    const { product, sum, difference } = this;
    const decay = Math.exp(-2 * this.alpha * x);
    const turn = 2 * this.beta * x;
    const waves = 0.25 * sum * (1 + decay * decay) + 0.5 * product.re * (1 - decay * decay);
    return (waves + decay * (0.5 * difference * Math.cos(turn) - product.im * Math.sin(turn))) * Math.exp(-2 * this.alpha * (lengthM - x));
  }

  /** -(1/2) d|V|^2/dx exp(-2 alpha x), over the larger of alpha and beta. */
  private slope(x: number): Slope {
    const { a, b, product, sum, difference } = this;
    const loss = 2 * this.alpha * x;
    const turn = 2 * this.beta * x;
    const decay = Math.exp(-loss);
    const halfSine = Math.sin(0.5 * turn);
    const terms = [
      -this.start * decay,
      -2 * b * product.im * halfSine * halfSine * decay,
      -0.5 * a * product.re * Math.expm1(-loss) ** 2,
      0.5 * b * difference * Math.sin(turn) * decay,
      0.25 * a * sum * Math.expm1(-2 * loss),
    ];
    let value = 0;
    let scale = Math.abs(turn) * b * decay * this.both;
    for (const term of terms) {
      value += term;
      scale += Math.abs(term);
    }
    return { value, scale };
  }

  /**
   * |V| at a minimum x, and |Zc I| at a maximum, over exp(alpha x); null where it is no small part of the waves, and V and I as sums of them are as good.
   * With sin psi = r sinh u, what stands on the one side is (|A| e^(alpha x) - |B| e^(-alpha x))^2 + 2 |A B*| (1 - |cos psi|), and neither term cancels.
   */
  vanishingAt(x: number, isMaximum: boolean): number | null {
    const { r, sum, product, both, unit } = this;
    const loss = 2 * this.alpha * x;
    const decay = Math.exp(-loss);
    // On a line of much loss the voltage may be least where the waves add.
    const isOpposed = Math.cos(2 * this.beta * x + this.phase) < 0;
    if (isOpposed === isMaximum) return null;
    const powers = 0.5 * product.re * (1 + decay * decay) - 0.25 * sum * Math.expm1(-2 * loss);
    const amplitudes = Math.sqrt(Math.max(0, 0.5 * (0.5 * sum + product.re))) + decay * Math.sqrt(Math.max(0, 0.5 * (0.5 * sum - product.re)));
    const sine = (r * powers) / (2 * both * decay);
    const square = (powers / amplitudes) ** 2 + (2 * both * decay * sine * sine) / (1 + Math.sqrt(1 - sine * sine));
    return Math.sqrt(square) < smallPart * amplitudes ? unit * Math.sqrt(square) : null;
  }

  /** The root of the slope between two neighbouring turns. At an end of the line, a slope that is only rounding is one. */
  zeroOf({ from, to, rises }: Piece, lengthM: number): number | null {
    const first = this.slope(from);
    if (from === 0 && Math.abs(first.value) <= vanishing * first.scale) return from;
    const last = this.slope(to);
    if (to === lengthM && Math.abs(last.value) <= vanishing * last.scale) return to;
    const sign = rises ? 1 : -1;
    if (!(sign * first.value < 0 && sign * last.value >= 0)) return null;
    return bracketedRoot((x) => this.slope(x).value, { x: from, value: first.value }, { x: to, value: last.value })?.x ?? null;
  }

  /** Brackets of the maxima, which is where sin psi - r sinh u turns or beyond: all between the two places, and those of a period before; ascending. */
  private turns(from: number, to: number, mostPeriods: number): { turns: Turn[]; isCut: boolean } {
    const { alpha, beta, r, phase, offset } = this;
    if (!(r < 1)) return { turns: [], isCut: false };
    // Beyond, r^2 cosh u is more than 1 and nothing turns.
    const most = Math.acosh(1 / (r * r));
    const first = Math.max(from, (-most - offset) / (2 * alpha));
    const last = Math.min(to, (most - offset) / (2 * alpha));
    const turns: Turn[] = [];
    if (!(first <= last)) return { turns, isCut: false };
    const start = Math.floor((phase + 2 * beta * first + Math.PI / 2) / (2 * Math.PI)) - 1;
    const at = (period: number, angle: number) => (2 * Math.PI * period + angle - phase) / (2 * beta);
    for (let step = 0; ; step++) {
      const period = start + step;
      if (!(at(period, -Math.PI / 2) <= last)) return { turns, isCut: false };
      if (step > mostPeriods) return { turns, isCut: turns.length > 0 };
      const pair = bracketsInPeriod(r, r * (2 * Math.PI * period - phase) + offset);
      if (pair) turns.push({ x: at(period, pair[0]), rises: true }, { x: at(period, pair[1]), rises: false });
    }
  }
}

/** Where |r sinh u| is below this at both ends of the half period around a maximum, they are as good a bracket as the turns between them. */
const farFromTurns = 0.9;

/** Brackets of the maximum with psi = 2 pi n + t, |t| <= pi/2; null where there is none. */
function bracketsInPeriod(r: number, u: number): [number, number] | null {
  const quarter = Math.PI / 2;
  const isFar = Math.abs(r * Math.sinh(u - r * quarter)) < farFromTurns && Math.abs(r * Math.sinh(u + r * quarter)) < farFromTurns;
  return isFar ? [-quarter, quarter] : turnsInPeriod(r, u);
}

/** The two roots of cos t = r^2 cosh(u + r t) for |t| <= pi/2, on both sides of where the difference is greatest; null where it is nowhere positive. */
function turnsInPeriod(r: number, u: number): [number, number] | null {
  const quarter = Math.PI / 2;
  const difference = (t: number) => Math.cos(t) - r * r * Math.cosh(u + r * t);
  const its = (t: number) => -Math.sin(t) - r * r * r * Math.sinh(u + r * t);
  const root = (f: (t: number) => number, from: number, to: number) => bracketedRoot(f, { x: from, value: f(from) }, { x: to, value: f(to) })?.x ?? from;
  if (!(its(-quarter) > 0 && its(quarter) < 0)) return null;
  const top = root(its, -quarter, quarter);
  if (!(difference(top) > vanishing)) return null;
  return [difference(-quarter) >= 0 ? -quarter : root(difference, -quarter, top), difference(quarter) >= 0 ? quarter : root(difference, top, quarter)];
}
