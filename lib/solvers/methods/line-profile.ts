/**
 * Voltage, current and power at places along a terminated line, one entry a place.
 *
 *   V(x) = v cosh(gamma x) + Z i sinh(gamma x)/gamma,   I(x) = i cosh(gamma x) + Y v sinh(gamma x)/gamma
 *
 * x from the termination in m, v and i its voltage and current. The length up to x is a line of its own, whose two-port (line-two-port.ts) and
 * power (line-power.ts) are asked for: a line with x times the constants, 1 m long, so that a column holds places as it holds frequencies.
 */
import type { LineConstants } from '../lines/line-constants';
import type { ComplexColumn } from '../numeric/complex-column';
import { inSpaceOf, magnitude, magnitudes, type ComplexParts, type Phasor, type Space } from '../numeric/phasor';
import { binaryExponent, timesPowerOfTwo } from '../numeric/power-of-two';
import { powerAlongLine } from './line-power';
import { lineTwoPort } from './line-two-port';
import { oddScaleOf, type OnePort } from './one-port';
import type { Propagation } from './telegrapher';

export interface Profile<T> {
  /** V(x) and I(x), each divided by exp(gamma x). */
  readonly v: T;
  readonly i: T;
  /** The sums of the magnitudes of their terms: what a vanishing v or i is measured against. */
  readonly vScale: Float64Array;
  readonly iScale: Float64Array;
  /** Re(V I*) exp(-2 alpha x), and the part of it that does not come from the termination: what the line up to x dissipates. */
  readonly power: Float64Array;
  readonly dissipated: Float64Array;
}

/**
 * Source: Pozar table 4.1 for V and I, Poynting's theorem for the power. Range: any line, termination and place. Accuracy: a few units of rounding of
 * the terms, of the value itself for the power of a passive termination. Throws nothing.
 * The trap: exp(gamma x) is left out, for it may overflow; multiply by exp(-gamma (l - x)) to compare with the input at l.
 */
export function profile<T extends Phasor<T>>(space: Space<T>, constants: LineConstants, waves: Propagation, places: Float64Array, load: OnePort<T>): Profile<T> {
  const part = upTo(constants, waves, places);
  const two = lineTwoPort(space, part.constants, part.waves, 1);
  const v = two.even.mul(load.v).add(two.series.mul(load.i));
  const i = two.shunt.mul(load.v).add(two.even.mul(load.i));
  const trip = magnitudes(space, two.roundTrip);
  const even = trip.map((p, index) => 0.5 * (1 + p) * two.sensitivity[index]);
  const series = oddScaleOf(space, two, two.series);
  const shunt = oddScaleOf(space, two, two.shunt);
  const { total, dissipated } = powerAlongLine(part.constants, part.waves, 1, space.column(load.v), space.column(load.i));
  return {
    v,
    i,
    vScale: even.map((each, index) => each * load.vScale[index] + series[index] * load.iScale[index]),
    iScale: even.map((each, index) => each * load.iScale[index] + shunt[index] * load.vScale[index]),
    power: total,
    dissipated,
  };
}

/** Columns with an entry a place, where the line's have one a frequency or, at one frequency, a single one. */
function upTo(constants: LineConstants, waves: Propagation, places: Float64Array): { constants: LineConstants; waves: Propagation } {
  const times = (column: Float64Array) => places.map((x, index) => column[column.length === 1 ? 0 : index] * x);
  return {
    constants: { resistance: times(constants.resistance), inductance: times(constants.inductance), conductance: times(constants.conductance), capacitance: times(constants.capacitance) },
    waves: {
      ...waves,
      omega: places.map((_, index) => waves.omega[waves.omega.length === 1 ? 0 : index]),
      attenuationNpPerM: times(waves.attenuationNpPerM),
      phaseRadPerM: times(waves.phaseRadPerM),
    },
  };
}

/** What closes the line, at one frequency. */
export interface Load {
  readonly v: ComplexParts;
  readonly i: ComplexParts;
  readonly vScale: number;
  readonly iScale: number;
}

export interface Source {
  /** Root mean square, without load. */
  readonly voltage: ComplexParts;
  readonly impedance: ComplexParts;
}

export interface DrivenProfile {
  readonly v: ComplexColumn;
  readonly i: ComplexColumn;
  readonly power: Float64Array;
  /** By what |V(x)| exp(-alpha x) of the load's own v and i is to be multiplied. */
  readonly gain: Float64Array;
}

const vanishing = 8 * Number.EPSILON;

/** At one frequency, the load is the same at every place. Only v/i counts: the larger is brought to about 1, so that squares do not underflow. */
export function loadOf<T extends Phasor<T>>(space: Space<T>, { v, i, vScale, iScale }: OnePort<T>): Load {
  const shift = -binaryExponent(Math.max(magnitudes(space, v)[0], magnitudes(space, i)[0]));
  const scaled = (value: number) => timesPowerOfTwo(value, shift);
  const parts = ({ re, im }: ComplexColumn): ComplexParts => ({ re: scaled(re[0]), im: scaled(im[0]) });
  return { v: parts(space.column(v)), i: parts(space.column(i)), vScale: scaled(vScale[0]), iScale: scaled(iScale[0]) };
}

/**
 * V, I and Re(V I*) at places z from the source, in m, at one frequency: V = Vs exp(-gamma z) V'(l - z)/(V'(l) + Zs I'(l)), with V' = V exp(-gamma x) as `profile` has
 * it. null where source and line resonate without loss. Range: any line and load; Re Zs >= 0. Accuracy: a few units of rounding of what V and I are
 * the sums of; of the value itself for the power into a passive load. Throws nothing.
 * The trap: exp(gamma x) of a lossy line overflows; only decays from the source are formed.
 */
export function drivenProfile(constants: LineConstants, waves: Propagation, lengthM: number, places: Float64Array, load: Load, source: Source): DrivenProfile | null {
  const input = inSpaceOf(1, (space) => {
    const near = profile(space, constants, waves, Float64Array.of(lengthM), everywhere(space, load));
    const column = space.column(near.v.add(near.i.mul(space.constant(source.impedance))));
    const scale = near.vScale[0] + magnitude(source.impedance.re, source.impedance.im) * near.iScale[0];
    return { re: column.re[0], im: column.im[0], scale };
  });
  const size = magnitude(input.re, input.im);
  if (!(size > vanishing * input.scale)) return null;
  return inSpaceOf(places.length, (space) => {
    const { v, i, power } = profile(space, constants, waves, places.map((z) => lengthM - z), everywhere(space, load));
    const alpha = waves.attenuationNpPerM[0];
    const beta = waves.phaseRadPerM[0];
    const decay = places.map((z) => Math.exp(-alpha * z));
    const travelled = space.from(decay.map((each, index) => each * Math.cos(beta * places[index])), decay.map((each, index) => -each * Math.sin(beta * places[index])));
    const factor = travelled.mul(space.constant(source.voltage).div(space.constant(input)));
    const gain = decay.map((each) => (magnitude(source.voltage.re, source.voltage.im) / size) * each);
    return { v: space.column(v.mul(factor)), i: space.column(i.mul(factor)), power: power.map((each, index) => each * gain[index] ** 2), gain };
  });
}

function everywhere<T extends Phasor<T>>(space: Space<T>, { v, i, vScale, iScale }: Load): OnePort<T> {
  const zero = space.constant(0);
  const column = (value: number) => new Float64Array(space.length).fill(value);
  return { v: space.constant(v), i: space.constant(i), vSlope: zero, iSlope: zero, vScale: column(vScale), iScale: column(iScale) };
}
