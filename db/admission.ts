import type { Knex } from 'knex';

export interface AdmissionRequest {
  keyDigest: Buffer | null;
  sessionId: string | null;
  /** Null where keys are not accepted at all. */
  scope: string | null;
  roles: readonly string[];
  address: string | null;
  units: number;
}

export type Verdict =
  | 'admitted'
  | 'unknown'
  | 'revoked'
  | 'expired'
  | 'disabled'
  | 'address'
  | 'scope'
  | 'role'
  | 'burst'
  | 'quota'
  | 'organization_quota';

/** One row of the SQL function admit(); the columns after `verdict` are null for an unknown caller. */
export interface AdmissionRow {
  verdict: Verdict;
  organization_id: string;
  key_id: string | null;
  member_id: string | null;
  session_expires_at: Date | null;
  role: string | null;
  keeps_bodies: boolean;
  burst_limit: number;
  burst_remaining: number;
  burst_seconds: number;
  holder_quota: number;
  holder_used: number;
  organization_quota: number;
  organization_used: number;
  period: string;
  period_seconds: number;
  period_remaining: number;
}

export async function admit(database: Knex, request: AdmissionRequest): Promise<AdmissionRow> {
  const { rows } = await database.raw('select * from admit(?::bytea, ?::uuid, ?::text, ?::text[], ?::inet, ?::bigint)', [
    request.keyDigest,
    request.sessionId,
    request.scope,
    [...request.roles],
    request.address,
    request.units,
  ] as never);
  return rows[0];
}
