/**
 * Capacitance of a rectangular strip between two parallel planes, anywhere between them, by a Schwarz-Christoffel map.
 *
 *                                        p4 ------------------------- upper plane
 *   The right half of the cross-section   |  g2
 *   is the image of a half plane: the    p3 -------- c2
 *   real axis runs from p1 up to p4          strip   |  t
 *   along the wall of symmetry, round    p2 -------- c1
 *   the strip and up the wall again.      |  g1
 *                                        p1 ------------------------- lower plane
 *
 *   dz/du = (b/pi) sqrt((u - c1)(u - c2)) / sqrt((u - p1)(u - p2)(u - p3)(u - p4))
 *
 * The five sides are integrals of it, and the capacitance is that of the four points: 2 K(k)/K(k'), k^2 = (p3-p2)(p4-p1)/((p3-p1)(p4-p2)).
 * Under a wide strip the field is uniform: a wall may stand anywhere in it, and what is cut off is a plate capacitor.
 */
import { quarterPeriodRatio } from './elliptic';

/** Lengths in any one unit, all above 0. */
export interface StripBetweenPlanes {
  readonly width: number;
  readonly thickness: number;
  readonly gapBelow: number;
  readonly gapAbove: number;
}

/** What the field is still uneven by at so many gaps from the edge is exp(-pi 6), and the capacitance changes by its square. */
const wallAfterGaps = 6;

/** Natural logarithms of p2 - p1, c1 - p2, p3 - c2, p4 - p3, where c2 - c1 is 1. */
export type Prevertices = readonly [number, number, number, number];

export interface StripCapacitance {
  /** C/eps. */
  readonly capacitance: number;
  /** Where to start from for a strip that is nearly the same. */
  readonly prevertices: Prevertices;
}

/**
 * Source: Schwarz-Christoffel formula (Churchill, Complex Variables; Nehari, Conformal Mapping, chapter 5; from memory); elliptic for a strip in the
 * middle, as Bates 1956 has it. Range: gaps from a billionth of the distance of the planes. Accuracy: 1e-12. Returns null should the side lengths not
 * be met in `mostSteps`, which no dimension in the range is known to bring about. The trap: the points crowd by exp(pi w/g); they are kept as
 * logarithms of their distances, and the wall under a wide strip bounds them.
 */
export function thickStripCapacitance(strip: StripBetweenPlanes, from?: Prevertices): StripCapacitance | null {
  const below = Math.min(0.5 * strip.width, wallAfterGaps * strip.gapBelow);
  const above = Math.min(0.5 * strip.width, wallAfterGaps * strip.gapAbove);
  const scale = Math.PI / (strip.gapBelow + strip.thickness + strip.gapAbove);
  const wanted: Wanted = [Math.log(below * scale), Math.log(above * scale), Math.log(strip.gapBelow / strip.gapAbove), Math.log(strip.thickness / (strip.gapBelow + strip.gapAbove))];
  const prevertices = solve(wanted, from);
  if (!prevertices) return null;
  const plates = (0.5 * strip.width - below) / strip.gapBelow + (0.5 * strip.width - above) / strip.gapAbove;
  return { capacitance: 2 * (halfCapacitance(prevertices) + plates), prevertices };
}

function halfCapacitance(prevertices: Prevertices): number {
  const [g1, w1, w2, g2] = prevertices.map(Math.exp);
  const middle = w1 + 1 + w2;
  const denominator = Math.log(g1 + middle) + Math.log(middle + g2);
  const logModulus = 0.5 * (Math.log(middle) + Math.log(g1 + middle + g2) - denominator);
  const logComplement = 0.5 * (prevertices[0] + prevertices[3] - denominator);
  return quarterPeriodRatio(Math.min(0, logModulus), Math.min(0, logComplement));
}

/** Logarithms of: half width below, half width above, the gaps over one another, thickness over both gaps; widths in units of b/pi. */
type Wanted = readonly [number, number, number, number];

const mostSteps = 60;
/** Longest step in the logarithm of a distance. */
const longestStep = 2;
const differenceStep = 1e-6;
const closeEnough = 1e-13;
/** A step that leaves no more than this part was made with derivatives that are good enough for the next. */
const goodStep = 0.1;

/** Newton's method with differences for derivatives: a step that is short enough always leads nearer, as every side grows with its own distance. */
function solve(wanted: Wanted, from: Prevertices = [0, 0, 0, 0]): Prevertices | null {
  let at: Prevertices = from;
  let residual = residualOf(at, wanted);
  let columns: readonly (readonly number[])[] | undefined;
  for (let step = 0; step < mostSteps; step++) {
    if (largest(residual) < closeEnough) return at;
    columns ??= at.map((_, index) => residualOf(moved(at, index, differenceStep), wanted).map((each, row) => (each - residual[row]) / differenceStep));
    const full = solveFour(columns, residual);
    const length = Math.max(1, largest(full) / longestStep);
    at = at.map((each, index) => each - full[index] / length) as unknown as Prevertices;
    const before = largest(residual);
    residual = residualOf(at, wanted);
    // Rounding of the sides ends it a little above `closeEnough`, where the dimensions are far apart.
    if (largest(full) < 1e-9 && largest(residual) >= 0.5 * before) return at;
    if (largest(residual) > goodStep * before) columns = undefined;
  }
  return null;
}

const largest = (values: readonly number[]) => values.reduce((most, each) => Math.max(most, Math.abs(each)), 0);

function moved(at: Prevertices, index: number, by: number): Prevertices {
  return at.map((each, other) => (other === index ? each + by : each)) as unknown as Prevertices;
}

function residualOf(at: Prevertices, wanted: Wanted): Wanted {
  const [g1, w1, t, w2, g2] = sides(at);
  return [Math.log(w1) - wanted[0], Math.log(w2) - wanted[1], Math.log(g1 / g2) - wanted[2], Math.log(t / (g1 + g2)) - wanted[3]];
}

/** By elimination with pivots; `columns` are those of the matrix. */
function solveFour(columns: readonly (readonly number[])[], right: readonly number[]): number[] {
  const rows = right.map((value, row) => [...columns.map((column) => column[row]), value]);
  for (let pivot = 0; pivot < 4; pivot++) {
    let best = pivot;
    for (let row = pivot + 1; row < 4; row++) if (Math.abs(rows[row][pivot]) > Math.abs(rows[best][pivot])) best = row;
    [rows[pivot], rows[best]] = [rows[best], rows[pivot]];
    for (let row = 0; row < 4; row++) {
      if (row === pivot) continue;
      const factor = rows[row][pivot] / rows[pivot][pivot];
      for (let column = pivot; column <= 4; column++) rows[row][column] -= factor * rows[pivot][column];
    }
  }
  return rows.map((row, index) => row[4] / row[index]);
}

/** Trapezoid rule after u = A + (B - A)/(1 + exp(-2v)): end points and points close beyond them, however close, stay pi/2 away from the line of v. */
const nodeStep = 0.25;
const nodeReach = 140;
const nodes = Array.from({ length: 2 * nodeReach + 1 }, (_, index) => {
  const v = (index - nodeReach) * nodeStep;
  const [start, end] = [1 / (1 + Math.exp(-2 * v)), 1 / (1 + Math.exp(2 * v))];
  return { start, end, weight: 2 * start * end * nodeStep };
});
const starts = Float64Array.from(nodes, ({ start }) => start);
const ends = Float64Array.from(nodes, ({ end }) => end);
const weights = Float64Array.from(nodes, ({ weight }) => weight);

/** The five sides from p1 to p4, in units of b/pi; their heights sum to pi. */
function sides(at: Prevertices): number[] {
  const spans = [Math.exp(at[0]), Math.exp(at[1]), 1, Math.exp(at[2]), Math.exp(at[3])];
  return spans.map((span, side) => {
    // How far the six points are from the near end of this side, those before it from its start and those after it from its end.
    const away = [0, 1, 2, 3, 4, 5].map((point) => {
      let distance = 0;
      for (let between = point; between < side; between++) distance += spans[between];
      for (let between = side + 1; between < point; between++) distance += spans[between];
      return distance;
    });
    const isBefore = (point: number) => point <= side;
    const [p1, p2, c1, c2, p3, p4] = away;
    const [b2, b3, b4, b5] = [isBefore(1), isBefore(2), isBefore(3), isBefore(4)];
    let sum = 0;
    for (let index = 0; index < weights.length; index++) {
      const start = span * starts[index];
      const end = span * ends[index];
      const above = (c1 + (b3 ? start : end)) * (c2 + (b4 ? start : end));
      const below = (p1 + start) * (p2 + (b2 ? start : end)) * (p3 + (b5 ? start : end)) * (p4 + end);
      sum += weights[index] * Math.sqrt(above / below);
    }
    return sum * span;
  });
}
