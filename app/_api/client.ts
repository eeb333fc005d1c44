/**
 * The pages' way to the API: the same contract that scripts use, carried by the session cookie. An
 * answer that is not a success is thrown as a ProblemError; an ended session leads to sign-in and back.
 */
import { ProblemError, unreachable, type Problem } from './problem-error';

export { asProblem, ProblemError, type Problem, type ProblemField } from './problem-error';

export type Method = 'GET' | 'POST' | 'PATCH' | 'DELETE';

export interface Received<Data> {
  readonly status: number;
  readonly headers: Headers;
  readonly data: Data;
}

/** `request` with status and headers beside the data. `path` starts below /api/v1: "/keys". */
export async function exchange<Data>(method: Method, path: string, body?: unknown, headers?: Record<string, string>): Promise<Received<Data>> {
  const response = await fetch(`/api/v1${path}`, {
    method,
    headers: { Accept: 'application/json', ...(body === undefined ? {} : { 'Content-Type': 'application/json' }), ...headers },
    body: body === undefined ? undefined : JSON.stringify(body),
    cache: 'no-store',
  }).catch(() => {
    throw new ProblemError(unreachable);
  });
  const data: unknown = await response.json().catch(() => null);
  if (!response.ok) {
    const error = new ProblemError(problemOf(response, data), retryAfter(response));
    if (response.status === 401 && path !== '/session') goToSignIn();
    throw error;
  }
  return { status: response.status, headers: response.headers, data: data as Data };
}

export async function request<Data>(method: Method, path: string, body?: unknown, headers?: Record<string, string>): Promise<Data> {
  return (await exchange<Data>(method, path, body, headers)).data;
}

/** For useSWR: the key is the path below /api/v1. */
export function fetcher<Data>(path: string): Promise<Data> {
  return request<Data>('GET', path);
}

function problemOf(response: Response, data: unknown): Problem {
  if (typeof data === 'object' && data !== null && 'code' in data && 'title' in data) return data as Problem;
  // A proxy in front may answer in a form of its own.
  return { ...unreachable, status: response.status, title: `The service answered ${response.status}`, detail: 'the answer is not one of the service’s own; try again in a moment' };
}

function retryAfter(response: Response): number | null {
  const seconds = Number(response.headers.get('Retry-After') ?? NaN);
  return Number.isFinite(seconds) ? seconds : null;
}

function goToSignIn() {
  const here = window.location.pathname + window.location.search;
  window.location.assign(`/sign-in?next=${encodeURIComponent(here)}`);
}
