import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/connection';
import { newCallId } from '@/lib/calls/call-id';
import { createKey } from '../support/accounts';
import { call } from '../support/client';
import { createWorld, oneUnitCall, oneUnitInput, oneUnitPath, type World } from '../support/world';

let world: World;
let quiet: World;

beforeAll(async () => {
  world = await createWorld();
  quiet = await createWorld();
});
afterAll(closeDatabase);

interface Row {
  id: string;
  created_at: string;
  status: number;
  key: { id: string; name: string } | null;
}

const page = (query: string, key = world.key.secret) => call('GET', `/api/v1/calls${query}`, { key });

async function insertRows(organizationId: string, moments: readonly Date[], fields: Record<string, unknown> = {}): Promise<string[]> {
  const rows = moments.map((moment) => ({
    id: newCallId(moment.getTime()), created_at: moment, organization_id: organizationId, calculation: 'lines/secondary-constants',
    status: 200, units: 1, duration_ms: 1, request_id: 'req_00000000000000000000000000', engine: '1.0.0', ...fields,
  }));
  await database()('call').insert(rows);
  return rows.map(({ id }) => id);
}

async function walk(query: string, key: string, between: (pages: number) => Promise<unknown> = async () => undefined): Promise<Row[]> {
  const rows: Row[] = [];
  let cursor = '';
  for (let pages = 1; ; pages++) {
    const { status, body } = await page(`${query}${cursor && `&cursor=${encodeURIComponent(cursor)}`}`, key);
    expect(status).toBe(200);
    rows.push(...body.data);
    if (body.next_cursor === null) return rows;
    expect(pages, 'pages must end').toBeLessThan(200);
    cursor = body.next_cursor;
    await between(pages);
  }
}

describe('paging through calls', () => {
  test('gives every row once and newest first, also where many share one instant and more arrive meanwhile', async () => {
    const now = Date.now();
    const moments = Array.from({ length: 57 }, (_, index) => new Date(now - 3_600_000 + Math.floor(index / 10) * 1000));
    const before = await insertRows(quiet.organization.id, moments);
    const rows = await walk('?limit=7', quiet.key.secret, () => insertRows(quiet.organization.id, [new Date(), new Date()]));
    const ids = rows.map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
    expect(ids.filter((id) => before.includes(id)).sort()).toEqual(before.toSorted());
    expect(ids).toContain(quiet.callId);
    const order = rows.map(({ created_at, id }) => `${created_at} ${id}`);
    expect(order).toEqual(order.toSorted().reverse());
  });

  test('gives twenty rows by default, at most a hundred, and the last page no cursor', async () => {
    expect((await page('', quiet.key.secret)).body.data).toHaveLength(20);
    expect((await page('?limit=1', quiet.key.secret)).body.data).toHaveLength(1);
    const all = await page('?limit=100', quiet.key.secret);
    expect(all.body.next_cursor).toBeNull();
    for (const limit of ['0', '101', '-1', '1.5', 'many', '', '1e1000', ' ']) {
      const refused = await page(`?limit=${encodeURIComponent(limit)}`, quiet.key.secret);
      expect(refused.status, `limit=${limit}`).toBe(422);
      expect(refused.body.errors[0].parameter).toBe('limit');
    }
  });

  test('keeps the filter and its cursor together: a cursor of another filter, organization or member is refused', async () => {
    const { body } = await page('?limit=2', quiet.key.secret);
    const cursor = encodeURIComponent(body.next_cursor);
    expect((await page(`?limit=2&cursor=${cursor}`, quiet.key.secret)).status).toBe(200);
    expect((await page(`?limit=50&cursor=${cursor}`, quiet.key.secret)).status).toBe(200);
    const foreign = [
      await page(`?limit=2&status=2xx&cursor=${cursor}`, quiet.key.secret),
      await page(`?limit=2&from=2026-01-01T00:00:00Z&cursor=${cursor}`, quiet.key.secret),
      await page(`?limit=2&cursor=${cursor}`, world.key.secret),
      await call('GET', `/api/v1/calls?limit=2&cursor=${cursor}`, { cookie: quiet.cookies.engineer }),
    ];
    for (const answer of foreign) {
      expect(answer.status).toBe(400);
      expect(answer.body.errors).toEqual([expect.objectContaining({ parameter: 'cursor' })]);
    }
  });

  test('refuses a cursor that was tampered with anywhere', async () => {
    const { body } = await page('?limit=2', quiet.key.secret);
    const [place, seal] = body.next_cursor.split('.');
    const later = Buffer.from(JSON.stringify({ at: '2030-01-01T00:00:00.000Z', id: 'call_x' })).toString('base64url');
    const tampered = [`${later}.${seal}`, place, `${place}.`, `.${seal}`, `${place}.${seal.slice(0, -2)}`, 'x', '', '\u0000', `${place}.${'A'.repeat(seal.length)}`];
    for (const cursor of tampered) {
      const answer = await page(`?limit=2&cursor=${encodeURIComponent(cursor)}`, quiet.key.secret);
      expect(answer.status, cursor).toBe(400);
    }
    expect((await page(`?cursor=${'a'.repeat(501)}`, quiet.key.secret)).status).toBe(422);
  });
});

describe('filtering calls', () => {
  test('by status, calculation, key, Bench and time gives exactly the rows that match', async () => {
    const own = await createWorld();
    const other = await createKey(own.organization, { name: 'the other' });
    await oneUnitCall(other.secret);
    await oneUnitCall(other.secret, { body: { wrong: true } });
    await call('POST', '/api/v1/lines/secondary-constants', { key: own.key.secret, body: { wrong: true } });
    const bench = await call('POST', oneUnitPath, { cookie: own.cookies.developer, body: oneUnitInput });
    const count = async (query: string) => (await page(query, own.key.secret)).body.data.length as number;
    expect(await count('')).toBe(5);
    expect(await count('?status=2xx')).toBe(3);
    expect(await count('?status=4xx')).toBe(2);
    expect(await count('?status=422')).toBe(2);
    expect(await count('?status=429')).toBe(0);
    expect(await count('?status=5xx')).toBe(0);
    expect(await count('?calculation=lines/secondary-constants')).toBe(1);
    expect(await count('?calculation=no/such')).toBe(0);
    expect(await count(`?key=${other.id}`)).toBe(2);
    expect(await count(`?key=${other.id}&status=422`)).toBe(1);
    const { data } = (await page('?key=none', own.key.secret)).body;
    expect(data).toEqual([expect.objectContaining({ id: bench.body.id, key: null, member: { name: own.organization.members.developer.name } })]);
    const middle: string = (await page(`?key=${other.id}`, own.key.secret)).body.data[0].created_at;
    expect((await count(`?from=${middle}`)) + (await count(`?to=${middle}`))).toBe(5);
  });

  test('refuses a filter that is none with 422 and names every wrong one at once', async () => {
    const answer = await page('?status=teapot&key=short&from=yesterday&to=2026-13-01T00:00:00Z&limit=0&colour=red');
    expect(answer.status).toBe(422);
    expect(answer.body.errors.map(({ parameter }: { parameter: string }) => parameter).sort()).toEqual(['colour', 'from', 'key', 'limit', 'status', 'to']);
  });

  test('never fails on a time or a text that the database could not hold', async () => {
    const moments = ['0000-01-01T00:00:00Z', '0001-01-01T00:00:00Z', '9999-12-31T23:59:59.999999999Z', '9999-12-31T23:59:59-10:00', '2026-01-01T00:00:00+23:59', '2026-01-01T00:00:00-23:59'];
    const queries = [...moments.flatMap((moment) => [`?from=${encodeURIComponent(moment)}`, `?to=${encodeURIComponent(moment)}`]), '?calculation=%00', '?calculation=%ED%A0%80'];
    for (const query of queries) expect([200, 422], query).toContain((await page(query)).status);
    expect((await call('GET', '/api/v1/calls/call_7ZZZZZZZZZ0000000000000000', { key: world.key.secret })).status).toBe(404);
  });
});
