/** Numbers for people. JSON stays plain SI; here they get SI prefixes and the digits that matter. */

const prefixes = [
  [1e18, 'E'],
  [1e15, 'P'],
  [1e12, 'T'],
  [1e9, 'G'],
  [1e6, 'M'],
  [1e3, 'k'],
  [1, ''],
  [1e-3, 'm'],
  [1e-6, 'µ'],
  [1e-9, 'n'],
  [1e-12, 'p'],
  [1e-15, 'f'],
  [1e-18, 'a'],
] as const;

/** Units that may carry a prefix; a decibel, a neper, a degree or a ratio may not. */
const prefixable = /^(ohm|Hz|H|F|S|s|m|V|A|W)(\/|$)/;

const missing = '–';
const minus = '\u2212';

export interface Quantity {
  readonly value: string;
  readonly unit: string;
}

/** 49970 ohm -> 49.97 kohm. A value that does not exist is a dash. */
export function engineering(value: number | null | undefined, unit = '', digits = 4): Quantity {
  if (value === null || value === undefined || !Number.isFinite(value)) return { value: missing, unit };
  if (value === 0) return { value: '0', unit };
  if (!prefixable.test(unit)) return { value: significant(value, digits), unit };
  const rounded = Number(Math.abs(value).toPrecision(digits));
  const [factor, prefix] = prefixes.find(([least]) => rounded >= least) ?? prefixes[prefixes.length - 1];
  return { value: signed((value / factor).toPrecision(digits)), unit: `${prefix}${unit}` };
}

/** `engineering` as one text: "49.97 kohm". */
export function formatQuantity(value: number | null | undefined, unit = '', digits = 4): string {
  const quantity = engineering(value, unit, digits);
  return quantity.unit ? `${quantity.value} ${quantity.unit}` : quantity.value;
}

/** Fixed where that reads well, a power of ten where it does not; a true minus sign. */
export function significant(value: number | null | undefined, digits = 4): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return missing;
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e-4 && size < 1e6) return signed(fixed(value, digits));
  const [mantissa, exponent] = value.toExponential(digits - 1).split('e');
  return signed(`${mantissa}e${Number(exponent)}`);
}

/** 69.75 - 31.52j with both parts under one prefix, so that they can be compared. */
export function engineeringComplex(value: { readonly re: number; readonly im: number } | null | undefined, unit = '', digits = 4): Quantity {
  if (!value || !Number.isFinite(value.re) || !Number.isFinite(value.im)) return { value: missing, unit };
  const largest = Math.max(Math.abs(value.re), Math.abs(value.im));
  const [factor, prefix] = prefixable.test(unit)
    ? (prefixes.find(([least]) => largest >= least) ?? prefixes[6])
    : ([1, ''] as const);
  const imaginary = `${signed(fixed(Math.abs(value.im / factor), digits))}j`;
  const sign = value.im < 0 || Object.is(value.im, -0) ? minus : '+';
  return { value: `${signed(fixed(value.re / factor, digits))}\u2009${sign}\u2009${imaginary}`, unit: `${prefix}${unit}` };
}

/** 0.3004 with -43.2 degrees. */
export function formatPolar(value: { readonly re: number; readonly im: number }, digits = 4): { readonly magnitude: string; readonly angle: string } {
  const angle = (Math.atan2(value.im, value.re) * 180) / Math.PI;
  return { magnitude: significant(Math.hypot(value.re, value.im), digits), angle: `∠ ${signed(angle.toFixed(1))}°` };
}

const grouped = new Intl.NumberFormat('en-GB');

/** 12,400 units. */
export function formatCount(value: number): string {
  return grouped.format(value);
}

/** Exact as long as that is short; from ten million on four digits and a prefix, and the exact count on hover. */
export function formatCountBriefly(value: number): string {
  if (value < 1e7) return formatCount(value);
  const [factor, prefix] = prefixes.find(([least]) => value >= least) ?? prefixes[6];
  const brief = value / factor;
  return `${Number.isInteger(brief) ? brief : significant(brief)} ${prefix}`;
}

/** Milliseconds with one decimal below a second: 4.1, 88.3, 1,240. */
export function formatMilliseconds(value: number): string {
  return value < 1000 ? value.toFixed(1) : grouped.format(Math.round(value));
}

function fixed(value: number, digits: number): string {
  if (value === 0) return '0';
  const whole = Math.floor(Math.log10(Math.abs(value))) + 1;
  return value.toFixed(Math.min(12, Math.max(0, digits - whole)));
}

function signed(text: string): string {
  return text.replaceAll('-', minus);
}
