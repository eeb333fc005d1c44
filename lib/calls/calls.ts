/** The call log's reading side: pages by cursor, and one call with its bodies. */
import { createHmac, timingSafeEqual } from 'node:crypto';
import { database } from '@/db/connection';
import { findCall, listCalls, type CallFilter, type CallRow } from '@/db/calls';
import { timeOfCallId } from './call-id';

export type CallPageFilter = Omit<CallFilter, 'before'> & { cursor?: string };

/** The cursor was not made by this service for this organization and filter. */
export class CursorRefused extends Error {
  override readonly name = 'CursorRefused';
}

export async function readCallPage(filter: CallPageFilter) {
  const { cursor, ...given } = filter;
  const rest = { ...given, from: utc(given.from), to: utc(given.to) };
  const rows = await listCalls(database(), {
    ...rest,
    before: cursor === undefined ? undefined : readCursor(cursor, rest),
    limit: filter.limit + 1,
  });
  const page = rows.slice(0, filter.limit);
  const last = page[page.length - 1];
  return {
    data: page.map(callOf),
    next_cursor: rows.length > filter.limit && last ? makeCursor(last, rest) : null,
  };
}

/** Undefined for a call that does not exist, is another organization's or, where asked, another member's. */
export async function readCall(organizationId: string, id: string, memberId?: string) {
  const createdAt = timeOfCallId(id);
  const row = createdAt ? await findCall(database(), organizationId, id, createdAt, memberId) : undefined;
  if (!row) return undefined;
  return {
    ...callOf(row),
    client_request_id: row.client_request_id,
    address: row.address,
    engine: row.engine,
    digests: { input: row.input_digest, result: row.result_digest },
    request: parsed(row.request),
    answer: parsed(row.answer),
  };
}

/** The database reads fewer offsets than the API takes. */
function utc(moment: string | undefined): string | undefined {
  return moment && new Date(moment).toISOString();
}

function callOf(row: CallRow) {
  return {
    id: row.id,
    created_at: row.created_at.toISOString(),
    calculation: row.calculation,
    status: row.status,
    problem: row.problem,
    units: row.units,
    duration_ms: row.duration_ms,
    key: row.key_id && row.key_name ? { id: row.key_id, name: row.key_name } : null,
    member: row.member_name ? { name: row.member_name } : null,
    request_id: row.request_id,
  };
}

function parsed(text: string | null): unknown {
  return text === null ? null : JSON.parse(text);
}

/** The place of the last row, signed together with the filter so that it fits no other list. */
function makeCursor(row: CallRow, filter: Omit<CallPageFilter, 'cursor'>): string {
  const place = Buffer.from(JSON.stringify({ at: row.created_at.toISOString(), id: row.id })).toString('base64url');
  return `${place}.${signature(place, filter).toString('base64url')}`;
}

function readCursor(cursor: string, filter: Omit<CallPageFilter, 'cursor'>): { createdAt: string; id: string } {
  const [place = '', seal = ''] = cursor.split('.');
  const expected = signature(place, filter);
  const given = Buffer.from(seal, 'base64url');
  if (given.length !== expected.length || !timingSafeEqual(given, expected)) throw new CursorRefused();
  const { at, id } = JSON.parse(Buffer.from(place, 'base64url').toString());
  return { createdAt: at, id };
}

function signature(place: string, filter: Omit<CallPageFilter, 'cursor'>): Buffer {
  const { organizationId, memberId, calculation, status, keyId, from, to } = filter;
  const scope = JSON.stringify([place, organizationId, memberId, calculation, status, keyId, from, to]);
  return createHmac('sha256', `cursor ${process.env.SESSION_KEY}`).update(scope).digest().subarray(0, 16);
}
