import { setTimeout as pause } from 'node:timers/promises';
import { afterAll, afterEach, beforeEach, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/connection';
import { createKey, createOrganization, sessionCookieOf } from '../support/accounts';
import { call, serverUrl, type Answer } from '../support/client';
import { startSecondServer, type SecondServer } from '../support/second-server';
import { oneUnitCall } from '../support/world';

let second: SecondServer;

beforeEach(async () => {
  second = await startSecondServer();
  // A fresh process opens its connections and loads its routes with the first calls.
  const { secret } = await createKey(await createOrganization());
  for (let round = 0; round < 3; round++) await Promise.all(Array.from({ length: 8 }, () => oneUnitCall(secret, { server: second.url })));
});
afterEach(() => second.stop('SIGKILL'));
afterAll(closeDatabase);

describe('two processes on one database', () => {
  test('admit exactly the quota between them', async () => {
    const { id, secret } = await createKey(await createOrganization(), { monthly_unit_quota: 60 });
    const answers = await Promise.all(Array.from({ length: 120 }, (_, index) => oneUnitCall(secret, { server: index % 2 ? second.url : serverUrl() })));
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(60);
    expect(answers.filter(({ status }) => status === 429)).toHaveLength(60);
    expect(Number((await database()('month_usage').where({ holder: `key:${id}` }).first('units')).units)).toBe(60);
  });

  test('share one burst limit', async () => {
    const { secret } = await createKey(await createOrganization(), { requests_per_minute: 20 });
    const answers = await Promise.all(Array.from({ length: 40 }, (_, index) => oneUnitCall(secret, { server: index % 2 ? second.url : serverUrl() })));
    const admitted = answers.filter(({ status }) => status === 200).length;
    expect(admitted).toBeGreaterThanOrEqual(20);
    expect(admitted).toBeLessThanOrEqual(22);
  });

  test('hold to a revocation and a sign-out that the other made, from the next request', async () => {
    const organization = await createOrganization();
    const { id, secret } = await createKey(organization);
    const cookie = await sessionCookieOf(organization.members.owner);
    expect((await oneUnitCall(secret, { server: second.url })).status).toBe(200);
    await call('DELETE', `/api/v1/keys/${id}`, { cookie });
    expect((await oneUnitCall(secret, { server: second.url })).status).toBe(401);
    expect((await call('GET', '/api/v1/session', { cookie, server: second.url })).status).toBe(200);
    await call('DELETE', '/api/v1/session', { cookie });
    expect((await call('GET', '/api/v1/session', { cookie, server: second.url })).status).toBe(401);
  });
});

describe('a process that ends under load', () => {
  async function load(secret: string, end: () => Promise<void>): Promise<{ answers: Answer[]; broken: number }> {
    const answers: Answer[] = [];
    let broken = 0;
    const callers = Array.from({ length: 8 }, async () => {
      for (;;) {
        try {
          answers.push(await oneUnitCall(secret, { server: second.url }));
        } catch (error) {
          // No connection at all is how a client learns that nobody is there; a broken one is an answer lost.
          if ((error as { code?: string }).code !== 'ECONNREFUSED') broken++;
          return;
        }
      }
    });
    while (answers.length < 40) await pause(10);
    await end();
    await Promise.all(callers);
    return { answers, broken };
  }

  test('by SIGKILL has recorded every call that it answered', async () => {
    const { id, secret } = await createKey(await createOrganization());
    const { answers } = await load(secret, () => second.stop('SIGKILL'));
    const rows = new Set((await database()('call').where({ key_id: id }).select('request_id')).map(({ request_id }) => request_id));
    for (const { headers } of answers) expect(rows).toContain(headers['x-request-id']);
  });

  test('by SIGTERM answers what is under way first', async () => {
    const { id, secret } = await createKey(await createOrganization());
    const { answers, broken } = await load(secret, () => second.stop('SIGTERM'));
    expect(answers.every(({ status }) => status === 200)).toBe(true);
    const [{ count }] = await database()('call').where({ key_id: id }).count();
    // Each of the eight callers may find its idle connection closed; no call was recorded and left unanswered.
    expect(Number(count)).toBe(answers.length);
    expect(broken).toBeLessThanOrEqual(8);
  });
});
