/** Exact scaling by powers of two, so that a long product neither overflows nor rounds. */

const number = new Float64Array(1);
const words = new Uint32Array(number.buffer);
const highWord = new Uint8Array(Uint32Array.of(1).buffer)[0] === 1 ? 1 : 0;

/** floor(log2 |x|) of a normal number from its exponent bits; -1023 for 0 and subnormal numbers. */
export function binaryExponent(x: number): number {
  number[0] = x;
  return ((words[highWord] >>> 20) & 0x7ff) - 1023;
}

/** 2^exponent, exactly, for -1022 <= exponent <= 1023. */
export function powerOfTwo(exponent: number): number {
  words[1 - highWord] = 0;
  words[highWord] = (exponent + 1023) << 20;
  return number[0];
}

/** x 2^exponent for any whole exponent; infinite or 0 beyond the range of numbers. */
export function timesPowerOfTwo(x: number, exponent: number): number {
  // Three steps cover the whole range from the smallest subnormal to the largest number.
  let rest = Math.max(-3000, Math.min(3000, exponent));
  let result = x;
  while (rest !== 0) {
    const step = Math.max(-1000, Math.min(1000, rest));
    result *= powerOfTwo(step);
    rest -= step;
  }
  return result;
}
