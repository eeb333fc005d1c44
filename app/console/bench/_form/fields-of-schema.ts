/** From a calculation's input schema to the tree of fields that its form is drawn from. */
import type { z } from 'zod';
import type { Field, GroupField, Member } from './field';
import { readerOf, type JsonSchema, type SchemaReader } from './json-schema';
import { columnsOf, isComplexColumns, isComplexObject } from './shapes';
import { unionField } from './union-fields';

export function formOf(input: z.ZodType): GroupField {
  const reader = readerOf(input, 'input');
  const field = fieldOf(reader.root, reader, 'input', false);
  if (field.kind !== 'group') throw new Error('the input of a calculation is an object');
  return field;
}

/** `name` speaks where the schema has no title. */
export function fieldOf(written: JsonSchema, reader: SchemaReader, name: string, optional: boolean): Field {
  const schema = reader.resolve(written);
  const described = {
    title: schema.title ?? titleOf(name),
    description: schema.description ?? '',
    optional,
    default: schema.default,
    example: schema.examples?.[0],
  };
  const unit = unitOf(schema);
  if (schema.const !== undefined) return { ...described, kind: 'constant', value: schema.const };
  if (schema.enum) return schema.enum.length === 1 ? { ...described, kind: 'constant', value: schema.enum[0] } : { ...described, kind: 'choice', options: schema.enum.map(String) };
  if (schema.anyOf ?? schema.oneOf) return unionField(schema, reader, described, fieldOf);
  switch (schema.type) {
    case 'number':
    case 'integer':
      return { ...described, kind: 'number', unit };
    case 'boolean':
      return { ...described, kind: 'boolean' };
    case 'string':
      return { ...described, kind: 'text' };
    case 'array':
      return listOf(schema, reader, name, { ...described, unit });
    case 'object':
      return objectOf(schema, reader, { ...described, unit });
    default:
      return { ...described, kind: 'json' };
  }
}

type DescribedField = Pick<Field, 'title' | 'description' | 'optional' | 'default' | 'example'> & { readonly unit: string };

function objectOf(schema: JsonSchema, reader: SchemaReader, { unit, ...described }: DescribedField): Field {
  if (!schema.properties) return { ...described, kind: 'json' };
  if (isComplexObject(schema, reader)) return { ...described, kind: 'complex', unit };
  if (isComplexColumns(schema, reader)) return { ...described, kind: 'complexes', columns: true, unit };
  const required = new Set(schema.required ?? []);
  const members: Member[] = Object.entries(schema.properties).map(([name, property]) => ({
    name,
    field: fieldOf(property, reader, name, !required.has(name)),
  }));
  return { ...described, kind: 'group', members };
}

function listOf(schema: JsonSchema, reader: SchemaReader, name: string, { unit, ...described }: DescribedField): Field {
  if (!schema.items) return { ...described, kind: 'json' };
  const items = reader.resolve(schema.items);
  if (items.enum) return { ...described, kind: 'choices', options: items.enum.map(String) };
  if (items.type === 'number' || items.type === 'integer') return { ...described, kind: 'numbers', unit: unit || unitOf(items) };
  const columns = columnsOf(items, reader, fieldOf);
  if (columns) return { ...described, kind: 'rows', columns };
  const bounds = { least: schema.minItems ?? 0, most: schema.maxItems ?? Infinity };
  const inherited: JsonSchema = { ...items, 'x-unit': items['x-unit'] ?? schema['x-unit'] };
  const fixed = bounds.least === bounds.most;
  if (isComplexUnion(inherited, reader) && !fixed) return { ...described, kind: 'complexes', columns: false, unit: unit || unitOf(items) };
  return { ...described, kind: 'list', ...bounds, item: () => fieldOf(inherited, reader, name, false) };
}

function isComplexUnion(schema: JsonSchema, reader: SchemaReader): boolean {
  return Boolean(schema.anyOf ?? schema.oneOf) && fieldOf(schema, reader, '', false).kind === 'complex';
}

/** "1" says that there is none. */
function unitOf(schema: JsonSchema): string {
  const unit = schema['x-unit'] ?? '';
  return unit === '1' ? '' : unit;
}

/** "Load impedance" for load_impedance_ohm, less its unit only where the schema names none. */
function titleOf(name: string): string {
  const words = name.replaceAll('_', ' ').trim();
  return words.charAt(0).toUpperCase() + words.slice(1);
}
