/**
 * What the controls hold, as a tree beside the tree of fields: texts as typed with the unit that stands in
 * their field, choices by name, and of a union every branch that was ever filled in, so that changing the
 * kind and changing it back loses nothing.
 */
import { shownUnit, sizeOfComplex, writeComplex, writeQuantity } from '@/lib/quantities/write-quantity';
import type { TypedComplex } from '@/lib/quantities/read-complex';
import type { ComplexesField, Field, GroupField, ListField, RowsField, UnionField } from './field';

export interface TypedValue {
  readonly text: string;
  /** The unit in the field, which a bare number counts in. */
  readonly unit: string;
}

export interface RowsValue {
  readonly text: string;
  readonly units: readonly string[];
}

export interface GroupValue {
  /** False where an optional group is left out. */
  readonly present: boolean;
  readonly members: Readonly<Record<string, FormValue>>;
}

export interface UnionValue {
  /** Empty where an optional union is left out. */
  readonly variant: string;
  readonly options: Readonly<Record<string, FormValue>>;
}

export interface ListValue {
  readonly present: boolean;
  readonly items: readonly { readonly value: FormValue }[];
}

/** A choice or text holds a string, a box true or false, several choices a list; null is left out. */
export type FormValue = TypedValue | RowsValue | GroupValue | UnionValue | ListValue | string | boolean | readonly string[] | null;

/** The values that stand for an input; undefined stands for what a request leaves out. */
export function valuesOf(field: Field, input: unknown): FormValue {
  switch (field.kind) {
    case 'number':
      return typedNumber(field.unit, input, field.example ?? field.default);
    case 'complex':
      return typedComplex(field.unit, input, field.example ?? field.default);
    case 'numbers':
      return typedNumbers(field.unit, input, field.example);
    case 'complexes':
      return typedComplexes(field, input);
    case 'rows':
      return rowsOf(field, input);
    case 'choice':
    case 'text':
      return input === undefined ? '' : String(input);
    case 'json':
      return input === undefined ? '' : JSON.stringify(input);
    case 'choices':
      return Array.isArray(input) ? input.map(String) : null;
    case 'boolean':
      return typeof input === 'boolean' ? input : null;
    case 'constant':
      return null;
    case 'group':
      return groupOf(field, input);
    case 'union':
      return unionOf(field, input);
    case 'list':
      return listOf(field, input);
  }
}

/** What a new entry or a newly chosen kind starts from: the schema's own example, field by field where it has none. */
export function startingValues(field: Field): FormValue {
  return valuesOf(field, startingInput(field));
}

function startingInput(field: Field): unknown {
  if (field.optional) return undefined;
  if (field.kind === 'group') {
    if (isRecord(field.example)) return field.example;
    return Object.fromEntries(field.members.map(({ name, field: member }) => [name, startingInput(member)]));
  }
  if (field.kind === 'constant') return field.value;
  if (field.kind === 'union') return field.example ?? startingInput(field.variants[0].field());
  if (field.kind === 'list') return field.example ?? Array.from({ length: field.least }, () => startingInput(field.item()));
  return field.example ?? (field.kind === 'choice' ? field.options[0] : field.kind === 'boolean' ? false : undefined);
}

function typedNumber(unit: string, input: unknown, example: unknown): TypedValue {
  const size = typeof input === 'number' ? input : typeof example === 'number' ? example : 0;
  const shown = shownUnit(size, unit);
  return { text: typeof input === 'number' ? writeQuantity(input, unit, shown) : '', unit: shown };
}

function typedComplex(unit: string, input: unknown, example: unknown): TypedValue {
  const given = isComplex(input) ? input : undefined;
  const shown = shownUnit(sizeOfComplex(given ?? (isComplex(example) ? example : 0)), unit);
  return { text: given === undefined ? '' : writeComplex(given, unit, shown), unit: shown };
}

function typedNumbers(unit: string, input: unknown, example: unknown): TypedValue {
  const numbers = Array.isArray(input) ? (input as number[]) : [];
  const sizes = numbers.length > 0 ? numbers : Array.isArray(example) ? (example as number[]) : [];
  const shown = shownUnit(sizes.reduce((largest, each) => Math.max(largest, Math.abs(each)), 0), unit);
  return { text: numbers.map((each) => writeQuantity(each, unit, shown)).join(', '), unit: shown };
}

function typedComplexes({ unit, columns }: ComplexesField, input: unknown): TypedValue {
  const list = complexList(input, columns);
  const shown = shownUnit(list.reduce<number>((largest, each) => Math.max(largest, sizeOfComplex(each)), 0), unit);
  return { text: list.map((each) => writeComplex(each, unit, shown)).join('\n'), unit: shown };
}

function complexList(input: unknown, columns: boolean): TypedComplex[] {
  if (columns && isRecord(input)) return (input.re as number[]).map((re, index) => ({ re, im: (input.im as number[])[index] }));
  return Array.isArray(input) ? (input as TypedComplex[]) : [];
}

function rowsOf({ columns, example }: RowsField, input: unknown): RowsValue {
  const rows = Array.isArray(input) ? (input as Record<string, TypedComplex>[]) : [];
  const sizes = rows.length > 0 ? rows : Array.isArray(example) ? (example as Record<string, TypedComplex>[]) : [];
  const units = columns.map(({ name, field }) => shownUnit(sizes.reduce((largest, row) => Math.max(largest, sizeOfComplex(row[name] ?? 0)), 0), field.unit));
  const text = rows.map((row) => columns.map(({ name, field }, index) => writeComplex(row[name], field.unit, units[index])).join('\t')).join('\n');
  return { text, units };
}

function groupOf({ members, optional }: GroupField, input: unknown): GroupValue {
  const given = isRecord(input) ? input : {};
  return {
    present: !optional || input !== undefined,
    members: Object.fromEntries(members.map(({ name, field }) => [name, valuesOf(field, given[name])])),
  };
}

function unionOf(field: UnionField, input: unknown): UnionValue {
  if (input === undefined) return { variant: '', options: {} };
  const variant = field.variantOf(input);
  return variant ? { variant: variant.key, options: { [variant.key]: valuesOf(variant.field(), input) } } : { variant: '', options: {} };
}

function listOf(field: ListField, input: unknown): ListValue {
  const entries = Array.isArray(input) ? input : [];
  return { present: !field.optional || input !== undefined, items: entries.map((entry) => ({ value: valuesOf(field.item(), entry) })) };
}

function isComplex(input: unknown): input is TypedComplex {
  return typeof input === 'number' || (isRecord(input) && ('re' in input || 'magnitude' in input));
}

function isRecord(input: unknown): input is Record<string, unknown> {
  return typeof input === 'object' && input !== null && !Array.isArray(input);
}
