import { afterAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/connection';
import { newCallId } from '@/lib/calls/call-id';
import { createKey } from '../support/accounts';
import { call } from '../support/client';
import { createWorld, oneUnitCall, oneUnitInput, oneUnitPath } from '../support/world';

afterAll(closeDatabase);

const day = 86_400_000;

describe('usage', () => {
  test('counts units per organization and per key from the rows that enforce the quota, and refusals cost nothing', async () => {
    const world = await createWorld({ monthly_unit_quota: 700 });
    const second = await createKey(world.organization, { name: 'second', monthly_unit_quota: 300 });
    for (let round = 0; round < 3; round++) await oneUnitCall(second.secret);
    await oneUnitCall(second.secret, { body: { wrong: 1 } });
    await call('POST', oneUnitPath, { cookie: world.cookies.engineer, body: oneUnitInput });
    const { body } = await call('GET', '/api/v1/usage', { cookie: world.cookies.auditor });
    expect(body.organization).toEqual({ units_used: 5, monthly_unit_quota: 700 });
    expect(body.keys[0]).toEqual({ id: second.id, name: 'second', units_used: 3, monthly_unit_quota: 300 });
    expect(body.keys).toHaveLength(2);
    const byKey = await call('GET', '/api/v1/usage?by=key', { cookie: world.cookies.auditor });
    expect(byKey.body.history.find(({ label }: { label: string }) => label === 'second')).toEqual({ label: 'second', calls: 4, units: 3 });
    expect(byKey.body.history.find(({ label }: { label: string }) => label === 'the Bench')).toEqual({ label: 'the Bench', calls: 1, units: 1 });
    const byCalculation = await call('GET', '/api/v1/usage?by=calculation', { cookie: world.cookies.auditor });
    expect(byCalculation.body.history).toEqual([{ label: 'terminations/input-impedance', calls: 6, units: 5 }]);
  });

  test('tells the month in UTC', async () => {
    const world = await createWorld();
    const now = new Date();
    const { body } = await call('GET', '/api/v1/usage', { cookie: world.cookies.owner });
    expect(body.period).toEqual({
      start: new Date(Date.UTC(now.getUTCFullYear(), now.getUTCMonth(), 1)).toISOString(),
      end: new Date(Date.UTC(now.getUTCFullYear(), now.getUTCMonth() + 1, 1)).toISOString(),
    });
  });

  test('has a row for every UTC day of the range, idle ones too, and puts a call at the border on the right side', async () => {
    const world = await createWorld();
    const border = new Date(Math.floor(Date.now() / day) * day - 2 * day);
    await database().raw('select ensure_call_partitions(?::timestamptz)', [border]);
    await database().raw('select ensure_call_partitions(?::timestamptz)', [new Date(border.getTime() - day)]);
    for (const moment of [border, new Date(border.getTime() - 1)]) {
      await database()('call').insert({
        id: newCallId(moment.getTime()), created_at: moment, organization_id: world.organization.id, calculation: 'x/y', status: 200,
        units: 10, duration_ms: 1, request_id: 'req_00000000000000000000000000', engine: '1.0.0',
      });
    }
    const name = (offset: number) => new Date(border.getTime() + offset * day).toISOString().slice(0, 10);
    const from = new Date(border.getTime() - 2 * day).toISOString();
    const to = new Date(border.getTime() + 2 * day).toISOString();
    const { body } = await call('GET', `/api/v1/usage?from=${from}&to=${to}`, { cookie: world.cookies.owner });
    expect(body.history).toEqual([
      { label: name(-2), calls: 0, units: 0 },
      { label: name(-1), calls: 1, units: 10 },
      { label: name(0), calls: 1, units: 10 },
      { label: name(1), calls: 0, units: 0 },
    ]);
    const thirty = await call('GET', '/api/v1/usage', { cookie: world.cookies.owner });
    expect([30, 31]).toContain(thirty.body.history.length);
  });

  test('refuses a range that is empty, backwards or longer than 366 days', async () => {
    const world = await createWorld();
    const ask = (query: string) => call('GET', `/api/v1/usage?${query}`, { cookie: world.cookies.owner });
    expect((await ask('from=2026-01-01T00:00:00Z&to=2027-01-02T00:00:00Z')).status).toBe(200);
    for (const query of ['from=2026-01-01T00:00:00Z&to=2027-01-03T00:00:00Z', 'from=2026-01-02T00:00:00Z&to=2026-01-01T00:00:00Z', 'from=2026-01-01T00:00:00Z&to=2026-01-01T00:00:00Z', 'from=2020-01-01T00:00:00Z']) {
      const answer = await ask(query);
      expect(answer.status, query).toBe(422);
      expect(answer.body.errors[0].parameter).toBe('from');
    }
    expect((await ask('by=moon&from=x&to=y')).body.errors).toHaveLength(3);
  });

  test('never fails on a time that the database could not hold', async () => {
    const world = await createWorld();
    const ranges = [['0000-01-01T00:00:00Z', '0000-02-01T00:00:00Z'], ['0001-01-01T00:00:00Z', '0001-02-01T00:00:00Z'], ['2026-01-01T00:00:00+23:59', '2026-02-01T00:00:00-23:59'], ['9999-12-01T00:00:00Z', '9999-12-31T23:59:59.999999999Z']];
    for (const [from, to] of ranges as [string, string][]) {
      for (const by of ['day', 'key', 'calculation']) {
        const answer = await call('GET', `/api/v1/usage?by=${by}&from=${encodeURIComponent(from)}&to=${encodeURIComponent(to)}`, { cookie: world.cookies.owner });
        expect([200, 422], `${from} ${to} ${by}`).toContain(answer.status);
      }
    }
  });
});
