import { setTimeout as pause } from 'node:timers/promises';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/connection';
import { createKey, createOrganization, type TestOrganization } from '../support/accounts';
import { call, type Answer } from '../support/client';
import { openCuttableDatabase, type CuttableDatabase } from '../support/cuttable-database';
import { startSecondServer, type SecondServer } from '../support/second-server';
import { oneUnitCall } from '../support/world';

let way: CuttableDatabase;
let server: SecondServer;
let organization: TestOrganization;
let key: { id: string; secret: string };

beforeAll(async () => {
  way = await openCuttableDatabase();
  server = await startSecondServer({ DATABASE_URL: way.url });
  organization = await createOrganization();
});
afterEach(() => way.mend());
afterAll(async () => {
  await server.stop('SIGKILL');
  await way.close();
  await closeDatabase();
});

const ask = () => oneUnitCall(key.secret, { server: server.url });

async function untilServed(): Promise<number> {
  const start = performance.now();
  while ((await ask()).status !== 200) {
    if (performance.now() - start > 10_000) throw new Error('the service has not come back within ten seconds');
    await pause(100);
  }
  return performance.now() - start;
}

async function everyAnswerHasItsRow(answers: readonly Answer[]): Promise<void> {
  const rows = new Set((await database()('call').where({ key_id: key.id, status: 200 }).select('request_id')).map(({ request_id }) => request_id));
  for (const { status, headers } of answers) if (status === 200) expect(rows).toContain(headers['x-request-id']);
}

describe('a database that goes away under load', () => {
  for (const fault of ['cut', 'stall'] as const) {
    test(`(${fault}) is answered with 503 and Retry-After, never with a wrong number or silence, and service resumes by itself`, async () => {
      key = await createKey(organization);
      await untilServed();
      const answers: Answer[] = [];
      let isOver = false;
      const callers = Array.from({ length: 6 }, async () => {
        while (!isOver) answers.push(await ask());
      });
      await pause(400);
      way[fault]();
      const begun = performance.now();
      const during = await ask();
      expect(during.status).toBe(503);
      expect(Number(during.headers['retry-after'])).toBeGreaterThanOrEqual(1);
      expect(performance.now() - begun).toBeLessThan(8000);
      expect((await call('GET', '/api/v1/health', { server: server.url })).status).toBe(200);
      expect((await call('GET', '/api/v1/ready', { server: server.url })).status).toBe(503);
      expect((await call('GET', '/api/v1/methods', { server: server.url })).status).toBe(200);
      way.mend();
      expect(await untilServed()).toBeLessThan(10_000);
      isOver = true;
      await Promise.all(callers);
      expect(new Set(answers.map(({ status }) => status))).toEqual(new Set([200, 503]));
      await everyAnswerHasItsRow(answers);
      expect((await call('GET', '/api/v1/ready', { server: server.url })).status).toBe(200);
    });
  }

  test('charges at most the calls that were under way, and never less than what was answered', async () => {
    key = await createKey(organization);
    await untilServed();
    const simultaneous = 8;
    const answers = (await Promise.all(Array.from({ length: simultaneous }, async () => {
      const own: Answer[] = [];
      while (own.at(-1)?.status !== 503) {
        own.push(await ask());
        if (own.length === 20) way.cut();
      }
      return own;
    }))).flat();
    way.mend();
    const answered = (await database()('call').where({ key_id: key.id, status: 200 }).count())[0].count;
    const { units } = await database()('month_usage').where({ holder: `key:${key.id}` }).first('units');
    expect(Number(answered)).toBeGreaterThanOrEqual(answers.filter(({ status }) => status === 200).length);
    expect(Number(units)).toBeGreaterThanOrEqual(Number(answered));
    expect(Number(units)).toBeLessThanOrEqual(Number(answered) + simultaneous);
  });

  test('leaves no key in the log of the server', () => {
    expect(server.log().length).toBeGreaterThan(0);
    expect(server.log()).not.toContain(key.secret.slice(16, 48));
  });
});
