/**
 * The call log's writing side: calls that end within the same few milliseconds are committed together, and
 * each caller waits for the commit that holds their row. Nothing is answered before its row is durable.
 */
import { database } from '@/db/connection';
import { ensureCallPartitions, insertCalls, isMissingPartition, type NewCall } from '@/db/calls';
import { touchKeys } from '@/db/keys';

export type { NewCall } from '@/db/calls';

interface Waiting {
  readonly call: NewCall;
  readonly resolve: () => void;
  readonly reject: (error: unknown) => void;
}

const largestGroup = 200;
/** Long enough to gather a busy millisecond or two, short against a round trip to the disk. */
const gatherMilliseconds = 2;

let waiting: Waiting[] = [];
let timer: NodeJS.Timeout | undefined;

export function recordCall(call: NewCall): Promise<void> {
  return new Promise((resolve, reject) => {
    waiting.push({ call, resolve, reject });
    if (waiting.length >= largestGroup) flush();
    else timer ??= setTimeout(flush, gatherMilliseconds);
  });
}

function flush(): void {
  clearTimeout(timer);
  timer = undefined;
  const group = waiting;
  waiting = [];
  void commit(group);
}

/** A group that the database refuses is halved until the row at fault stands alone; the others are kept. */
async function commit(group: Waiting[]): Promise<void> {
  try {
    await insertWithPartitions(group.map(({ call }) => call));
    for (const { resolve } of group) resolve();
  } catch (error) {
    if (group.length === 1 || !isRefusalOfData(error)) {
      for (const { reject } of group) reject(error);
      return;
    }
    const half = Math.ceil(group.length / 2);
    await Promise.all([commit(group.slice(0, half)), commit(group.slice(half))]);
  }
  noteUse(group);
}

async function insertWithPartitions(calls: NewCall[]): Promise<void> {
  try {
    await insertCalls(database(), calls);
  } catch (error) {
    if (!isMissingPartition(error)) throw error;
    await ensureCallPartitions(database(), [...new Set(calls.map((call) => call.created_at))]);
    await insertCalls(database(), calls);
  }
}

/** SQLSTATE class 22 is data that a column cannot hold; anything else concerns the whole group. */
function isRefusalOfData(error: unknown): boolean {
  return typeof error === 'object' && error !== null && 'code' in error && String(error.code).startsWith('22');
}

const touchedAt = new Map<string, number>();
const touchMilliseconds = 60_000;
const mostTouched = 10_000;

/** `last_used_at` may be a minute behind, so it is neither awaited nor written for every call. */
function noteUse(group: Waiting[]): void {
  const now = Date.now();
  const due = new Set<string>();
  for (const { call } of group) {
    if (call.key_id && now - (touchedAt.get(call.key_id) ?? 0) > touchMilliseconds) due.add(call.key_id);
  }
  if (due.size === 0) return;
  if (touchedAt.size > mostTouched) touchedAt.clear();
  for (const id of due) touchedAt.set(id, now);
  touchKeys(database(), [...due]).catch(() => due.forEach((id) => touchedAt.delete(id)));
}
