/** RateLimit and RateLimit-Policy as a client reads them: structured field lists of strings with parameters. */
import { parseList } from 'structured-headers';

export interface LimitState {
  readonly name: string;
  readonly quota: number;
  readonly windowSeconds: number;
  readonly remaining: number;
  readonly resetSeconds: number;
  readonly cost: number;
}

/** Throws where the two fields do not parse, or do not fit one another. */
export function readLimits(headers: Record<string, string>): LimitState[] {
  const policies = new Map(items(headers['ratelimit-policy'], 'RateLimit-Policy'));
  return items(headers.ratelimit, 'RateLimit').map(([name, state]) => {
    const policy = policies.get(name);
    if (!policy) throw new Error(`RateLimit names ${name}, which RateLimit-Policy does not`);
    const quota = wholeNumber(policy, 'q');
    const windowSeconds = wholeNumber(policy, 'w');
    const remaining = wholeNumber(state, 'r');
    const resetSeconds = wholeNumber(state, 't');
    if (remaining > quota) throw new Error(`${name}: r=${remaining} is more than q=${quota}`);
    if (windowSeconds < 1) throw new Error(`${name}: w=${windowSeconds} is no window`);
    if (resetSeconds > windowSeconds) throw new Error(`${name}: t=${resetSeconds} is more than w=${windowSeconds}`);
    if (wholeNumber(state, 'a') !== remaining || wholeNumber(state, 'w') !== resetSeconds) {
      throw new Error(`${name}: the names of the two drafts do not agree`);
    }
    return { name, quota, windowSeconds, remaining, resetSeconds, cost: wholeNumber(state, 'c') };
  });
}

type Parameters = ReadonlyMap<string, unknown>;

function items(field: string | undefined, fieldName: string): [string, Parameters][] {
  if (!field) throw new Error(`${fieldName} is missing`);
  const list = parseList(field).map(([value, parameters]): [string, Parameters] => {
    if (typeof value !== 'string') throw new Error(`${fieldName}: every item must be a string; got ${String(value)}`);
    return [value, parameters as Parameters];
  });
  if (new Set(list.map(([name]) => name)).size !== list.length) throw new Error(`${fieldName} names a limit twice`);
  return list;
}

function wholeNumber(parameters: Parameters, name: string): number {
  const value = parameters.get(name);
  if (!Number.isInteger(value) || (value as number) < 0) throw new Error(`parameter ${name} must be a whole number; got ${String(value)}`);
  return value as number;
}
