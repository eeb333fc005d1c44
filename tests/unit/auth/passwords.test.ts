import { scryptSync } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { hashPassword, verifyPassword } from '@/lib/auth/passwords';

describe('a stored password', () => {
  test('is scrypt of RFC 7914 with N 32768, r 8, p 3, a salt of its own and 32 bytes, as Node computes it alone', async () => {
    const stored = await hashPassword('salt marsh and copper');
    const [scheme, N, r, p, salt, hash] = stored.split('$');
    expect([scheme, N, r, p]).toEqual(['scrypt', '32768', '8', '3']);
    expect(Buffer.from(salt, 'base64url')).toHaveLength(16);
    const again = scryptSync('salt marsh and copper', Buffer.from(salt, 'base64url'), 32, { N: 32768, r: 8, p: 3, maxmem: 2 ** 27 });
    expect(Buffer.from(hash, 'base64url')).toEqual(again);
    expect(stored).not.toContain('copper');
    expect(await hashPassword('salt marsh and copper')).not.toBe(stored);
  });

  test('is met by the right password only', async () => {
    const stored = await hashPassword('Copper 4/0');
    expect(await verifyPassword('Copper 4/0', stored)).toBe(true);
    for (const wrong of ['copper 4/0', 'Copper 4/0 ', 'Copper 4/', '', '\u0000']) expect(await verifyPassword(wrong, stored)).toBe(false);
  });

  test('is met however a keyboard composes its letters', async () => {
    const stored = await hashPassword('Å\u0301ngström ﬁne');
    expect(await verifyPassword('Å\u0301ngström ﬁne'.normalize('NFD'), stored)).toBe(true);
  });

  test('keeps the cost it was made with, so that raising the cost locks nobody out', async () => {
    const salt = Buffer.alloc(16, 7);
    const cheap = scryptSync('older', salt, 32, { N: 1024, r: 8, p: 1 });
    expect(await verifyPassword('older', `scrypt$1024$8$1$${salt.toString('base64url')}$${cheap.toString('base64url')}`)).toBe(true);
  });
});

describe('an account that does not exist', () => {
  test('is refused whatever the password', async () => {
    for (const password of ['', 'x', 'salt marsh and copper']) expect(await verifyPassword(password, undefined)).toBe(false);
  });
});
