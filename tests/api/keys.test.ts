import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/connection';
import { isWellFormedKey, mintKey } from '@/lib/auth/key-text';
import { call } from '../support/client';
import { createWorld, oneUnitCall, type World } from '../support/world';

let world: World;
let cookie: string;

const wanted = (name: string, fields: Record<string, unknown> = {}) => ({ name, scopes: ['lines:run', 'terminations:run'], ...fields });
const issue = (body: unknown) => call('POST', '/api/v1/keys', { cookie, body });
const change = (id: string, version: number | string, body: unknown) =>
  call('PATCH', `/api/v1/keys/${id}`, { cookie, body, headers: { 'If-Match': typeof version === 'number' ? `"${version}"` : version } });

beforeAll(async () => {
  world = await createWorld({ monthly_unit_quota: 50_000 });
  cookie = world.cookies.admin;
});
afterAll(closeDatabase);

describe('issuing', () => {
  test('answers the secret, the place and the version, and the key works at once', async () => {
    const answer = await issue(wanted('fresh', { monthly_unit_quota: 5000, requests_per_minute: 120, allowed_addresses: ['127.0.0.0/8'] }));
    expect(answer.status).toBe(201);
    const { key, secret } = answer.body;
    expect(isWellFormedKey(secret)).toBe(true);
    expect(secret.slice(8, 16)).toBe(key.id);
    expect(key).toMatchObject({
      name: 'fresh',
      monthly_unit_quota: 5000,
      requests_per_minute: 120,
      allowed_addresses: ['127.0.0.0/8'],
      expires_at: null,
      state: 'active',
      units_used: 0,
      version: 1,
      created_by: world.organization.members.admin.name,
    });
    expect(key.display).toBe(`lw_live_${key.id}…${secret.slice(-2)}`);
    expect(answer.headers.location).toBe(`/api/v1/keys/${key.id}`);
    expect(answer.headers.etag).toBe('"1"');
    const used = await oneUnitCall(secret);
    expect(used.status).toBe(200);
    const read = await call('GET', answer.headers.location!, { cookie });
    expect(read.body).toEqual({ ...key, units_used: 1, last_used_at: read.body.last_used_at });
  });

  test('fills in the documented defaults', async () => {
    const { body } = await issue(wanted('defaults'));
    expect(body.key).toMatchObject({ monthly_unit_quota: 10_000, requests_per_minute: 6000, expires_at: null, allowed_addresses: [] });
  });

  test('refuses the name of a key in force in any case, and takes it again once that key is revoked', async () => {
    const first = await issue(wanted('twin'));
    const second = await issue(wanted('TWIN'));
    expect(second.status).toBe(409);
    expect(second.body.errors).toEqual([expect.objectContaining({ pointer: '/name', code: 'taken' })]);
    await call('DELETE', `/api/v1/keys/${first.body.key.id}`, { cookie });
    expect((await issue(wanted('twin'))).status).toBe(201);
  });

  test('makes one key of twenty issued at once under one name', async () => {
    const answers = await Promise.all(Array.from({ length: 20 }, () => issue(wanted('race'))));
    expect(answers.map(({ status }) => status).sort()).toEqual([201, ...Array.from({ length: 19 }, () => 409)]);
  });

  test('lets two organizations use the same name', async () => {
    const other = await createWorld();
    expect((await issue(wanted('shared name'))).status).toBe(201);
    expect((await call('POST', '/api/v1/keys', { cookie: other.cookies.owner, body: wanted('shared name') })).status).toBe(201);
  });

  test('refuses a quota above the organization’s, naming both numbers', async () => {
    const answer = await issue(wanted('greedy', { monthly_unit_quota: 50_001 }));
    expect(answer.status).toBe(422);
    expect(answer.body.errors).toEqual([expect.objectContaining({ pointer: '/monthly_unit_quota' })]);
    expect(answer.body.detail).toContain('50000');
    expect(answer.body.detail).toContain('50001');
    expect((await issue(wanted('just so', { monthly_unit_quota: 50_000 }))).status).toBe(201);
  });

  test('refuses an expiry that has passed', async () => {
    const answer = await issue(wanted('stale', { expires_at: '2020-01-01T00:00:00Z' }));
    expect(answer.status).toBe(422);
    expect(answer.body.errors[0].pointer).toBe('/expires_at');
  });

  test('names every wrong field at once', async () => {
    const answer = await issue({ name: ' ', scopes: ['lines:run', 'all'], monthly_unit_quota: -1, requests_per_minute: 0.5, expires_at: 'soon', allowed_addresses: ['10.0.0.0/40'], color: 'red' });
    expect(answer.status).toBe(422);
    expect(answer.body.errors.map(({ pointer }: { pointer: string }) => pointer).sort()).toEqual(
      ['/allowed_addresses/0', '/color', '/expires_at', '/monthly_unit_quota', '/name', '/requests_per_minute', '/scopes/1'].sort(),
    );
  });

  test('never fails on a text that the database could not hold', async () => {
    for (const name of ['nul \u0000 inside', '\u0000', 'half \ud800 a pair', '𝄞'.repeat(30), 'a\nb']) {
      const answer = await issue(wanted(name));
      expect([201, 422], JSON.stringify(name)).toContain(answer.status);
      if (answer.status === 201) expect((await call('GET', `/api/v1/keys/${answer.body.key.id}`, { cookie })).body.name).toBe(name.trim());
    }
  });
});

describe('the secret', () => {
  test('stands in the answer that issues the key and nowhere else: no other answer and no table', async () => {
    const { body } = await issue(wanted('secretive'));
    const secret: string = body.secret;
    const answers = [
      await oneUnitCall(secret),
      await oneUnitCall(secret, { body: { wrong: 1 } }),
      await call('GET', '/api/v1/keys', { cookie }),
      await call('GET', `/api/v1/keys/${body.key.id}`, { cookie }),
      await change(body.key.id, 1, { name: 'still secretive' }),
      await call('GET', '/api/v1/calls', { cookie }),
      await call('GET', '/api/v1/usage', { cookie }),
      await call('DELETE', `/api/v1/keys/${body.key.id}`, { cookie }),
      await oneUnitCall(secret),
    ];
    // Neither the whole nor its secret part; the eight characters that name it and the last two may show.
    const secretPart = secret.slice(16, 48);
    for (const answer of answers) expect(answer.text + JSON.stringify(answer.headers)).not.toContain(secretPart);
    const { rows: tables } = await database().raw(`select format('%I', c.relname) as name from pg_class c join pg_namespace n on n.oid = c.relnamespace where n.nspname = 'public' and c.relkind = 'r'`);
    expect(tables.length).toBeGreaterThan(8);
    for (const { name } of tables) {
      const { rows } = await database().raw(`select count(*)::int as found from ${name} as t where t::text like ?`, [`%${secretPart}%`]);
      expect(rows[0].found, name).toBe(0);
    }
  });
});

describe('changing', () => {
  test('needs the version it is based on: 428 without, 412 with another, 200 with the present one', async () => {
    const { body } = await issue(wanted('versioned'));
    const { id } = body.key;
    expect((await call('PATCH', `/api/v1/keys/${id}`, { cookie, body: { name: 'x' } })).status).toBe(428);
    for (const stale of ['"2"', '"0"', 'W/"1"', '*', '1', '"one"', '"99999999999999999999"']) {
      const answer = await change(id, stale, { name: 'x' });
      expect(answer.status, stale).toBe(412);
    }
    const changed = await change(id, 1, { requests_per_minute: 7 });
    expect(changed.status).toBe(200);
    expect(changed.headers.etag).toBe('"2"');
    expect(changed.body).toMatchObject({ name: 'versioned', requests_per_minute: 7, version: 2 });
    expect((await change(id, 1, { name: 'y' })).status).toBe(412);
  });

  test('lets one of two simultaneous editors win and tells the other', async () => {
    const { body } = await issue(wanted('contested'));
    const answers = await Promise.all([1, 2, 3, 4].map((requests_per_minute) => change(body.key.id, 1, { requests_per_minute })));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 412, 412, 412]);
  });

  test('holds a change to the same rules as issuing', async () => {
    const { body } = await issue(wanted('ruled'));
    await issue(wanted('occupied'));
    expect((await change(body.key.id, 1, { name: 'Occupied' })).status).toBe(409);
    expect((await change(body.key.id, 1, { monthly_unit_quota: 50_001 })).status).toBe(422);
    expect((await change(body.key.id, 1, { expires_at: '2020-01-01T00:00:00Z' })).status).toBe(422);
    expect((await change(body.key.id, 1, { scopes: [] })).status).toBe(422);
    expect((await change(body.key.id, 1, { id: 'aaaaaaaa' })).status).toBe(422);
    expect((await call('GET', `/api/v1/keys/${body.key.id}`, { cookie })).body.version).toBe(1);
  });

  test('bites at once: scopes, quota and addresses', async () => {
    const { body } = await issue(wanted('tamed'));
    const { secret, key } = body;
    expect((await oneUnitCall(secret)).status).toBe(200);
    await change(key.id, 1, { scopes: ['lines:run'] });
    expect((await oneUnitCall(secret)).body.code).toBe('insufficient-scope');
    await change(key.id, 2, { scopes: ['terminations:run'], monthly_unit_quota: 1 });
    expect((await oneUnitCall(secret)).body.code).toBe('quota-exceeded');
    await change(key.id, 3, { monthly_unit_quota: 2, allowed_addresses: ['192.0.2.0/24'] });
    expect((await oneUnitCall(secret)).body.code).toBe('address-not-allowed');
    await change(key.id, 4, { allowed_addresses: [] });
    expect((await oneUnitCall(secret)).status).toBe(200);
  });
});

describe('revoking', () => {
  test('refuses the very next call, also among many in flight, and twice is as once', async () => {
    const { body } = await issue(wanted('doomed', { requests_per_minute: 60_000 }));
    const { secret, key } = body;
    let revokedAt = Number.POSITIVE_INFINITY;
    const startedAfter: number[] = [];
    const caller = async () => {
      for (let round = 0; round < 25; round++) {
        const begun = performance.now();
        const { status } = await oneUnitCall(secret);
        if (begun > revokedAt) startedAfter.push(status);
      }
    };
    const callers = Array.from({ length: 4 }, caller);
    await new Promise((resolve) => setTimeout(resolve, 40));
    const revoked = await call('DELETE', `/api/v1/keys/${key.id}`, { cookie });
    revokedAt = performance.now();
    await Promise.all(callers);
    startedAfter.push((await oneUnitCall(secret)).status);
    expect(revoked.status).toBe(200);
    expect(revoked.body).toMatchObject({ state: 'revoked', version: 2 });
    expect(new Set(startedAfter)).toEqual(new Set([401]));
    const again = await call('DELETE', `/api/v1/keys/${key.id}`, { cookie });
    expect(again.body).toEqual({ ...revoked.body, last_used_at: again.body.last_used_at, units_used: again.body.units_used });
  });

  test('keeps the key in the list, after those in force', async () => {
    const { body } = await issue(wanted('a name that sorts first'));
    await call('DELETE', `/api/v1/keys/${body.key.id}`, { cookie });
    const { body: list } = await call('GET', '/api/v1/keys', { cookie });
    const states: string[] = list.data.map((key: { state: string }) => key.state);
    expect(list.data.some((key: { id: string }) => key.id === body.key.id)).toBe(true);
    expect(states.indexOf('revoked')).toBeGreaterThan(states.lastIndexOf('active'));
  });
});

describe('a key that does not work', () => {
  test('is answered with the same bytes whether it is unknown, revoked or expired', async () => {
    const expired = await issue(wanted('expired'));
    const revoked = await issue(wanted('revoked'));
    await database()('api_key').where({ id: expired.body.key.id }).update({ expires_at: new Date(Date.now() - 1000) });
    await call('DELETE', `/api/v1/keys/${revoked.body.key.id}`, { cookie });
    const never = mintKey().text;
    const answers = [await oneUnitCall(never), await oneUnitCall(expired.body.secret), await oneUnitCall(revoked.body.secret), await oneUnitCall(`${never.slice(0, -1)}_`)];
    for (const answer of answers) {
      expect(answer.status).toBe(401);
      expect(answer.headers['www-authenticate']).toBe('Bearer realm="linewright", error="invalid_token"');
      expect({ ...answer.body, request_id: null }).toEqual({ ...answers[0]!.body, request_id: null });
    }
    const read = await call('GET', `/api/v1/keys/${expired.body.key.id}`, { cookie });
    expect(read.body.state).toBe('expired');
  });

  test('is refused for a disabled organization, with a reason that its owner can act on', async () => {
    const other = await createWorld();
    await database()('organization').where({ id: other.organization.id }).update({ disabled_at: new Date() });
    const answer = await oneUnitCall(other.key.secret);
    expect(answer.status).toBe(403);
    expect(answer.body.code).toBe('organization-disabled');
  });
});
