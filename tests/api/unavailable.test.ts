import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/db/connection';
import { problemsOf } from '@/openapi/operation';
import { operations } from '@/openapi/operations/all';
import { call, type CallOptions } from '../support/client';
import { readLimits } from '../support/rate-limit-fields';
import { startSecondServer, type SecondServer } from '../support/second-server';
import { createWorld, validRequest, type World } from '../support/world';

let world: World;
let away: SecondServer;
const anonymousRequests = 40;

beforeAll(async () => {
  world = await createWorld();
  // Port 9 is discard, where nothing listens.
  away = await startSecondServer({ DATABASE_URL: 'postgres://linewright@127.0.0.1:9/linewright', ANONYMOUS_REQUESTS_PER_MINUTE: String(anonymousRequests) });
});
afterAll(async () => {
  await away.stop();
  await closeDatabase();
});

describe('with the database out of reach', () => {
  for (const operation of operations) {
    const documents503 = problemsOf(operation).includes('unavailable');
    test(`${operation.id} ${documents503 ? 'answers 503 with Retry-After within three seconds' : 'answers as ever'}`, async () => {
      const { method, path, options } = await validRequest(operation, world);
      const cookie = operation.access === 'public' ? undefined : world.cookies.owner;
      const callers: CallOptions[] = [{ cookie }, ...(operation.access !== 'public' && operation.access.scope ? [{ key: world.key.secret }] : [])];
      for (const caller of callers) {
        const start = performance.now();
        const answer = await call(method, path, { ...options, ...caller, server: away.url, from: '127.4.0.1' });
        expect(performance.now() - start).toBeLessThan(3000);
        if (!documents503) {
          expect(answer.status).toBe(200);
        } else {
          expect(answer.status).toBe(503);
          expect(answer.body.code).toBe('unavailable');
          expect(Number(answer.headers['retry-after'])).toBeGreaterThanOrEqual(1);
          expect(answer.headers['set-cookie']).toBeUndefined();
        }
      }
    });
  }

  test('a mistyped key is still refused without asking it, and forty callers at once all hear 503', async () => {
    expect((await call('GET', '/api/v1/usage', { server: away.url, key: 'lw_live_wrong' })).status).toBe(401);
    const start = performance.now();
    const answers = await Promise.all(Array.from({ length: 40 }, () => call('GET', '/api/v1/usage', { server: away.url, key: world.key.secret })));
    expect(new Set(answers.map(({ status }) => status))).toEqual(new Set([503]));
    expect(performance.now() - start).toBeLessThan(5000);
  });

  test('neither the log nor an answer holds a key, a cookie or a password', async () => {
    await call('POST', '/api/v1/session', { server: away.url, from: '127.4.0.1', body: { email: world.organization.members.owner.email, password: world.organization.members.owner.password } });
    const log = away.log();
    expect(log).toContain('ECONNREFUSED');
    for (const secret of [world.key.secret.slice(16, 48), world.cookies.owner.split('.')[2]!, world.organization.members.owner.password]) expect(log).not.toContain(secret);
  });
});

describe('strangers at one address', () => {
  test('share one limit over all open operations, told in the fields, and hear 429 with Retry-After beyond it', async () => {
    const from = '127.4.0.9';
    const ask = () => call('GET', '/api/v1/methods', { server: away.url, from });
    for (let used = 1; used <= anonymousRequests; used++) {
      const [limit] = readLimits((await ask()).headers);
      expect(limit).toMatchObject({ name: 'anonymous', quota: anonymousRequests, windowSeconds: 60, remaining: anonymousRequests - used, cost: 1 });
    }
    for (const operation of operations.filter(({ access, unlimited }) => access === 'public' && !unlimited)) {
      const { method, path, options } = await validRequest(operation, world);
      const answer = await call(method, path, { ...options, server: away.url, from });
      expect(answer.status, operation.id).toBe(429);
      expect(answer.body).toMatchObject({ code: 'burst-limit', violated_policies: ['anonymous'] });
      expect(Number(answer.headers['retry-after'])).toBeGreaterThanOrEqual(1);
      expect(Number(answer.headers['retry-after'])).toBeLessThanOrEqual(60);
    }
    for (const path of ['/api/v1/health']) expect((await call('GET', path, { server: away.url, from })).status).toBe(200);
    expect((await call('GET', '/api/v1/methods', { server: away.url, from: '127.4.0.10' })).status).toBe(200);
  });
});
