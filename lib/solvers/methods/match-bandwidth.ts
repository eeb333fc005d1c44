/**
 * How wide a match is: from the design frequency outward to where the return loss first falls below a limit.
 *
 *   width = f_high - f_low,   |Gamma(f)| = 10^(-limit/20) at both,   |Gamma| below it everywhere between
 */
import type { Method } from '../calculation';
import { ImpossibleInput } from '../errors';
import { bracketedRoot } from '../numeric/roots';

export const matchBandwidth: Method = {
  id: 'match-bandwidth',
  title: 'Bandwidth of a match by its return loss',
  source: 'by definition (Pozar, Microwave Engineering, 4th ed., section 5.4, from memory); the edges are roots of the reflection of the whole circuit, found in a bracket',
  formulas: [String.raw`\Delta f = f_2 - f_1, \qquad -20\log_{10}|\Gamma(f_{1,2})| = A, \qquad -20\log_{10}|\Gamma(f)| \ge A \;\text{for}\; f_1 \le f \le f_2`],
  symbols: [
    { symbol: String.raw`\Delta f`, meaning: 'full width around the design frequency', unit: 'Hz' },
    { symbol: 'A', meaning: 'return loss kept to, 10 dB or 20 dB', unit: 'dB' },
    { symbol: String.raw`\Gamma`, meaning: 'power-wave reflection at the source' },
  ],
  range: 'edges between 0 Hz and ten times the design frequency, and within the tables of load and line',
  accuracy: 'edges exact to rounding times the quality factor; the steps outward are half the distance come, and a fiftieth of a half wave at most',
};

export interface FirstEdges {
  /** One a limit; Infinity where there is none before `reachedHz`. */
  readonly atHz: readonly number[];
  readonly reachedHz: number;
}

const firstStep = 1e-10;
const growth = 0.5;
const samplesPerHalfWave = 50;
const mostSamples = 4096;
const samplesInChunk = 64;

/**
 * The frequencies at which bands are looked for, from the design frequency outward to one end of the range, in chunks. The same object
 * gives the same chunks again, so that what was made of them can be kept. `wavelengths`: total length of line at the design frequency.
 */
export class OutwardSweep {
  private readonly chunks = new Map<number, Float64Array[]>();

  constructor(
    private readonly designHz: number,
    readonly endHz: number,
  ) {}

  chunksFor(wavelengths: number): readonly Float64Array[] {
    const fineness = 2 ** Math.ceil(Math.log2(Math.max(1, wavelengths)));
    const known = this.chunks.get(fineness) ?? this.make(fineness);
    this.chunks.set(fineness, known);
    return known;
  }

  private make(fineness: number): Float64Array[] {
    const distance = Math.abs(this.endHz - this.designHz);
    const longest = this.designHz / (2 * samplesPerHalfWave * fineness);
    const samples: number[] = [];
    let offset = firstStep * this.designHz;
    while (offset < distance && samples.length < mostSamples) {
      samples.push(this.designHz + Math.sign(this.endHz - this.designHz) * offset);
      offset += Math.min(growth * offset, longest);
    }
    if (samples.length < mostSamples && distance > 0) samples.push(this.endHz);
    return Array.from({ length: Math.ceil(samples.length / samplesInChunk) }, (_, index) => Float64Array.from(samples.slice(index * samplesInChunk, (index + 1) * samplesInChunk)));
  }
}

/**
 * For each limit on |Gamma|, ascending, the first frequency at which it is reached; Infinity where it is not. Range: |Gamma| at the
 * design frequency below every limit. Accuracy: as the method's. Throws nothing: where the line is not known any more, the search ends.
 * The trap: beyond an edge the return loss may be good again, which is another band and does not count.
 */
export function firstEdges(magnitudeAt: (frequenciesHz: Float64Array) => Float64Array, designHz: number, sweep: OutwardSweep, wavelengths: number, limits: readonly number[]): FirstEdges {
  const at = limits.map(() => Infinity);
  let last = designHz;
  let lastMagnitude = 0;
  for (const chunk of sweep.chunksFor(wavelengths)) {
    const magnitudes = knownPart(magnitudeAt, chunk);
    for (let index = 0; index < magnitudes.length; index++) {
      const magnitude = magnitudes[index];
      // At direct current a chain that blocks may have no reflection to speak of.
      if (!Number.isFinite(magnitude)) continue;
      limits.forEach((limit, which) => {
        if (at[which] === Infinity && magnitude > limit) {
          const excess = (frequency: number) => magnitudeAt(Float64Array.of(frequency))[0] - limit;
          at[which] = bracketedRoot(excess, { x: last, value: lastMagnitude - limit }, { x: chunk[index], value: magnitude - limit })?.x ?? Infinity;
        }
      });
      last = chunk[index];
      lastMagnitude = magnitude;
    }
    if (magnitudes.length < chunk.length || at.every((each) => each !== Infinity)) break;
  }
  return { atHz: at, reachedHz: last };
}

/** As far as the line is known: a table may end before the sweep does. */
function knownPart(magnitudeAt: (frequenciesHz: Float64Array) => Float64Array, chunk: Float64Array): Float64Array {
  try {
    return magnitudeAt(chunk);
  } catch (error) {
    if (!(error instanceof ImpossibleInput)) throw error;
    return chunk.length === 1 ? new Float64Array(0) : knownPart(magnitudeAt, chunk.slice(0, chunk.length >> 1));
  }
}
