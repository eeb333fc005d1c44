/**
 * Where sign-in may lead: a path of this site, or nowhere. Anything that a browser could read as
 * another host (`//host`, `/\host`, a scheme, a control character) is dropped, or a mailed link could
 * carry a member from our sign-in straight to somebody else's.
 */
export function sameSitePath(next: unknown): string | null {
  if (typeof next !== 'string' || !/^\/(?![/\\])[\x21-\x5b\x5d-\x7e]*$/.test(next)) return null;
  const base = 'http://here.invalid';
  return URL.canParse(next, base) && new URL(next, base).origin === base ? next : null;
}
