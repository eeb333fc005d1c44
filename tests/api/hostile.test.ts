import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/db/connection';
import { calculationPath } from '@/lib/solvers/calculation';
import { calculations } from '@/lib/solvers/registry';
import { createKey, createOrganization } from '../support/accounts';
import { call, type Answer } from '../support/client';
import { document, requestValidator } from '../support/document';
import { bodiesLike, rightBodies, strangeTexts, wrongBodies } from '../support/generated-bodies';
import type { Json } from '../support/json';

const fixedSeed = 20_261_201;
const bodiesPerCalculation = 667;
const simultaneous = 8;

let key: string;

beforeAll(async () => {
  key = (await createKey(await createOrganization({ monthly_unit_quota: 1e12 }), { monthly_unit_quota: 1e12, requests_per_minute: 60_000 })).secret;
});
afterAll(closeDatabase);

/**
 * Refusals that JSON Schema cannot express, each by its code: a sweep that runs backwards or starts a
 * logarithm at zero, a table out of order or of unequal columns, parts without any part or beside a whole
 * impedance, frequencies outside a table, a reference that takes no power, a cascade too large for one call; of a sought
 * dimension bounds the wrong way round, a name of another kind of line, one missing beside it, an impedance or bounds out of reach.
 */
const crossFieldCodes = new Set(['sweep_order', 'log_from_zero', 'not_ascending', 'length_differs', 'no_parts', 'excluded', 'outside_table', 'reference_without_resistance', 'too_large', 'wrong_count',
  'bounds_order', 'not_a_dimension', 'required_dimension', 'out_of_bounds', 'out_of_reach', 'no_line', 'infinite_impedance',
  'geometry', 'missing', 'too_small', 'no_resistivity', 'line_needed', 'other_representation', 'negative_real_part', 'zero_impedance', 'source_without_resistance', 'no_source', 'load_without_resistance', 'nested_too_deep',
  'no_wavelength', 'only_one', 'one_of_required', 'negative_resistance']);

/** The place itself, or the object or list from which the named child is missing. */
function resolves(root: Json, pointer: string): boolean {
  let value = root;
  const parts = pointer.split('/').slice(1).map((part) => part.replaceAll('~1', '/').replaceAll('~0', '~'));
  return parts.every((part, index) => {
    if (typeof value !== 'object' || value === null) return false;
    if (Object.hasOwn(value, part)) {
      value = value[part];
      return true;
    }
    const isLast = index === parts.length - 1;
    // A name longer than sixty characters is quoted by its beginning.
    return isLast && (!Array.isArray(value) || part === 'length') ? true : isLast && Object.keys(value).some((name) => name.startsWith(part));
  });
}

function everyNumberIsFinite(value: Json): boolean {
  if (typeof value === 'number') return Number.isFinite(value);
  return typeof value !== 'object' || value === null || Object.values(value).every(everyNumberIsFinite);
}

/** What must hold of the answer to any text; says which of the two ways it went. */
function judge(text: string, answer: Answer, accepts: (value: Json) => boolean): 'computed' | 'refused' {
  const told = `${text.slice(0, 500)}\n=> ${answer.status} ${answer.text.slice(0, 500)}`;
  expect([200, 400, 413, 422], told).toContain(answer.status);
  let value: Json;
  try {
    value = JSON.parse(text);
  } catch {
    expect(answer.status, told).toBe(400);
    return 'refused';
  }
  if (answer.status === 200) {
    expect(accepts(value), `the document refuses what was computed\n${told}`).toBe(true);
    expect(everyNumberIsFinite(answer.body.result), told).toBe(true);
    return 'computed';
  }
  if (answer.status === 413) {
    expect(Buffer.byteLength(text)).toBeGreaterThan(1024 * 1024);
    return 'refused';
  }
  expect(answer.status, told).toBe(422);
  expect(answer.body.errors?.length, told).toBeGreaterThan(0);
  for (const { pointer, detail } of answer.body.errors) {
    expect(resolves(value, pointer), `${pointer} does not resolve\n${told}`).toBe(true);
    expect(detail.length, told).toBeGreaterThan(10);
  }
  if (accepts(value)) {
    const codes = answer.body.errors.map(({ code }: { code: string }) => code);
    expect(codes.filter((code: string) => !crossFieldCodes.has(code)), `the document accepts what was refused\n${told}`).toEqual([]);
  }
  return 'refused';
}

async function sendAll(path: string, texts: readonly string[]): Promise<Answer[]> {
  const answers: Answer[] = [];
  for (let start = 0; start < texts.length; start += simultaneous) {
    answers.push(...(await Promise.all(texts.slice(start, start + simultaneous).map((rawBody) => call('POST', path, { key, rawBody })))));
  }
  return answers;
}

for (const calculation of calculations) {
  const path = `/${calculationPath(calculation)}`;
  const schema = document.paths[path].post.requestBody.content['application/json'].schema;
  const validate = requestValidator({ path, method: 'post' });
  const accepts = (value: Json) => validate(value);

  const texts = fc.oneof(
    { weight: 6, arbitrary: rightBodies(schema).map((body) => JSON.stringify(body)) },
    { weight: 4, arbitrary: bodiesLike(calculation.examples.map(({ input }) => input)).map((body) => JSON.stringify(body)) },
    { weight: 10, arbitrary: wrongBodies(schema).map((body) => JSON.stringify(body)) },
    { weight: 1, arbitrary: fc.tuple(rightBodies(schema), strangeTexts).map(([body, change]) => change(JSON.stringify(body))) },
    { weight: 1, arbitrary: fc.jsonValue({ maxDepth: 6 }).map((body) => JSON.stringify(body)) },
    { weight: 1, arbitrary: fc.string({ unit: 'binary', maxLength: 200 }) },
  );

  describe(path, () => {
    for (const [name, seed, count] of [['the fixed seed', fixedSeed, bodiesPerCalculation], ['a seed of this run', Date.now() % 2 ** 31, 100]] as const) {
      test(`answers bodies made from ${name} with finite numbers or with the fields that are wrong`, async () => {
        console.log(`${path}: seed ${seed}, ${count} bodies`);
        const bodies = fc.sample(texts, { seed, numRuns: count });
        const answers = await sendAll(`/api/v1${path}`, bodies);
        const ways = answers.map((answer, index) => judge(bodies[index], answer, accepts));
        // Nearly a third of the bodies are made right by the schema; of cascades most of those break a rule across fields.
        expect(ways.filter((way) => way === 'computed').length, 'the bodies must reach the solver too').toBeGreaterThanOrEqual(count / 50);
        expect(ways.filter((way) => way === 'refused').length).toBeGreaterThan(count / 4);
      });
    }
  });
}

test('nothing of all that has polluted a prototype or stopped the service', async () => {
  const answer = await call('GET', '/api/v1/health');
  expect(answer.body).toEqual({ status: 'up', engine: expect.any(String) });
});
