/**
 * One-ports in homogeneous form: a pair (v, i) of which the impedance is v/i. An open is (1, 0), a short (0, 1), and a
 * resonance that makes either vanish needs no special case.
 */
import type { Method } from '../calculation';
import type { ComplexParts, Phasor, Space } from '../numeric/phasor';
import { magnitudes } from '../numeric/phasor';
import type { LineTwoPort } from './line-two-port';

export const lumpedImpedance: Method = {
  id: 'lumped-impedance',
  title: 'Impedance of ideal lumped parts',
  source: 'Z = R + j w L + 1/(j w C) in series, Y = 1/R + 1/(j w L) + j w C in parallel; Kirchhoff 1847, any text on circuits',
  formulas: [String.raw`Z = R + j\omega L + \frac{1}{j\omega C}`, String.raw`Y = \frac{1}{R} + \frac{1}{j\omega L} + j\omega C`],
  symbols: [
    { symbol: 'R', meaning: 'resistance', unit: 'ohm' },
    { symbol: 'L', meaning: 'inductance', unit: 'H' },
    { symbol: 'C', meaning: 'capacitance', unit: 'F' },
    { symbol: String.raw`\omega`, meaning: 'angular frequency', unit: 'rad/s' },
  ],
  range: 'ideal parts, without parasitics, at any frequency',
  accuracy: 'exact; 1e-12 relative in float64',
};

export interface OnePort<T> {
  readonly v: T;
  readonly i: T;
  /** Derivatives to omega. */
  readonly vSlope: T;
  readonly iSlope: T;
  /** Sums of the magnitudes of the terms of v and i: what a vanishing v or i is measured against. */
  readonly vScale: Float64Array;
  readonly iScale: Float64Array;
}

export interface LumpedParts {
  readonly resistance_ohm?: number | undefined;
  readonly inductance_h?: number | undefined;
  readonly capacitance_f?: number | undefined;
}

export function openCircuit<T extends Phasor<T>>(space: Space<T>): OnePort<T> {
  return fixed(space, 1, 0);
}

export function shortCircuit<T extends Phasor<T>>(space: Space<T>): OnePort<T> {
  return fixed(space, 0, 1);
}

export function impedance<T extends Phasor<T>>(space: Space<T>, value: ComplexParts): OnePort<T> {
  return fixed(space, value, 1);
}

/** Where the impedance varies in a way whose slope is not asked for. */
export function impedanceColumn<T extends Phasor<T>>(space: Space<T>, re: Float64Array, im: Float64Array, infinite?: Uint8Array): OnePort<T> {
  const zero = space.constant(0);
  const one = space.constant(1);
  const value = space.from(re, im);
  const v = infinite ? space.pick(infinite, one, value) : value;
  const i = infinite ? space.pick(infinite, zero, one) : one;
  return { v, i, vSlope: zero, iSlope: zero, vScale: magnitudes(space, v), iScale: magnitudes(space, i) };
}

/** v/i = R + j w L + 1/(j w C), multiplied through by j w C where there is a C. */
export function seriesParts<T extends Phasor<T>>(space: Space<T>, omega: Float64Array, parts: LumpedParts): OnePort<T> {
  const { resistance_ohm: R = 0, inductance_h: L = 0, capacitance_f: C } = parts;
  if (C === undefined) {
    return onePort(space, omega, (w) => ({ v: [R, w * L], i: [1, 0], vSlope: [0, L], iSlope: [0, 0], vScale: R + w * L, iScale: 1 }));
  }
  return onePort(space, omega, (w) => ({
    v: [1 - w * L * (w * C), w * C * R],
    i: [0, w * C],
    vSlope: [-2 * w * L * C, R * C],
    iSlope: [0, C],
    vScale: 1 + w * L * (w * C) + w * C * R,
    iScale: w * C,
  }));
}

/** i/v = 1/R + 1/(j w L) + j w C, multiplied through by R and by j w L where there are any. */
export function parallelParts<T extends Phasor<T>>(space: Space<T>, omega: Float64Array, parts: LumpedParts): OnePort<T> {
  const { resistance_ohm: R, inductance_h: L, capacitance_f: C = 0 } = parts;
  // Either is a short at every frequency, whatever stands beside it.
  if (R === 0 || L === 0) return shortCircuit(space);
  const r = R ?? 1;
  const perResistance = R === undefined ? 0 : 1;
  if (L === undefined) {
    return onePort(space, omega, (w) => ({
      v: [r, 0],
      i: [perResistance, w * r * C],
      vSlope: [0, 0],
      iSlope: [0, r * C],
      vScale: r,
      iScale: perResistance + w * r * C,
    }));
  }
  return onePort(space, omega, (w) => ({
    v: [0, w * L * r],
    i: [r - w * L * (w * C) * r, perResistance * w * L],
    vSlope: [0, L * r],
    iSlope: [-2 * w * L * C * r, perResistance * L],
    vScale: w * L * r,
    iScale: r + w * L * (w * C) * r + perResistance * w * L,
  }));
}

/** The input of a line left open at its far end; everything divided by exp(t), which a pair does not notice. */
export function openStub<T extends Phasor<T>>(space: Space<T>, line: LineTwoPort<T>): OnePort<T> {
  return { v: line.even, i: line.shunt, vSlope: line.evenSlope, iSlope: line.shuntSlope, ...stubScales(space, line, line.shunt, 'open') };
}

/** The input of a line shorted at its far end. */
export function shortStub<T extends Phasor<T>>(space: Space<T>, line: LineTwoPort<T>): OnePort<T> {
  return { v: line.series, i: line.even, vSlope: line.seriesSlope, iSlope: line.evenSlope, ...stubScales(space, line, line.series, 'short') };
}

/** (1 + |p|)/2 for the even entry; the other has sinh in it, whose terms are as large, against its slowest part. */
function stubScales<T extends Phasor<T>>(space: Space<T>, line: LineTwoPort<T>, odd: T, kind: 'open' | 'short') {
  const trip = magnitudes(space, line.roundTrip);
  const evenScale = trip.map((p, index) => 0.5 * (1 + p) * line.sensitivity[index]);
  const oddScale = oddScaleOf(space, line, odd);
  return kind === 'open' ? { vScale: evenScale, iScale: oddScale } : { vScale: oddScale, iScale: evenScale };
}

/**
 * What a vanishing Z l S is measured against: its terms Z l/(2 t) and Z l p/(2 t), and the rounding of t. A short line does not
 * cancel, for 1 - p is formed without subtraction, so the scale shrinks with |t| there.
 */
export function oddScaleOf<T extends Phasor<T>>(space: Space<T>, line: LineTwoPort<T>, odd: T): Float64Array {
  const trip = magnitudes(space, line.roundTrip);
  const gap = magnitudes(space, line.roundTrip.neg().add(1));
  const size = magnitudes(space, odd);
  return size.map((each, index) => {
    const theta = line.sensitivity[index] - 1;
    return gap[index] === 0 ? each : (each * (1 + trip[index]) * Math.min(1, theta) * (1 + theta)) / gap[index];
  });
}

function fixed<T extends Phasor<T>>(space: Space<T>, v: ComplexParts | number, i: number): OnePort<T> {
  const zero = space.constant(0);
  const value = space.constant(v);
  const column = (each: number) => new Float64Array(space.length).fill(each);
  return { v: value, i: space.constant(i), vSlope: zero, iSlope: zero, vScale: magnitudes(space, value), iScale: column(i) };
}

interface PartsAt {
  readonly v: readonly [number, number];
  readonly i: readonly [number, number];
  readonly vSlope: readonly [number, number];
  readonly iSlope: readonly [number, number];
  readonly vScale: number;
  readonly iScale: number;
}

function onePort<T extends Phasor<T>>(space: Space<T>, omega: Float64Array, at: (omega: number) => PartsAt): OnePort<T> {
  const parts = Array.from(omega, at);
  const phasor = (name: 'v' | 'i' | 'vSlope' | 'iSlope') =>
    space.from(Float64Array.from(parts, (each) => each[name][0]), Float64Array.from(parts, (each) => each[name][1]));
  return {
    v: phasor('v'),
    i: phasor('i'),
    vSlope: phasor('vSlope'),
    iSlope: phasor('iSlope'),
    vScale: Float64Array.from(parts, (each) => each.vScale),
    iScale: Float64Array.from(parts, (each) => each.iScale),
  };
}
