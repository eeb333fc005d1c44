/**
 * The limits a caller is under, and the fields that tell them: RateLimit and RateLimit-Policy of
 * draft-ietf-httpapi-ratelimit-headers. Drafts to -11 say `r` and `t`, the working group's later text `a`
 * and `w`; unknown parameters are ignored, so each item carries both.
 */
import type { AdmissionRow } from '@/db/admission';

export interface Limit {
  readonly name: string;
  readonly quota: number;
  readonly windowSeconds: number;
  readonly remaining: number;
  readonly resetSeconds: number;
}

export function limitsOf(row: AdmissionRow): Limit[] {
  const month = { windowSeconds: row.period_seconds, resetSeconds: row.period_remaining };
  const organization = { ...month, name: 'organization', quota: row.organization_quota, remaining: row.organization_quota - row.organization_used };
  const burst = { name: 'burst', quota: row.burst_limit, windowSeconds: 60, remaining: row.burst_remaining, resetSeconds: row.burst_seconds };
  if (row.key_id === null) return [burst, organization];
  return [burst, { ...month, name: 'key', quota: row.holder_quota, remaining: row.holder_quota - row.holder_used }, organization];
}

export function limitHeaders(limits: readonly Limit[], units: number): Record<string, string> {
  if (limits.length === 0) return {};
  const policy = limits.map(({ name, quota, windowSeconds }) => `"${name}";q=${integer(quota)};w=${integer(windowSeconds)}`);
  const state = limits.map(({ name, remaining, resetSeconds }) => {
    const left = integer(remaining);
    const seconds = integer(Math.ceil(resetSeconds));
    const cost = name === 'burst' || name === 'anonymous' ? 1 : units;
    return `"${name}";r=${left};t=${seconds};a=${left};w=${seconds};c=${integer(cost)}`;
  });
  return { 'RateLimit-Policy': policy.join(', '), RateLimit: state.join(', ') };
}

/** Structured-field integers have at most 15 digits (RFC 9651). */
function integer(value: number): number {
  return Math.min(Math.max(Math.floor(value), 0), 999_999_999_999_999);
}
