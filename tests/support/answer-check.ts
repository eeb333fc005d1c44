/** Holds one answer against the document and against what every answer promises. Throws on the first breach. */
import { answerValidator, componentValidator, documentedOperation, headerValidator, type DocumentedAnswer } from './document';
import { noteObserved } from './observed';
import type { Json } from './json';
import { readLimits } from './rate-limit-fields';

export interface Answer {
  readonly status: number;
  readonly headers: Record<string, string>;
  readonly text: string;
  /** The JSON of the text; undefined where there is none. */
  readonly body: Json;
}

export function checkAnswer(method: string, pathname: string, answer: Answer): void {
  const breach = (what: string): never => {
    throw new Error(`${method} ${pathname} answered ${answer.status}: ${what}\n${answer.text.slice(0, 600)}`);
  };
  checkEveryAnswer(method, answer, breach);
  const operation = documentedOperation(method, pathname);
  if (!operation) return;
  const documented = operation.answers[String(answer.status)];
  if (!documented) return void breach(`${operation.id} does not document this status`);
  noteObserved(operation.id, answer.status);
  checkHeaders(documented, answer, breach);
  if (method === 'HEAD') return;
  const [mediaType] = Object.keys(documented.content ?? {});
  if (!mediaType) return void (answer.text === '' || breach('the document shows no body'));
  if (answer.headers['content-type'] !== mediaType) breach(`the content type must be ${mediaType}`);
  const validate = answerValidator(operation, answer.status, mediaType);
  if (!validate(answer.body)) breach(JSON.stringify(validate.errors?.slice(0, 5)));
}

type Breach = (what: string) => never;

function checkEveryAnswer(method: string, { status, headers, text, body }: Answer, breach: Breach): void {
  if (!/^req_[0-9A-HJKMNP-TV-Z]{26}$/.test(headers['x-request-id'] ?? '')) breach('X-Request-Id is missing or not ours');
  if (headers['x-content-type-options'] !== 'nosniff') breach('X-Content-Type-Options must be nosniff');
  if (!headers['content-security-policy']?.includes("default-src 'none'")) breach('the policy must allow nothing');
  if (!/^no-(store|cache)$/.test(headers['cache-control'] ?? '')) breach('Cache-Control must be no-store or no-cache');
  for (const telltale of ['server', 'x-powered-by']) if (telltale in headers) breach(`${telltale} tells what runs here`);
  if (headers['access-control-allow-origin']) breach('no other site is served');
  // A refusal may quote what was sent; an answer has no such word anywhere.
  if (status < 400 && /\b(NaN|Infinity)\b/.test(text)) breach('NaN or Infinity stands in the text');
  if (status === 405 && !headers.allow) breach('405 needs Allow');
  if (status >= 400 && method !== 'HEAD') checkProblem(status, headers, text, body, breach);
}

/** What would tell of the machinery: stack frames, statements, driver and file names. */
const internals = /\n\s+at |node_modules|\.ts:\d|\bselect .+ from\b|\binsert into\b|SQLSTATE|ECONNREFUSED|\bknex\b|TypeError|RangeError/i;

function checkProblem(status: number, headers: Record<string, string>, text: string, body: Json, breach: Breach): void {
  if (headers['content-type'] !== 'application/problem+json') breach('a refusal must be application/problem+json');
  const validate = componentValidator('Problem');
  if (!validate(body)) breach(JSON.stringify(validate.errors));
  if (body.status !== status) breach('the problem names another status');
  if (body.request_id !== headers['x-request-id']) breach('the problem names another request');
  if (!body.type.endsWith(`/problems/${body.code}`)) breach('type and code disagree');
  if (process.env.PUBLIC_URL && !body.type.startsWith(`${process.env.PUBLIC_URL}/problems/`)) breach('type is not a URL of this site');
  if (internals.test(text)) breach('the problem tells of the machinery');
}

function checkHeaders(documented: DocumentedAnswer, { headers }: Answer, breach: Breach): void {
  for (const name of Object.keys(documented.headers ?? {})) {
    const value = headers[name.toLowerCase()];
    if (value === undefined) return breach(`the documented header ${name} is missing`);
    const validate = headerValidator(name);
    if (!validate(/^\d+$/.test(value) ? Number(value) : value)) breach(`${name}: ${JSON.stringify(validate.errors)}`);
  }
  if (headers.ratelimit !== undefined || headers['ratelimit-policy'] !== undefined) readLimits(headers);
}
