/** A call as a command to paste; the key stays in a variable of the shell. */
export function curlCommand(origin: string, path: string, body?: Readonly<Record<string, unknown>>): string {
  const head = `curl -s ${origin}/api/v1/${path} \\\n  -H "Authorization: Bearer $LINEWRIGHT_KEY"`;
  if (body === undefined) return head;
  // Within '…' a shell takes everything as it stands but the quote itself.
  return `${head} \\\n  -H "Content-Type: application/json" \\\n  -d '${fieldALine(body).replaceAll("'", "'\\''")}'`;
}

/** JSON with one line a top-level field: short enough to show, and a long input stays readable. */
export function fieldALine(body: Readonly<Record<string, unknown>>): string {
  const fields = Object.entries(body).map(([name, value]) => `    ${JSON.stringify(name)}: ${compact(value)}`);
  return `{\n${fields.join(',\n')}\n  }`;
}

function compact(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(compact).join(', ')}]`;
  if (typeof value === 'object' && value !== null) return `{${Object.entries(value).map(([name, inner]) => `${JSON.stringify(name)}: ${compact(inner)}`).join(', ')}}`;
  return JSON.stringify(value);
}
