import { afterAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/connection';
import { createKey, createOrganization, sessionCookieOf } from '../support/accounts';
import { call, type Answer } from '../support/client';
import { readLimits } from '../support/rate-limit-fields';
import { oneUnitCall, oneUnitInput, oneUnitPath } from '../support/world';

afterAll(closeDatabase);

const limitNamed = (answer: Answer, name: string) => readLimits(answer.headers).find((limit) => limit.name === name)!;
function statuses(answers: readonly Answer[]): Record<number, number> {
  const counts: Record<number, number> = {};
  for (const { status } of answers) counts[status] = (counts[status] ?? 0) + 1;
  return counts;
}

const unitsOf = async (holder: string) => Number((await database()('month_usage').where({ holder }).first('units'))?.units ?? 0);
const secondsLeftInMonth = () => {
  const now = new Date();
  return (Date.UTC(now.getUTCFullYear(), now.getUTCMonth() + 1, 1) - now.getTime()) / 1000;
};

describe('a quota of 100 units', () => {
  test('admits exactly 100 of 200 simultaneous calls of one unit, each with its row, its own remainder and true fields', async () => {
    const organization = await createOrganization();
    const { id, secret } = await createKey(organization, { monthly_unit_quota: 100 });
    const answers = await Promise.all(Array.from({ length: 200 }, () => oneUnitCall(secret)));
    expect(statuses(answers)).toEqual({ 200: 100, 429: 100 });
    expect(await unitsOf(`key:${id}`)).toBe(100);
    expect(await unitsOf(`organization:${organization.id}`)).toBe(100);

    const admitted = answers.filter(({ status }) => status === 200);
    expect(admitted.map((answer) => limitNamed(answer, 'key').remaining).sort((a, b) => a - b)).toEqual(Array.from({ length: 100 }, (_, left) => left));
    for (const answer of admitted) {
      expect(answer.body.usage).toEqual({ units: 1, remaining: limitNamed(answer, 'key').remaining });
      expect(limitNamed(answer, 'key')).toMatchObject({ quota: 100, cost: 1 });
      expect(limitNamed(answer, 'burst').cost).toBe(1);
    }
    for (const answer of answers.filter(({ status }) => status === 429)) {
      expect(answer.body).toMatchObject({ code: 'quota-exceeded', violated_policies: ['key'] });
      expect(limitNamed(answer, 'key')).toMatchObject({ remaining: 0, cost: 0 });
      expect(limitNamed(answer, 'organization').remaining).toBeLessThanOrEqual(1_000_000);
      expect(Math.abs(Number(answer.headers['retry-after']) - secondsLeftInMonth())).toBeLessThan(5);
      expect(Number(answer.headers['retry-after'])).toBeGreaterThanOrEqual(limitNamed(answer, 'key').resetSeconds);
    }

    const rows = await database()('call').where({ key_id: id }).select('id', 'status', 'units', 'problem', 'request_id');
    expect(rows).toHaveLength(200);
    const byRequest = new Map(rows.map((row) => [row.request_id, row]));
    for (const { status, headers, body } of answers) {
      expect(byRequest.get(headers['x-request-id'])).toMatchObject({
        status,
        units: status === 200 ? 1 : 0,
        problem: status === 200 ? null : 'quota-exceeded',
        ...(status === 200 && { id: body.id }),
      });
    }
  });

  test('is exact for an organization across two keys and a member', async () => {
    const organization = await createOrganization({ monthly_unit_quota: 100 });
    const keys = await Promise.all([createKey(organization, { monthly_unit_quota: 100 }), createKey(organization, { monthly_unit_quota: 100 })]);
    const cookie = await sessionCookieOf(organization.members.engineer);
    const callers = [() => oneUnitCall(keys[0].secret), () => oneUnitCall(keys[1].secret), () => call('POST', oneUnitPath, { cookie, body: oneUnitInput })];
    const answers = await Promise.all(Array.from({ length: 210 }, (_, index) => callers[index % 3]!()));
    expect(statuses(answers)).toEqual({ 200: 100, 429: 110 });
    expect(await unitsOf(`organization:${organization.id}`)).toBe(100);
    const parts = await Promise.all([unitsOf(`key:${keys[0].id}`), unitsOf(`key:${keys[1].id}`), unitsOf(`member:${organization.members.engineer.id}`)]);
    expect(parts.reduce((sum, part) => sum + part)).toBe(100);
    for (const answer of answers.filter(({ status }) => status === 429)) expect(answer.body.violated_policies).toEqual(['organization']);
  });

  test('refuses a call that costs more than is left and leaves the rest for a smaller one', async () => {
    const organization = await createOrganization();
    const { secret } = await createKey(organization, { monthly_unit_quota: 2 });
    const costly = { ...oneUnitInput, frequency_hz: { start: 1e6, stop: 1e9, points: 5000, spacing: 'linear' } };
    expect((await oneUnitCall(secret, { body: costly })).status).toBe(429);
    expect((await oneUnitCall(secret)).body.usage).toEqual({ units: 1, remaining: 1 });
  });
});

describe('a refusal', () => {
  test('of the input costs no units but counts against the burst limit', async () => {
    const organization = await createOrganization();
    const { id, secret } = await createKey(organization, { monthly_unit_quota: 10, requests_per_minute: 600 });
    const first = await oneUnitCall(secret, { body: { wrong: 1 } });
    const second = await oneUnitCall(secret, { body: { wrong: 1 } });
    expect(first.status).toBe(422);
    expect(limitNamed(first, 'key')).toMatchObject({ remaining: 10, cost: 0 });
    expect(limitNamed(second, 'burst').remaining).toBeLessThan(limitNamed(first, 'burst').remaining + 1);
    expect(await unitsOf(`key:${id}`)).toBe(0);
  });

  test('of an impossible input gives its units back with its row', async () => {
    const organization = await createOrganization();
    const { id, secret } = await createKey(organization, { monthly_unit_quota: 10 });
    const answer = await oneUnitCall(secret, { body: impossibleInput });
    expect(answer.status).toBe(422);
    expect(answer.body.code).toBe('invalid-input');
    expect(answer.body.errors.map(({ pointer }: { pointer: string }) => pointer)).toEqual(['/termination', '/reference_impedance_ohm']);
    expect(await unitsOf(`key:${id}`)).toBe(0);
    expect(await unitsOf(`organization:${organization.id}`)).toBe(0);
    expect(await database()('call').where({ key_id: id }).select('status', 'units', 'problem')).toEqual([{ status: 422, units: 0, problem: 'invalid-input' }]);
    for (let round = 0; round < 10; round++) expect((await oneUnitCall(secret)).status).toBe(200);
    expect((await oneUnitCall(secret)).status).toBe(429);
  });
});

describe('the monthly quota', () => {
  test('counts the present UTC month only', async () => {
    const organization = await createOrganization();
    const { id, secret } = await createKey(organization, { monthly_unit_quota: 1 });
    await database().raw(`insert into month_usage (holder, period, units) values (?, (current_period() - interval '1 month')::date, 1)`, [`key:${id}`]);
    expect((await oneUnitCall(secret)).status).toBe(200);
    expect((await oneUnitCall(secret)).status).toBe(429);
  });
});

/** Well formed, but nothing closes the line and the reference takes no power. */
const impossibleInput = { ...oneUnitInput, termination: { kind: 'series_rlc' }, reference_impedance_ohm: { re: 0, im: 50 } };
