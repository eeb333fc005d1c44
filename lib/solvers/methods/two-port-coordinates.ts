/**
 * A two-port by six numbers of which only ratios count, so that every linear two-port has them, whichever of its matrices exist.
 *
 *   forward [x1; y1] = m [x2; y2],    m11 m22 - m12 m21 = forward backward
 *
 * (x, y) are voltage and current (m is then a multiple of ABCD) or the power waves (b1, a1), (a2, b2) (a multiple of T). They are the line
 * coordinates of the plane of all (x1, y1, x2, y2) that the two-port allows. Each representation is five of the six over the sixth:
 *
 *   ABCD, T: over forward      Z = [m11 backward; forward m22]/m21      Y = [m22 -backward; -forward m11]/m12
 *   S = [m12 backward; forward -m21]/m22
 *
 * A representation does not exist where its divisor vanishes. Of the six only one is a product of entries, a determinant; it and all sums are
 * formed with 32 digits, so that the only rounding that counts is that of the entries given.
 */
import Complex from 'complex.js';
import type { ComplexParts } from '../numeric/phasor';
import { magnitude } from '../numeric/phasor';
import { LongComplex, longOne } from '../numeric/double-double';

export type Representation = 'abcd' | 's' | 'z' | 'y' | 't';

/** Entries of a matrix by rows. */
export type Entries<Each> = readonly [Each, Each, Each, Each];

export interface Coordinates {
  /** m11, m12, m21, m22. */
  readonly m: Entries<LongComplex>;
  readonly forward: LongComplex;
  readonly backward: LongComplex;
  /** What m changes by, to first order, when one entry given changes by the whole of itself: a matrix for each entry. */
  readonly changes: Entries<Entries<ComplexParts>>;
  /** The same of `backward`, its magnitudes added. */
  readonly backwardSize: number;
  /** Where AD - BC is lost in the rounding of its terms and may be 1, it is taken as 1. */
  readonly takenAsReciprocal: boolean;
}

export type PortReferences = readonly [ComplexParts, ComplexParts];

export function isInWaves(representation: Representation): boolean {
  return representation === 's' || representation === 't';
}

const none: ComplexParts = { re: 0, im: 0 };

/** A number that was typed or computed elsewhere is a few units of rounding off. */
const roundingOfEntry = 8 * Number.EPSILON;
/** Where a determinant is known no better than this, that most two-ports are reciprocal says more about it. */
const worstKnown = 1e-9;

/** Range: any entries. Accuracy: 1e-31 of the terms. Throws nothing. */
export function coordinatesOf(representation: Representation, given: Entries<ComplexParts>): Coordinates {
  const [x11, x12, x21, x22] = eachOf(given, LongComplex.of);
  const [g11, g12, g21, g22] = given;
  const diagonal = x11.mul(x22);
  const other = x12.mul(x21);
  const determinant = diagonal.sub(other);
  // What the determinant changes by with an entry of the diagonal, and of the other two.
  const onDiagonal = diagonal.rounded();
  const besides = other.neg().rounded();
  const passages = { backwardSize: sizeOf(g12), takenAsReciprocal: false };
  switch (representation) {
    case 'abcd':
    case 't': {
      const backwardSize = 2 * (sizeOf(onDiagonal) + sizeOf(besides));
      const takenAsReciprocal = isLostAroundOne(determinant, roundingOfEntry * backwardSize);
      return {
        m: [x11, x12, x21, x22],
        forward: longOne,
        backward: takenAsReciprocal ? longOne : determinant,
        changes: [[g11, none, none, none], [none, g12, none, none], [none, none, g21, none], [none, none, none, g22]],
        backwardSize,
        takenAsReciprocal,
      };
    }
    case 'z':
      return {
        m: [x11, determinant, longOne, x22],
        forward: x21,
        backward: x12,
        changes: [[g11, onDiagonal, none, none], [none, besides, none, none], [none, besides, none, none], [none, onDiagonal, none, g22]],
        ...passages,
      };
    case 'y':
      return {
        m: [x22, longOne, determinant, x11],
        forward: x21.neg(),
        backward: x12.neg(),
        changes: [[none, none, onDiagonal, g11], [none, none, besides, none], [none, none, besides, none], [g22, none, onDiagonal, none]],
        ...passages,
      };
    case 's':
      return {
        m: [determinant.neg(), x11, x22.neg(), longOne],
        forward: x21,
        backward: x12,
        changes: [[negative(onDiagonal), g11, none, none], [negative(besides), none, none, none], [negative(besides), none, none, none], [negative(onDiagonal), none, negative(g22), none]],
        ...passages,
      };
  }
}

/** From waves to voltages and currents: V1 = (Z1* a1 + Z1 b1)/sqrt(R1), I1 = (a1 - b1)/sqrt(R1); so at port 2, where the current leaves. */
export function toVoltages(waves: Coordinates, references: PortReferences): Coordinates {
  const [z1, z2] = longReferences(references);
  const scale = 2 * Math.sqrt(references[0].re) * Math.sqrt(references[1].re);
  return transformed(waves, [z1, z1.conjugate(), longOne.neg(), longOne], [longOne, z2.neg(), longOne, z2.conjugate()], scale);
}

/** The other way: a1 = (V1 + Z1 I1)/(2 sqrt(R1)), b1 = (V1 - Z1* I1)/(2 sqrt(R1)). Kurokawa 1965, equation 1. */
export function toWaves(voltages: Coordinates, references: PortReferences): Coordinates {
  const [z1, z2] = longReferences(references);
  const scale = 2 * Math.sqrt(references[0].re) * Math.sqrt(references[1].re);
  return transformed(voltages, [longOne, z1.conjugate().neg(), longOne, z1], [z2.conjugate(), z2, longOne.neg(), longOne], scale);
}

/** Waves to waves of other references, not by way of a matrix that may not exist. */
export function referredTo(waves: Coordinates, references: PortReferences, wanted: PortReferences): Coordinates {
  const [z1, z2] = longReferences(references);
  const [w1, w2] = longReferences(wanted);
  const left: Entries<LongComplex> = [z1.add(w1.conjugate()), z1.sub(w1).conjugate(), z1.sub(w1), z1.conjugate().add(w1)];
  const right: Entries<LongComplex> = [z2.add(w2.conjugate()), w2.sub(z2), w2.sub(z2).conjugate(), z2.conjugate().add(w2)];
  const roots = [...references, ...wanted].map(({ re }) => Math.sqrt(re));
  return transformed(waves, left, right, 4 * roots[0] * roots[1] * roots[2] * roots[3]);
}

/** m -> left m right, where `scale` is the root of both determinants. */
function transformed(from: Coordinates, left: Entries<LongComplex>, right: Entries<LongComplex>, scale: number): Coordinates {
  const leftParts = eachOf(left, (each) => each.rounded());
  const rightParts = eachOf(right, (each) => each.rounded());
  const factor = LongComplex.of({ re: scale, im: 0 });
  return {
    ...from,
    m: product(product(left, from.m), right),
    forward: from.forward.mul(factor),
    backward: from.backward.mul(factor),
    changes: eachOf(from.changes, (change) => productOfParts(productOfParts(leftParts, change), rightParts)),
    backwardSize: from.backwardSize * scale,
  };
}

/** First-order bound of the rounding of m, in units of that of an entry given. */
export function sizesOf({ changes }: Coordinates): Entries<number> {
  const at = (index: 0 | 1 | 2 | 3) => sizeOf(changes[0][index]) + sizeOf(changes[1][index]) + sizeOf(changes[2][index]) + sizeOf(changes[3][index]);
  return [at(0), at(1), at(2), at(3)];
}

export interface Matrix {
  readonly entries: Entries<ComplexParts>;
  /** False where the divisor is no more than the rounding of what was given. */
  readonly exists: boolean;
}

/** `coordinates` are in waves for S and T, in voltages and currents for the others. */
export function matrixOf(representation: Representation, coordinates: Coordinates): Matrix {
  const { m, forward, backward } = coordinates;
  const [m11, m12, m21, m22] = m;
  const over = (divisor: LongComplex, size: number, entries: Entries<LongComplex>): Matrix => {
    const below = divisor.rounded();
    const exists = sizeOf(below) > roundingOfEntry * size;
    return { entries: eachOf(entries, (each) => (exists ? quotient(each.rounded(), below) : none)), exists };
  };
  const sizes = sizesOf(coordinates);
  switch (representation) {
    case 'abcd':
    case 't':
      return over(forward, 0, m);
    case 'z':
      return over(m21, sizes[2], [m11, backward, forward, m22]);
    case 'y':
      return over(m12, sizes[1], [m22, backward.neg(), forward.neg(), m11]);
    case 's':
      return over(m22, sizes[3], [m12, backward, forward, m21.neg()]);
  }
}

function isLostAroundOne(determinant: LongComplex, rounding: number): boolean {
  return rounding > worstKnown && sizeOf(determinant.sub(longOne).rounded()) <= rounding;
}

function longReferences(references: PortReferences): readonly [LongComplex, LongComplex] {
  return [LongComplex.of(references[0]), LongComplex.of(references[1])];
}

function product(x: Entries<LongComplex>, y: Entries<LongComplex>): Entries<LongComplex> {
  const entry = (a: LongComplex, b: LongComplex, c: LongComplex, d: LongComplex) => a.mul(b).add(c.mul(d));
  return [entry(x[0], y[0], x[1], y[2]), entry(x[0], y[1], x[1], y[3]), entry(x[2], y[0], x[3], y[2]), entry(x[2], y[1], x[3], y[3])];
}

function productOfParts(x: Entries<ComplexParts>, y: Entries<ComplexParts>): Entries<ComplexParts> {
  const entry = (a: ComplexParts, b: ComplexParts, c: ComplexParts, d: ComplexParts): ComplexParts => ({
    re: a.re * b.re - a.im * b.im + c.re * d.re - c.im * d.im,
    im: a.re * b.im + a.im * b.re + c.re * d.im + c.im * d.re,
  });
  return [entry(x[0], y[0], x[1], y[2]), entry(x[0], y[1], x[1], y[3]), entry(x[2], y[0], x[3], y[2]), entry(x[2], y[1], x[3], y[3])];
}

/** By Smith's algorithm. */
function quotient(x: ComplexParts, y: ComplexParts): ComplexParts {
  const { re, im } = new Complex(x.re, x.im).div(new Complex(y.re, y.im));
  return { re, im };
}

function eachOf<Each, Other>(entries: Entries<Each>, change: (each: Each) => Other): Entries<Other> {
  return [change(entries[0]), change(entries[1]), change(entries[2]), change(entries[3])];
}

function negative({ re, im }: ComplexParts): ComplexParts {
  return { re: -re, im: -im };
}

function sizeOf({ re, im }: ComplexParts): number {
  return magnitude(re, im);
}
