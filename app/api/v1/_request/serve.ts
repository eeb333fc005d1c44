/** From tasks to the framework's route handlers: every method is answered, in our own error shape. */
import type { z } from 'zod';
import type { Operation } from '@/openapi/operation';
import { carry, type Context, type Task } from './carry';
import { beginExchange } from './exchange';
import type { RawParameters } from './parse';
import { Refusal } from './refusal';
import { problemReply, respond, type Reply } from './respond';

type RouteHandler = (request: Request, route: { params: Promise<RawParameters> }) => Promise<Response>;
type Method = 'GET' | 'HEAD' | 'POST' | 'PUT' | 'PATCH' | 'DELETE' | 'OPTIONS';
type RouteHandlers = Record<Method, RouteHandler>;

type TypedContext<Parameters extends z.ZodObject, Query extends z.ZodObject, Body extends z.ZodType> = Context & {
  readonly parameters: z.output<Parameters>;
  readonly query: z.output<Query>;
  readonly body: z.output<Body>;
};

/** Joins an operation to what it does, with the types of its own schemas. */
export function handle<Parameters extends z.ZodObject, Query extends z.ZodObject, Body extends z.ZodType>(
  operation: Operation<Parameters, Query, Body>,
  run: (context: TypedContext<Parameters, Query, Body>) => Promise<Reply> | Reply,
): Task {
  // The input was parsed by this very operation's schemas, so its types are theirs.
  return { operation: operation as unknown as Operation, run: (context) => run(context as TypedContext<Parameters, Query, Body>) };
}

export function serve(...tasks: Task[]): RouteHandlers {
  return serveResolved(() => tasks);
}

/** For a path whose parameters decide what it is: null where there is nothing. */
export function serveResolved(resolve: (parameters: RawParameters) => readonly Task[] | null): RouteHandlers {
  const answer: RouteHandler = async (request, { params }) => {
    const parameters = await params;
    // The framework takes a path with a trailing slash for the same one.
    const tasks = new URL(request.url).pathname.endsWith('/') ? null : resolve(parameters);
    if (tasks === null) return refuse(request, new Refusal('not-found', 'there is nothing at this path'));
    const method = request.method === 'HEAD' ? 'get' : request.method.toLowerCase();
    const task = tasks.find(({ operation }) => operation.method === method);
    if (task) return carry(task, request, parameters);
    return answerMethod(request, tasks);
  };
  return { GET: answer, HEAD: answer, POST: answer, PUT: answer, PATCH: answer, DELETE: answer, OPTIONS: answer };
}

function answerMethod(request: Request, tasks: readonly Task[]): Response {
  const methods = tasks.map(({ operation }) => operation.method.toUpperCase());
  const allow = [...methods, ...(methods.includes('GET') ? ['HEAD'] : []), 'OPTIONS'].join(', ');
  // The server hands on methods that the framework does not know, such as TRACE, in this header.
  const method = request.headers.get('x-linewright-method') ?? request.method;
  if (method === 'OPTIONS') return respond(request, beginExchange(request), { status: 204, body: null, headers: { Allow: allow } });
  return refuse(request, new Refusal('method-not-allowed', `${method.slice(0, 20)} is not supported here; use ${allow}`, { headers: { Allow: allow } }));
}

function refuse(request: Request, refusal: Refusal): Response {
  const exchange = beginExchange(request);
  return respond(request, exchange, problemReply(refusal, exchange));
}
