/** parse: every wrong field at once. A refusal is carried, not thrown, for who calls is answered first. */
import Negotiator from 'negotiator';
import { z } from 'zod';
import { fieldErrors, mostErrors, type FieldError } from '@/lib/problems/field-errors';
import type { Operation } from '@/openapi/operation';
import { readJsonBody } from './read-body';
import { Refusal, invalidInput } from './refusal';

export type RawParameters = Readonly<Record<string, string | string[] | undefined>>;

export interface Input {
  readonly parameters: Record<string, unknown>;
  readonly query: Record<string, unknown>;
  readonly body: unknown;
}

export interface Parsed {
  readonly input: Input | null;
  readonly refusal: Refusal | null;
  /** The body as it came, for the call log; null when it was not JSON. */
  readonly bodyText: string | null;
}

const noQuery = z.strictObject({});
const noParameters = z.strictObject({});

export async function parse(request: Request, operation: Operation, rawParameters: RawParameters): Promise<Parsed> {
  let bodyText: string | null = null;
  try {
    negotiate(request);
    const parameters = readParameters(operation, rawParameters);
    const query = (operation.query ?? noQuery).safeParse(readQuery(request), { reportInput: true });
    let body: unknown;
    const errors: FieldError[] = query.success ? [] : fieldErrors(query.error.issues).map(asParameter);
    if (operation.body) {
      const json = await readJsonBody(request);
      bodyText = json.text;
      const parsedBody = operation.body.safeParse(json.value, { reportInput: true });
      if (parsedBody.success) body = parsedBody.data;
      else errors.push(...fieldErrors(parsedBody.error.issues));
    }
    if (errors.length > 0) throw invalidInput(errors.slice(0, mostErrors));
    return { input: { parameters, query: query.data ?? {}, body }, refusal: null, bodyText };
  } catch (error) {
    if (error instanceof Refusal) return { input: null, refusal: error, bodyText };
    throw error;
  }
}

function negotiate(request: Request): void {
  const accept = request.headers.get('accept') ?? '*/*';
  if (new Negotiator({ headers: { accept } }).mediaTypes(['application/json']).length === 0) {
    throw new Refusal('not-acceptable', 'this path answers application/json');
  }
}

function readParameters(operation: Operation, raw: RawParameters): Record<string, unknown> {
  const parsed = (operation.parameters ?? noParameters).safeParse(operation.parameters ? raw : {});
  if (!parsed.success) throw new Refusal('not-found', 'there is nothing at this path');
  return parsed.data;
}

function readQuery(request: Request): Record<string, string> {
  const query: Record<string, string> = Object.create(null);
  for (const [name, value] of new URL(request.url).searchParams) {
    if (name in query) throw new Refusal('malformed-request', `the query parameter ${name.slice(0, 60)} is given twice`);
    query[name] = value;
  }
  return query;
}

function asParameter({ pointer, ...rest }: FieldError): FieldError {
  return { parameter: pointer?.slice(1), ...rest };
}
