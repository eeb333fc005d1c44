/** Ids of calls and requests are ULIDs, so a call's id tells its time, and with it its partition. */
import { decodeTime, ulid } from 'ulid';

export function newCallId(now: number): string {
  return `call_${ulid(now)}`;
}

export function newRequestId(): string {
  return `req_${ulid()}`;
}

export function timeOfCallId(id: string): string | null {
  try {
    return new Date(decodeTime(id.slice('call_'.length))).toISOString();
  } catch {
    return null;
  }
}
