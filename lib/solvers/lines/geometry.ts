/** Lines given by their geometry, and the same with one dimension left open. A kind that names its `dimensions` appears here by itself. */
import { z } from 'zod';
import type { InputProblem } from '../errors';
import { lineKinds, type Line } from './line';

interface GeometryKind {
  readonly schema: z.ZodObject;
  readonly dimensions: readonly string[];
}

/** By the name of the kind. */
export const geometryKinds: ReadonlyMap<string, GeometryKind> = new Map(
  (lineKinds as readonly { schema: z.ZodType; dimensions?: readonly string[] }[])
    .filter(({ dimensions }) => dimensions !== undefined && dimensions.length > 0)
    .map((kind) => [nameOf(kind.schema as z.ZodObject), kind as GeometryKind]),
);

/** Every dimension of every kind, once. */
export const dimensionNames: readonly string[] = [...new Set([...geometryKinds.values()].flatMap(({ dimensions }) => dimensions))];

type OpenKind = z.ZodObject<{ kind: z.ZodLiteral<string> }, z.core.$loose>;
const openKinds = [...geometryKinds.values()].map(withUnknown) as [OpenKind, ...OpenKind[]];

/** A geometry of which any dimension may be left out; which one may is for the calculation to say. */
export const geometryWithUnknown = z
  .discriminatedUnion('kind', openKinds)
  .meta({ id: 'GeometryWithUnknown', title: 'Line', description: 'A line given by its geometry. The sought dimension may be left out; where it is given, it is not looked at.' });

export type GeometryWithUnknown = z.output<typeof geometryWithUnknown>;

function nameOf(schema: z.ZodObject): string {
  return (schema.shape.kind as z.ZodLiteral<string>).value;
}

function withUnknown({ schema, dimensions }: GeometryKind) {
  const { id, ...about } = schema.meta() ?? {};
  const open = Object.fromEntries(dimensions.map((name) => [name, isNeeded(schema, name) ? (schema.shape[name] as z.ZodType).optional() : schema.shape[name]]));
  return z.strictObject({ ...schema.shape, ...open }).meta({ ...about, id: `${id}WithUnknown` });
}

function isNeeded(schema: z.ZodObject, name: string): boolean {
  return !z.safeParse(schema.shape[name] as z.ZodType, undefined).success;
}

/** The dimensions besides `sought` that the kind needs and the value does not have. */
export function missingDimensions({ schema, dimensions }: GeometryKind, line: object, sought: string): string[] {
  return dimensions.filter((name) => name !== sought && isNeeded(schema, name) && !Object.hasOwn(line, name));
}

export interface DimensionBounds {
  readonly least: number;
  readonly greatest: number;
  readonly unit: string;
}

/** What the kind's schema allows the dimension to be. */
export function boundsOf({ schema }: GeometryKind, dimension: string): DimensionBounds {
  const field = z.toJSONSchema(schema.shape[dimension] as z.ZodType, { io: 'input' }) as { minimum?: number; maximum?: number; exclusiveMinimum?: number; exclusiveMaximum?: number; 'x-unit'?: string };
  const least = field.minimum ?? field.exclusiveMinimum;
  const greatest = field.maximum ?? field.exclusiveMaximum;
  if (least === undefined || greatest === undefined) throw new Error(`${dimension} has no bounds`);
  return { least, greatest, unit: field['x-unit'] ?? '1' };
}

/** The whole line with the dimension at a value, or what its own schema says against it. */
export function lineWith({ schema }: GeometryKind, given: GeometryWithUnknown, dimension: string, value: number): { line: Line } | { problems: InputProblem[] } {
  const parsed = schema.safeParse({ ...given, [dimension]: value });
  if (parsed.success) return { line: parsed.data as Line };
  return { problems: parsed.error.issues.map((issue) => problemOf(issue)) };
}

function problemOf(issue: z.core.$ZodIssue): InputProblem {
  const code = issue.code === 'custom' && typeof issue.params?.code === 'string' ? issue.params.code : issue.code;
  const path = ['line', ...issue.path.map(String)];
  return { pointer: `/${path.join('/')}`, code, detail: `${path[path.length - 1]} ${issue.message}` };
}
