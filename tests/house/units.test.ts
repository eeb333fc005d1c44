/** The name of a JSON field ends in its unit, and the schema declares the same one. */
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { calculationPath } from '@/lib/solvers/calculation';
import { calculations } from '@/lib/solvers/registry';

/** Longest first: `_ohm_per_m` is not `_m`. */
const suffixes: [ending: string, unit: string][] = [
  ['_ohm_per_m', 'ohm/m'],
  ['_h_per_m', 'H/m'],
  ['_f_per_m', 'F/m'],
  ['_np_per_m', 'Np/m'],
  ['_db_per_m', 'dB/m'],
  ['_rad_per_m', 'rad/m'],
  ['_m_per_s', 'm/s'],
  ['_ohm_m', 'ohm m'],
  ['_s_per_m', 's/m'],
  ['_per_m', '1/m'],
  ['_per_k', '1/K'],
  ['_ohm', 'ohm'],
  ['_deg', 'deg'],
  ['_rad', 'rad'],
  ['_hz', 'Hz'],
  ['_db', 'dB'],
  ['_np', 'Np'],
  ['_m2', 'm2'],
  ['_m', 'm'],
  ['_s', 's'],
  ['_h', 'H'],
  ['_f', 'F'],
  ['_v', 'V'],
  ['_a', 'A'],
  ['_w', 'W'],
  ['_c', 'degC'],
];

/** `_s` is the second, and the siemens where the quantity is one that has it. */
const isOfSiemens = /(conductance|admittance|susceptance)/;

function unitByName(name: string): string | null {
  if (isAtLevel(name)) return null;
  const unit = suffixes.find(([ending]) => name.endsWith(ending))?.[1];
  if (unit === undefined) return null;
  return isOfSiemens.test(name) ? unit.replace(/^s/, 'S') : unit;
}

/** Parts of a quantity: the field that holds them names the unit. */
const parts = new Set(['re', 'im', 'magnitude', 'start', 'stop']);
/** A bandwidth at a level: the level's unit ends the name, and the field that holds it names the unit of the width. */
const isAtLevel = (name: string): boolean => /^at_\d+_db$/.test(name);
/** Names that the contract gives without a suffix, for what they hold is more than a number of that unit. */
const nouns = new Set(['termination', 'values', 'band']);
/** In an entry of a two-port's matrix the letter is the quantity. */
const isMatrixEntry = (name: string): boolean => /^([abcd]|[zyst][12][12])$/.test(name);

interface Schema {
  readonly $ref?: string;
  readonly 'x-unit'?: string;
  readonly properties?: Record<string, Schema>;
  readonly items?: Schema | boolean;
  readonly prefixItems?: Schema[];
  readonly anyOf?: Schema[];
  readonly oneOf?: Schema[];
  readonly allOf?: Schema[];
  readonly $defs?: Record<string, Schema>;
}

interface Field {
  readonly path: string;
  readonly name: string;
  readonly units: ReadonlySet<string>;
  /** Of the nearest field above whose name ends in one. */
  readonly unitAbove: string | null;
}

function fieldsOf(root: Schema, start: string): Field[] {
  const found: Field[] = [];
  const target = (schema: Schema): Schema => (schema.$ref ? (root.$defs?.[schema.$ref.replace('#/$defs/', '')] ?? {}) : {});
  const branches = (schema: Schema): Schema[] => [
    ...(schema.anyOf ?? []),
    ...(schema.oneOf ?? []),
    ...(schema.allOf ?? []),
    ...(schema.prefixItems ?? []),
    ...(typeof schema.items === 'object' ? [schema.items] : []),
    ...(schema.$ref ? [target(schema)] : []),
  ];

  /** What the schema itself declares, or else what its branches do. */
  function unitsOf(schema: Schema, depth = 0): string[] {
    if (schema['x-unit'] !== undefined) return [schema['x-unit']];
    return depth > 8 ? [] : branches(schema).flatMap((branch) => unitsOf(branch, depth + 1));
  }

  function walk(schema: Schema, path: string, unitAbove: string | null, open: readonly string[]): void {
    // A cascade may hold cascades: once round is enough.
    if (schema.$ref && open.includes(schema.$ref)) return;
    const inside = schema.$ref ? [...open, schema.$ref] : open;
    for (const [name, field] of Object.entries(schema.properties ?? {})) {
      found.push({ path: `${path}.${name}`, name, units: new Set(unitsOf(field)), unitAbove });
      walk(field, `${path}.${name}`, unitByName(name) ?? unitAbove, inside);
    }
    for (const branch of branches(schema)) walk(branch, path, unitAbove, inside);
  }

  walk(root, start, null, []);
  return found;
}

describe.each(calculations.map((calculation) => [calculationPath(calculation), calculation] as const))('%s', (path, calculation) => {
  const fields = [
    ...fieldsOf(z.toJSONSchema(calculation.input, { io: 'input' }) as Schema, 'input'),
    ...fieldsOf(z.toJSONSchema(calculation.output, { io: 'output' }) as Schema, 'output'),
  ];

  it('has fields to look at', () => {
    expect(fields.length, path).toBeGreaterThan(4);
  });

  it('declares the unit that a name ends in', () => {
    const wrong = fields
      .map(({ path: where, name, units }) => ({ where, said: unitByName(name), declared: [...units].join(' or ') }))
      .filter(({ said, declared }) => said !== null && said !== declared);
    expect(wrong).toEqual([]);
  });

  it('ends a name in the unit that is declared', () => {
    const wrong = fields
      .filter(({ name, units }) => units.size > 0 && unitByName(name) === null && !nouns.has(name) && !isMatrixEntry(name))
      .filter(({ name, units, unitAbove }) => !((parts.has(name) || isAtLevel(name)) && (unitAbove === null || units.has(unitAbove))))
      .map(({ path: where, units }) => ({ where, declared: [...units].join(' or ') }));
    expect(wrong).toEqual([]);
  });
});
