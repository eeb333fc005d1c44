/** Published and computed numbers, digit for digit. Plain hyphens: a reader may paste them into a script. */
import type { ComputedValue, PublishedValue } from '@/lib/verification/checks';

/** A number in the form of the published one: the digits that agree with it, and those that follow. */
export interface Digits {
  readonly agreeing: string;
  readonly following: string;
}

/** The digits of `computed`, written with an exponent where the published number is. */
export function digitsBeside(published: string, computed: number): Digits {
  const text = /e/i.test(published) && computed !== 0 ? computed.toExponential() : String(computed);
  const [mantissa, exponent = ''] = text.split(/e/i);
  const [wanted, wantedExponent = ''] = published.split(/e/i);
  if (Number(exponent) !== Number(wantedExponent)) return { agreeing: '', following: text };
  const same = commonLength(mantissa, wanted);
  // The exponent belongs to the whole; it stands with the digits that end the number.
  const following = mantissa.slice(same);
  const tail = exponent && `e${exponent}`;
  return following ? { agreeing: mantissa.slice(0, same), following: following + tail } : { agreeing: mantissa + tail, following: '' };
}

function commonLength(computed: string, published: string): number {
  let length = 0;
  while (length < computed.length && computed[length] === published[length]) length++;
  const isRoundedUp = length + 1 === computed.length && Number(computed[length]) === Number(published[length]) + 1 && Number(published[length + 1]) >= 5;
  return isRoundedUp ? computed.length : length;
}

/** One line of a value: `before` is its sign or the place of one, `after` the j. */
export interface Line extends Digits {
  readonly before: string;
  readonly after: string;
}

/** The place of a sign; a line may not break after it. */
const noSign = '\u00a0';

const noValue: Line = { before: noSign, agreeing: 'no finite value', following: '', after: '' };

export function publishedLines(value: PublishedValue): readonly Line[] {
  if (value === null) return [noValue];
  if (typeof value !== 'object') return [line({ agreeing: String(value), following: '' })];
  return [line({ agreeing: value.re, following: '' }), line({ agreeing: value.im, following: '' }, true)];
}

export function computedLines(published: PublishedValue, value: ComputedValue): readonly Line[] {
  if (value === null) return [published === null ? noValue : { ...noValue, agreeing: '', following: noValue.agreeing }];
  if (typeof value === 'object') {
    const wanted = typeof published === 'object' && published !== null ? published : { re: '', im: '' };
    return [line(digitsBeside(wanted.re, value.re)), line(digitsBeside(wanted.im, value.im), true)];
  }
  if (typeof value === 'number' && typeof published === 'string') return [line(digitsBeside(published, value))];
  return [line(value === published ? { agreeing: String(value), following: '' } : { agreeing: '', following: String(value) })];
}

function line({ agreeing, following }: Digits, imaginary = false): Line {
  const isNegative = (agreeing || following).startsWith('-');
  const unsigned = (text: string) => text.replace(/^-/, '');
  return {
    before: isNegative ? '-' : imaginary ? '+' : noSign,
    agreeing: unsigned(agreeing),
    following: agreeing === '-' || !agreeing ? unsigned(following) : following,
    after: imaginary ? '\u00a0j' : '',
  };
}

/** 1.2e-16, 0.004, 0: a difference or a tolerance, in brief. */
export function brief(value: number, digits = 2): string {
  if (value === 0) return '0';
  if (!Number.isFinite(value)) return 'none';
  const rounded = Number(value.toPrecision(digits));
  return rounded >= 1e-3 && rounded < 1e4 ? String(rounded) : rounded.toExponential();
}

/** 83 %, 0.02 %: of what is allowed. */
export function percent(share: number): string {
  if (!Number.isFinite(share)) return 'not met';
  return share > 0 && share < 1e-4 ? '< 0.01\u00a0%' : `${Number((share * 100).toPrecision(2))}\u00a0%`;
}
