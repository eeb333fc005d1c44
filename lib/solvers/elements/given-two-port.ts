/** A two-port given by its matrix, as an element of a chain. */
import { slopeOfColumn, logarithmicSlopeOfColumn, type Slope } from '../methods/sweep-slope';
import { coordinatesOf, isInWaves, matrixOf, sizesOf, toVoltages, toWaves, type Coordinates, type Entries, type PortReferences } from '../methods/two-port-coordinates';
import type { TwoPort } from '../methods/two-port';
import { portReferences } from '../nouns/reference-impedance';
import { entriesOf, isColumn, partsAt } from '../nouns/two-port-values';
import type { ComplexParts, Phasor, Space } from '../numeric/phasor';
import { magnitude, magnitudes } from '../numeric/phasor';
import { binaryExponent, powerOfTwo } from '../numeric/power-of-two';
import type { LeafElement } from './element';

export type GivenTwoPort = Extract<LeafElement, { kind: 'two_port' }>;

const defaultReference = 50;
/** Of an entry that was typed or computed elsewhere, and of what was made of it here. */
const roundings = 4;
/** S12 and S21 that differ by no more are the same. */
const sameWithin = 1e-12;

/** Whether it has columns, so that its slope is found by differences. */
export function variesOverSweep(element: GivenTwoPort): boolean {
  return entriesOf(element.values, element.representation).some(isColumn);
}

/** One frequency's worth, in voltages and currents, brought to about 1 by a power of two, which ratios do not notice. */
interface At {
  readonly m: Entries<ComplexParts>;
  readonly sizes: Entries<number>;
  readonly forward: ComplexParts;
  readonly backward: ComplexParts;
  readonly isReciprocal: boolean;
}

/**
 * `references` are those of the whole cascade: in them the slope of a matrix other than S or T is formed. Range: any matrix. Accuracy: the
 * matrix to 1e-15 of what was given; its slope, where it is given over the sweep, as good as differences between neighbours are.
 */
export function givenTwoPort<T extends Phasor<T>>(space: Space<T>, element: GivenTwoPort, omega: Float64Array, references: PortReferences): TwoPort<T> {
  const own = referencesOf(element);
  const varies = variesOverSweep(element);
  const starts = startsOf(element, space.length);
  const points = starts.map((start) => pointOf(isInWaves(element.representation) ? toVoltages(start, own) : start));
  const at = (index: number) => points[varies ? index : 0];
  const column = (of: (point: At) => ComplexParts) =>
    space.from(Float64Array.from({ length: space.length }, (_, index) => of(at(index)).re), Float64Array.from({ length: space.length }, (_, index) => of(at(index)).im));
  const sizes = (entry: number) => Float64Array.from({ length: space.length }, (_, index) => at(index).sizes[entry]);

  const zero = space.constant(0);
  const none = new Float64Array(space.length);
  const factor = column(({ forward }) => forward);
  return {
    a: column(({ m }) => m[0]), b: column(({ m }) => m[1]), c: column(({ m }) => m[2]), d: column(({ m }) => m[3]),
    slope: varies && space.length > 1 ? slopeOf(space, element, starts, factor, omega, isInWaves(element.representation) ? own : references) : { a: zero, b: zero, c: zero, d: zero },
    size: { a: sizes(0), b: sizes(1), c: sizes(2), d: sizes(3) },
    roundings: new Float64Array(space.length).fill(roundings),
    lossNp: none,
    factor, exponent: none,
    backward: column(({ backward }) => backward), backwardExponent: none,
    isReciprocal: points.every(({ isReciprocal }) => isReciprocal),
  };
}

function referencesOf({ reference_impedance_ohm }: GivenTwoPort): PortReferences {
  return portReferences(reference_impedance_ohm ?? defaultReference);
}

/** Whether the determinant of ABCD or T is lost, so that S12 = S21 was taken for granted. */
export function isTakenAsReciprocal(element: GivenTwoPort, points: number): boolean {
  return startsOf(element, points).some(({ takenAsReciprocal }) => takenAsReciprocal);
}

/** Once where it is the same at every frequency. */
function startsOf(element: GivenTwoPort, points: number): Coordinates[] {
  const entries = entriesOf(element.values, element.representation);
  return Array.from({ length: entries.some(isColumn) ? points : 1 }, (_, index) =>
    coordinatesOf(element.representation, [partsAt(entries[0], index), partsAt(entries[1], index), partsAt(entries[2], index), partsAt(entries[3], index)]),
  );
}

function pointOf(coordinates: Coordinates): At {
  const sizes = sizesOf(coordinates);
  const [a, b, c, d] = coordinates.m.map((each) => each.rounded());
  const forward = coordinates.forward.rounded();
  const backward = coordinates.backward.rounded();
  const down = powerOfTwo(-Math.max(-1000, Math.min(1000, binaryExponent(Math.max(...[a, b, c, d].map(sizeOf)) || 1))));
  const scaled = ({ re, im }: ComplexParts): ComplexParts => ({ re: re * down, im: im * down });
  const difference = magnitude(forward.re - backward.re, forward.im - backward.im);
  const isReciprocal = difference <= sameWithin * Math.max(sizeOf(forward), sizeOf(backward)) + 8 * Number.EPSILON * coordinates.backwardSize;
  return {
    m: [scaled(a), scaled(b), scaled(c), scaled(d)],
    sizes: [sizes[0] * down, sizes[1] * down, sizes[2] * down, sizes[3] * down],
    forward: scaled(forward),
    backward: scaled(backward),
    isReciprocal,
  };
}

/**
 * forward times d(M/forward)/d omega, by way of S, of which the passages are known by magnitude and phase and the reflections by their parts:
 *
 *   S21 d[S12 - S11 S22/S21, S11/S21; -S22/S21, 1/S21] = [S12 S21 h - S11' S22 - S11 S22' + S11 S22 g, S11' - S11 g; S22 g - S22', -g]
 *   g = S21'/S21, h = S12'/S12
 *
 * and from waves to voltages and currents as in `toVoltages`.
 */
function slopeOf<T extends Phasor<T>>(space: Space<T>, element: GivenTwoPort, starts: readonly Coordinates[], factor: T, omega: Float64Array, references: PortReferences): TwoPort<T>['slope'] {
  const scattering = starts.map((start) => matrixOf('s', isInWaves(element.representation) ? start : toWaves(start, references)).entries);
  const entry = (index: 0 | 1 | 2 | 3) => scattering.map((each) => each[index]);
  const column = (values: Slope) => space.from(Float64Array.from(values, ({ re }) => re), Float64Array.from(values, ({ im }) => im));
  const [s11, s12, s21, s22] = [column(entry(0)), column(entry(1)), column(entry(2)), column(entry(3))];
  const s11Slope = column(slopeOfColumn(omega, entry(0)));
  const s22Slope = column(slopeOfColumn(omega, entry(3)));
  const g = column(logarithmicSlopeOfColumn(omega, entry(2)));
  const h = column(logarithmicSlopeOfColumn(omega, entry(1)));

  const n11 = s12.mul(s21).mul(h).sub(s11Slope.mul(s22)).sub(s11.mul(s22Slope)).add(s11.mul(s22).mul(g));
  const n12 = s11Slope.sub(s11.mul(g));
  const n21 = s22.mul(g).sub(s22Slope);
  const n22 = g.neg();
  const z1 = space.constant(references[0]);
  const z2 = space.constant(references[1]);
  const [upper, lower] = [n11.add(n12), n21.add(n22)];
  const upperOhm = z2.conjugate().mul(n12).sub(z2.mul(n11));
  const lowerOhm = z2.conjugate().mul(n22).sub(z2.mul(n21));
  // Of this M, forward is 2 sqrt(R1 R2) S21; where nothing passes there is no delay to find.
  const forward = s21.mul(2 * Math.sqrt(references[0].re) * Math.sqrt(references[1].re));
  const vanishes = Uint8Array.from(magnitudes(space, forward), (each) => (each > 0 ? 0 : 1));
  const ratio = space.pick(vanishes, space.constant(0), factor.div(space.pick(vanishes, space.constant(1), forward)));
  return {
    a: z1.mul(upper).add(z1.conjugate().mul(lower)).mul(ratio),
    b: z1.mul(upperOhm).add(z1.conjugate().mul(lowerOhm)).mul(ratio),
    c: lower.sub(upper).mul(ratio),
    d: lowerOhm.sub(upperOhm).mul(ratio),
  };
}

function sizeOf({ re, im }: ComplexParts): number {
  return magnitude(re, im);
}
