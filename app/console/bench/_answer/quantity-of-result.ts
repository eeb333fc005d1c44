/** One quantity of a result: a column over the axis, or a single value, real or complex. */
import type { JsonSchema } from '../_form/json-schema';

export type Entry = number | null;

export interface Quantity {
  /** RFC 6901, into the result; warnings refer to it. */
  readonly pointer: string;
  readonly name: string;
  readonly title: string;
  readonly description: string;
  readonly unit: string;
  readonly kind: 'real' | 'complex' | 'word';
  /** One entry where it is a single value. */
  readonly re: readonly Entry[];
  /** Of complex quantities. */
  readonly im: readonly Entry[];
  /** Of words: verdicts and names. */
  readonly words: readonly string[];
  readonly single: boolean;
  /** Its order among the figures; undefined where it is none. */
  readonly figure?: number;
  readonly plot?: string;
  readonly plotGroup?: string;
}

export interface Value {
  readonly re: Entry;
  readonly im: Entry;
}

/** The value at an index of the axis; a single value is the same at all of them. */
export function valueAt(quantity: Quantity, index: number): Value {
  const at = quantity.single ? 0 : index;
  return { re: quantity.re[at] ?? null, im: quantity.im[at] ?? null };
}

export function wordAt(quantity: Quantity, index: number): string {
  return quantity.words[quantity.single ? 0 : index] ?? '';
}

export function lengthOf(quantity: Quantity): number {
  return quantity.kind === 'word' ? quantity.words.length : quantity.re.length;
}

/** The quantity that a value and its schema are; undefined where they are something else. */
export function quantityOf(schema: JsonSchema, value: unknown, pointer: string, name: string): Quantity | undefined {
  const content = contentOf(value);
  if (!content) return undefined;
  const unit = schema['x-unit'] ?? '';
  return {
    pointer,
    name,
    title: schema.title ?? name.replaceAll('_', ' '),
    description: schema.description ?? '',
    unit: unit === '1' ? '' : unit,
    figure: schema['x-figure'],
    plot: schema['x-plot'],
    plotGroup: schema['x-plot-group'],
    ...content,
  };
}

type Content = Pick<Quantity, 'kind' | 're' | 'im' | 'words' | 'single'>;

const none = { re: [], im: [], words: [] } as const;

function contentOf(value: unknown): Content | undefined {
  if (typeof value === 'number') return { ...none, kind: 'real', re: [value], single: true };
  if (typeof value === 'boolean' || typeof value === 'string') return { ...none, kind: 'word', words: [wordOf(value)], single: true };
  if (isList(value, isEntry)) return { ...none, kind: 'real', re: value, single: false };
  if (isList(value, isWord)) return { ...none, kind: 'word', words: value.map(wordOf), single: false };
  if (typeof value !== 'object' || value === null || Object.keys(value).sort().join() !== 'im,re') return undefined;
  const { re, im } = value as { re: unknown; im: unknown };
  if (isEntry(re) && isEntry(im)) return { ...none, kind: 'complex', re: [re], im: [im], single: true };
  return isList(re, isEntry) && isList(im, isEntry) ? { ...none, kind: 'complex', re, im, single: false } : undefined;
}

function isEntry(value: unknown): value is Entry {
  return value === null || typeof value === 'number';
}

function isWord(value: unknown): value is string | boolean | null {
  return value === null || typeof value === 'string' || typeof value === 'boolean';
}

function isList<Item>(value: unknown, accepts: (item: unknown) => item is Item): value is Item[] {
  return Array.isArray(value) && value.length > 0 && value.every(accepts);
}

function wordOf(value: string | boolean | null): string {
  if (value === null) return '';
  return typeof value === 'string' ? value : value ? 'yes' : 'no';
}
