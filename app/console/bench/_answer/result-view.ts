/**
 * A result as something to look at: single values, columns beside their axis, records, texts, and parts
 * that have an axis of their own. Made from the output schema and the value alone; no calculation is named.
 */
import type { JsonSchema, SchemaReader } from '../_form/json-schema';
import { lengthOf, quantityOf, type Quantity } from './quantity-of-result';

export interface RecordList {
  readonly title: string;
  readonly pointer: string;
  readonly records: readonly ResultPart[];
}

export interface ResultPart {
  readonly title: string;
  readonly pointer: string;
  readonly singles: readonly Quantity[];
  /** Frequency, position or whatever the columns run along. */
  readonly axis?: Quantity;
  readonly columns: readonly Quantity[];
  /** Of more than a line: a netlist. */
  readonly texts: readonly { readonly title: string; readonly pointer: string; readonly text: string }[];
  readonly lists: readonly RecordList[];
  readonly parts: readonly ResultPart[];
  /** Titles of what this answer does not have. */
  readonly absent: readonly string[];
}

interface Draft {
  singles: Quantity[];
  columns: Quantity[];
  texts: { title: string; pointer: string; text: string }[];
  lists: RecordList[];
  parts: ResultPart[];
  absent: string[];
}

export function resultView(reader: SchemaReader, result: unknown): ResultPart {
  return partOf(reader, reader.root, result, '', 'Result');
}

function partOf(reader: SchemaReader, schema: JsonSchema, value: unknown, pointer: string, title: string): ResultPart {
  const draft: Draft = { singles: [], columns: [], texts: [], lists: [], parts: [], absent: [] };
  collect(reader, schema, value, pointer, '', draft);
  const axis = axisOf(draft.columns);
  const along = draft.columns.filter((column) => column !== axis && (!axis || lengthOf(column) === lengthOf(axis)));
  // Columns of another length cannot stand in the same table.
  const others = draft.columns.filter((column) => column !== axis && !along.includes(column));
  const apart = others.map((column): ResultPart => ({ title: column.title, pointer: column.pointer, singles: [], columns: [column], texts: [], lists: [], parts: [], absent: [] }));
  return { ...draft, title, pointer, axis, columns: along, parts: [...draft.parts, ...apart] };
}

function collect(reader: SchemaReader, schema: JsonSchema, value: unknown, pointer: string, group: string, draft: Draft): void {
  if (typeof value !== 'object' || value === null) return;
  for (const [name, property] of Object.entries(schema.properties ?? {})) {
    const inner = settled(reader, property, (value as Record<string, unknown>)[name]);
    const content = (value as Record<string, unknown>)[name];
    const title = inner.title ?? name.replaceAll('_', ' ');
    const place = `${pointer}/${name}`;
    if (content === undefined || (Array.isArray(content) && content.length === 0)) {
      continue;
    } else if (content === null && !isNumeric(inner)) {
      draft.absent.push(title);
    } else if (typeof content === 'string' && content.includes('\n')) {
      draft.texts.push({ title, pointer: place, text: content });
    } else if (Array.isArray(content) && typeof content[0] === 'object' && content[0] !== null) {
      draft.lists.push(listOf(reader, inner, content, place, title));
    } else {
      const quantity = quantityOf(inner, content ?? NaN, place, name);
      if (quantity) {
        const named = group === '' ? quantity : { ...quantity, title: nested(group, title) };
        (quantity.single ? draft.singles : draft.columns).push(content === null ? { ...named, re: [null] } : named);
      } else if (hasOwnAxis(content)) {
        draft.parts.push(partOf(reader, inner, content, place, title));
      } else {
        collect(reader, inner, content, place, title, draft);
      }
    }
  }
}

/** "S11" says all; "First" of "Maxima" needs its group. */
function nested(group: string, title: string): string {
  return title.length <= 4 || title.toLowerCase().startsWith(group.toLowerCase()) ? title : `${group}, ${title.charAt(0).toLowerCase()}${title.slice(1)}`;
}

function listOf(reader: SchemaReader, schema: JsonSchema, items: readonly unknown[], pointer: string, title: string): RecordList {
  const records = items.map((item, index) => {
    const itemSchema = settled(reader, schema.items ?? {}, item);
    return partOf(reader, itemSchema, item, `${pointer}/${index}`, `${title} ${index + 1}`);
  });
  return { title, pointer, records };
}

/** Of a union the branch that the value is of, with the words that stand around the union. */
function settled(reader: SchemaReader, written: JsonSchema, value: unknown): JsonSchema {
  const schema = reader.resolve(written);
  const branches = schema.anyOf ?? schema.oneOf;
  if (!branches) return schema;
  const { anyOf: _any, oneOf: _one, ...around } = schema;
  const fitting = branches.map((branch) => settled(reader, branch, value)).filter((branch) => fits(reader, branch, value));
  return { ...(fitting[0] ?? branches.map((branch) => reader.resolve(branch)).find(({ type }) => type !== 'null')), ...around };
}

function fits(reader: SchemaReader, schema: JsonSchema, value: unknown): boolean {
  if (value === null) return schema.type !== 'null';
  if (Array.isArray(value)) return schema.type === 'array';
  if (typeof value !== 'object') return typeof value === (schema.type === 'integer' ? 'number' : schema.type);
  const { properties = {}, required = [] } = schema;
  const keys = Object.keys(value);
  const known = keys.every((key) => key in properties) && required.every((key) => keys.includes(key));
  return schema.type === 'object' && known && Object.entries(properties).every(([name, property]) => {
    const { const: fixed } = reader.resolve(property);
    return fixed === undefined || (value as Record<string, unknown>)[name] === fixed;
  });
}

function isNumeric({ type }: JsonSchema): boolean {
  return type === 'number' || type === 'integer';
}

function hasOwnAxis(content: unknown): boolean {
  return typeof content === 'object' && content !== null && 'frequency_hz' in content;
}

/** Frequency where there is one, else the first real column of several: the position along a line. */
function axisOf(columns: readonly Quantity[]): Quantity | undefined {
  return columns.find(({ name, kind }) => name === 'frequency_hz' && kind === 'real') ?? (columns.length > 1 ? columns.find(({ kind, re }) => kind === 'real' && isRising(re)) : undefined);
}

function isRising(values: readonly (number | null)[]): boolean {
  return values.every((value, index) => value !== null && (index === 0 || value >= (values[index - 1] ?? Infinity)));
}
