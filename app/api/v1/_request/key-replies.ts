/** Keys as replies: their ETag, and what may stand in the way of a change. */
import { KeyFieldRefused, NameTaken, VersionMoved, type KeyResource } from '@/lib/auth/keys';
import { Refusal, invalidInput } from './refusal';
import { reply, type Reply } from './respond';

export function keyReply(status: number, key: KeyResource, value: unknown, headers: Record<string, string> = {}): Reply {
  return reply(status, value, { ETag: `"${key.version}"`, ...headers });
}

/** The version that If-Match names; 428 without one, 412 when it cannot be a version of ours. */
export function versionOf(request: Request): number {
  const wanted = request.headers.get('if-match');
  if (wanted === null) throw new Refusal('precondition-required', 'send the key’s ETag as If-Match');
  const version = /^"(\d{1,9})"$/.exec(wanted.trim())?.[1];
  if (version === undefined) throw moved();
  return Number(version);
}

export async function orKeyRefusal<T>(write: () => Promise<T>): Promise<T> {
  try {
    return await write();
  } catch (error) {
    if (error instanceof NameTaken) {
      throw new Refusal('name-taken', 'another key in force has this name', {
        errors: [{ pointer: '/name', code: 'taken', detail: 'name must differ from the names of the keys in force' }],
      });
    }
    if (error instanceof VersionMoved) throw moved();
    if (error instanceof KeyFieldRefused) {
      throw invalidInput([{ pointer: error.pointer, code: 'out_of_bounds', detail: error.message }]);
    }
    throw error;
  }
}

function moved(): Refusal {
  return new Refusal('precondition-failed', 'the key is another version than If-Match names');
}
