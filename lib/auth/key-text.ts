/**
 * The text of an API key: `lw_live_` or `lw_test_`, then in base62 eight characters that name it, 32 of
 * secret (190 bits) and six of CRC-32, so that a mistyped key is refused without asking the database and
 * a scanner can tell a real one. Only its HMAC under the pepper is kept.
 */
import { createHmac, randomBytes } from 'node:crypto';
import { crc32 } from 'node:zlib';

export interface MintedKey {
  readonly id: string;
  readonly text: string;
  readonly ending: string;
}

const alphabet = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz';
const keyForm = /^lw_(live|test)_([0-9A-Za-z]{8})[0-9A-Za-z]{32}[0-9A-Za-z]{6}$/;
const checksumLength = 6;

/** Finds a key anywhere in a text, as in a URL where it must not be. */
export const keyInText = /\blw_(?:live|test)_[0-9A-Za-z]{46}\b/;

export const pepperVersion = 1;

export function mintKey(): MintedKey {
  const id = randomBase62(8);
  const body = `lw_live_${id}${randomBase62(32)}`;
  const text = body + checksum(body);
  return { id, text, ending: text.slice(-2) };
}

export function isWellFormedKey(text: string): boolean {
  return keyForm.test(text) && checksum(text.slice(0, -checksumLength)) === text.slice(-checksumLength);
}

export function digestKey(text: string): Buffer {
  const pepper = process.env.KEY_PEPPER;
  if (!pepper) throw new Error('KEY_PEPPER is not set');
  return createHmac('sha256', pepper).update(text).digest();
}

export function displayKey(id: string, ending: string): string {
  return `lw_live_${id}…${ending}`;
}

function checksum(body: string): string {
  let rest = crc32(body);
  let text = '';
  for (let place = 0; place < checksumLength; place++) {
    text = alphabet[rest % 62] + text;
    rest = Math.floor(rest / 62);
  }
  return text;
}

/** Bytes of 248 and more are thrown away: 248 = 4 x 62, so what stays is even over the alphabet. */
function randomBase62(length: number): string {
  let text = '';
  while (text.length < length) {
    for (const byte of randomBytes(length)) {
      if (byte < 248 && text.length < length) text += alphabet[byte % 62];
    }
  }
  return text;
}
