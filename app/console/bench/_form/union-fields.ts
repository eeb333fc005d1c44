/**
 * Unions: of words, of complex notations, of kinds. A union becomes a choice of its branches; the three
 * notations of a complex number become one field, since one text can hold any of them.
 */
import type { Field, UnionField, Variant } from './field';
import type { JsonSchema, SchemaReader } from './json-schema';
import { isComplexColumns, isComplexObject, type MakeField } from './shapes';

type Described = Pick<Field, 'title' | 'description' | 'optional' | 'default' | 'example'>;

interface Branch extends Variant {
  /** One word and nothing more. Asked before any field is made: a branch may hold its own union again. */
  readonly isWord: boolean;
  /** Whether a value on the wire is of this branch. */
  accepts(input: unknown): boolean;
}

export function unionField(schema: JsonSchema, reader: SchemaReader, described: Described, make: MakeField): Field {
  const unit = schema['x-unit'];
  const all = flattened(schema, reader);
  const choices = all.filter((branch) => branch.type !== 'null');
  const optional = described.optional || choices.length < all.length;
  const self = { ...described, optional };

  const branches = branchesOf(choices, reader, unit, make);
  if (branches.length === 1) return { ...branches[0].field(), ...self } as Field;
  if (branches.every(({ isWord }) => isWord)) return { ...self, kind: 'choice', options: branches.map(({ key }) => key) };
  return { ...self, kind: 'union', variants: branches, variantOf: (input) => branches.find((branch) => branch.accepts(input)) } satisfies UnionField;
}

/** Branches of branches are branches; a described branch that is itself a union keeps no name of its own. */
function flattened(schema: JsonSchema, reader: SchemaReader): JsonSchema[] {
  const unit = schema['x-unit'];
  return (schema.anyOf ?? schema.oneOf ?? []).flatMap((written) => {
    const branch = reader.resolve(written);
    return branch.anyOf || branch.oneOf ? flattened({ ...branch, 'x-unit': branch['x-unit'] ?? unit }, reader) : [branch];
  });
}

function branchesOf(choices: readonly JsonSchema[], reader: SchemaReader, unit: string | undefined, make: MakeField): Branch[] {
  const hasComplex = choices.some((choice) => isComplexObject(choice, reader));
  const isOfComplex = (choice: JsonSchema) => hasComplex && (choice.type === 'number' || isComplexObject(choice, reader));
  const complex = choices.find((choice) => isComplexObject(choice, reader));
  const branches: Branch[] = [];
  for (const choice of choices) {
    if (isOfComplex(choice)) {
      if (!branches.some(({ key }) => key === 'complex')) branches.push(complexBranch(complex!, reader, unit, make));
    } else if (choice.enum) {
      branches.push(...choice.enum.map((value) => constantBranch(value, choice)));
    } else if (choice.const !== undefined) {
      branches.push(constantBranch(choice.const, choice));
    } else {
      branches.push(shapeBranch({ ...choice, 'x-unit': choice['x-unit'] ?? unit }, reader, branches.length, make));
    }
  }
  return branches;
}

function complexBranch(shape: JsonSchema, reader: SchemaReader, unit: string | undefined, make: MakeField): Branch {
  const label = unit === 'ohm' ? 'Impedance' : unit === 'S' ? 'Admittance' : 'Complex number';
  return {
    key: 'complex',
    label,
    isWord: false,
    field: once(() => make({ ...shape, title: label, description: 'As 75-30j or 80.8∠-21.8°, or a real number.', 'x-unit': unit, default: undefined }, reader, 'value', false)),
    accepts: (input) => typeof input === 'number' || (isRecord(input) && (typeof input.re === 'number' || 'magnitude' in input)),
  };
}

function constantBranch(value: unknown, { description = '' }: JsonSchema): Branch {
  const label = wordsOf(String(value));
  return {
    key: String(value).replaceAll('.', '-'),
    label,
    isWord: true,
    field: () => ({ kind: 'constant', value, title: label, description, optional: false }),
    accepts: (input) => input === value,
  };
}

function shapeBranch(choice: JsonSchema, reader: SchemaReader, index: number, make: MakeField): Branch {
  const tag = tagOf(choice, reader);
  const label = choice.title ?? (tag ? wordsOf(String(tag.value)) : (choice.type as string));
  return {
    key: tag ? String(tag.value).replaceAll('.', '-') : `${String(choice.type)}-${index}`,
    label,
    isWord: false,
    field: once(() => make(choice, reader, label, false)),
    accepts: (input) => accepts(choice, reader, tag, input),
  };
}

/** The first member that can have only one value, such as kind. */
function tagOf({ properties = {} }: JsonSchema, reader: SchemaReader): { name: string; value: unknown } | undefined {
  for (const [name, property] of Object.entries(properties)) {
    const { const: value } = reader.resolve(property);
    if (value !== undefined) return { name, value };
  }
  return undefined;
}

function accepts(choice: JsonSchema, reader: SchemaReader, tag: { name: string; value: unknown } | undefined, input: unknown): boolean {
  if (Array.isArray(input)) return choice.type === 'array';
  if (!isRecord(input)) return typeof input === (choice.type === 'integer' ? 'number' : choice.type);
  if (choice.type !== 'object') return false;
  if (isComplexColumns(choice, reader)) return Array.isArray(input.re);
  if (tag) return input[tag.name] === tag.value;
  const known = new Set(Object.keys(choice.properties ?? {}));
  const fits = Object.keys(input).every((key) => known.has(key)) && (choice.required ?? []).every((key) => key in input);
  // Objects of one shape may differ in a word they hold.
  return fits && Object.entries(choice.properties ?? {}).every(([name, property]) => fitsWord(reader.resolve(property), input[name]));
}

function fitsWord({ enum: words }: JsonSchema, value: unknown): boolean {
  return value === undefined || !words || words.includes(value);
}

function isRecord(input: unknown): input is Record<string, unknown> {
  return typeof input === 'object' && input !== null && !Array.isArray(input);
}

function once<Value>(make: () => Value): () => Value {
  let made: { readonly value: Value } | undefined;
  return () => (made ??= { value: make() }).value;
}

export function wordsOf(value: string): string {
  const words = value.replaceAll('_', ' ');
  return words.charAt(0).toUpperCase() + words.slice(1);
}
