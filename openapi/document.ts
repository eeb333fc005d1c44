/** The OpenAPI 3.1 document, built from the operations and their zod schemas. */
import { OpenAPIRegistry, OpenApiGeneratorV31, type ResponseConfig } from '@asteasolutions/zod-to-openapi';
import { scopeMeanings, scopes } from '@/lib/auth/permissions';
import { problemKind, type ProblemSlug } from '@/lib/problems/problems';
import { engineVersion } from '@/lib/solvers/engine';
import { isTaggedRead, problemsOf, tags, type Operation } from './operation';
import { operations } from './operations/all';
import { z } from './zod';

const problemSchema = z
  .object({
    type: z.string().max(500).meta({ description: 'URL of a page about this kind of problem.', examples: ['http://127.0.0.1:3000/problems/invalid-input'] }),
    title: z.string().max(200).meta({ description: 'The kind of problem; always the same for one type.', examples: ['The input is wrong'] }),
    status: z.number().int().min(400).max(599).meta({ description: 'HTTP status.', examples: [422] }),
    detail: z.string().max(2000).meta({ description: 'What is wrong in this request.', examples: ['length_m must be at least 0; got -0.3'] }),
    code: z.string().max(60).meta({ description: 'Stable word for the kind of problem.', examples: ['invalid-input'] }),
    request_id: z.string().max(40).meta({ description: 'The same as X-Request-Id.', examples: ['req_01JE0T3M9ZC7V5Q2R8W4XKDNBH'] }),
    errors: z
      .array(
        z.object({
          pointer: z.string().max(2000).optional().meta({ description: 'RFC 6901 pointer into the body.', examples: ['/length_m'] }),
          parameter: z.string().max(2000).optional().meta({ description: 'Name of the query parameter.', examples: ['limit'] }),
          code: z.string().max(60).meta({ description: 'Stable word for what is wrong.', examples: ['too_small'] }),
          detail: z.string().max(2000).meta({ description: 'What to mend.', examples: ['length_m must be at least 0; got -0.3'] }),
        }),
      )
      .max(100)
      .optional()
      .meta({ description: 'Every wrong field at once.' }),
    violated_policies: z
      .array(z.string().max(40))
      .max(10)
      .optional()
      .meta({ description: 'Names of the exhausted limits, as in RateLimit-Policy.', examples: [['burst']] }),
  })
  .meta({ id: 'Problem', description: 'Why a request was refused (RFC 9457).' });

const headers = {
  'X-Request-Id': { description: 'Identifies the request in the call log and the server’s own log.', schema: { type: 'string', maxLength: 40, examples: ['req_01JE0T3M9ZC7V5Q2R8W4XKDNBH'] } },
  RateLimit: {
    description: 'What is left of each limit, in how many seconds it is whole again, and what this request cost; a structured field list (RFC 9651). `r` and `a`, `t` and `w` are the same under the names of two drafts.',
    schema: { type: 'string', maxLength: 500, examples: ['"burst";r=5999;t=1;a=5999;w=1;c=1'] },
  },
  'RateLimit-Policy': { description: 'The limits the caller is under; a structured field list.', schema: { type: 'string', maxLength: 500, examples: ['"burst";q=6000;w=60'] } },
  'Retry-After': { description: 'Seconds to wait.', schema: { type: 'integer', minimum: 1, maximum: 2678400, examples: [12] } },
  'WWW-Authenticate': { description: 'The scheme to use.', schema: { type: 'string', maxLength: 200, examples: ['Bearer realm="linewright"'] } },
  ETag: { description: 'Names this version of the record.', schema: { type: 'string', maxLength: 100, examples: ['"1"'] } },
  Location: { description: 'Path of the new record.', schema: { type: 'string', maxLength: 200, examples: ['/api/v1/keys/jIu9aR5U'] } },
  'Set-Cookie': { description: 'The session cookie.', schema: { type: 'string', maxLength: 2000, examples: ['lw_session=eyJ; Path=/; HttpOnly; SameSite=Lax'] } },
} as const;
type HeaderName = keyof typeof headers;

export function buildDocument() {
  const registry = new OpenAPIRegistry();
  const problem = registry.register('Problem', problemSchema);
  registry.registerComponent('securitySchemes', 'ApiKey', {
    type: 'http',
    scheme: 'bearer',
    bearerFormat: 'API key',
    description: `A key issued in the console, sent as \`Authorization: Bearer lw_live_…\`. Scopes: ${scopes.map((scope) => `\`${scope}\` (${scopeMeanings[scope]})`).join(', ')}.`,
  });
  registry.registerComponent('securitySchemes', 'Session', {
    type: 'apiKey',
    in: 'cookie',
    name: 'lw_session',
    description: 'The session of a signed-in member. Served only to this site’s own pages.',
  });
  for (const [name, header] of Object.entries(headers)) registry.registerComponent('headers', name, header as never);
  for (const operation of operations) registry.registerPath(pathOf(operation, problem) as never);
  return new OpenApiGeneratorV31(registry.definitions, { sortComponents: 'alphabetically' }).generateDocument({
    openapi: '3.1.0',
    info: {
      title: 'Linewright',
      version: engineVersion,
      description:
        'Transmission-line calculations. Every number is SI, every field ends in its unit, and every answer carries its methods with source, range and accuracy. Errors are RFC 9457.',
      license: { name: 'Proprietary', url: '/problems' },
      contact: { name: 'The people who run this installation', url: '/' },
    },
    servers: [{ url: '/api/v1', description: 'This installation' }],
    tags: Object.entries(tags).map(([name, description]) => ({ name, description })),
  });
}

function pathOf(operation: Operation, problem: z.ZodType) {
  return {
    method: operation.method,
    path: operation.path,
    operationId: operation.id,
    tags: [operation.tag],
    summary: operation.summary,
    description: operation.description,
    security: securityOf(operation),
    request: {
      ...(operation.parameters && { params: operation.parameters }),
      ...(operation.query && { query: operation.query }),
      ...(operation.conditional && { headers: ifMatch }),
      ...(operation.body && {
        body: { required: true, content: { 'application/json': { schema: operation.body, examples: operation.bodyExamples } } },
      }),
    },
    responses: { ...answersOf(operation), ...refusalsOf(operation, problem) },
  };
}

const ifMatch = z.object({
  'If-Match': z.string().max(100).meta({ description: 'The ETag of the version that the change is based on.', examples: ['"1"'] }),
});

function securityOf({ access }: Operation) {
  if (access === 'public') return [];
  return access.scope ? [{ ApiKey: [access.scope] }, { Session: [] }] : [{ Session: [] }];
}

function answersOf(operation: Operation): Record<string, ResponseConfig> {
  const limited: HeaderName[] = operation.unlimited ? [] : ['RateLimit', 'RateLimit-Policy'];
  const answers = Object.entries(operation.answers).map(([status, answer]): [string, ResponseConfig] => [
    status,
    {
      description: answer.description,
      headers: headerReferences(['X-Request-Id', ...limited, ...(answer.headers ?? [])]) as never,
      ...(answer.schema && { content: { 'application/json': { schema: answer.schema, ...(answer.examples && { examples: answer.examples as never }) } } }),
    },
  ]);
  if (isTaggedRead(operation)) {
    answers.push(['304', { description: 'The version that If-None-Match names is the present one.', headers: headerReferences(['X-Request-Id', 'ETag']) as never }]);
  }
  return Object.fromEntries(answers);
}

/** Problems that share a status share a response, which names their codes. */
function refusalsOf(operation: Operation, problem: z.ZodType): Record<string, ResponseConfig> {
  const byStatus = new Map<number, ProblemSlug[]>();
  for (const slug of problemsOf(operation)) {
    const { status } = problemKind(slug);
    byStatus.set(status, [...(byStatus.get(status) ?? []), slug]);
  }
  return Object.fromEntries(
    [...byStatus].map(([status, slugs]) => [
      String(status),
      {
        description: slugs.map((slug) => `\`${slug}\`: ${problemKind(slug).title}.`).join(' '),
        headers: headerReferences(['X-Request-Id', ...refusalHeaders(status)]),
        content: { 'application/problem+json': { schema: problem, examples: Object.fromEntries(slugs.map((slug) => [slug, problemExample(slug)])) } },
      } as ResponseConfig,
    ]),
  );
}

function refusalHeaders(status: number): HeaderName[] {
  if (status === 401) return ['WWW-Authenticate'];
  return status === 429 || status === 503 ? ['Retry-After'] : [];
}

function problemExample(slug: ProblemSlug) {
  const { status, title, meaning } = problemKind(slug);
  return {
    summary: title,
    value: { type: `http://127.0.0.1:3000/problems/${slug}`, title, status, detail: meaning, code: slug, request_id: 'req_01JE0T3M9ZC7V5Q2R8W4XKDNBH' },
  };
}

function headerReferences(names: readonly HeaderName[]) {
  return Object.fromEntries(names.map((name) => [name, { $ref: `#/components/headers/${name}` }]));
}
