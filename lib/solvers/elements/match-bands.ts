/** How wide matches are between one source and one load: the edges of each, and a word where there are none. */
import type { Warning } from '../calculation';
import { inHertz } from '../lines/line-warnings';
import { firstEdges, OutwardSweep } from '../methods/match-bandwidth';
import type { Element } from './element';
import type { SourceAndLoad } from './terminated-chain';

/** Ascending in |Gamma|. */
const limits = [{ name: 'at_20_db', magnitude: 0.1, db: 20 }, { name: 'at_10_db', magnitude: Math.sqrt(0.1), db: 10 }] as const;
type Level = (typeof limits)[number]['name'];

/** Farther than this from the design frequency nobody means the same band. */
const timesDesign = 10;

/** Looks for the edges of every solution along the same two sweeps, so that the line's model over them is made once. */
export class MatchBands {
  private readonly down: OutwardSweep;
  private readonly up: OutwardSweep;

  constructor(
    private readonly circuit: SourceAndLoad,
    private readonly designHz: number,
    tables: readonly (readonly number[])[],
    private readonly phaseRadPerM: number,
  ) {
    const low = Math.max(0, ...tables.map((each) => each[0]));
    const high = Math.min(timesDesign * designHz, ...tables.map((each) => each[each.length - 1]));
    this.down = new OutwardSweep(designHz, low);
    this.up = new OutwardSweep(designHz, high);
  }

  /** A width that has no end is null, with a warning. `pointer` is that of the solution. */
  of(elements: readonly Element[], pointer: string): { bandwidth: Record<Level, number | null>; warnings: Warning[] } {
    const magnitudeAt = (frequencies: Float64Array) => this.circuit.response(elements, frequencies).magnitude;
    const lineLength = elements.reduce((sum, each) => sum + ('length_m' in each ? each.length_m : 0), 0);
    const wavelengths = (this.phaseRadPerM * lineLength) / (2 * Math.PI);
    const magnitudes = limits.map((each) => each.magnitude);
    const [below, above] = [this.down, this.up].map((sweep) => firstEdges(magnitudeAt, this.designHz, sweep, wavelengths, magnitudes));
    const bandwidth = { at_10_db: null, at_20_db: null } as Record<Level, number | null>;
    const warnings: Warning[] = [];
    limits.forEach(({ name, db }, index) => {
      const value = above.atHz[index] - below.atHz[index];
      if (Number.isFinite(value)) bandwidth[name] = value;
      else warnings.push({ code: 'no_band_edge', pointer: `${pointer}/bandwidth_hz/${name}`, detail: noEdge(db, below.atHz[index] === Infinity ? below.reachedHz : null, above.atHz[index] === Infinity ? above.reachedHz : null) });
    });
    return { bandwidth, warnings };
  }
}

function noEdge(db: number, downToHz: number | null, upToHz: number | null): string {
  const where = [...(downToHz === null ? [] : [`down to ${downToHz === 0 ? '0 Hz' : inHertz(downToHz)}`]), ...(upToHz === null ? [] : [`up to ${inHertz(upToHz)}`])];
  return `the return loss stays at ${db} dB or more ${where.join(' and ')}, which is as far as was looked, so there is no finite width`;
}
