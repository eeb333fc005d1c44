import { crc32 } from 'node:zlib';
import { beforeAll, describe, expect, test } from 'vitest';
import { digestKey, displayKey, isWellFormedKey, keyInText, mintKey } from '@/lib/auth/key-text';

const alphabet = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz';

/** The checksum read back to the number that it writes, the other way round than the minting does. */
function valueOf(base62: string): bigint {
  return [...base62].reduce((value, letter) => value * 62n + BigInt(alphabet.indexOf(letter)), 0n);
}

let minted: ReturnType<typeof mintKey>[];

beforeAll(() => {
  minted = Array.from({ length: 10_000 }, () => mintKey());
});

describe('ten thousand minted keys', () => {
  test('have the documented form, name and ending, and end in the CRC-32 of what comes before', () => {
    for (const { id, text, ending } of minted) {
      expect(text).toMatch(/^lw_live_[0-9A-Za-z]{8}[0-9A-Za-z]{32}[0-9A-Za-z]{6}$/);
      expect(text.slice(8, 16)).toBe(id);
      expect(text.slice(-2)).toBe(ending);
      expect(valueOf(text.slice(-6))).toBe(BigInt(crc32(text.slice(0, -6))));
      expect(isWellFormedKey(text)).toBe(true);
    }
  });

  test('are all different, in name and in secret', () => {
    expect(new Set(minted.map(({ id }) => id)).size).toBe(minted.length);
    expect(new Set(minted.map(({ text }) => text.slice(16, 48))).size).toBe(minted.length);
  });

  test('use every letter of base62 evenly', () => {
    const counts = new Map<string, number>();
    for (const { text } of minted) for (const letter of text.slice(8, 48)) counts.set(letter, (counts.get(letter) ?? 0) + 1);
    const expected = (minted.length * 40) / 62;
    expect(counts.size).toBe(62);
    const chiSquare = [...counts.values()].reduce((sum, count) => sum + (count - expected) ** 2 / expected, 0);
    // 61 degrees of freedom: beyond 140 lies one run in 10 million.
    expect(chiSquare).toBeLessThan(140);
  });
});

describe('a mistyped key', () => {
  test('is refused with any one character changed, left out, doubled or swapped with its neighbour', () => {
    for (const { text } of minted.slice(0, 40)) {
      for (let place = 0; place < text.length; place++) {
        const other = text[place] === 'x' ? 'y' : 'x';
        expect(isWellFormedKey(text.slice(0, place) + other + text.slice(place + 1))).toBe(false);
        expect(isWellFormedKey(text.slice(0, place) + text.slice(place + 1))).toBe(false);
        expect(isWellFormedKey(text.slice(0, place) + text[place] + text.slice(place))).toBe(false);
        const swapped = text.slice(0, place) + (text[place + 1] ?? '') + text[place] + text.slice(place + 2);
        if (swapped !== text) expect(isWellFormedKey(swapped)).toBe(false);
      }
    }
  });

  test('is refused with anything around it', () => {
    const { text } = minted[0];
    for (const other of ['', ` ${text}`, `${text}\n`, `${text} `, `"${text}"`, text.toUpperCase(), text.replace('live', 'prod'), `${text}${text}`]) expect(isWellFormedKey(other)).toBe(false);
  });

  test('made up at random passes the checksum never in a hundred thousand', () => {
    let state = 1;
    const random = () => (state = (state * 48_271) % 2_147_483_647) % 62;
    let passed = 0;
    for (let round = 0; round < 100_000; round++) {
      if (isWellFormedKey(`lw_live_${Array.from({ length: 46 }, () => alphabet[random()]).join('')}`)) passed++;
    }
    expect(passed).toBe(0);
  });
});

describe('a key anywhere in a text', () => {
  test('is found in URLs and sentences, and nothing like it is', () => {
    const { text } = minted[1];
    for (const found of [text, `https://host/api/v1/calls?key=${text}&limit=1`, `Bearer%20 ${text}.`, `/${text}/`]) expect(keyInText.test(found)).toBe(true);
    for (const innocent of [displayKey(minted[1].id, '6h'), text.slice(0, -1), `${text}x`, 'lw_live_', '/api/v1/keys/jIu9aR5U']) expect(keyInText.test(innocent)).toBe(false);
  });
});

describe('what is kept of a key', () => {
  test('is its HMAC under the pepper: another pepper, another digest, and none without one', () => {
    const before = process.env.KEY_PEPPER;
    try {
      process.env.KEY_PEPPER = 'one';
      const first = digestKey(minted[2].text);
      expect(first).toHaveLength(32);
      expect(digestKey(minted[2].text)).toEqual(first);
      expect(digestKey(minted[3].text)).not.toEqual(first);
      process.env.KEY_PEPPER = 'other';
      expect(digestKey(minted[2].text)).not.toEqual(first);
      delete process.env.KEY_PEPPER;
      expect(() => digestKey(minted[2].text)).toThrow('KEY_PEPPER');
    } finally {
      if (before === undefined) delete process.env.KEY_PEPPER;
      else process.env.KEY_PEPPER = before;
    }
  });

  test('shows its name and its last two characters', () => {
    expect(displayKey('jIu9aR5U', '6h')).toBe('lw_live_jIu9aR5U…6h');
  });
});
