/**
 * Request bodies made at random: right ones by the input schema as the document shows it, and wrong ones
 * made from right ones. Everything comes from fast-check, so a seed gives the same bodies again.
 */
import fc from 'fast-check';
import { document } from './document';
import type { Json } from './json';

/** Values that a schema of ours is likely to have bounds for. */
const numbers = fc.oneof(
  { weight: 6, arbitrary: fc.double({ min: 0, max: 1e3, noNaN: true }) },
  { weight: 2, arbitrary: fc.constantFrom(0, 1, 50, 75, 1e-12, 1e6, 1e9, 2.5e-7) },
  { weight: 1, arbitrary: fc.double({ min: -1e15, max: 1e15, noNaN: true }) },
);

/** A schema that holds itself is entered twice at most. */
const mostRounds = 2;

/** Bodies that the schema accepts, as far as a schema can say; `root` is where its references point into. */
export function rightBodies(schema: Json, root: Json = document): fc.Arbitrary<Json> {
  const bodies = fromSchema(schema, root, []);
  if (!bodies) throw new Error('the schema holds itself without an end');
  return bodies;
}

/** Undefined where a schema would have to hold itself once more; `open` are the references on the way here. */
function fromSchema(schema: Json, root: Json, open: readonly string[]): fc.Arbitrary<Json> | undefined {
  if (schema.$ref) {
    const rounds = open.filter((each) => each === schema.$ref).length;
    return rounds < mostRounds ? fromSchema(resolve(schema.$ref, root), root, [...open, schema.$ref]) : undefined;
  }
  if ('const' in schema) return fc.constant(schema.const);
  if (schema.enum) return fc.constantFrom(...schema.enum);
  const branches = schema.oneOf ?? schema.anyOf;
  if (branches) return oneOf(branches, root, open);
  if (schema.allOf) return fromSchema(Object.assign({}, ...schema.allOf.map((part: Json) => (part.$ref ? resolve(part.$ref, root) : part))), root, open);
  switch (schema.type) {
    case 'object':
      return objectOf(schema, root, open);
    case 'array':
      return listOf(schema, root, open);
    case 'integer':
      return fc.integer({ min: schema.minimum ?? -1000, max: Math.min(schema.maximum ?? 1000, 1000) });
    case 'number':
      return numbers.map((value) => within(value, schema));
    case 'boolean':
      return fc.boolean();
    case 'string':
      return fc.string({ minLength: schema.minLength ?? 0, maxLength: Math.min(schema.maxLength ?? 20, 20) });
    case 'null':
      return fc.constant(null);
    default:
      throw new Error(`no value is known for the schema ${JSON.stringify(schema).slice(0, 200)}`);
  }
}

function oneOf(schemas: readonly Json[], root: Json, open: readonly string[]): fc.Arbitrary<Json> | undefined {
  const possible = schemas.flatMap((each) => fromSchema(each, root, open) ?? []);
  return possible.length > 0 ? fc.oneof(...possible) : undefined;
}

function objectOf(schema: Json, root: Json, open: readonly string[]): fc.Arbitrary<Json> | undefined {
  const members = Object.entries<Json>(schema.properties ?? {}).map(([name, member]) => [name, fromSchema(member, root, open)] as const);
  const required: string[] = schema.required ?? [];
  if (members.some(([name, member]) => !member && required.includes(name))) return undefined;
  return fc.record(Object.fromEntries(members.filter(([, member]) => member)) as Record<string, fc.Arbitrary<Json>>, { requiredKeys: required });
}

/** Short, or as long as the bounds demand; never as long as they allow. */
function listOf(schema: Json, root: Json, open: readonly string[]): fc.Arbitrary<Json> | undefined {
  const least = schema.minItems ?? 0;
  const items = schema.prefixItems?.length ? oneOf(schema.prefixItems, root, open) : fromSchema(schema.items, root, open);
  if (!items) return least === 0 ? fc.constant([]) : undefined;
  return fc.array(items, { minLength: least, maxLength: Math.min(schema.maxItems ?? 4, Math.max(least, 4)) });
}

function within(value: number, { minimum, maximum, exclusiveMinimum, exclusiveMaximum }: Json): number {
  const low = minimum ?? (exclusiveMinimum !== undefined ? exclusiveMinimum + 1e-6 : -1e15);
  const high = maximum ?? (exclusiveMaximum !== undefined ? exclusiveMaximum - 1e-6 : 1e15);
  return Math.min(Math.max(value, low), high);
}

function resolve(reference: string, root: Json): Json {
  return reference
    .split('/')
    .slice(1)
    .reduce((node: Json, part) => node[part], root);
}

/** What stands in no field of ours, or in the wrong one. */
const strangeValues: fc.Arbitrary<Json> = fc.oneof(
  fc.constantFrom(null, true, false, '', 'NaN', 'Infinity', '-Infinity', '1e999', '50', 'open', [], {}, [[]], [null], -1, -0, 1e308, 5e-324, 2 ** 53 + 2, '\u0000', '\ud800', 'x'.repeat(5000)),
  fc.constantFrom({ re: 1 }, { re: '1', im: 0 }, { magnitude: -1, angle_deg: 0 }, { kind: 'lossless' }, { kind: 'no-such-kind' }, { start: 2, stop: 1, points: 3 }, { start: 0, stop: 1, points: 3, spacing: 'log' }),
  fc.string({ unit: 'binary', maxLength: 40 }),
  fc.jsonValue({ maxDepth: 3 }),
);

const strangeNames: fc.Arbitrary<string> = fc.oneof(fc.constantFrom('__proto__', 'constructor', 'prototype', 'toString', 'hasOwnProperty', '', 'a/b', 'm~n', '\u0000', 'ü', 'length_mm', 'x'.repeat(300)), fc.string({ unit: 'binary', maxLength: 20 }));

const anyChange: fc.Arbitrary<Change> = fc.record({ at: fc.nat(10_000), how: fc.constantFrom('replace', 'replace', 'add', 'remove', 'rename'), value: strangeValues, name: strangeNames });

/** A right body with one to three places changed. */
export function wrongBodies(schema: Json, root: Json = document): fc.Arbitrary<Json> {
  return changedBodies(rightBodies(schema, root));
}

/**
 * Bodies that were found right, as they are and with a number or two changed to another of any size: where the fields must
 * agree among themselves, as the dimensions of a line must, bodies made from the schema alone hardly ever reach the solver.
 */
export function bodiesLike(right: readonly Json[]): fc.Arbitrary<Json> {
  const number = fc.oneof(fc.double({ min: 1e-6, max: 1e3, noNaN: true }), fc.double({ noNaN: true, noDefaultInfinity: true }), fc.constantFrom(0, 1e-3, 1e9));
  const change = fc.record({ at: fc.nat(10_000), how: fc.constant('replace'), value: number, name: fc.constant('') });
  return fc.oneof(fc.constantFrom(...right), changedBodies(fc.constantFrom(...right), change), changedBodies(fc.constantFrom(...right)));
}

interface Change {
  readonly at: number;
  readonly how: string;
  readonly value: Json;
  readonly name: string;
}

/** One to three places changed: another value, a member more, less, or renamed. */
function changedBodies(bodies: fc.Arbitrary<Json>, change: fc.Arbitrary<Change> = anyChange): fc.Arbitrary<Json> {
  return fc.tuple(bodies, fc.array(change, { minLength: 1, maxLength: 3 })).map(([body, changes]) => {
    const top = { body: structuredClone(body) };
    for (const { at, how, value, name } of changes) {
      const places = placesOf(top.body, top, 'body');
      const { parent, key } = places[at % places.length];
      if (how === 'replace') define(parent, key, value);
      else if (how === 'remove' && parent !== top) removeFrom(parent, key);
      else if (how === 'rename' && parent !== top && !Array.isArray(parent)) {
        const moved = parent[key];
        delete parent[key];
        define(parent, name, moved);
      } else if (typeof parent[key] === 'object' && parent[key] !== null) define(parent[key], name, value);
    }
    return top.body;
  });
}

/** As JSON.parse would: `__proto__` becomes a member like any other. */
function define(target: Json, name: string, value: Json): void {
  if (Array.isArray(target)) target.push(structuredClone(value));
  else Object.defineProperty(target, name, { value: structuredClone(value), enumerable: true, configurable: true, writable: true });
}

function removeFrom(parent: Json, key: string): void {
  if (Array.isArray(parent)) parent.splice(Number(key), 1);
  else delete parent[key];
}

function placesOf(value: Json, parent: Json, key: string): { parent: Json; key: string }[] {
  const here = [{ parent, key }];
  if (typeof value !== 'object' || value === null) return here;
  return [...here, ...Object.keys(value).slice(0, 20).flatMap((name) => placesOf(value[name], value, name))];
}

/** Texts that no object could be written as: numbers beyond a double, members twice, nesting, length. */
export const strangeTexts: fc.Arbitrary<(body: string) => string> = fc.constantFrom<((body: string) => string)[]>(
  (body) => body.replace(/-?\d+(\.\d+)?(e[+-]?\d+)?/i, '1e999'),
  (body) => body.replace(/-?\d+(\.\d+)?(e[+-]?\d+)?/i, '-1e999'),
  (body) => body.replace(/-?\d+(\.\d+)?(e[+-]?\d+)?/i, '123456789012345678901234567890'),
  (body) => body.replace(/-?\d+(\.\d+)?(e[+-]?\d+)?/i, '0.1e-400'),
  (body) => body.replace(/-?\d+(\.\d+)?(e[+-]?\d+)?/i, 'NaN'),
  (body) => body.replace(/-?\d+(\.\d+)?(e[+-]?\d+)?/i, '0x10'),
  (body) => body.replace(/^\{/, '{"frequency_hz": "twice", '),
  (body) => body.replace(/\}$/, ', "frequency_hz": "twice"}'),
  (body) => body.replace(/\}$/, ', "__proto__": {"polluted": true}}'),
  (body) => body.replace(/\}$/, `, "deep": ${'['.repeat(5000)}${']'.repeat(5000)}}`),
  (body) => body.replace(/\}$/, `, "frequency_hz": [${'1e6,'.repeat(200_000)}1]}`),
  (body) => body.replace(/\}$/, `, "frequency_hz": [${'"x",'.repeat(150_000)}1]}`),
  (body) => body.replace(/\}$/, `, ${Array.from({ length: 20_000 }, (_, index) => `"f${index}":1`).join()}}`),
  (body) => body.replace(/\}$/, ', "\\ud800": "\\udfff\\u0000"}'),
  (body) => body.slice(0, -1),
  (body) => `[${body}]`,
  (body) => JSON.stringify(body),
);
