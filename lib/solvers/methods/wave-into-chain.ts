/**
 * Voltage and current of a closed chain, carried from the load to the source: the quick way to the reflection alone, over many frequencies.
 * The same circuit as the two-ports of networks/cascade, without their group delay and their account of rounding.
 *
 *   series z = vs/is:  (v is + vs i, i is)     shunt y = is/vs:  (v vs, i vs + is v)     line:  (A v + B i, C v + A i)
 *
 * Only the ratio of v and i counts, so that a short across the path or an open in series is like any other.
 */
import type { Line } from '../lines/line';
import type { LineConstants } from '../lines/line-constants';
import type { Element } from '../elements/element';
import { propagation, type Propagation } from './telegrapher';

/** Real and imaginary parts of v and i, one entry a frequency. */
export interface Pair {
  readonly vr: Float64Array;
  readonly vi: Float64Array;
  readonly ir: Float64Array;
  readonly ii: Float64Array;
}

export interface LineOverSweep {
  readonly constants: LineConstants;
  readonly waves: Propagation;
}

export function lineOverSweep(constants: LineConstants, frequenciesHz: Float64Array): LineOverSweep {
  return { constants, waves: propagation(constants, frequenciesHz) };
}

/** Changes `pair` in place from what stands behind the element to what stands before it. */
export function through(element: Element, pair: Pair, omega: Float64Array, lineOf: (line: Line) => LineOverSweep): void {
  switch (element.kind) {
    case 'series':
    case 'shunt':
      return throughPart(element, pair, omega);
    case 'line':
    case 'open_stub':
    case 'short_stub':
    case 'series_open_stub':
    case 'series_short_stub':
      return throughLine(element.kind, element.length_m, pair, omega, lineOf(element.line));
    default:
      throw new Error(`no match is made with ${element.kind}`);
  }
}

type Part = Extract<Element, { kind: 'series' | 'shunt' }>;

/** One inductor or one capacitor: what matches are made of. As a pair it is (j w L, 1) or (1, j w C). */
function throughPart({ kind, inductance_h: L, capacitance_f: C }: Part, pair: Pair, omega: Float64Array): void {
  const isSeries = kind === 'series';
  const value = L ?? C ?? 0;
  // Where the element adds its own j w value; elsewhere it multiplies by it and adds the other quantity.
  const adds = isSeries === (L !== undefined);
  const [first, second] = isSeries ? [[pair.vr, pair.vi], [pair.ir, pair.ii]] : [[pair.ir, pair.ii], [pair.vr, pair.vi]];
  for (let index = 0; index < omega.length; index++) {
    const x = omega[index] * value;
    const [a, b, c, d] = [first[0][index], first[1][index], second[0][index], second[1][index]];
    first[0][index] = adds ? a - x * d : c - x * b;
    first[1][index] = adds ? b + x * c : d + x * a;
    if (!adds) {
      second[0][index] = -x * d;
      second[1][index] = x * c;
    }
  }
}

type LineKind = 'line' | 'open_stub' | 'short_stub' | 'series_open_stub' | 'series_short_stub';

function throughLine(kind: LineKind, length: number, pair: Pair, omega: Float64Array, { constants, waves }: LineOverSweep): void {
  const { resistance: R, inductance: L, conductance: G, capacitance: C } = constants;
  for (let index = 0; index < omega.length; index++) {
    const alpha = waves.attenuationNpPerM[index] * length;
    const beta = waves.phaseRadPerM[index] * length;
    // As in line-two-port.ts: p = exp(-2 t), 1 - p without cancellation, all divided by exp(t).
    const radius = Math.exp(-2 * alpha);
    const sine = Math.sin(beta);
    const gapRe = -Math.expm1(-2 * alpha) + 2 * radius * sine * sine;
    const gapIm = radius * Math.sin(2 * beta);
    const evenRe = 1 - 0.5 * gapRe;
    const evenIm = -0.5 * gapIm;
    // S = (1 - p)/(2 t), 1 where t vanishes.
    const square = alpha * alpha + beta * beta;
    const sRe = square === 0 ? 1 : (0.5 * (gapRe * alpha + gapIm * beta)) / square;
    const sIm = square === 0 ? 0 : (0.5 * (gapIm * alpha - gapRe * beta)) / square;
    const zIm = omega[index] * L[index];
    const yIm = omega[index] * C[index];
    const bRe = length * (R[index] * sRe - zIm * sIm);
    const bIm = length * (R[index] * sIm + zIm * sRe);
    const cRe = length * (G[index] * sRe - yIm * sIm);
    const cIm = length * (G[index] * sIm + yIm * sRe);
    const a = pair.vr[index], b = pair.vi[index], c = pair.ir[index], d = pair.ii[index];
    if (kind === 'line') {
      set(pair, index, evenRe * a - evenIm * b + bRe * c - bIm * d, evenRe * b + evenIm * a + bRe * d + bIm * c, cRe * a - cIm * b + evenRe * c - evenIm * d, cRe * b + cIm * a + evenRe * d + evenIm * c);
      continue;
    }
    const isOpen = kind === 'open_stub' || kind === 'series_open_stub';
    const [vsRe, vsIm, isRe, isIm] = isOpen ? [evenRe, evenIm, cRe, cIm] : [bRe, bIm, evenRe, evenIm];
    if (kind === 'open_stub' || kind === 'short_stub') {
      set(pair, index, a * vsRe - b * vsIm, a * vsIm + b * vsRe, c * vsRe - d * vsIm + isRe * a - isIm * b, c * vsIm + d * vsRe + isRe * b + isIm * a);
    } else {
      set(pair, index, a * isRe - b * isIm + vsRe * c - vsIm * d, a * isIm + b * isRe + vsRe * d + vsIm * c, c * isRe - d * isIm, c * isIm + d * isRe);
    }
  }
}

function set(pair: Pair, index: number, vr: number, vi: number, ir: number, ii: number): void {
  pair.vr[index] = vr;
  pair.vi[index] = vi;
  pair.ir[index] = ir;
  pair.ii[index] = ii;
}
