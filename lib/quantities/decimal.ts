/** Decimal numbers as people type them, and numbers as decimals without an exponent. */
import { refuse } from './refusal';

const plainDecimal = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;
const withComma = /^[+-]?[\d.]*\d,\d[\d,.]*(e[+-]?\d+)?$/i;

/** The largest power of ten that is read: beyond it no quantity lies, and exact scaling would take long. */
const largestExponent = 400;

/** Checks a decimal and answers it in the form that `Number` and `rationalOf` read. */
export function readDecimal(text: string): string {
  if (withComma.test(text)) refuse(`write ${text} with a point and without commas, as in 1234.5`);
  if (!plainDecimal.test(text)) refuse(`${quoted(text)} is not a number`);
  const exponent = Number(/e(.*)$/i.exec(text)?.[1] ?? 0);
  if (Math.abs(exponent) > largestExponent) refuse(`${text} is beyond any number of this service`);
  return text.replace(/^\+/, '').replace(/^(-?)\./, '$10.');
}

/**
 * The shortest decimal that reads back as `value`, its point moved by `places` to the right. Moving the
 * point instead of multiplying is what makes the way there and back exact.
 */
export function shiftedDecimal(value: number, places: number): string {
  const [mantissa, exponent = '0'] = value.toExponential().split('e');
  const negative = mantissa.startsWith('-');
  const [whole, fraction = ''] = mantissa.replace('-', '').split('.');
  const figures = whole + fraction;
  const point = 1 + Number(exponent) + places;
  const text = point <= 0 ? `0.${'0'.repeat(-point)}${figures}` : `${figures.padEnd(point, '0').slice(0, point)}.${figures.slice(point)}`;
  return (negative ? '-' : '') + (text.includes('.') ? text.replace(/\.?0*$/, '') : text);
}

export function quoted(text: string): string {
  return `“${text.length > 40 ? `${text.slice(0, 40)}…` : text}”`;
}
