import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/connection';
import { calculationPath } from '@/lib/solvers/calculation';
import { calculations } from '@/lib/solvers/registry';
import { call } from '../support/client';
import { createWorld, oneUnitCall, oneUnitInput, type World } from '../support/world';

let world: World;

beforeAll(async () => {
  world = await createWorld();
});
afterAll(closeDatabase);

/** RFC 8785, written anew: members by UTF-16 code units, numbers and texts as ECMAScript writes them. */
function canonicalJson(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  if (typeof value !== 'object' || value === null) return JSON.stringify(value);
  const members = Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1));
  return `{${members.map(([name, member]) => `${JSON.stringify(name)}:${canonicalJson(member)}`).join(',')}}`;
}

const sha256 = (text: string) => createHash('sha256').update(text).digest('hex');

/** The bytes of the member `result` as they stand in the answer. */
function resultBytes(text: string): string {
  const start = text.indexOf('"result":') + '"result":'.length;
  const end = text.indexOf(',"methods":[', start);
  return text.slice(start, end);
}

describe('an answer', () => {
  for (const calculation of calculations) {
    const path = calculationPath(calculation);
    test(`of ${path} carries digests that anyone can recompute from it`, async () => {
      for (const { input } of calculation.examples) {
        const answer = await call('POST', `/api/v1/${path}`, { key: world.key.secret, body: input });
        expect(answer.status).toBe(200);
        const { digests, result, calculation: named } = answer.body;
        expect(named).toBe(path);
        expect(digests.result).toBe(sha256(canonicalJson(result)));
        expect(digests.result).toBe(sha256(resultBytes(answer.text)));
        expect(digests.input).toBe(sha256(canonicalJson(calculation.input.parse(input))));
      }
    });

    test(`of ${path} has the same result, byte for byte, for the same input however it is written`, async () => {
      const { input } = calculation.examples[0];
      const compact = await call('POST', `/api/v1/${path}`, { key: world.key.secret, body: input });
      const reordered = Object.fromEntries(Object.entries(input as object).reverse());
      const spaced = await call('POST', `/api/v1/${path}`, { key: world.key.secret, rawBody: JSON.stringify(reordered, null, 4) });
      expect(resultBytes(spaced.text)).toBe(resultBytes(compact.text));
      expect(spaced.body.digests).toEqual(compact.body.digests);
      expect(spaced.body.id).not.toBe(compact.body.id);
    });

    test(`of ${path} names its methods with source, range and accuracy, all of them declared`, async () => {
      const { body } = await call('POST', `/api/v1/${path}`, { key: world.key.secret, body: calculation.examples[0].input });
      expect(body.methods.length).toBeGreaterThan(0);
      for (const { in_range, ...method } of body.methods) {
        expect(typeof in_range).toBe('boolean');
        const declared = calculation.methods.find(({ id }) => id === method.id);
        expect(declared).toMatchObject(method);
        expect((await call('GET', `/api/v1/methods/${method.id}`)).body).toEqual(declared);
      }
    });
  }
});

describe('the log', () => {
  test('has the call under the id, the request id and the digests of the answer, with its bodies', async () => {
    const answer = await oneUnitCall(world.key.secret, { headers: { 'X-Request-Id': 'build-4711' }, from: '127.0.0.9' });
    const { body: row } = await call('GET', `/api/v1/calls/${answer.body.id}`, { key: world.key.secret });
    expect(row).toMatchObject({
      id: answer.body.id,
      calculation: 'terminations/input-impedance',
      status: 200,
      problem: null,
      units: 1,
      request_id: answer.headers['x-request-id'],
      client_request_id: 'build-4711',
      address: '127.0.0.9',
      engine: answer.body.engine,
      digests: answer.body.digests,
      member: null,
    });
    expect(row.key.id).toBe(world.key.id);
    expect(row.request).toEqual(oneUnitInput);
    expect(row.answer).toEqual(answer.body);
    expect(row.duration_ms).toBeGreaterThan(0);
  });

  test('keeps a refused request as it came, and the problem it was answered with', async () => {
    const wrong = { line: 'x', 'nul \u0000': '\ud800' };
    const refused = await oneUnitCall(world.key.secret, { body: wrong });
    expect(refused.status).toBe(422);
    const { body: page } = await call('GET', '/api/v1/calls?status=422&limit=1', { key: world.key.secret });
    const { body: row } = await call('GET', `/api/v1/calls/${page.data[0].id}`, { key: world.key.secret });
    expect(row.request_id).toBe(refused.headers['x-request-id']);
    expect(row.request).toEqual(wrong);
    expect(row.answer).toEqual(refused.body);
    expect(row.digests).toEqual({ input: null, result: null });
  });

  test('takes no client request id that could break a log line', async () => {
    for (const id of ['with blank', 'x'.repeat(129), 'ümlaut']) {
      const answer = await oneUnitCall(world.key.secret, { headers: { 'X-Request-Id': id } });
      expect(answer.headers['x-request-id']).not.toBe(id);
      const { body: row } = await call('GET', `/api/v1/calls/${answer.body.id}`, { key: world.key.secret });
      expect(row.client_request_id).toBeNull();
    }
  });

  test('keeps no bodies for an organization that does not want them kept', async () => {
    const own = await createWorld();
    await database()('organization').where({ id: own.organization.id }).update({ keeps_bodies: false });
    const answer = await oneUnitCall(own.key.secret);
    const { body: row } = await call('GET', `/api/v1/calls/${answer.body.id}`, { key: own.key.secret });
    expect(row).toMatchObject({ request: null, answer: null, digests: answer.body.digests });
    expect(await database()('call_body').where({ id: answer.body.id })).toEqual([]);
  });

  test('is written before the answer is given', async () => {
    for (let round = 0; round < 20; round++) {
      const answer = await oneUnitCall(world.key.secret);
      expect(await database()('call').where({ id: answer.body.id }).first('status')).toEqual({ status: 200 });
    }
  });

  test('has no row for a caller who is not known', async () => {
    const [{ count: before }] = await database()('call').count();
    await oneUnitCall('lw_live_0000000000000000000000000000000000000000000000');
    const [{ count: after }] = await database()('call').where('status', 401).count();
    expect(Number(after)).toBe(0);
    expect(Number(before)).toBeGreaterThan(0);
  });
});
