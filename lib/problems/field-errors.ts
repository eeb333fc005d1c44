/**
 * From the validator's issues to the `errors` list of a problem: one entry a wrong field, each with an
 * RFC 6901 pointer, a stable code and a sentence that says what to do. The Bench shows the same
 * sentences beside its fields.
 */
import type { z } from 'zod';

export interface FieldError {
  readonly pointer?: string;
  readonly parameter?: string;
  readonly code: string;
  readonly detail: string;
}

type Issue = z.core.$ZodIssue;
type UnionIssue = Extract<Issue, { code: 'invalid_union' }>;
type Path = readonly PropertyKey[];

/** More would help nobody, and a list of 20,000 wrong numbers must not make an answer of megabytes. */
export const mostErrors = 100;

/** An untrusted key or value may be a megabyte long; a sentence is not. */
const longestQuote = 60;

export function fieldErrors(issues: readonly Issue[]): FieldError[] {
  return issues.flatMap((issue) => errorsOf(issue, [])).slice(0, mostErrors);
}

/** RFC 6901: `~` and `/` in a key are escaped as `~0` and `~1`. */
export function pointerOf(path: Path): string {
  return path.map((part) => `/${String(part).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
}

function errorsOf(issue: Issue, parent: Path): FieldError[] {
  const path = [...parent, ...issue.path];
  switch (issue.code) {
    case 'unrecognized_keys':
      return issue.keys.map((key) =>
        fieldError([...path, quoted(key, '')], 'unknown_field', 'is not a field here; check its spelling or leave it out'),
      );
    case 'invalid_union':
      return issue.errors.length === 0
        ? [fieldError(path, 'invalid_value', `must be ${choice(optionsOf(issue))}${gotField(issue.input, path)}`)]
        : errorsOfUnion(issue, path);
    case 'invalid_key':
    case 'invalid_element':
      return issue.issues.flatMap((inner) => errorsOf(inner, path));
    default:
      return [fieldError(path, codeOf(issue), detailOf(issue))];
  }
}

function fieldError(path: Path, code: string, detail: string): FieldError {
  const name = path.length === 0 ? 'the body' : nameOf(path);
  return { pointer: pointerOf(path), code, detail: `${name} ${detail}` };
}

/** `frequency_hz` for /frequency_hz, `frequency_hz[3]` for /frequency_hz/3. */
function nameOf(path: Path): string {
  const last = path[path.length - 1];
  return typeof last === 'number' ? `${path.length > 1 ? nameOf(path.slice(0, -1)) : ''}[${last}]` : String(last);
}

function codeOf(issue: Issue): string {
  if (issue.code === 'invalid_type' && issue.input === undefined) return 'required';
  if (issue.code === 'custom') return typeof issue.params?.code === 'string' ? issue.params.code : 'invalid_value';
  return issue.code;
}

function detailOf(issue: Issue): string {
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined
        ? `is required (${kind(issue.expected)})`
        : `must be ${kind(issue.expected)}${got(issue.input)}`;
    case 'too_small':
      return `must ${sized(issue.origin, issue.inclusive ? 'at least' : 'more than', issue.minimum)}${got(issue.input)}`;
    case 'too_big':
      return `must ${sized(issue.origin, issue.inclusive ? 'at most' : 'less than', issue.maximum)}${got(issue.input)}`;
    case 'invalid_value':
      return `must be ${choice(issue.values)}${got(issue.input)}`;
    case 'invalid_format':
      return `must be ${formatName(issue.format)}${got(issue.input)}`;
    default:
      return issue.message;
  }
}

function sized(origin: string, comparison: string, bound: unknown): string {
  if (origin === 'array') return `have ${comparison} ${bound} entries`;
  if (origin === 'string') return `have ${comparison} ${bound} characters`;
  return `be ${comparison === 'more than' ? 'greater than' : comparison} ${bound}`;
}

function formatName(format: string): string {
  const names: Record<string, string> = {
    datetime: 'a date and time like 2026-12-01T09:30:00Z',
    email: 'an e-mail address',
    regex: 'in the documented form',
  };
  return names[format] ?? `in the form ${format}`;
}

function kind(expected: string): string {
  const names: Record<string, string> = {
    number: 'a finite number',
    int: 'a whole number',
    string: 'a text',
    object: 'an object',
    array: 'a list',
    boolean: 'true or false',
  };
  return names[expected] ?? expected;
}

/**
 * Of a union's branches, the one that the value came nearest to speaks: the branch whose own shape was
 * met and that has the fewest complaints. When no branch was met, the accepted shapes are listed.
 */
function errorsOfUnion(issue: UnionIssue, path: Path): FieldError[] {
  const branches = branchesOf(issue);
  const entered = branches.filter((branch) => !branch.some(refusesShape));
  const nearest = entered.toSorted((a, b) => complaints(a) - complaints(b))[0];
  if (nearest) return nearest.flatMap((inner) => errorsOf(inner, path));
  const shapes = [...new Set(branches.flatMap((branch) => branch.filter(refusesShape).flatMap(shapesOf)))].join(' or ');
  if (issue.input === undefined) return [fieldError(path, 'required', `is required (${shapes})`)];
  return [fieldError(path, 'invalid_type', `must be ${shapes}${got(issue.input)}`)];
}

/** A union within a union is one with all their branches. */
function branchesOf(issue: UnionIssue): (readonly Issue[])[] {
  return issue.errors.flatMap((branch): (readonly Issue[])[] => {
    const [inner] = branch;
    const isUnion = branch.length === 1 && inner?.code === 'invalid_union' && inner.path.length === 0 && inner.errors.length > 0;
    return isUnion ? branchesOf(inner) : [branch];
  });
}

function complaints(branch: readonly Issue[]): number {
  return branch.reduce((sum, inner) => sum + (inner.code === 'unrecognized_keys' ? 2 * inner.keys.length : 1), 0);
}

function refusesShape(inner: Issue): boolean {
  return inner.path.length === 0 && (inner.code === 'invalid_type' || inner.code === 'invalid_value');
}

function shapesOf(inner: Issue): string[] {
  if (inner.code === 'invalid_type') return [kind(inner.expected)];
  if (inner.code === 'invalid_value') return [choice(inner.values)];
  return [];
}

function optionsOf(issue: Issue): readonly unknown[] {
  return 'options' in issue && Array.isArray(issue.options) ? issue.options : [];
}

function choice(values: readonly unknown[]): string {
  const words = values.map((value) => JSON.stringify(value));
  return words.length === 1 ? words[0]! : `one of ${words.join(', ')}`;
}

function gotField(input: unknown, path: Path): string {
  const field = path[path.length - 1];
  const value =
    typeof input === 'object' && input !== null && field !== undefined && Object.hasOwn(input, field)
      ? (input as Record<PropertyKey, unknown>)[field]
      : undefined;
  return got(value);
}

function got(input: unknown): string {
  if (input === undefined) return '';
  if (typeof input === 'number') return `; got ${input}`;
  if (Array.isArray(input)) return `; got a list of ${input.length}`;
  if (typeof input === 'object' && input !== null) return '; got an object';
  return `; got ${quoted(JSON.stringify(input), '…')}`;
}

function quoted(text: string, ellipsis: string): string {
  return text.length <= longestQuote ? text : text.slice(0, longestQuote).toWellFormed() + ellipsis;
}
