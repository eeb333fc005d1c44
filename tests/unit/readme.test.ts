/** The README shows a call and its answer; both are read here and run. */
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import canonicalize from 'canonicalize';
import { expect, it } from 'vitest';
import { fieldErrors } from '@/lib/problems/field-errors';
import { engineVersion } from '@/lib/solvers/engine';
import { findCalculation } from '@/lib/solvers/registry';

const readme = readFileSync(new URL('../../README.md', import.meta.url), 'utf8');
const calculation = findCalculation('terminations', 'input-impedance')!;
const jsonBlocks = [...readme.matchAll(/```json\n([\s\S]*?)```/g)].map(([, text]) => JSON.parse(text!));
const sha256 = (value: unknown) => createHash('sha256').update(canonicalize(value)!).digest('hex');

it('shows the answer that the engine gives to the call it shows', () => {
  const [, body] = /-d '(\{[\s\S]*?\})'/.exec(readme)!;
  const input = calculation.input.parse(JSON.parse(body!));
  const { result, methods } = calculation.solve(input);
  const [answer] = jsonBlocks;
  expect(answer.result).toEqual(result);
  expect(answer.engine).toBe(engineVersion);
  expect(answer.digests).toEqual({ input: sha256(input), result: sha256(result) });
  expect(answer.methods).toEqual(methods.map(({ method: { id, title, source, range, accuracy }, inRange }) => ({ id, title, source, range, accuracy, in_range: inRange })));
});

it('shows errors in the words of the API', () => {
  const [, problem] = jsonBlocks;
  const { error } = calculation.input.safeParse({ line: { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 }, length_m: -0.3, termination: 'open' }, { reportInput: true });
  expect(problem.errors).toEqual(fieldErrors(error!.issues));
});
