/** Scales that no factor can express: a wire gauge, a level against a milliwatt, degrees Fahrenheit. */
import { awgSize, readAwg } from '../solvers/gauges';
import { readDecimal } from './decimal';
import { refuse } from './refusal';
import { sameDimensions, type Dimensions } from './units';

interface SpecialScale {
  readonly pattern: RegExp;
  readonly dimensions: Dimensions;
  /** "24 AWG is a wire diameter". */
  readonly kind: string;
  read(number: string): number;
}

const scales: readonly SpecialScale[] = [
  { pattern: /^(?:awg\s*(?<after>\S+)|(?<before>\S+)\s*awg)$/i, dimensions: { m: 1 }, kind: 'a wire diameter', read: gaugeDiameter },
  { pattern: /^(?<before>\S+?)\s*dBm$/, dimensions: { V: 1, A: 1 }, kind: 'a power', read: (number) => 1e-3 * 10 ** (Number(readDecimal(number)) / 10) },
  { pattern: /^(?<before>\S+?)\s*(°F|degF)$/, dimensions: { degC: 1 }, kind: 'a temperature', read: (number) => ((Number(readDecimal(number)) - 32) * 5) / 9 },
];

/** The value on a special scale; undefined where the text is on none. */
export function readSpecialScale(text: string, wanted: Dimensions, wantedName: string): number | undefined {
  for (const scale of scales) {
    const groups = scale.pattern.exec(text)?.groups;
    if (!groups) continue;
    if (!sameDimensions(scale.dimensions, wanted)) refuse(`${text} is ${scale.kind}; this field takes ${wantedName}`);
    return scale.read(groups.before ?? groups.after);
  }
  return undefined;
}

function gaugeDiameter(text: string): number {
  const number = readAwg(text);
  if (number === undefined) refuse(`AWG runs from 4/0 (0000) to 56 in whole numbers; got ${text}`);
  return awgSize(number).diameterM;
}
