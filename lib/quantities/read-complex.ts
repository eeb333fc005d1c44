/** Complex numbers as engineers write them: "75-30j", "75 - j30", "0.3∠-43°", "50"; a unit may follow. */
import { readDecimal } from './decimal';
import { readQuantity, scaled, tidy } from './read-quantity';
import { refuse } from './refusal';

export type TypedComplex = number | { readonly re: number; readonly im: number } | { readonly magnitude: number; readonly angle_deg: number };

const decimal = String.raw`(?:\d[\d.,]*|\.\d+)(?:e[+-]?\d+)?`;
/** Real part if any, then the sign and size of the imaginary part with j or i on either side of it, then a unit. */
const rectangular = new RegExp(`^(?:([+-]?${decimal})(?=\\s*[+-]))?\\s*([+-]?)\\s*(?:[ji]\\s*(${decimal})|(${decimal})\\s*\\*?\\s*[ji]|[ji](?![a-z]))(?![a-z])(.*)$`, 'i');
/** "<" stands for the angle sign on keyboards that lack it. */
const polar = new RegExp(`^([+-]?${decimal})\\s*[∠<]\\s*([+-]?${decimal})\\s*(°|deg|degrees|rad)?(?![a-z])(.*)$`, 'i');

export function readComplex(typed: string, unit: string, shown: string = unit): TypedComplex {
  const text = tidy(typed);
  return readPolar(text, unit, shown) ?? readRectangular(text, unit, shown) ?? readReal(text, unit, shown);
}

/** One a line, or between semicolons or tabs; a comma would be taken for one inside a number. */
export function readComplexes(typed: string, unit: string, shown: string = unit): TypedComplex[] {
  const entries = typed.split(/[;,\t\n]+/).map((entry) => entry.trim()).filter((entry) => entry !== '');
  return entries.map((entry) => readComplex(entry, unit, shown));
}

function readPolar(text: string, unit: string, shown: string): TypedComplex | undefined {
  const match = polar.exec(text);
  if (!match) return undefined;
  const [, magnitude, angle, angleUnit = 'deg', rest] = match;
  const written = rest.trim() || shown;
  return { magnitude: scaled(readDecimal(magnitude), written, unit), angle_deg: scaled(readDecimal(angle), angleUnit.toLowerCase(), 'deg') };
}

function readRectangular(text: string, unit: string, shown: string): TypedComplex | undefined {
  const match = rectangular.exec(text);
  if (!match) return undefined;
  const [, real = '0', sign, after, before, rest] = match;
  if (match[1] !== undefined && sign === '') return undefined;
  const written = rest.trim() || shown;
  const imaginary = `${sign === '-' ? '-' : ''}${readDecimal(after ?? before ?? '1')}`;
  return { re: scaled(readDecimal(real), written, unit), im: scaled(imaginary, written, unit) };
}

function readReal(text: string, unit: string, shown: string): number {
  if (/[∠<ji]/.test(text) && !/^[+-]?[\d.]+\s*(in|inch|mi|mil|mils|siemens)\b/.test(text)) {
    refuse('write a complex number as 75-30j, 75 - j30 or 80.8∠-21.8°');
  }
  return readQuantity(text, unit, shown);
}
