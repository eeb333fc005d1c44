/**
 * Console sessions: a signed token in an httpOnly cookie names a row, and the row decides. The signature
 * keeps strangers from making the database look; the row makes signing out immediate.
 */
import { randomUUID } from 'node:crypto';
import { SignJWT, jwtVerify } from 'jose';
import { database } from '@/db/connection';
import { endSession as endSessionRow, insertSession } from '@/db/sessions';

export const sessionCookie = 'lw_session';
const lifetimeSeconds = 12 * 3600;
const issuer = 'linewright';
const audience = 'console';

export interface StartedSession {
  readonly cookie: string;
  readonly expiresAt: Date;
}

export async function startSession(memberId: string, address: string | null, userAgent: string | null): Promise<StartedSession> {
  const id = randomUUID();
  const expiresAt = new Date(Date.now() + lifetimeSeconds * 1000);
  await insertSession(database(), {
    id,
    member_id: memberId,
    expires_at: expiresAt,
    address,
    user_agent: userAgent?.slice(0, 300).replaceAll('\0', '').toWellFormed() ?? null,
  });
  const token = await new SignJWT()
    .setProtectedHeader({ alg: 'HS256', typ: 'session+jwt' })
    .setJti(id)
    .setIssuer(issuer)
    .setAudience(audience)
    .setIssuedAt()
    .setExpirationTime(expiresAt)
    .sign(sessionKey());
  return { cookie: cookieText(token, lifetimeSeconds), expiresAt };
}

export async function endSession(id: string): Promise<string> {
  await endSessionRow(database(), id);
  return cookieText('', 0);
}

/** The session id that a cookie's token names, or null when the token is not one of ours or is too old. */
export async function readSessionToken(token: string): Promise<string | null> {
  try {
    const { payload } = await jwtVerify(token, sessionKey(), {
      algorithms: ['HS256'],
      typ: 'session+jwt',
      issuer,
      audience,
      requiredClaims: ['exp', 'jti'],
    });
    return payload.jti ?? null;
  } catch {
    return null;
  }
}

function cookieText(token: string, maxAge: number): string {
  const secure = process.env.PUBLIC_URL?.startsWith('https:') ? '; Secure' : '';
  return `${sessionCookie}=${token}; Path=/; HttpOnly; SameSite=Lax; Max-Age=${maxAge}${secure}`;
}

function sessionKey(): Uint8Array {
  const key = process.env.SESSION_KEY;
  if (!key) throw new Error('SESSION_KEY is not set');
  return new TextEncoder().encode(key);
}
