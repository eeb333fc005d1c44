/**
 * The same call for a script. Each snippet runs as it is pasted, given a key in LINEWRIGHT_KEY. Python's
 * uses its standard library: it runs on a test bench where nothing may be installed.
 */
export interface Snippet {
  readonly id: string;
  readonly title: string;
  readonly code: string;
}

export function snippetsOf(origin: string, path: string, input: unknown): Snippet[] {
  const url = `${origin}/api/v1/${path}`;
  return [
    { id: 'curl', title: 'curl', code: curl(url, input) },
    { id: 'python', title: 'Python', code: python(url, input) },
    { id: 'javascript', title: 'JavaScript', code: javascript(url, input) },
  ];
}

/** A single quote inside the body would end the shell's own. */
function curl(url: string, input: unknown): string {
  const body = JSON.stringify(input).replaceAll("'", `'\\''`);
  return [`curl -s ${url} \\`, '  -H "Authorization: Bearer $LINEWRIGHT_KEY" \\', '  -H "Content-Type: application/json" \\', `  -d '${body}'`].join('\n');
}

function python(url: string, input: unknown): string {
  return `import json, os, urllib.error, urllib.request

body = ${pythonLiteral(input)}

request = urllib.request.Request(
    "${url}",
    data=json.dumps(body).encode(),
    headers={
        "Authorization": "Bearer " + os.environ["LINEWRIGHT_KEY"],
        "Content-Type": "application/json",
    },
)
try:
    with urllib.request.urlopen(request, timeout=60) as response:
        answer = json.load(response)
except urllib.error.HTTPError as refused:
    raise SystemExit(refused.read().decode())

print(json.dumps(answer["result"], indent=2))
`;
}

function javascript(url: string, input: unknown): string {
  return `const response = await fetch("${url}", {
  method: "POST",
  headers: {
    Authorization: \`Bearer \${process.env.LINEWRIGHT_KEY}\`,
    "Content-Type": "application/json",
  },
  body: JSON.stringify(${layOut(input, JSON.stringify).replaceAll('\n', '\n  ')}),
});
const answer = await response.json();
if (!response.ok) throw new Error(JSON.stringify(answer, null, 2));

console.log(answer.result);
`;
}

function pythonLiteral(input: unknown): string {
  return layOut(input, (value) => (value === null ? 'None' : typeof value === 'boolean' ? (value ? 'True' : 'False') : JSON.stringify(value)));
}

const widest = 88;

/** Objects and lists on one line where that fits, else one entry a line. */
function layOut(value: unknown, plain: (value: unknown) => string, indent = ''): string {
  if (typeof value !== 'object' || value === null) return plain(value);
  const inner = `${indent}  `;
  const isList = Array.isArray(value);
  const entries = isList ? value.map((each) => ['', each] as const) : Object.entries(value).map(([key, each]) => [`${JSON.stringify(key)}: `, each] as const);
  const [open, close] = isList ? '[]' : '{}';
  const oneLine = `${open}${entries.map(([key, each]) => key + layOut(each, plain, inner)).join(', ')}${close}`;
  if (!oneLine.includes('\n') && indent.length + oneLine.length <= widest) return oneLine;
  // A list of numbers flows; one number a line would run for pages.
  if (isList && value.every((each) => typeof each === 'number')) return oneLine;
  return `${open}\n${entries.map(([key, each]) => `${inner}${key}${layOut(each, plain, inner)}`).join(',\n')},\n${indent}${close}`;
}
