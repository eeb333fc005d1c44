/** Ids of calls and requests are ULIDs, so a call's id tells its time, and with it its partition. */
import { decodeTime, ulid } from 'ulid';

export function newCallId(now: number): string {
  return `call_${ulid(now)}`;
}

export function newRequestId(): string {
  return `req_${ulid()}`;
}

/** Null for an id of no time, or of one beyond the years that are written with four digits. */
export function timeOfCallId(id: string): string | null {
  try {
    const time = new Date(decodeTime(id.slice('call_'.length)));
    return time.getUTCFullYear() <= 9999 ? time.toISOString() : null;
  } catch {
    return null;
  }
}
