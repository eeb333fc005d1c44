/** Bytes, then text, then JSON, each within its bound and each with its own refusal. */
import { pointerOf } from '@/lib/problems/field-errors';
import { Refusal, invalidInput } from './refusal';

const largestBody = 1024 * 1024;
const deepestNesting = 32;

export interface JsonBody {
  readonly text: string;
  readonly value: unknown;
}

export async function readJsonBody(request: Request): Promise<JsonBody> {
  refuseOtherMediaTypes(request);
  const text = decode(await readBytes(request));
  const value = parseJson(text);
  refuseDeepNesting(value);
  return { text, value };
}

function refuseOtherMediaTypes(request: Request): void {
  const type = request.headers.get('content-type') ?? '';
  if (!/^application\/json\s*(;\s*charset="?utf-8"?\s*)?$/i.test(type)) {
    throw new Refusal('unsupported-media-type', `Content-Type must be application/json; got ${type.slice(0, 100) || 'none'}`, {
      headers: { Accept: 'application/json' },
    });
  }
  const encoding = request.headers.get('content-encoding') ?? 'identity';
  if (encoding.toLowerCase() !== 'identity') {
    throw new Refusal('unsupported-media-type', 'the body must not be compressed', { headers: { 'Accept-Encoding': 'identity' } });
  }
}

/** Counted while reading: a declared length may be missing or untrue. */
async function readBytes(request: Request): Promise<Buffer> {
  const tooLarge = () => new Refusal('body-too-large', `the body must have at most ${largestBody} bytes`);
  if (Number(request.headers.get('content-length')) > largestBody) throw tooLarge();
  if (!request.body) return Buffer.alloc(0);
  const chunks: Uint8Array[] = [];
  let size = 0;
  const reader = request.body.getReader();
  for (;;) {
    const { done, value } = await reader.read();
    if (done) return Buffer.concat(chunks);
    size += value.byteLength;
    if (size > largestBody) {
      await reader.cancel();
      throw tooLarge();
    }
    chunks.push(value);
  }
}

/** A byte order mark stays and then fails as JSON: RFC 8259 forbids it, and the log keeps what was sent. */
function decode(bytes: Buffer): string {
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    throw new Refusal('malformed-request', 'the body must be UTF-8');
  }
}

function parseJson(text: string): unknown {
  if (text.trim() === '') throw new Refusal('malformed-request', 'the body is empty; send one JSON value');
  try {
    return JSON.parse(text);
  } catch (error) {
    const reason = error instanceof SyntaxError ? error.message.slice(0, 200).toWellFormed() : 'it cannot be parsed';
    throw new Refusal('malformed-request', `the body must be JSON: ${reason}`);
  }
}

/** No schema of ours is nearly as deep; without recursion, so that the check itself cannot overflow. */
function refuseDeepNesting(root: unknown): void {
  const pending: { value: unknown; path: PropertyKey[] }[] = [{ value: root, path: [] }];
  for (let next = pending.pop(); next; next = pending.pop()) {
    const { value, path } = next;
    if (typeof value !== 'object' || value === null) continue;
    if (path.length >= deepestNesting) {
      const pointer = pointerOf(path.slice(0, 1));
      throw invalidInput([{ pointer, code: 'too_deep', detail: `${String(path[0])} must be nested at most ${deepestNesting} levels deep` }]);
    }
    const isList = Array.isArray(value);
    for (const [key, child] of Object.entries(value)) {
      if (typeof child === 'object' && child !== null) pending.push({ value: child, path: [...path, isList ? Number(key) : key] });
    }
  }
}
