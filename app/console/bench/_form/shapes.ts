/** Shapes of objects that a person types as one text instead of a group of fields. */
import type { ComplexField, Field, NumberField } from './field';
import type { JsonSchema, SchemaReader } from './json-schema';

export type MakeField = (schema: JsonSchema, reader: SchemaReader, name: string, optional: boolean) => Field;

/** {re, im} or {magnitude, angle_deg}, of numbers. */
export function isComplexObject(schema: JsonSchema, reader: SchemaReader): boolean {
  const { properties } = schema;
  if (!properties) return false;
  const names = Object.keys(properties).sort().join();
  return (names === 'im,re' || names === 'angle_deg,magnitude') && Object.values(properties).every((property) => isNumber(reader.resolve(property)));
}

/** {re: [...], im: [...]}. */
export function isComplexColumns({ properties }: JsonSchema, reader: SchemaReader): boolean {
  if (!properties || Object.keys(properties).sort().join() !== 'im,re') return false;
  return Object.values(properties).every((property) => {
    const column = reader.resolve(property);
    return column.type === 'array' && column.items !== undefined && isNumber(reader.resolve(column.items));
  });
}

function isNumber({ type }: JsonSchema): boolean {
  return type === 'number' || type === 'integer';
}

/** The columns of a list of flat records of numbers; undefined where its entries are more than that. */
export function columnsOf(items: JsonSchema, reader: SchemaReader, make: MakeField): { name: string; field: NumberField | ComplexField }[] | undefined {
  if (items.type !== 'object' || !items.properties || isComplexObject(items, reader)) return undefined;
  const required = new Set(items.required ?? []);
  const columns = [];
  for (const [name, property] of Object.entries(items.properties)) {
    const field = make(property, reader, name, false);
    if (!required.has(name) || (field.kind !== 'number' && field.kind !== 'complex')) return undefined;
    columns.push({ name, field });
  }
  return columns.length > 0 ? columns : undefined;
}
