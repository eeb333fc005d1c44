import type { Knex } from 'knex';

export interface NewCall {
  id: string;
  created_at: string;
  organization_id: string;
  key_id: string | null;
  member_id: string | null;
  calculation: string;
  status: number;
  problem: string | null;
  units: number;
  duration_ms: number;
  request_id: string;
  client_request_id: string | null;
  address: string | null;
  engine: string;
  input_digest: string | null;
  result_digest: string | null;
  /** JSON texts; null where they are not kept. */
  request: string | null;
  answer: string | null;
  /** Units charged at admission that the outcome does not cost after all. */
  refunds: readonly Refund[];
}

export interface Refund {
  holder: string;
  period: string;
  units: number;
}

export interface CallRow {
  id: string;
  created_at: Date;
  calculation: string;
  status: number;
  problem: string | null;
  units: number;
  duration_ms: number;
  key_id: string | null;
  key_name: string | null;
  member_name: string | null;
  request_id: string;
}

export interface CallDetailRow extends CallRow {
  client_request_id: string | null;
  address: string | null;
  engine: string;
  input_digest: string | null;
  result_digest: string | null;
  request: string | null;
  answer: string | null;
}

export interface CallFilter {
  organizationId: string;
  memberId?: string;
  calculation?: string;
  status?: string;
  keyId?: string;
  from?: string;
  to?: string;
  /** The last row of the page before: newest first, so the next page is what lies below it. */
  before?: { createdAt: string; id: string };
  limit: number;
}

/**
 * Records calls and gives refunds back, in one transaction and two or three statements however many calls.
 * Sorted refunds keep the lock order key, member, organization.
 */
export async function insertCalls(database: Knex, calls: readonly NewCall[]): Promise<void> {
  const rows = JSON.stringify(calls);
  const refunds = totals(calls.flatMap((call) => call.refunds));
  await database.transaction(async (transaction) => {
    await transaction.raw(insertStatement, [rows]);
    for (const { holder, period, units } of refunds) {
      await transaction.raw('select refund(?, ?::date, ?)', [holder, period, units]);
    }
  });
}

const insertStatement = `
  with incoming as (
    select * from json_to_recordset(?::json) as row (
      id text, created_at timestamptz, organization_id uuid, key_id text, member_id uuid, calculation text,
      status smallint, problem text, units bigint, duration_ms double precision, request_id text,
      client_request_id text, address inet, engine text, input_digest text, result_digest text,
      request text, answer text)
  ), bodies as (
    insert into call_body (id, created_at, request, answer)
    select id, created_at, request, answer from incoming where request is not null or answer is not null
  )
  insert into call (id, created_at, organization_id, key_id, member_id, calculation, status, problem, units,
    duration_ms, request_id, client_request_id, address, engine, input_digest, result_digest)
  select id, created_at, organization_id, key_id, member_id, calculation, status, problem, units,
    duration_ms, request_id, client_request_id, address, engine, input_digest, result_digest
  from incoming`;

function totals(refunds: readonly Refund[]): Refund[] {
  const sums = new Map<string, Refund>();
  for (const refund of refunds) {
    const name = `${refund.holder} ${refund.period}`;
    sums.set(name, { ...refund, units: refund.units + (sums.get(name)?.units ?? 0) });
  }
  return [...sums.values()].sort((a, b) => (`${a.holder} ${a.period}` < `${b.holder} ${b.period}` ? -1 : 1));
}

/** Postgres refuses a row whose month has no partition with check_violation. */
export function isMissingPartition(error: unknown): boolean {
  return typeof error === 'object' && error !== null && 'code' in error && error.code === '23514';
}

export async function ensureCallPartitions(database: Knex, moments: readonly string[]): Promise<void> {
  for (const moment of moments) await database.raw('select ensure_call_partitions(?::timestamptz)', [moment]);
}

export async function listCalls(database: Knex, filter: CallFilter): Promise<CallRow[]> {
  const query = callRows(database)
    .where('call.organization_id', filter.organizationId)
    .orderBy([
      { column: 'call.created_at', order: 'desc' },
      { column: 'call.id', order: 'desc' },
    ])
    .limit(filter.limit);
  if (filter.memberId) query.where('call.member_id', filter.memberId);
  if (filter.calculation) query.where('call.calculation', filter.calculation);
  if (filter.keyId === 'none') query.whereNull('call.key_id');
  else if (filter.keyId) query.where('call.key_id', filter.keyId);
  if (filter.from) query.where('call.created_at', '>=', filter.from);
  if (filter.to) query.where('call.created_at', '<', filter.to);
  if (filter.before) query.whereRaw('(call.created_at, call.id) < (?::timestamptz, ?)', [filter.before.createdAt, filter.before.id]);
  if (filter.status) {
    const isClass = filter.status.endsWith('xx');
    const first = isClass ? Number(filter.status[0]) * 100 : Number(filter.status);
    query.whereBetween('call.status', [first, isClass ? first + 99 : first]);
  }
  return query;
}

export async function findCall(
  database: Knex,
  organizationId: string,
  id: string,
  createdAt: string,
  memberId?: string,
): Promise<CallDetailRow | undefined> {
  const query = callRows(database)
    .leftJoin('call_body', (join) =>
      join.on('call_body.created_at', 'call.created_at').andOn('call_body.id', 'call.id'),
    )
    .select(
      'call.client_request_id',
      database.raw('host(call.address) as address'),
      'call.engine',
      'call.input_digest',
      'call.result_digest',
      'call_body.request',
      'call_body.answer',
    )
    .where({ 'call.organization_id': organizationId, 'call.created_at': createdAt, 'call.id': id });
  if (memberId) query.where('call.member_id', memberId);
  return query.first() as unknown as Promise<CallDetailRow | undefined>;
}

function callRows(database: Knex) {
  return database('call')
    .leftJoin('api_key', 'api_key.id', 'call.key_id')
    .leftJoin('member', 'member.id', 'call.member_id')
    .select<CallRow[]>(
      'call.id',
      'call.created_at',
      'call.calculation',
      'call.status',
      'call.problem',
      'call.units',
      'call.duration_ms',
      'call.key_id',
      'api_key.name as key_name',
      'member.name as member_name',
      'call.request_id',
    );
}
