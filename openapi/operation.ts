/**
 * What an operation of the API is: one declaration that the route validates by, the OpenAPI document
 * shows and the tests walk. Calculations get theirs from the registry (operations/calculations.ts).
 */
import type { z } from 'zod';
import type { Permission, Scope } from '@/lib/auth/permissions';
import type { ProblemSlug } from '@/lib/problems/problems';

export type HttpMethod = 'get' | 'post' | 'patch' | 'delete';

/** Public, or for members with the permission and, where a scope is named, for keys that carry it. */
export type Access = 'public' | { readonly permission: Permission; readonly scope?: Scope };

export interface Answer {
  readonly description: string;
  readonly schema?: z.ZodType;
  readonly examples?: Readonly<Record<string, { readonly summary: string; readonly value: unknown }>>;
  readonly headers?: readonly AnswerHeader[];
}

export type AnswerHeader = 'ETag' | 'Location' | 'Set-Cookie';

export interface Operation<
  Parameters extends z.ZodObject = z.ZodObject,
  Query extends z.ZodObject = z.ZodObject,
  Body extends z.ZodType = z.ZodType,
> {
  /** `keys.issue`: unique, stable, used by client generators. */
  readonly id: string;
  readonly method: HttpMethod;
  /** Below /api/v1, parameters in braces. */
  readonly path: string;
  readonly tag: Tag;
  readonly summary: string;
  readonly description: string;
  readonly access: Access;
  readonly parameters?: Parameters;
  readonly query?: Query;
  readonly body?: Body;
  readonly bodyExamples?: Answer['examples'];
  /** True where a stale edit must be refused: the request needs If-Match. */
  readonly conditional?: boolean;
  /** True where the anonymous limit does not apply: probes that must always be answered. */
  readonly unlimited?: boolean;
  readonly answers: Readonly<Record<number, Answer>>;
  /** Refusals beyond those that access, query and body imply. */
  readonly problems?: readonly ProblemSlug[];
}

export const tags = {
  Calculations: 'What the service computes: one POST a calculation.',
  Catalogue: 'What there is to compute, with schemas, examples, methods and sources.',
  Tables: 'Materials and wire gauges, with their sources.',
  Keys: 'API keys of the organization; for signed-in members.',
  Calls: 'The call log.',
  Usage: 'Units used against quota.',
  Session: 'Signing in to the console and out again.',
  Service: 'The state of the service and this document.',
} as const;
export type Tag = keyof typeof tags;

/** Keeps each declaration's precise schema types for the route that serves it. */
export function defineOperation<
  Parameters extends z.ZodObject,
  Query extends z.ZodObject,
  Body extends z.ZodType,
>(operation: Operation<Parameters, Query, Body>): Operation<Parameters, Query, Body> {
  return operation;
}

/** All refusals that an operation can answer with, in the order of their status. */
export function problemsOf(operation: Operation): ProblemSlug[] {
  const slugs: ProblemSlug[] = ['not-acceptable', 'key-in-url'];
  if (!operation.unlimited) slugs.push('burst-limit');
  if (operation.access !== 'public') {
    slugs.push('authentication-required', 'invalid-credentials', 'organization-disabled', 'unavailable');
    slugs.push('insufficient-role', 'insufficient-scope', 'address-not-allowed');
    if (operation.method !== 'get') slugs.push('cross-origin');
  }
  if (operation.parameters) slugs.push('not-found');
  slugs.push('malformed-request', 'invalid-input');
  if (operation.body) slugs.push('body-too-large', 'unsupported-media-type');
  if (isTaggedRead(operation)) slugs.push('precondition-failed');
  if (operation.conditional) slugs.push('precondition-failed', 'precondition-required');
  return [...new Set([...slugs, ...(operation.problems ?? [])])];
}

/** A read whose answer carries an ETag answers 304 and 412 to conditional requests. */
export function isTaggedRead({ method, answers }: Operation): boolean {
  return method === 'get' && answers[200]?.headers?.includes('ETag') === true;
}
