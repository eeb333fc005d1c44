import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { fieldErrors, mostErrors, pointerOf } from '@/lib/problems/field-errors';

function errorsOf(schema: z.ZodType, value: unknown) {
  const parsed = schema.safeParse(value, { reportInput: true });
  if (parsed.success) throw new Error('the value was to be refused');
  return fieldErrors(parsed.error.issues);
}

const body = z.strictObject({
  length_m: z.number().min(0).max(1e6),
  points: z.number().int().min(2),
  name: z.string().min(1).max(5),
  kind: z.enum(['series', 'shunt']),
  dispersion: z.boolean(),
  list: z.array(z.number()).min(1).max(3),
});
const right = { length_m: 1, points: 2, name: 'a', kind: 'series', dispersion: true, list: [1] };

describe('the sentence of a wrong field', () => {
  const sentences: [change: Record<string, unknown>, pointer: string, code: string, detail: string][] = [
    [{ length_m: undefined }, '/length_m', 'required', 'length_m is required (a finite number)'],
    [{ length_m: '1' }, '/length_m', 'invalid_type', 'length_m must be a finite number; got "1"'],
    [{ length_m: null }, '/length_m', 'invalid_type', 'length_m must be a finite number; got null'],
    [{ length_m: Number.POSITIVE_INFINITY }, '/length_m', 'invalid_type', 'length_m must be a finite number; got Infinity'],
    [{ length_m: -0.3 }, '/length_m', 'too_small', 'length_m must be at least 0; got -0.3'],
    [{ length_m: 2e6 }, '/length_m', 'too_big', 'length_m must be at most 1000000; got 2000000'],
    [{ points: 2.5 }, '/points', 'invalid_type', 'points must be a whole number; got 2.5'],
    [{ name: '' }, '/name', 'too_small', 'name must have at least 1 characters; got ""'],
    [{ name: 'sixsix' }, '/name', 'too_big', 'name must have at most 5 characters; got "sixsix"'],
    [{ name: 7 }, '/name', 'invalid_type', 'name must be a text; got 7'],
    [{ kind: 'tee' }, '/kind', 'invalid_value', 'kind must be one of "series", "shunt"; got "tee"'],
    [{ dispersion: 'yes' }, '/dispersion', 'invalid_type', 'dispersion must be true or false; got "yes"'],
    [{ list: [] }, '/list', 'too_small', 'list must have at least 1 entries; got a list of 0'],
    [{ list: [1, 2, 3, 4] }, '/list', 'too_big', 'list must have at most 3 entries; got a list of 4'],
    [{ list: [1, 'x'] }, '/list/1', 'invalid_type', 'list[1] must be a finite number; got "x"'],
    [{ list: {} }, '/list', 'invalid_type', 'list must be a list; got an object'],
    [{ lenght_m: 1 }, '/lenght_m', 'unknown_field', 'lenght_m is not a field here; check its spelling or leave it out'],
  ];
  for (const [change, pointer, code, detail] of sentences) {
    test(`says: ${detail}`, () => {
      expect(errorsOf(body, { ...right, ...change })).toEqual([{ pointer, code, detail }]);
    });
  }

  test('says what a whole body must be', () => {
    expect(errorsOf(body, [])).toEqual([{ pointer: '', code: 'invalid_type', detail: 'the body must be an object; got a list of 0' }]);
  });

  test('never repeats more than sixty characters of what was sent, nor half a character', () => {
    const [wrong, unknown] = [errorsOf(body, { ...right, kind: '𝄞'.repeat(500_000) })[0], errorsOf(body, { ...right, ['𝄞'.repeat(100_000)]: 1 })[0]];
    for (const { detail, pointer } of [wrong, unknown]) {
      expect(detail.length).toBeLessThan(200);
      expect(pointer!.length).toBeLessThan(200);
      expect(detail.isWellFormed()).toBe(true);
      expect(pointer!.isWellFormed()).toBe(true);
    }
  });
});

describe('the list of wrong fields', () => {
  test('names every one at once, in one pass', () => {
    const pointers = errorsOf(body, { length_m: 'x', points: 1, kind: 'tee', dispersion: 0, list: ['a', 2, null], extra: 1 }).map(({ pointer }) => pointer);
    expect(pointers.sort()).toEqual(['/dispersion', '/extra', '/kind', '/length_m', '/list/0', '/list/2', '/name', '/points']);
  });

  test('ends at a hundred, however many there are', () => {
    expect(errorsOf(z.array(z.number()), Array.from({ length: 20_000 }, () => 'x'))).toHaveLength(mostErrors);
    expect(errorsOf(z.strictObject({}), Object.fromEntries(Array.from({ length: 20_000 }, (_, index) => [`f${index}`, 1])))).toHaveLength(mostErrors);
  });

  test('names unknown fields that every object inherits', () => {
    expect(errorsOf(z.strictObject({}), JSON.parse('{"__proto__": 1, "constructor": 2, "toString": 3}')).map(({ pointer }) => pointer).sort()).toEqual(['/__proto__', '/constructor', '/toString']);
  });
});

describe('a pointer', () => {
  test('escapes as RFC 6901 section 5 shows', () => {
    const fromTheStandard: [readonly PropertyKey[], string][] = [[[], ''], [['foo'], '/foo'], [['foo', 0], '/foo/0'], [[''], '/'], [['a/b'], '/a~1b'], [['m~n'], '/m~0n'], [['c%d'], '/c%d'], [[' '], '/ ']];
    for (const [path, pointer] of fromTheStandard) expect(pointerOf(path)).toBe(pointer);
  });
});

describe('a value of several possible shapes', () => {
  const complex = z.union([z.number(), z.strictObject({ re: z.number(), im: z.number() }), z.strictObject({ magnitude: z.number().min(0), angle_deg: z.number() })]);
  const termination = z.strictObject({ termination: z.union([complex, z.enum(['open', 'short']), z.strictObject({ kind: z.literal('series_rlc'), resistance_ohm: z.number().min(0) })]) });

  test('is held against the shape it comes nearest to', () => {
    expect(errorsOf(termination, { termination: { re: 75, im: 'x' } })).toEqual([{ pointer: '/termination/im', code: 'invalid_type', detail: 'im must be a finite number; got "x"' }]);
    expect(errorsOf(termination, { termination: { magnitude: -1, angle_deg: 0 } })).toEqual([{ pointer: '/termination/magnitude', code: 'too_small', detail: 'magnitude must be at least 0; got -1' }]);
    expect(errorsOf(termination, { termination: { kind: 'series_rlc', resistance_ohm: -5 } })[0].pointer).toBe('/termination/resistance_ohm');
    expect(errorsOf(termination, { termination: { kind: 'series_rlc', resistance_ohm: 'x' } })).toEqual([{ pointer: '/termination/resistance_ohm', code: 'invalid_type', detail: 'resistance_ohm must be a finite number; got "x"' }]);
  });

  test('is told all the shapes when it has none of them', () => {
    const [error] = errorsOf(termination, { termination: true });
    expect(error.pointer).toBe('/termination');
    for (const shape of ['a finite number', 'an object', '"open"', '"short"']) expect(error.detail).toContain(shape);
  });

  test('is required when it is missing', () => {
    expect(errorsOf(termination, {})[0]).toMatchObject({ pointer: '/termination', code: 'required' });
  });

  test('with a discriminator is held against the branch that it names, and told the names when it names none', () => {
    const line = z.discriminatedUnion('kind', [z.strictObject({ kind: z.literal('lossless'), z_ohm: z.number() }), z.strictObject({ kind: z.literal('rlgc'), r: z.number() })]);
    expect(errorsOf(line, { kind: 'rlgc', r: 'x' })).toEqual([{ pointer: '/r', code: 'invalid_type', detail: 'r must be a finite number; got "x"' }]);
    const [unknown] = errorsOf(line, { kind: 'coax' });
    expect(unknown.pointer).toBe('/kind');
    expect(unknown.detail).toContain('"lossless", "rlgc"');
    expect(unknown.detail).toContain('"coax"');
  });
});
