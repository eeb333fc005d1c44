import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/connection';
import { findMemberByEmail, insertMember } from '@/db/members';
import { hashPassword } from '@/lib/auth/passwords';
import { calculationPath } from '@/lib/solvers/calculation';
import { calculations } from '@/lib/solvers/registry';
import { operations } from '@/openapi/operations/all';
import { call } from '../support/client';
import { document, documentedOperations, requestValidator } from '../support/document';
import type { Json } from '../support/json';
import { createWorld, validRequest, type World } from '../support/world';

let world: World;

beforeAll(async () => {
  world = await createWorld();
});
afterAll(closeDatabase);

function valueAt(root: unknown, pointer: string): unknown {
  return pointer
    .split('/')
    .slice(1)
    .map((part) => part.replaceAll('~1', '/').replaceAll('~0', '~'))
    .reduce<Json>((value, part) => value?.[part], root);
}

describe('a documented example of a calculation', () => {
  for (const calculation of calculations) {
    for (const { name, input, expected, tolerance } of calculation.examples) {
      test(`${calculationPath(calculation)}, ${name}, gives the numbers that its source gives`, async () => {
        const answer = await call('POST', `/api/v1/${calculationPath(calculation)}`, { key: world.key.secret, body: input });
        expect(answer.status).toBe(200);
        expect(expected.length).toBeGreaterThan(0);
        for (const { pointer, value } of expected) {
          const got = valueAt(answer.body.result, pointer);
          if (value === null) expect(got, pointer).toBeNull();
          else expect(Math.abs((got as number) - value), `${pointer}: ${got} against ${value}`).toBeLessThanOrEqual(tolerance * (Math.abs(value) || 1));
        }
      });
    }
  }
});

describe('every documented request body', () => {
  for (const documented of documentedOperations.filter(({ path, method }) => document.paths[path][method].requestBody)) {
    const examples = document.paths[documented.path][documented.method].requestBody.content['application/json'].examples as Record<string, { value: Json }>;
    test(`of ${documented.id} is answered with success`, async () => {
      expect(Object.keys(examples ?? {}).length).toBeGreaterThan(0);
      const operation = operations.find(({ id }) => id === documented.id)!;
      for (const { value } of Object.values(examples)) {
        expect(requestValidator(documented)(value)).toBe(true);
        if (operation.id === 'session.start') await makeMember(value.email, value.password);
        const { method, path, options } = await validRequest(operation, world);
        const cookie = operation.access === 'public' ? undefined : world.cookies.owner;
        const answer = await call(method, path, { ...options, body: value, cookie, from: '127.5.0.1' });
        expect(answer.status).toBe(Number(Object.keys(operation.answers)[0]));
      }
    });
  }

  async function makeMember(email: string, password: string): Promise<void> {
    if (await findMemberByEmail(database(), email)) return;
    await insertMember(database(), { organization_id: world.organization.id, name: 'Marit Solberg', email, role: 'engineer', password_hash: await hashPassword(password) });
  }
});

function exampleOfParameter({ path, method }: (typeof documentedOperations)[number], name: string): string {
  const { schema, example } = ((document.paths[path][method].parameters ?? []) as Json[]).find((parameter) => parameter.in === 'path' && parameter.name === name);
  return encodeURIComponent(String(example ?? schema.examples?.[0] ?? schema.example));
}

describe('every documented query parameter', () => {
  for (const documented of documentedOperations) {
    const parameters = ((document.paths[documented.path][documented.method].parameters ?? []) as Json[]).filter((parameter) => parameter.in === 'query' && parameter.name !== 'cursor');
    if (parameters.length === 0) continue;
    test(`of ${documented.id} takes its example, alone and with the others`, async () => {
      const pairs: [string, string][] = parameters.map(({ name, schema, example }) => [name, String(example ?? schema.examples?.[0] ?? schema.example)]);
      const path = String(documented.path).replace(/\{(\w+)\}/g, (_, name: string) => exampleOfParameter(documented, name));
      for (const query of [...pairs.map((pair) => new URLSearchParams([pair])), new URLSearchParams(pairs)]) {
        const answer = await call('GET', `/api/v1${path}?${query}`, { key: world.key.secret });
        expect(answer.status, String(query)).toBe(200);
      }
    });
  }
});

describe('the document', () => {
  test('is served as it is published', async () => {
    const { body } = await call('GET', '/api/v1/openapi.json');
    expect(body).toEqual(document);
  });

  test('shows every calculation of the catalogue, and the catalogue every one of the document', async () => {
    const { body } = await call('GET', '/api/v1/calculations');
    const listed = body.data.map(({ path }: { path: string }) => `/${path}`).sort();
    expect(listed).toEqual(documentedOperations.filter(({ path, method }) => method === 'post' && /^\/(lines|terminations|networks)\//.test(path)).map(({ path }) => path).sort());
    for (const path of listed) {
      const short = await call('GET', `/api/v1${path}`);
      const long = await call('GET', `/api/v1/calculations${path}`);
      expect(short.body).toEqual(long.body);
      expect(short.headers.etag).toBe(long.headers.etag);
    }
  });

  test('names methods that can each be read', async () => {
    const { body } = await call('GET', '/api/v1/methods');
    expect(body.data.length).toBeGreaterThan(0);
    for (const method of body.data) expect((await call('GET', `/api/v1/methods/${method.id}`)).body).toEqual(method);
  });
});
