/**
 * Interpolation of a table that rises and falls only where the table does: piecewise cubic, with a continuous slope.
 *
 *   within [x0, x1], h = x1 - x0, t = (x - x0)/h, d = (y1 - y0)/h, slopes m0 and m1 at the nodes:
 *   y = y0 + h t (m0 + t ((3 d - 2 m0 - m1) + t (m0 + m1 - 2 d)))
 *
 * Slopes at inner nodes are those of the parabola through three neighbours, 0 where the table turns; at the ends those of the parabola
 * through the three last nodes, 0 where that would turn. Then in each interval, where hypot(m0, m1) > 3 |d|, both are shrunk to it.
 */

export interface Interpolated {
  readonly value: number;
  /** dy/dx. */
  readonly slope: number;
}

/** The circle of Fritsch and Carlson: slopes in units of the secant inside it keep the cubic monotone. */
const circle = 3;

/**
 * Symbols: x nodes, ascending; y values. Source: Fritsch and Carlson, Monotone piecewise cubic interpolation, SIAM Journal on Numerical
 * Analysis 17 (1980) 238-246, region S2 (from memory); slopes from parabolas, as in their section 4.
 * Range: one node or more, between the first and the last; one node is a constant. Accuracy: exact at the nodes; a straight line, and from
 * three nodes on a parabola without turn, is reproduced, for (m0 + m1)/2 = d keeps inside the circle; third order elsewhere. Throws nothing.
 * The trap: a cubic between monotone nodes may overshoot by a unit of rounding; it is kept between its nodes.
 */
export function monotoneInterpolant(x: readonly number[], y: readonly number[]): (at: number) => Interpolated {
  const last = x.length - 1;
  const slopes = nodeSlopes(x, y);
  return (at) => {
    const low = intervalOf(x, at);
    // A node is met exactly, the last one included.
    if (at === x[low]) return { value: y[low], slope: slopes[low] };
    if (low === last || at === x[low + 1]) return { value: y[Math.min(low + 1, last)], slope: slopes[Math.min(low + 1, last)] };
    const h = x[low + 1] - x[low];
    const t = (at - x[low]) / h;
    const d = (y[low + 1] - y[low]) / h;
    const [m0, m1] = [slopes[low], slopes[low + 1]];
    const second = 3 * d - 2 * m0 - m1;
    const third = m0 + m1 - 2 * d;
    const value = y[low] + h * t * (m0 + t * (second + t * third));
    const [least, most] = y[low] < y[low + 1] ? [y[low], y[low + 1]] : [y[low + 1], y[low]];
    return { value: Math.min(most, Math.max(least, value)), slope: m0 + t * (2 * second + t * 3 * third) };
  };
}

function nodeSlopes(x: readonly number[], y: readonly number[]): Float64Array {
  const last = x.length - 1;
  const slopes = new Float64Array(x.length);
  if (last === 0) return slopes;
  const h = (index: number) => x[index + 1] - x[index];
  const secant = (index: number) => (y[index + 1] - y[index]) / h(index);
  for (let index = 1; index < last; index++) {
    const [before, after] = [secant(index - 1), secant(index)];
    // Weighed by the far interval: the slope of the parabola at its middle node.
    if (before * after > 0) slopes[index] = (h(index) * before + h(index - 1) * after) / (h(index - 1) + h(index));
  }
  slopes[0] = last === 1 ? secant(0) : endSlope(h(0), secant(0), h(1), secant(1));
  slopes[last] = last === 1 ? secant(0) : endSlope(h(last - 1), secant(last - 1), h(last - 2), secant(last - 2));
  for (let index = 0; index < last; index++) {
    const most = circle * Math.abs(secant(index));
    const size = Math.hypot(slopes[index], slopes[index + 1]);
    if (size <= most) continue;
    slopes[index] *= most / size;
    slopes[index + 1] *= most / size;
  }
  return slopes;
}

/** Of the parabola through the end node and its two neighbours, at the end; 0 where it would leave against the secant. */
function endSlope(h: number, secant: number, hNext: number, secantNext: number): number {
  const slope = secant + ((secant - secantNext) * h) / (h + hNext);
  return slope * secant > 0 ? slope : 0;
}

/** The last node that is not beyond `at`; the first where there is none. */
function intervalOf(x: readonly number[], at: number): number {
  let low = 0;
  let high = x.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (x[middle] <= at) low = middle;
    else high = middle;
  }
  return high > low && x[high] <= at ? high : low;
}
