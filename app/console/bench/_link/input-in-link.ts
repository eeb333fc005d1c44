/**
 * An input in the address of the page: JSON, deflated, in base64url, behind a "1" for the form of the
 * encoding. It stands in the fragment, which a browser sends to no server.
 */
const form = '1.';
/** A sweep's own limit lies far below; what is longer was not made here. */
const longestText = 2_000_000;

export async function encodeInput(input: unknown): Promise<string> {
  const bytes = await through(new TextEncoder().encode(JSON.stringify(input)), new CompressionStream('deflate-raw'));
  return form + toBase64Url(bytes);
}

/** The input, or undefined where the fragment holds none that can be read. */
export async function decodeInput(fragment: string): Promise<unknown> {
  const text = fragment.replace(/^#/, '');
  if (!text.startsWith(form)) return undefined;
  try {
    const bytes = await through(fromBase64Url(text.slice(form.length)), new DecompressionStream('deflate-raw'));
    return JSON.parse(new TextDecoder().decode(bytes)) as unknown;
  } catch {
    return undefined;
  }
}

async function through(bytes: Uint8Array<ArrayBuffer>, stream: CompressionStream | DecompressionStream): Promise<Uint8Array> {
  const reader = new Blob([bytes]).stream().pipeThrough<Uint8Array<ArrayBuffer>>(stream).getReader();
  const parts: Uint8Array[] = [];
  let length = 0;
  for (let next = await reader.read(); !next.done; next = await reader.read()) {
    length += next.value.length;
    if (length > longestText) throw new RangeError('the link unfolds to more than an input can be');
    parts.push(next.value);
  }
  const whole = new Uint8Array(length);
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}

function toBase64Url(bytes: Uint8Array): string {
  const binary = Array.from(bytes, (byte) => String.fromCharCode(byte)).join('');
  return btoa(binary).replaceAll('+', '-').replaceAll('/', '_').replace(/=+$/, '');
}

function fromBase64Url(text: string): Uint8Array<ArrayBuffer> {
  const binary = atob(text.replaceAll('-', '+').replaceAll('_', '/'));
  return Uint8Array.from(binary, (character) => character.charCodeAt(0));
}
