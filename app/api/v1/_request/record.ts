/** record: the call's row, awaited before anything is answered, with what it gives back of its charge. */
import { recordCall, type NewCall } from '@/lib/calls/call-log';
import { newCallId } from '@/lib/calls/call-id';
import { engineVersion } from '@/lib/solvers/engine';
import type { Admission } from './admit';
import type { Exchange } from './exchange';
import type { Parsed } from './parse';
import type { Reply } from './respond';

/** A larger answer is not kept: the same request on the same engine gives it again, byte for byte. */
const largestKeptAnswer = 256 * 1024;

/** One id for the answer and its row. */
const callIds = new WeakMap<Exchange, string>();

export function callIdOf(exchange: Exchange): string {
  const known = callIds.get(exchange);
  if (known) return known;
  const id = newCallId(exchange.startedAt);
  callIds.set(exchange, id);
  return id;
}

export async function record(
  calculation: string,
  exchange: Exchange,
  admission: Admission,
  parsed: Parsed,
  outcome: Reply,
  units: number,
): Promise<void> {
  const { caller } = admission;
  if (!caller) return;
  const answer = outcome.body;
  // A call that was not let in leaves its row, but not a megabyte of whatever it sent.
  const keepsBodies = caller.keepsBodies && admission.refusal === null;
  await recordCall({
    id: callIdOf(exchange),
    created_at: new Date(exchange.startedAt).toISOString(),
    organization_id: caller.organizationId,
    key_id: caller.keyId,
    member_id: caller.memberId,
    calculation,
    status: outcome.status,
    problem: problemCodeOf(outcome),
    units,
    duration_ms: exchange.elapsed(),
    request_id: exchange.requestId,
    client_request_id: exchange.clientRequestId,
    address: exchange.address,
    engine: engineVersion,
    input_digest: outcome.digests?.input ?? null,
    result_digest: outcome.digests?.result ?? null,
    request: keepsBodies ? parsed.bodyText : null,
    answer: keepsBodies && answer !== null && answer.length <= largestKeptAnswer ? answer : null,
    refunds: refundsOf(admission, units),
  });
}

function problemCodeOf(outcome: Reply): string | null {
  return outcome.status < 400 || outcome.body === null ? null : (JSON.parse(outcome.body) as { code: string }).code;
}

function refundsOf({ caller, chargedUnits, period }: Admission, kept: number): NewCall['refunds'] {
  const units = chargedUnits - kept;
  if (units === 0 || !caller) return [];
  const holder = caller.keyId ? `key:${caller.keyId}` : `member:${caller.memberId}`;
  return [holder, `organization:${caller.organizationId}`].map((each) => ({ holder: each, period, units }));
}
