/** admit and meter: may this caller do this, now, and is there quota for it. One round trip. */
import { RateLimiterMemory, RateLimiterRes } from 'rate-limiter-flexible';
import { admissionDatabase } from '@/db/connection';
import { admit as admitRow, type AdmissionRow, type Verdict } from '@/db/admission';
import { rolesWith, type Role } from '@/lib/auth/permissions';
import type { Operation } from '@/openapi/operation';
import type { Exchange } from './exchange';
import { unknownCaller, type Credential } from './identify';
import { limitsOf, type Limit } from './limits';
import { Refusal } from './refusal';

export interface Caller {
  readonly organizationId: string;
  readonly keyId: string | null;
  readonly memberId: string | null;
  readonly role: Role | null;
  readonly sessionId: string | null;
  readonly sessionExpiresAt: Date | null;
  readonly keepsBodies: boolean;
}

export interface Admission {
  /** Null on public paths. */
  readonly caller: Caller | null;
  readonly refusal: Refusal | null;
  readonly limits: readonly Limit[];
  readonly chargedUnits: number;
  readonly period: string;
}

export async function admit(credential: Credential, operation: Operation, exchange: Exchange, units: number): Promise<Admission> {
  if (operation.access === 'public' || credential.kind === 'none') return admitAnonymous(operation, exchange);
  const row = await admitRow(admissionDatabase(), {
    keyDigest: credential.kind === 'key' ? credential.digest : null,
    sessionId: credential.kind === 'session' ? credential.sessionId : null,
    scope: operation.access.scope ?? null,
    roles: rolesWith(operation.access.permission),
    address: exchange.address,
    units,
  });
  if (row.verdict === 'unknown' || row.verdict === 'revoked' || row.verdict === 'expired') throw unknownCaller();
  return {
    caller: callerOf(row, credential),
    refusal: row.verdict === 'admitted' ? null : refusals[row.verdict](row, operation),
    limits: limitsOf(row),
    chargedUnits: row.verdict === 'admitted' ? units : 0,
    period: row.period,
  };
}

function callerOf(row: AdmissionRow, credential: Credential): Caller {
  return {
    organizationId: row.organization_id,
    keyId: row.key_id,
    memberId: row.member_id,
    role: row.role as Role | null,
    sessionId: credential.kind === 'session' ? credential.sessionId : null,
    sessionExpiresAt: row.session_expires_at,
    keepsBodies: row.keeps_bodies,
  };
}

type RefusingVerdict = Exclude<Verdict, 'admitted' | 'unknown' | 'revoked' | 'expired'>;

const refusals: Record<RefusingVerdict, (row: AdmissionRow, operation: Operation) => Refusal> = {
  disabled: () => new Refusal('organization-disabled', 'the organization is disabled'),
  address: () => new Refusal('address-not-allowed', 'the key may not be used from this address'),
  scope: (_, { access }) => {
    const scope = access === 'public' ? undefined : access.scope;
    return new Refusal(
      'insufficient-scope',
      scope ? `the key lacks the scope ${scope}` : 'keys are not accepted here; sign in to the console',
      { headers: { 'WWW-Authenticate': `Bearer realm="linewright", error="insufficient_scope"${scope ? `, scope="${scope}"` : ''}` } },
    );
  },
  role: (row) => new Refusal('insufficient-role', `the role ${row.role} does not allow this`),
  burst: (row) => limited('burst-limit', `more than ${row.burst_limit} requests in a minute`, 'burst', row.burst_seconds),
  quota: (row) =>
    limited('quota-exceeded', `the key has ${row.holder_quota - row.holder_used} units left this month, which do not cover the call`,
      row.key_id === null ? 'organization' : 'key', row.period_remaining),
  organization_quota: (row) =>
    limited('quota-exceeded', `the organization has ${row.organization_quota - row.organization_used} units left this month, which do not cover the call`,
      'organization', row.period_remaining),
};

function limited(slug: 'burst-limit' | 'quota-exceeded', detail: string, policy: string, seconds: number): Refusal {
  return new Refusal(slug, detail, {
    headers: { 'Retry-After': String(Math.max(1, Math.ceil(seconds))) },
    members: { violated_policies: [policy] },
  });
}

/** In memory and by address: what strangers read is the same for all of them and cheap. */
const anonymousRequestsPerMinute = Number(process.env.ANONYMOUS_REQUESTS_PER_MINUTE) || 1200;
const anonymous = new RateLimiterMemory({ points: anonymousRequestsPerMinute, duration: 60 });

async function admitAnonymous(operation: Operation, exchange: Exchange): Promise<Admission> {
  const admission = { caller: null, refusal: null, chargedUnits: 0, period: '' };
  if (operation.unlimited) return { ...admission, limits: [] };
  try {
    const left = await anonymous.consume(exchange.address ?? 'unknown');
    return { ...admission, limits: [anonymousLimit(left)] };
  } catch (full) {
    if (!(full instanceof RateLimiterRes)) throw full;
    const limit = anonymousLimit(full);
    return { ...admission, limits: [limit], refusal: limited('burst-limit', `more than ${limit.quota} requests in a minute from this address`, limit.name, limit.resetSeconds) };
  }
}

function anonymousLimit(state: RateLimiterRes): Limit {
  return {
    name: 'anonymous',
    quota: anonymousRequestsPerMinute,
    windowSeconds: 60,
    remaining: state.remainingPoints,
    resetSeconds: state.msBeforeNext / 1000,
  };
}
