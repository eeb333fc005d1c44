/** A chain of elements closed by a load, as its source sees it: what a matching network is judged by. */
import { lineOverFrequency, type Line } from '../lines/line';
import type { LineModel } from '../lines/line-constants';
import { reflection } from '../methods/reflection';
import { lineOverSweep, through, type LineOverSweep, type Pair } from '../methods/wave-into-chain';
import { terminationOnePort, type Termination } from '../nouns/termination';
import { inSpaceOf, magnitude, type ComplexParts } from '../numeric/phasor';
import { chainTwoPort } from './chain-of-elements';
import type { Element } from './element';

/** One entry a frequency; `absorbed` is 1 - |Gamma|^2. */
export interface ReflectionColumns {
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly magnitude: Float64Array;
  readonly absorbed: Float64Array;
}

/** What is the same for every chain over the same frequencies. */
interface Sweep {
  readonly omega: Float64Array;
  readonly load: Pair;
  readonly lines: Map<Line, LineOverSweep>;
}

/**
 * Judges chains between one source and one load. The line's model is made once for each array of frequencies, so that many chains of
 * the same line over the same frequencies pay for it once.
 */
export class SourceAndLoad {
  private readonly models = new WeakMap<Float64Array, Map<Line, LineModel>>();
  private readonly sweeps = new WeakMap<Float64Array, Sweep>();

  constructor(
    private readonly source: ComplexParts,
    private readonly load: Termination,
  ) {}

  /** `pointer` is where the line stands in the input. Throws `ImpossibleInput` where the line cannot be at these frequencies. */
  modelOf(line: Line, frequenciesHz: Float64Array, pointer = '/line'): LineModel {
    const known = this.models.get(frequenciesHz) ?? new Map<Line, LineModel>();
    this.models.set(frequenciesHz, known);
    const model = known.get(line) ?? lineOverFrequency(line, frequenciesHz, pointer);
    known.set(line, model);
    return model;
  }

  /**
   * Power-wave reflection at the source, through the two-ports of networks/cascade. Range: any elements, an empty chain included.
   * Accuracy: 1e-12 of a whole wave, times the quality factor where the chain resonates. Throws as `modelOf` does.
   */
  reflection(elements: readonly Element[], frequenciesHz: Float64Array): ReflectionColumns {
    const omega = frequenciesHz.map((each) => 2 * Math.PI * each);
    const constantsOf = (each: Element) => ('line' in each ? this.modelOf(each.line, frequenciesHz).constants : undefined);
    return inSpaceOf(frequenciesHz.length, (space) => {
      const none = new Float64Array(space.length);
      const load = terminationOnePort(space, this.load, frequenciesHz, omega, { re: none, im: none });
      const two = elements.length > 0 ? chainTwoPort(space, elements, constantsOf, { frequenciesHz, omega, references: [this.source, this.source] }) : undefined;
      const v = two ? two.a.mul(load.v).add(two.b.mul(load.i)) : load.v;
      const i = two ? two.c.mul(load.v).add(two.d.mul(load.i)) : load.i;
      const { gamma, magnitude, absorbed } = reflection(space, v, i, space.constant(this.source));
      const { re, im } = space.column(gamma);
      return { re, im, magnitude, absorbed };
    });
  }

  /**
   * The same, quickly, of a chain that a match is made of: lines, stubs, and single inductors and capacitors. Accuracy: as `reflection`
   * but where a chain nearly blocks.
   */
  response(elements: readonly Element[], frequenciesHz: Float64Array): ReflectionColumns {
    const sweep = this.sweepOf(frequenciesHz);
    const lineOf = (line: Line) => {
      const known = sweep.lines.get(line) ?? lineOverSweep(this.modelOf(line, frequenciesHz).constants, frequenciesHz);
      sweep.lines.set(line, known);
      return known;
    };
    const pair = { vr: sweep.load.vr.slice(), vi: sweep.load.vi.slice(), ir: sweep.load.ir.slice(), ii: sweep.load.ii.slice() };
    for (let index = elements.length - 1; index >= 0; index--) through(elements[index], pair, sweep.omega, lineOf);
    return this.reflectionOf(pair);
  }

  private sweepOf(frequenciesHz: Float64Array): Sweep {
    const known = this.sweeps.get(frequenciesHz) ?? this.makeSweep(frequenciesHz);
    this.sweeps.set(frequenciesHz, known);
    return known;
  }

  private makeSweep(frequenciesHz: Float64Array): Sweep {
    const omega = frequenciesHz.map((each) => 2 * Math.PI * each);
    const load = inSpaceOf(frequenciesHz.length, (space) => {
      const { v, i } = terminationOnePort(space, this.load, frequenciesHz, omega, { re: omega, im: omega });
      const [voltage, current] = [space.column(v), space.column(i)];
      return { vr: voltage.re, vi: voltage.im, ir: current.re, ii: current.im };
    });
    return { omega, load, lines: new Map() };
  }

  /** As in methods/reflection.ts. */
  private reflectionOf({ vr, vi, ir, ii }: Pair): ReflectionColumns {
    const { re: R, im: X } = this.source;
    const result = { re: vr.slice(), im: vr.slice(), magnitude: vr.slice(), absorbed: vr.slice() };
    for (let index = 0; index < vr.length; index++) {
      const [a, b, c, d] = [vr[index], vi[index], ir[index], ii[index]];
      const dropRe = R * c - X * d, dropIm = R * d + X * c;
      const size = magnitude(a + dropRe, b + dropIm);
      const [unitRe, unitIm] = [(a + dropRe) / size, (b + dropIm) / size];
      // V - Zr* I, over the sum.
      const [awayRe, awayIm] = [(a - (R * c + X * d)) / size, (b - (R * d - X * c)) / size];
      result.re[index] = awayRe * unitRe + awayIm * unitIm;
      result.im[index] = awayIm * unitRe - awayRe * unitIm;
      result.magnitude[index] = magnitude(awayRe, awayIm);
      result.absorbed[index] = 4 * R * ((a / size) * (c / size) + (b / size) * (d / size));
    }
    return result;
  }

  /** The load's impedance at one frequency; infinite parts where it is an open. */
  impedanceOfLoad(frequencyHz: number): ComplexParts {
    const frequencies = Float64Array.of(frequencyHz);
    const omega = Float64Array.of(2 * Math.PI * frequencyHz);
    return inSpaceOf(1, (space) => {
      const { v, i } = terminationOnePort(space, this.load, frequencies, omega, { re: omega, im: omega });
      const { re, im } = space.column(v.div(i));
      return { re: re[0], im: im[0] };
    });
  }
}
