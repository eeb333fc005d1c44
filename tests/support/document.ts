/** The published OpenAPI document, and its schemas as validators. */
import { readFileSync } from 'node:fs';
import Ajv2020, { type ErrorObject } from 'ajv/dist/2020.js';
import addFormats from 'ajv-formats';
import type { Json } from './json';

export interface Validator {
  (value: unknown): boolean;
  errors?: ErrorObject[] | null;
}

export interface DocumentedAnswer {
  readonly headers?: Record<string, Json>;
  readonly content?: Record<string, { schema: Json }>;
}

export interface DocumentedOperation {
  readonly id: string;
  readonly method: string;
  readonly path: string;
  readonly answers: Record<string, DocumentedAnswer>;
}

export const document: Json = JSON.parse(readFileSync(new URL('../../openapi/openapi.json', import.meta.url), 'utf8'));

export const documentedOperations: readonly DocumentedOperation[] = Object.entries<Json>(document.paths).flatMap(([path, methods]) =>
  Object.entries<Json>(methods)
    .filter(([method]) => ['get', 'post', 'put', 'patch', 'delete'].includes(method))
    .map(([method, operation]) => ({ id: operation.operationId, method, path, answers: operation.responses })),
);

/** A path without parameters wins over one with them, as OpenAPI says. */
export function documentedOperation(method: string, pathname: string): DocumentedOperation | undefined {
  const below = pathname.replace(/^\/api\/v1/, '');
  const wanted = method === 'HEAD' ? 'get' : method.toLowerCase();
  return documentedOperations
    .filter((operation) => operation.method === wanted && pathPattern(operation.path).test(below))
    .sort((a, b) => a.path.split('{').length - b.path.split('{').length)[0];
}

function pathPattern(template: string): RegExp {
  return new RegExp(`^${template.replaceAll('.', '\\.').replace(/\{[^}]+\}/g, '[^/]+')}$`);
}

/** The schema of a request body, to the letter. */
export function requestValidator({ path, method }: Pick<DocumentedOperation, 'path' | 'method'>): Validator {
  return compiled(toTheLetter, ['paths', path, method, 'requestBody', 'content', 'application/json', 'schema']);
}

/** The schema of an answer, closed: a field that the document does not show is refused. */
export function answerValidator({ path, method }: DocumentedOperation, status: number, mediaType: string): Validator {
  return compiled(closed, ['paths', path, method, 'responses', String(status), 'content', mediaType, 'schema']);
}

export function componentValidator(name: string): Validator {
  return compiled(closed, ['components', 'schemas', name]);
}

export function headerValidator(name: string): Validator {
  return compiled(toTheLetter, ['components', 'headers', name, 'schema']);
}

const toTheLetter = ajvOf(document);
const closed = ajvOf(closeObjects(structuredClone(document)));

function ajvOf(root: Json): Ajv2020 {
  // An OpenAPI document is more than a schema, hence not strict; numbers are: NaN is none.
  const ajv = new Ajv2020({ strict: false, strictNumbers: true, allErrors: true, validateSchema: false });
  addFormats(ajv as never);
  // Their patterns say the same; the names are for people.
  for (const name of ['ipv4-cidr', 'ipv6-cidr']) ajv.addFormat(name, true);
  ajv.addSchema(root, 'document');
  return ajv;
}

const validators = new Map<Ajv2020, Map<string, Validator>>();

function compiled(ajv: Ajv2020, pointer: readonly string[]): Validator {
  const known = validators.get(ajv) ?? new Map<string, Validator>();
  validators.set(ajv, known);
  const fragment = pointer.map((part) => `/${encodeURIComponent(part.replaceAll('~', '~0').replaceAll('/', '~1'))}`).join('');
  let validator = known.get(fragment);
  if (!validator) {
    validator = ajv.compile({ $ref: `document#${fragment}` }) as Validator;
    known.set(fragment, validator);
  }
  return validator;
}

function closeObjects(node: Json): Json {
  if (Array.isArray(node)) node.forEach(closeObjects);
  else if (typeof node === 'object' && node !== null) {
    if (node.type === 'object' && node.properties && node.additionalProperties === undefined) node.additionalProperties = false;
    Object.values(node).forEach(closeObjects);
  }
  return node;
}
