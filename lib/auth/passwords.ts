/** Passwords at rest: scrypt (RFC 7914) with its parameters beside the hash, so that they can be raised. */
import { randomBytes, scrypt, timingSafeEqual } from 'node:crypto';

/** OWASP's 2^15, 8, 3: 32 MiB and about a tenth of a second, off the event loop. */
const cost = { N: 2 ** 15, r: 8, p: 3 };
const hashLength = 32;
const memoryLimit = 128 * 1024 * 1024;

export async function hashPassword(password: string): Promise<string> {
  const salt = randomBytes(16);
  const hash = await derive(password, salt, cost);
  return `scrypt$${cost.N}$${cost.r}$${cost.p}$${salt.toString('base64url')}$${hash.toString('base64url')}`;
}

/** With no stored hash the same work is done and the answer is no: an unknown account takes as long. */
export async function verifyPassword(password: string, stored: string | undefined): Promise<boolean> {
  const [, N, r, p, salt, hash] = (stored ?? absentAccount).split('$');
  const expected = Buffer.from(hash!, 'base64url');
  const derived = await derive(password, Buffer.from(salt!, 'base64url'), { N: Number(N), r: Number(r), p: Number(p) });
  return timingSafeEqual(derived, expected) && stored !== undefined;
}

const absentAccount = `scrypt$${cost.N}$${cost.r}$${cost.p}$${Buffer.alloc(16).toString('base64url')}$${Buffer.alloc(hashLength).toString('base64url')}`;

function derive(password: string, salt: Buffer, parameters: { N: number; r: number; p: number }): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    scrypt(password.normalize('NFKC'), salt, hashLength, { ...parameters, maxmem: memoryLimit }, (error, key) =>
      error ? reject(error) : resolve(key),
    );
  });
}
