/** From what the controls hold to the input of a call, with a complaint for each text that cannot be read. */
import { readComplex, readComplexes, type TypedComplex } from '@/lib/quantities/read-complex';
import { readQuantities, readQuantity, tidy } from '@/lib/quantities/read-quantity';
import { UnreadableQuantity } from '@/lib/quantities/refusal';
import { pointerOf } from '@/lib/problems/field-errors';
import type { ComplexesField, Field, RowsField } from './field';
import type { FormValue, GroupValue, ListValue, RowsValue, TypedValue, UnionValue } from './form-values';

export interface Complaint {
  /** RFC 6901, into the input. */
  readonly pointer: string;
  readonly detail: string;
}

export interface FormReading {
  readonly input: unknown;
  readonly complaints: readonly Complaint[];
}

type Path = readonly (string | number)[];

export function readForm(field: Field, values: FormValue): FormReading {
  const complaints: Complaint[] = [];
  const input = read(field, values, [], complaints);
  return { input, complaints };
}

/** Undefined where a request leaves the field out; so is an empty required text, which the schema then misses. */
function read(field: Field, value: FormValue, path: Path, complaints: Complaint[]): unknown {
  const attempt = <Result>(work: () => Result) => attemptAt(path, complaints, work);
  switch (field.kind) {
    case 'number': {
      const { text, unit } = value as TypedValue;
      return text.trim() === '' ? undefined : attempt(() => readQuantity(text, field.unit, unit));
    }
    case 'complex': {
      const { text, unit } = value as TypedValue;
      return text.trim() === '' ? undefined : attempt(() => readComplex(text, field.unit, unit));
    }
    case 'numbers': {
      const { text, unit } = value as TypedValue;
      return text.trim() === '' ? undefined : attempt(() => readQuantities(text, field.unit, unit));
    }
    case 'complexes':
      return attempt(() => readComplexField(field, value as TypedValue));
    case 'rows':
      return attempt(() => readRows(field, value as RowsValue));
    case 'choice':
    case 'text':
      return value === '' || value === null ? undefined : value;
    case 'choices':
    case 'boolean':
      return value ?? (field.kind === 'boolean' && !field.optional ? false : undefined);
    case 'constant':
      return field.value;
    case 'json':
      return value === '' ? undefined : attempt(() => JSON.parse(String(value)) as unknown);
    case 'group': {
      const { present, members } = value as GroupValue;
      if (!present) return undefined;
      const entries = field.members.map((member) => [member.name, read(member.field, members[member.name], [...path, member.name], complaints)] as const);
      return Object.fromEntries(entries.filter(([, entry]) => entry !== undefined));
    }
    case 'union': {
      const { variant: key, options } = value as UnionValue;
      const variant = field.variants.find((candidate) => candidate.key === key);
      return variant && read(variant.field(), options[key] ?? null, path, complaints);
    }
    case 'list': {
      const { present, items } = value as ListValue;
      if (!present) return undefined;
      return items.map((item, index) => read(field.item(), item.value, [...path, index], complaints));
    }
  }
}

function attemptAt<Result>(path: Path, complaints: Complaint[], work: () => Result): Result | undefined {
  try {
    return work();
  } catch (error) {
    if (error instanceof SyntaxError) complaints.push({ pointer: pointerOf(path), detail: 'is not JSON' });
    else if (error instanceof UnreadableQuantity) complaints.push({ pointer: pointerOf(path), detail: error.message });
    else throw error;
    return undefined;
  }
}

function readComplexField({ unit, columns }: ComplexesField, { text, unit: shown }: TypedValue): unknown {
  if (text.trim() === '') return undefined;
  const numbers = readComplexes(text, unit, shown);
  return columns ? { re: numbers.map((each) => rectangular(each).re), im: numbers.map((each) => rectangular(each).im) } : numbers;
}

function rectangular(value: TypedComplex): { readonly re: number; readonly im: number } {
  if (typeof value === 'number') return { re: value, im: 0 };
  if ('re' in value) return value;
  const angle = (value.angle_deg * Math.PI) / 180;
  return { re: value.magnitude * Math.cos(angle), im: value.magnitude * Math.sin(angle) };
}

function readRows({ columns }: RowsField, { text, units }: RowsValue): unknown {
  const lines = text.split('\n').map(tidy).filter((line) => line !== '');
  if (lines.length === 0) return undefined;
  return lines.map((line, index) => {
    const cells = cellsOf(line, columns.length);
    if (cells.length !== columns.length) throw new UnreadableQuantity(`line ${index + 1} has ${cells.length} columns; ${columns.length} are needed`);
    return Object.fromEntries(columns.map(({ name, field }, column) => [name, readCell(cells[column], field, units[column], index)]));
  });
}

/** Tabs as a spreadsheet gives them, semicolons or commas; spaces only where that alone gives the right number. */
function cellsOf(line: string, wanted: number): string[] {
  for (const separator of [/\t+/, /;/, /,/]) {
    if (separator.test(line)) return line.split(separator).map((cell) => cell.trim());
  }
  const words = line.split(/\s+/);
  return words.length === wanted ? words : [line];
}

function readCell(cell: string, field: RowsField['columns'][number]['field'], shown: string, index: number): TypedComplex {
  try {
    return field.kind === 'number' ? readQuantity(cell, field.unit, shown) : readComplex(cell, field.unit, shown);
  } catch (error) {
    if (error instanceof UnreadableQuantity) throw new UnreadableQuantity(`line ${index + 1}: ${error.message}`);
    throw error;
  }
}
