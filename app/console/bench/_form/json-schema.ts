/** The part of JSON Schema that the service's own schemas use, with references resolved. */
import { z } from 'zod';

export interface JsonSchema {
  readonly $ref?: string;
  readonly $defs?: Readonly<Record<string, JsonSchema>>;
  readonly type?: string | readonly string[];
  readonly const?: unknown;
  readonly enum?: readonly unknown[];
  readonly anyOf?: readonly JsonSchema[];
  readonly oneOf?: readonly JsonSchema[];
  readonly allOf?: readonly JsonSchema[];
  readonly properties?: Readonly<Record<string, JsonSchema>>;
  readonly required?: readonly string[];
  readonly items?: JsonSchema;
  readonly prefixItems?: readonly JsonSchema[];
  readonly minItems?: number;
  readonly maxItems?: number;
  readonly default?: unknown;
  readonly title?: string;
  readonly description?: string;
  readonly examples?: readonly unknown[];
  readonly 'x-unit'?: string;
  readonly 'x-figure'?: number;
  readonly 'x-plot'?: string;
  readonly 'x-plot-group'?: string;
}

export interface SchemaReader {
  readonly root: JsonSchema;
  /** The schema itself in place of a reference to it; what stands beside the reference wins. */
  resolve(schema: JsonSchema): JsonSchema;
}

export function readerOf(type: z.ZodType, io: 'input' | 'output'): SchemaReader {
  const root = z.toJSONSchema(type, { io, unrepresentable: 'any' }) as JsonSchema;
  function resolve(schema: JsonSchema): JsonSchema {
    const { $ref, allOf, ...own } = schema;
    if ($ref) return { ...resolve(target($ref)), ...own };
    if (allOf?.length === 1) return { ...resolve(allOf[0]), ...own };
    return schema;
  }
  function target(reference: string): JsonSchema {
    if (reference === '#') return root;
    const found = root.$defs?.[decodeURIComponent(reference.replace('#/$defs/', ''))];
    if (!found) throw new Error(`the schema refers to ${reference}, which it does not define`);
    return found;
  }
  return { root: resolve(root), resolve };
}
