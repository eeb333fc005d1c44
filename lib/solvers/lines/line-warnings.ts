/** What to know about a line's model over the frequencies asked for. */
import type { Warning } from '../calculation';

/** Skin effect changes R by about a factor of three over a decade, so constants over more are a choice worth naming. */
const decade = 10;

/** Of a line whose R and G were given as the same at every frequency. */
export function constantOverDecadeWarnings(frequenciesHz: Float64Array): Warning[] {
  const positive = frequenciesHz.filter((each) => each > 0);
  if (positive.length === 0) return [];
  let lowest = Infinity;
  let highest = 0;
  for (const each of positive) {
    lowest = Math.min(lowest, each);
    highest = Math.max(highest, each);
  }
  if (highest <= decade * lowest) return [];
  return [
    {
      code: 'constants_over_decade',
      pointer: '',
      detail: `R and G are taken as constant from ${inHertz(lowest)} to ${inHertz(highest)}; the resistance of a real conductor grows with the root of frequency, and dielectric loss with frequency`,
    },
  ];
}

/** 1e8 as "100 MHz", for a sentence. */
export function inHertz(frequencyHz: number): string {
  const prefixes = ['', 'k', 'M', 'G', 'T', 'P'];
  const step = Math.max(0, Math.min(prefixes.length - 1, Math.floor(Math.log10(frequencyHz) / 3)));
  return `${Number((frequencyHz / 1000 ** step).toPrecision(6))} ${prefixes[step]}Hz`;
}

/** "0 Hz to 100 MHz", or the one frequency where both are the same. */
export function hertzRange(lowestHz: number, highestHz: number): string {
  const text = (frequencyHz: number) => (frequencyHz === 0 ? '0 Hz' : inHertz(frequencyHz));
  return lowestHz === highestHz ? text(lowestHz) : `${text(lowestHz)} to ${text(highestHz)}`;
}

/** Beyond these radians the rounding of the phase alone, some 1e-15 of it, is more than the stated accuracy. */
const mostTurn = 1000;

/** `turns`: by how many radians the phase turns, at each frequency. */
export function turnWarnings(turns: Float64Array, pointer: string): Warning[] {
  const most = turns.reduce((largest, each) => Math.max(largest, each), 0);
  if (most <= mostTurn) return [];
  return [
    {
      code: 'many_turns',
      pointer,
      detail: `the phase turns by up to ${most.toPrecision(3)} rad, and a number of 16 digits knows it to ${(most * 2e-15).toPrecision(1)} rad; what depends on the phase is no better`,
    },
  ];
}

/** Where a line carries more than its transverse wave. */
export function higherModeWarnings(omega: Float64Array, singleModeLimitHz: number): Warning[] {
  const highest = omega.reduce((most, each) => Math.max(most, each), 0) / (2 * Math.PI);
  if (highest <= singleModeLimitHz) return [];
  return [{ code: 'higher_modes', pointer: '', detail: `above ${inHertz(singleModeLimitHz)} a higher mode propagates beside the one computed here; frequency_hz goes up to ${inHertz(highest)}` }];
}
