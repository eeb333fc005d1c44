/** A calculation as a task: priced, computed, enveloped with methods, warnings and digests. */
import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { calculationPath, type Calculation, type MethodUse, type Solution } from '@/lib/solvers/calculation';
import { engineVersion } from '@/lib/solvers/engine';
import { ImpossibleInput } from '@/lib/solvers/errors';
import { computeOperation } from '@/openapi/operations/calculations';
import type { Context, Task } from './carry';
import { callIdOf } from './record';
import { invalidInput } from './refusal';
import type { Reply } from './respond';

export function computeTask(calculation: Calculation): Task {
  const path = calculationPath(calculation);
  return {
    operation: computeOperation(calculation),
    calculation: path,
    price: ({ body }) => calculation.cost.units(body),
    run: (context) => answer(path, context, solve(calculation, context.body)),
  };
}

function solve(calculation: Calculation, input: unknown): Solution<unknown> {
  try {
    return calculation.solve(input);
  } catch (error) {
    throw error instanceof ImpossibleInput ? invalidInput(error.problems) : error;
  }
}

/** The result stands in the answer as the very bytes that were digested: canonical JSON (RFC 8785). */
function answer(path: string, { exchange, body, admission }: Context, { result, methods, warnings }: Solution<unknown>): Reply {
  const canonicalResult = canonical(result);
  const digests = { input: sha256(canonical(body)), result: sha256(canonicalResult) };
  const remaining = Math.max(0, Math.min(...admission.limits.filter(isUnitLimit).map((limit) => limit.remaining)));
  const before = JSON.stringify({ id: callIdOf(exchange), calculation: path, engine: engineVersion });
  const after = JSON.stringify({
    methods: methods.map(methodUse),
    warnings,
    digests,
    usage: { units: admission.chargedUnits, remaining },
  });
  return { status: 200, body: `${before.slice(0, -1)},"result":${canonicalResult},${after.slice(1)}`, digests };
}

function isUnitLimit({ name }: { name: string }): boolean {
  return name !== 'burst';
}

function methodUse({ method, inRange }: MethodUse) {
  const { id, title, source, range, accuracy } = method;
  return { id, title, source, range, accuracy, in_range: inRange };
}

/** Throws on a number that is not finite: such an answer must fail rather than leave. */
function canonical(value: unknown): string {
  const text = canonicalize(value);
  if (text === undefined) throw new TypeError('a result has no JSON form');
  return text;
}

function sha256(text: string): string {
  return createHash('sha256').update(text).digest('hex');
}
