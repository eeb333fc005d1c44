import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/db/connection';
import { operations } from '@/openapi/operations/all';
import { call } from '../support/client';
import { createWorld, oneUnitInput, oneUnitPath, pathOfNothing, validRequest, type World } from '../support/world';

let world: World;

beforeAll(async () => {
  world = await createWorld();
});
afterAll(closeDatabase);

const byPath = new Map(operations.map(({ path }) => [path, operations.filter((operation) => operation.path === path)]));
const everyMethod = ['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS', 'TRACE', 'PROPFIND', 'LOCK', 'QUERY'];

describe('a path', () => {
  for (const [template, atPath] of byPath) {
    const methods = atPath.map(({ method }) => method.toUpperCase());
    const allowed = [...methods, ...(methods.includes('GET') ? ['HEAD'] : []), 'OPTIONS'];

    test(`${template} answers ${allowed.join(', ')}, and 405 with Allow to every other method`, async () => {
      const { path } = await validRequest(atPath[0]!, world);
      const allowSets = new Set<string>();
      for (const method of everyMethod.filter((each) => !allowed.includes(each))) {
        const answer = await call(method, path);
        expect(answer.status, method).toBe(405);
        expect(answer.headers.allow!.split(', ').sort(), method).toEqual([...allowed].sort());
        if (method !== 'HEAD') expect(answer.body.code).toBe('method-not-allowed');
        allowSets.add(answer.headers.allow!);
      }
      const options = await call('OPTIONS', path);
      expect(options.status).toBe(204);
      expect(options.text).toBe('');
      expect(options.headers.allow!.split(', ').sort()).toEqual([...allowed].sort());
      expect(allowSets).toEqual(new Set([options.headers.allow!]));
    });

    if (methods.includes('GET')) {
      test(`${template} answers HEAD as GET, without the body`, async () => {
        const operation = atPath.find(({ method }) => method === 'get')!;
        const { path } = await validRequest(operation, world);
        const cookie = world.cookies.owner;
        const get = await call('GET', path, { cookie });
        const head = await call('HEAD', path, { cookie });
        expect(head.status).toBe(get.status);
        expect(head.text).toBe('');
        for (const name of ['content-type', 'etag', 'vary', 'cache-control', 'ratelimit-policy']) expect(head.headers[name], name).toBe(get.headers[name]);
      });
    }

    test(`${template} with a trailing slash or a part too many is another path: 404, not a redirect`, async () => {
      const { path } = await validRequest(atPath[0]!, world);
      for (const other of [`${path}/`, `${path}/more/and/more`, `${path}//`]) {
        const answer = await call('GET', other, { cookie: world.cookies.owner });
        expect(answer.status, other).toBe(404);
        expect(answer.body.code).toBe('not-found');
      }
    });
  }
});

describe('a path that is none of ours', () => {
  const strange = [
    '/api', '/api/', '/api/v1', '/api/v1/', '/api/v2/calls', '/api/v1/nothing', '/api/v1/lines', '/api/v1/lines/no-such', '/api/v1/no-such/secondary-constants',
    '/api/v1/__proto__/constructor', '/api/v1/lines/__proto__', '/api/v1/constructor/name', '/api/v1/_request/serve', '/api/v1/CALLS', '/api/v1/calls/..%2fkeys', '/api/v1/keys/%00',
    '/api/v1/methods/%00', '/api/v1/methods/..;/', '/api/v1/calculations/lines/%F0%9F%A7%AA', '/api/v1/.env', '/api/v1/calculations/lines', '/api/openapi.json',
  ];
  for (const path of strange) {
    test(`${path} answers every method with 404 in our own shape`, async () => {
      for (const method of everyMethod) {
        const answer = await call(method, path, { cookie: world.cookies.owner });
        // A known template with an id that cannot be one answers other methods with 405.
        const template = /^\/api\/v1\/(keys|methods|calls|calculations\/lines)\/[^/]+$/.test(path);
        expect(template ? [404, 405, 204] : [404], `${method} ${path}`).toContain(answer.status);
      }
      expect((await call('GET', path, { cookie: world.cookies.owner })).status).toBe(404);
    });
  }

  test('of eight thousand characters, or with broken percent signs, is refused without failing', async () => {
    for (const path of [`/api/v1/${'a'.repeat(8000)}`, `/api/v1/methods/${'%41'.repeat(2500)}`, '/api/v1/methods/%E0%A4%A', '/api/v1/calls?cursor=%E0%A4%A', '/api/v1/methods/%ff%fe']) {
      const answer = await call('GET', path, { cookie: world.cookies.owner });
      expect(answer.status, path.slice(0, 40)).toBeGreaterThanOrEqual(400);
      expect(answer.status, path.slice(0, 40)).toBeLessThan(500);
    }
  });
});

describe('an id', () => {
  for (const operation of operations.filter(({ parameters }) => parameters)) {
    test(`that names nothing answers 404 at ${operation.id}`, async () => {
      const { options } = await validRequest(operation, world);
      const answer = await call(operation.method.toUpperCase(), pathOfNothing(operation), { ...options, cookie: world.cookies.owner });
      expect(answer.status).toBe(404);
      expect(answer.body.code).toBe('not-found');
    });
  }
});

describe('a header by which the framework talks to itself', () => {
  const fields: Record<string, string>[] = [
    { RSC: '1' }, { RSC: '1', 'Next-Router-Prefetch': '1' }, { 'Next-Router-State-Tree': '%5B%22%22%5D' }, { 'Next-Action': '0' }, { 'X-Nextjs-Data': '1' },
    { 'X-Matched-Path': '/api/v1/keys' }, { 'X-Middleware-Subrequest': 'middleware' }, { 'X-Middleware-Rewrite': '/api/v1/keys' }, { 'X-Invoke-Path': '/api/v1/keys' }, { 'X-Now-Route-Matches': 'method=x' },
  ];
  for (const headers of fields) {
    test(`such as ${Object.keys(headers).join(' and ')} changes no answer`, async () => {
      expect((await call('GET', '/api/v1/health', { headers })).status).toBe(200);
      expect((await call('POST', oneUnitPath, { key: world.key.secret, body: oneUnitInput, headers })).status).toBe(200);
      expect((await call('GET', '/api/v1/nothing', { headers })).status).toBe(404);
      expect((await call('POST', oneUnitPath, { body: oneUnitInput, headers })).status).toBe(401);
    });
  }

  test('and the query parameters it uses for that cannot exchange an id', async () => {
    const { id } = (await call('GET', '/api/v1/methods')).body.data[0];
    for (const prefix of ['nxtP', 'nxtI']) {
      const answer = await call('GET', `/api/v1/methods/${id}?${prefix}method=no-such-method`);
      expect(answer.status === 200 ? answer.body.id : answer.status).toBe(answer.status === 200 ? id : 422);
    }
  });
});

describe('a header that claims another method', () => {
  test('changes nothing', async () => {
    for (const headers of [{ 'X-Linewright-Method': 'DELETE' }, { 'X-HTTP-Method-Override': 'DELETE' }, { 'X-Method-Override': 'PUT' }] as Record<string, string>[]) {
      expect((await call('GET', '/api/v1/health', { headers })).status).toBe(200);
      expect((await call('POST', '/api/v1/health', { headers })).status).toBe(405);
    }
    const computed = await call('POST', oneUnitPath, { key: world.key.secret, body: oneUnitInput, headers: { 'X-Linewright-Method': 'TRACE' } });
    expect(computed.status).toBe(200);
  });
});
