/** Each calculation keeps the word of its own declaration. */
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { calculationPath, groups } from '@/lib/solvers/calculation';
import { calculations, findCalculation, findMethod, methods } from '@/lib/solvers/registry';

function at(value: unknown, pointer: string): unknown {
  return pointer.split('/').slice(1).reduce((node, key) => (node as Record<string, unknown> | undefined)?.[key], value);
}

describe('the registry', () => {
  it('finds each calculation by group and id, and nothing else', () => {
    for (const calculation of calculations) expect(findCalculation(calculation.group, calculation.id)).toBe(calculation);
    expect(findCalculation('lines', 'nothing')).toBeUndefined();
    expect(findCalculation('constructor', 'prototype')).toBeUndefined();
  });

  it('names no calculation and no method twice', () => {
    expect(new Set(calculations.map(calculationPath)).size).toBe(calculations.length);
    expect(new Set(methods.map(({ id }) => id)).size).toBe(methods.length);
    expect(findMethod('nothing')).toBeUndefined();
  });
});

describe.each(calculations.map((calculation) => ({ path: calculationPath(calculation), calculation })))('$path', ({ calculation }) => {
  it('has a group, a title of at most 60 characters, a summary and methods with source, range and accuracy', () => {
    expect(groups).toContain(calculation.group);
    expect(calculation.title.length).toBeLessThanOrEqual(60);
    expect(calculation.summary).not.toBe('');
    expect(calculation.methods.length).toBeGreaterThan(0);
    for (const method of calculation.methods) {
      for (const field of ['id', 'title', 'source', 'range', 'accuracy'] as const) expect(method[field]).not.toBe('');
    }
  });

  it.each([...calculation.examples])('answers the example "$name" as its source does, in the shape it declares', ({ input, expected, tolerance }) => {
    const parsed = calculation.input.parse(input);
    const solution = calculation.solve(parsed);
    expect(calculation.output.safeParse(solution.result).error).toBeUndefined();
    expect(expected.length).toBeGreaterThan(0);
    for (const { pointer, value } of expected) {
      const got = at(solution.result, pointer);
      if (value === null) expect(got, pointer).toBeNull();
      else expect(Math.abs((got as number) - value), `${pointer}: ${got}`).toBeLessThanOrEqual(tolerance * (value === 0 ? 1 : Math.abs(value)));
    }
    expect(calculation.cost.units(parsed)).toBeGreaterThanOrEqual(1);
    for (const { method } of solution.methods) expect(calculation.methods).toContain(method);
  });

  it('gives every field of its schemas a title and a description', () => {
    for (const schema of [z.toJSONSchema(calculation.input, { io: 'input' }), z.toJSONSchema(calculation.output)]) {
      for (const [name, field] of fieldsOf(schema)) {
        expect(field.title, `title of ${name}`).toBeTruthy();
        expect(field.description, `description of ${name}`).toBeTruthy();
      }
    }
  });
});

type JsonSchema = { properties?: Record<string, JsonSchema>; $ref?: string; title?: string; description?: string } & Record<string, unknown>;

function fieldsOf(schema: unknown): [string, JsonSchema][] {
  if (typeof schema !== 'object' || schema === null) return [];
  const own = Object.entries((schema as JsonSchema).properties ?? {}).filter(([, field]) => field.$ref === undefined);
  return [...own, ...Object.values(schema).flatMap(fieldsOf)];
}
