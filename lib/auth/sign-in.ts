/**
 * Signing in, guarded by two counts on Postgres: tries from an address and tries for an account. A try is
 * counted before the password is looked at, so parallel guesses cannot slip through; a right password gives
 * its try back. An unknown address and a wrong password take the same time and get the same answer.
 */
import { createHash } from 'node:crypto';
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import { database } from '@/db/connection';
import { findMemberByEmail, type MemberRow } from '@/db/members';
import { verifyPassword } from './passwords';
import { startSession, type StartedSession } from './sessions';

export type SignInOutcome =
  | { readonly kind: 'signed-in'; readonly member: MemberRow; readonly session: StartedSession }
  | { readonly kind: 'failed' }
  | { readonly kind: 'limited'; readonly retryAfterSeconds: number };

interface Limiters {
  byAddress: RateLimiterPostgres;
  byAccount: RateLimiterPostgres;
}

const windowSeconds = 15 * 60;
const triesByAddress = 50;
const triesByAccount = 10;

let limiters: Limiters | undefined;

export async function signIn(
  credentials: { email: string; password: string },
  address: string | null,
  userAgent: string | null,
): Promise<SignInOutcome> {
  const { byAddress, byAccount } = (limiters ??= makeLimiters());
  const addressName = address ?? 'unknown';
  const accountName = createHash('sha256').update(credentials.email.trim().toLowerCase()).digest('base64url');
  try {
    await byAddress.consume(addressName);
    await byAccount.consume(accountName);
  } catch (refusal) {
    if (refusal instanceof RateLimiterRes) {
      return { kind: 'limited', retryAfterSeconds: Math.max(1, Math.ceil(refusal.msBeforeNext / 1000)) };
    }
    throw refusal;
  }
  const member = await findMemberByEmail(database(), credentials.email.trim());
  const matches = await verifyPassword(credentials.password, member?.password_hash);
  if (!member || !matches || member.organization_disabled) return { kind: 'failed' };
  await Promise.all([byAddress.reward(addressName), byAccount.delete(accountName)]);
  return { kind: 'signed-in', member, session: await startSession(member.id, address, userAgent) };
}

function makeLimiters(): Limiters {
  const shared = { storeClient: database(), storeType: 'knex', tableName: 'sign_in_attempt', tableCreated: true, duration: windowSeconds };
  return {
    byAddress: new RateLimiterPostgres({ ...shared, keyPrefix: 'address', points: triesByAddress }),
    byAccount: new RateLimiterPostgres({ ...shared, keyPrefix: 'account', points: triesByAccount }),
  };
}
