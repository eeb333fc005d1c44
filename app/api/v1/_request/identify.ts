/** identify: who says they are calling. Nothing here asks the database; a mistyped key ends here. */
import { isWellFormedKey, keyInText, digestKey } from '@/lib/auth/key-text';
import { readSessionToken, sessionCookie } from '@/lib/auth/sessions';
import type { Operation } from '@/openapi/operation';
import { Refusal } from './refusal';

export type Credential =
  | { readonly kind: 'key'; readonly digest: Buffer }
  | { readonly kind: 'session'; readonly sessionId: string }
  | { readonly kind: 'none' };

export const challenge = { 'WWW-Authenticate': 'Bearer realm="linewright"' };
export const invalidTokenChallenge = { 'WWW-Authenticate': 'Bearer realm="linewright", error="invalid_token"' };

export async function identify(request: Request, operation: Operation): Promise<Credential> {
  if (keyInText.test(request.url)) {
    throw new Refusal('key-in-url', 'an API key stands in the URL; send it in the Authorization header and replace it, for it may have been logged');
  }
  if (operation.access === 'public') {
    if (operation.method !== 'get') refuseOtherOrigins(request);
    return { kind: 'none' };
  }
  const authorization = request.headers.get('authorization');
  if (authorization !== null) return keyCredential(authorization);
  const token = cookieOf(request, sessionCookie);
  if (token === null) {
    throw new Refusal('authentication-required', 'send Authorization: Bearer with an API key, or sign in', { headers: challenge });
  }
  if (operation.method !== 'get') refuseOtherOrigins(request);
  const sessionId = await readSessionToken(token);
  if (sessionId === null) throw unknownCaller();
  return { kind: 'session', sessionId };
}

/** The same words for every key or session that does not work, so that they tell a stranger nothing. */
export function unknownCaller(): Refusal {
  return new Refusal('invalid-credentials', 'the key or session is not valid', { headers: invalidTokenChallenge });
}

function keyCredential(authorization: string): Credential {
  const [scheme, token, ...rest] = authorization.trim().split(/[\s,]+/);
  if (scheme?.toLowerCase() !== 'bearer') {
    throw new Refusal('authentication-required', 'the only supported scheme is Authorization: Bearer', { headers: challenge });
  }
  if (!token || rest.length > 0) {
    throw new Refusal('malformed-request', 'Authorization must be Bearer and one key', {
      headers: { 'WWW-Authenticate': 'Bearer realm="linewright", error="invalid_request"' },
    });
  }
  if (!isWellFormedKey(token)) throw unknownCaller();
  return { kind: 'key', digest: digestKey(token) };
}

/** A browser sends the cookie along from any site; only this site's own pages may use it to change things. */
function refuseOtherOrigins(request: Request): void {
  const site = request.headers.get('sec-fetch-site');
  const origin = request.headers.get('origin');
  const isOwn = site !== null ? site === 'same-origin' || site === 'none' : origin === null || hostOf(origin) === request.headers.get('host');
  if (!isOwn) throw new Refusal('cross-origin', 'a session serves only this site’s own pages; use an API key elsewhere');
}

function hostOf(origin: string): string | null {
  return URL.canParse(origin) ? new URL(origin).host : null;
}

function cookieOf(request: Request, name: string): string | null {
  for (const part of (request.headers.get('cookie') ?? '').split(';')) {
    const separator = part.indexOf('=');
    if (part.slice(0, separator).trim() === name) return part.slice(separator + 1).trim() || null;
  }
  return null;
}
