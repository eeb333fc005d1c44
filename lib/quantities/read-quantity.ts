/**
 * From what a person types into a field to the SI number that goes on the wire: "3.2 mm", "30.8 pF/ft",
 * "24 AWG". Strict: what cannot be read is refused with the reason, never guessed.
 */
import { quoted, readDecimal } from './decimal';
import { numberOf, over, rationalOf, times } from './rational';
import { refuse } from './refusal';
import { readSpecialScale } from './special-scales';
import { readUnit } from './unit-expression';
import { kindOf, sameDimensions, type Unit } from './units';

const leadingNumber = /^([+-]?[\d.,]*\d[\d.,]*(?:e[+-]?\d+)?|[+-]?\.\d+(?:e[+-]?\d+)?)(.*)$/i;

/** `unit` is the field's own; a bare number counts in `shown`, the unit that stands inside the field. */
export function readQuantity(typed: string, unit: string, shown: string = unit): number {
  const text = tidy(typed);
  if (text === '') refuse('type a number');
  const own = readUnit(unit);
  const special = readSpecialScale(text, own.dimensions, takes(unit));
  if (special !== undefined) return special;
  const [, number, rest] = leadingNumber.exec(text) ?? refuse(`${quoted(text)} does not begin with a number`);
  return scaled(readDecimal(number), rest.trim() === '' ? shown : rest, unit);
}

/** Several of them, one a line or between commas or semicolons. */
export function readQuantities(typed: string, unit: string, shown: string = unit): number[] {
  const entries = typed.split(/[,;\t\n]+/).map((entry) => entry.trim()).filter((entry) => entry !== '');
  return entries.map((entry) => readQuantity(entry, unit, shown));
}

/** A decimal in the unit `written`, as a number in `unit`; exact to the last binary digit where both are decimal. */
export function scaled(decimal: string, written: string, unit: string): number {
  const target = readUnit(unit);
  return numberOf(times(rationalOf(decimal), over(unitFor(written, unit, target).factor, target.factor)));
}

function unitFor(written: string, unit: string, target: Unit): Unit {
  const source = readUnit(written, target.dimensions);
  if (!sameDimensions(source.dimensions, target.dimensions)) {
    refuse(`${written.trim()} is ${kindOf(source.dimensions)}; this field takes ${takes(unit)}`);
  }
  return source;
}

/** The unit that a field takes, in words where it has none. */
export function takes(unit: string): string {
  return unit === '' || unit === '1' ? 'a plain number' : unit;
}

/** One kind of minus, one kind of space, no space at the ends. */
export function tidy(text: string): string {
  return text.replace(/[−–‐]/g, '-').replace(/[\u00a0\u2009\u202f]/g, ' ').trim();
}
