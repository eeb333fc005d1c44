import { setTimeout as pause } from 'node:timers/promises';
import { afterAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/db/connection';
import { createKey, createOrganization } from '../support/accounts';
import { call, type Answer } from '../support/client';
import { readLimits } from '../support/rate-limit-fields';
import { oneUnitCall } from '../support/world';

afterAll(closeDatabase);

const burstOf = (answer: Answer) => readLimits(answer.headers).find(({ name }) => name === 'burst')!;

describe('a burst limit', () => {
  test('of 60 a minute admits 60 at once, then one a second, and Retry-After is the wait that suffices', async () => {
    const { secret } = await createKey(await createOrganization(), { requests_per_minute: 60 });
    const start = performance.now();
    const answers = await Promise.all(Array.from({ length: 90 }, () => oneUnitCall(secret)));
    const refilled = Math.ceil((performance.now() - start) / 1000);
    const admitted = answers.filter(({ status }) => status === 200).length;
    expect(admitted).toBeGreaterThanOrEqual(60);
    expect(admitted).toBeLessThanOrEqual(60 + refilled);
    for (const refused of answers.filter(({ status }) => status === 429)) {
      expect(refused.body).toMatchObject({ code: 'burst-limit', violated_policies: ['burst'] });
      expect(burstOf(refused)).toMatchObject({ quota: 60, windowSeconds: 60, remaining: 0 });
      expect(Number(refused.headers['retry-after'])).toBeGreaterThanOrEqual(1);
      expect(Number(refused.headers['retry-after'])).toBeLessThanOrEqual(2);
    }
    // What flowed in while the answers were looked at is used up first.
    let refused = await oneUnitCall(secret);
    while (refused.status === 200) refused = await oneUnitCall(secret);
    await pause(Number(refused.headers['retry-after']) * 1000);
    expect((await oneUnitCall(secret)).status).toBe(200);
  });

  test('is told as it is: each of a row of calls leaves one less, or what has flowed in since', async () => {
    const { secret } = await createKey(await createOrganization(), { requests_per_minute: 30 });
    const start = performance.now();
    for (let used = 1; used <= 10; used++) {
      const answer = await oneUnitCall(secret);
      const flowedIn = Math.ceil((performance.now() - start) / 2000);
      expect(burstOf(answer).remaining).toBeGreaterThanOrEqual(30 - used);
      expect(burstOf(answer).remaining).toBeLessThanOrEqual(30 - used + flowedIn);
      expect(burstOf(answer).resetSeconds).toBeLessThanOrEqual(2 * used);
    }
  });

  test('is counted for each key and each member alone', async () => {
    const organization = await createOrganization();
    const [one, other] = [await createKey(organization, { requests_per_minute: 1 }), await createKey(organization, { requests_per_minute: 1 })];
    expect((await oneUnitCall(one.secret)).status).toBe(200);
    expect((await oneUnitCall(one.secret)).status).toBe(429);
    expect((await oneUnitCall(other.secret)).status).toBe(200);
  });

  test('is not spent by a call that is refused before it: wrong scope, address or key', async () => {
    const { secret } = await createKey(await createOrganization(), { requests_per_minute: 1, scopes: ['usage:read'] });
    for (let round = 0; round < 3; round++) expect((await oneUnitCall(secret)).status).toBe(403);
    expect((await call('GET', '/api/v1/usage', { key: secret })).status).toBe(200);
    expect((await call('GET', '/api/v1/usage', { key: secret })).status).toBe(429);
  });

  test('comes before the body: a wrong one over the limit is answered 429', async () => {
    const { secret } = await createKey(await createOrganization(), { requests_per_minute: 1 });
    await oneUnitCall(secret);
    expect((await oneUnitCall(secret, { rawBody: '{' })).status).toBe(429);
  });
});
