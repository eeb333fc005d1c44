/**
 * JSON to read: as indented as usual, but a list of numbers runs along its lines instead of down a page.
 * Still the same JSON: what is copied parses to the same value.
 */
const longestLine = 72;

export function readableJson(value: unknown, indent = ''): string {
  if (Array.isArray(value)) return readableList(value, indent);
  if (typeof value === 'object' && value !== null) {
    const inner = `${indent}  `;
    const fields = Object.entries(value).map(([name, field]) => `${inner}${JSON.stringify(name)}: ${readableJson(field, inner)}`);
    return fields.length === 0 ? '{}' : `{\n${fields.join(',\n')}\n${indent}}`;
  }
  return JSON.stringify(value) ?? 'null';
}

function readableList(list: readonly unknown[], indent: string): string {
  if (list.length === 0) return '[]';
  const inner = `${indent}  `;
  const isFlat = list.every((entry) => typeof entry !== 'object' || entry === null);
  if (!isFlat) return `[\n${list.map((entry) => inner + readableJson(entry, inner)).join(',\n')}\n${indent}]`;
  const words = list.map((entry) => JSON.stringify(entry));
  const oneLine = `[${words.join(', ')}]`;
  return oneLine.length <= longestLine ? oneLine : `[\n${lines(words, inner).join('\n')}\n${indent}]`;
}

function lines(words: readonly string[], indent: string): string[] {
  const made: string[] = [];
  let line = indent;
  words.forEach((word, index) => {
    const text = index < words.length - 1 ? `${word}, ` : word;
    if (line.length + text.length > longestLine && line !== indent) {
      made.push(line.trimEnd());
      line = indent;
    }
    line += text;
  });
  return [...made, line];
}
