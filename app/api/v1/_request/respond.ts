/** respond: an outcome becomes bytes and headers, the same way for every path. */
import { createHash } from 'node:crypto';
import { problemKind } from '@/lib/problems/problems';
import type { Exchange } from './exchange';
import { limitHeaders, type Limit } from './limits';
import { Refusal } from './refusal';

export interface Reply {
  readonly status: number;
  /** JSON text; null for an answer without a body. */
  readonly body: string | null;
  readonly headers?: Readonly<Record<string, string>>;
  /** Fingerprints of a calculation, for the call log. */
  readonly digests?: { readonly input: string; readonly result: string };
}

export function reply(status: number, value: unknown, headers: Readonly<Record<string, string>> = {}): Reply {
  return { status, body: JSON.stringify(value), headers };
}

/** A reply whose reader may keep it and ask later whether it is still the same. */
export function taggedReply(text: string): Reply {
  return { status: 200, body: text, headers: { ETag: `"${createHash('sha256').update(text).digest('base64url')}"`, 'Cache-Control': 'no-cache' } };
}

export function problemReply(refusal: Refusal, exchange: Exchange): Reply {
  const { status, title } = problemKind(refusal.slug);
  const problem = {
    type: `${process.env.PUBLIC_URL ?? ''}/problems/${refusal.slug}`,
    title,
    status,
    detail: refusal.message,
    code: refusal.slug,
    request_id: exchange.requestId,
    ...(refusal.errors.length > 0 && { errors: refusal.errors }),
    ...refusal.members,
  };
  return { status, body: JSON.stringify(problem), headers: { 'Content-Type': 'application/problem+json', ...refusal.headers } };
}

export function respond(request: Request, exchange: Exchange, outcome: Reply, limits: readonly Limit[] = [], units = 0): Response {
  const final = conditional(request, exchange, outcome);
  const headers = new Headers({
    ...(final.body !== null && { 'Content-Type': 'application/json' }),
    'Cache-Control': 'no-store',
    Vary: 'Accept, Authorization, Cookie',
    'X-Request-Id': exchange.requestId,
    'X-Content-Type-Options': 'nosniff',
    'Content-Security-Policy': "default-src 'none'; frame-ancestors 'none'",
    'Referrer-Policy': 'no-referrer',
    ...(process.env.PUBLIC_URL?.startsWith('https:') && { 'Strict-Transport-Security': 'max-age=31536000' }),
    ...limitHeaders(limits, units),
    ...final.headers,
  });
  const hasBody = final.body !== null && request.method !== 'HEAD';
  return new Response(hasBody ? final.body : null, { status: final.status, headers });
}

/** RFC 9110 section 13.2.2 for reads: If-Match first, then If-None-Match. */
function conditional(request: Request, exchange: Exchange, outcome: Reply): Reply {
  const tag = outcome.headers?.ETag;
  if (outcome.status !== 200 || !tag || (request.method !== 'GET' && request.method !== 'HEAD')) return outcome;
  const wanted = request.headers.get('if-match');
  if (wanted !== null && !matches(wanted, tag)) {
    return problemReply(new Refusal('precondition-failed', 'the record is another version than If-Match names'), exchange);
  }
  const known = request.headers.get('if-none-match');
  return known !== null && matches(known.replaceAll('W/', ''), tag) ? { ...outcome, status: 304, body: null } : outcome;
}

function matches(list: string, tag: string): boolean {
  return list.split(',').some((item) => item.trim() === '*' || item.trim() === tag);
}
