import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/connection';
import { mintKey } from '@/lib/auth/key-text';
import type { Operation } from '@/openapi/operation';
import { isTaggedRead } from '@/openapi/operation';
import { operations } from '@/openapi/operations/all';
import { createKey, createOrganization, sessionCookieOf } from '../support/accounts';
import { call, type Answer, type CallOptions } from '../support/client';
import { createWorld, validRequest, type World } from '../support/world';

let world: World;

beforeAll(async () => {
  world = await createWorld();
});
afterAll(closeDatabase);

/** As the owner, from an address of this file's own. */
async function ask(operation: Operation, change: { query?: string; options?: CallOptions } = {}) {
  const { method, path, options } = await validRequest(operation, world);
  const cookie = operation.access === 'public' ? undefined : world.cookies.owner;
  const headers = { ...options.headers, ...change.options?.headers };
  return call(method, `${path}${change.query ?? ''}`, { ...options, cookie, from: '127.3.0.1', ...change.options, headers });
}

const parametersOf = (answer: Answer) => answer.body.errors.map(({ parameter }: { parameter?: string }) => parameter);

describe('every operation', () => {
  for (const operation of operations) {
    test(`${operation.id} refuses an unknown query parameter with 422 and names it`, async () => {
      const answer = await ask(operation, { query: '?nonsense=1&constructor=2&toString=3' });
      expect(answer.status).toBe(422);
      expect(parametersOf(answer).sort()).toEqual(['constructor', 'nonsense', 'toString']);
    });

    test(`${operation.id} refuses a query parameter given twice with 400`, async () => {
      const answer = await ask(operation, { query: '?limit=1&limit=1' });
      expect(answer.status).toBe(400);
      expect(answer.body.detail).toContain('limit');
    });

    test(`${operation.id} refuses a key in the URL with 400`, async () => {
      const answer = await ask(operation, { query: `?key=${mintKey().text}` });
      expect(answer.status).toBe(400);
      expect(answer.body.code).toBe('key-in-url');
    });

    test(`${operation.id} answers 406 where JSON is not accepted, and serves every Accept that allows it`, async () => {
      for (const accept of ['text/html', 'application/xml;q=0.9, text/*', 'application/json;q=0', '*/*;q=0']) {
        const answer = await ask(operation, { options: { headers: { accept } } });
        expect(answer.status, accept).toBe(406);
        expect(answer.body.code).toBe('not-acceptable');
      }
      for (const accept of ['*/*', 'application/*', 'text/html;q=0.9, application/json;q=0.1', 'application/json']) {
        const cookie = operation.id === 'session.end' ? await sessionCookieOf(world.organization.members.owner) : undefined;
        const answer = await ask(operation, { options: { headers: { accept }, ...(cookie && { cookie }) } });
        expect(answer.status, accept).toBeLessThan(300);
      }
    });
  }
});

describe('every operation for callers', () => {
  for (const operation of operations.filter(({ access }) => access !== 'public')) {
    test(`${operation.id} answers 429 with Retry-After to a member over the burst limit`, async () => {
      const organization = await createOrganization({ member_requests_per_minute: 1 });
      const cookie = await sessionCookieOf(organization.members.owner);
      const spend = await call('GET', '/api/v1/session', { cookie });
      expect(spend.status).toBe(200);
      const answer = await ask(operation, { options: { cookie } });
      expect(answer.status).toBe(429);
      expect(answer.body.code).toBe('burst-limit');
      expect(answer.body.violated_policies).toEqual(['burst']);
      expect(Number(answer.headers['retry-after'])).toBeGreaterThan(50);
    });

    test(`${operation.id} answers 403 once the organization is disabled`, async () => {
      const organization = await createOrganization();
      const cookie = await sessionCookieOf(organization.members.owner);
      await database()('organization').where({ id: organization.id }).update({ disabled_at: new Date() });
      const answer = await ask(operation, { options: { cookie } });
      expect(answer.status).toBe(403);
      expect(answer.body.code).toBe('organization-disabled');
    });

    test(`${operation.id} answers 401 to an expired key`, async () => {
      const { id, secret } = await createKey(world.organization);
      await database()('api_key').where({ id }).update({ expires_at: new Date(Date.now() - 1) });
      const answer = await ask(operation, { options: { cookie: undefined, key: secret } });
      expect(answer.status).toBe(401);
      expect(answer.body.code).toBe('invalid-credentials');
    });

    if (operation.method !== 'get') {
      test(`${operation.id} answers 403 to a session used by another site`, async () => {
        const answer = await ask(operation, { options: { headers: { 'sec-fetch-site': 'cross-site' } } });
        expect(answer.status).toBe(403);
        expect(answer.body.code).toBe('cross-origin');
      });
    }
  }
});

describe('every operation that changes a version', () => {
  for (const operation of operations.filter(({ conditional }) => conditional)) {
    test(`${operation.id} needs If-Match and the present version`, async () => {
      const { method, path, options } = await validRequest(operation, world);
      const cookie = world.cookies.owner;
      expect((await call(method, path, { ...options, cookie, headers: {} })).status).toBe(428);
      expect((await call(method, path, { ...options, cookie, headers: { 'If-Match': '"999"' } })).status).toBe(412);
      expect((await call(method, path, { ...options, cookie })).status).toBe(200);
    });
  }
});

describe('every read with an ETag', () => {
  for (const operation of operations.filter(isTaggedRead)) {
    const tagged = async () => {
      const { path } = await validRequest(operation, world);
      const cookie = operation.access === 'public' ? undefined : world.cookies.owner;
      const get = (headers: Record<string, string> = {}) => call('GET', path, { cookie, headers, from: '127.3.0.2' });
      return { get, tag: (await get()).headers.etag! };
    };

    test(`${operation.id} answers 304 without a body to the tag it gave, in every form a cache sends it`, async () => {
      const { get, tag } = await tagged();
      expect(tag).toMatch(/^"[\w-]+"$/);
      for (const known of [tag, '*', `W/${tag}`, `"other", ${tag}`, `"other",W/${tag} ,"another"`]) {
        const answer = await get({ 'If-None-Match': known });
        expect(answer.status, known).toBe(304);
        expect(answer.text).toBe('');
        expect(answer.headers.etag).toBe(tag);
        expect(answer.headers.vary).toContain('Accept, Authorization, Cookie');
      }
    });

    test(`${operation.id} answers 200 to another tag and 412 where If-Match names another`, async () => {
      const { get, tag } = await tagged();
      for (const known of ['"other"', 'W/"other"', tag.slice(1, -1), `"${tag}"`]) expect((await get({ 'If-None-Match': known })).status, known).toBe(200);
      for (const wanted of [tag, '*', `"other", ${tag}`]) expect((await get({ 'If-Match': wanted })).status, wanted).toBe(200);
      for (const wanted of ['"other"', `W/${tag}`]) expect((await get({ 'If-Match': wanted })).status, wanted).toBe(412);
      expect((await get({ 'If-Match': '"other"', 'If-None-Match': tag })).status).toBe(412);
      expect((await get({ 'If-Match': tag, 'If-None-Match': tag })).status).toBe(304);
    });
  }

  test('evaluates conditions after the caller: a stranger with the right tag hears 401', async () => {
    const key = await createKey(world.organization);
    const answer = await call('GET', `/api/v1/keys/${key.id}`, { headers: { 'If-None-Match': '"1"' } });
    expect(answer.status).toBe(401);
  });
});
