import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/db/connection';
import { operations } from '@/openapi/operations/all';
import { createKey } from '../support/accounts';
import { call } from '../support/client';
import { createWorld, oneUnitCall, pathOfNothing, validRequest, type World } from '../support/world';

let ours: World;
let theirs: World;

beforeAll(async () => {
  ours = await createWorld();
  theirs = await createWorld();
});
afterAll(closeDatabase);

const withIds = operations.filter(({ access, parameters }) => access !== 'public' && parameters);

describe('a record of another organization', () => {
  test('is reached by the operations that take an id, all of which are held to this', () => {
    expect(withIds.map(({ id }) => id).sort()).toEqual(['calls.read', 'keys.change', 'keys.read', 'keys.revoke']);
  });

  for (const operation of withIds) {
    test(`is answered by ${operation.id} with the bytes of one that does not exist, and stays as it is`, async () => {
      const foreign = await validRequest(operation, theirs);
      const cookie = ours.cookies.owner;
      const atForeign = await call(foreign.method, foreign.path, { ...foreign.options, cookie });
      const atNothing = await call(foreign.method, pathOfNothing(operation), { ...foreign.options, cookie });
      expect(atForeign.status).toBe(404);
      expect({ ...atForeign.body, request_id: null }).toEqual({ ...atNothing.body, request_id: null });
      const names = (answer: typeof atForeign) => Object.keys(answer.headers).sort();
      expect(names(atForeign)).toEqual(names(atNothing));
      const read = await call('GET', foreign.path, { cookie: theirs.cookies.owner });
      expect(read.status).toBe(200);
      if (operation.tag === 'Keys') expect(read.body).toMatchObject({ state: 'active', version: 1 });
    });
  }

  test('is answered the same way without If-Match, with a wrong one and with a wrong body', async () => {
    const { id } = await createKey(theirs.organization);
    const cookie = ours.cookies.owner;
    for (const headers of [{}, { 'If-Match': '"7"' }, { 'If-Match': 'x' }] as Record<string, string>[]) {
      const foreign = await call('PATCH', `/api/v1/keys/${id}`, { cookie, body: { name: 'mine now' }, headers });
      const unknown = await call('PATCH', '/api/v1/keys/00000000', { cookie, body: { name: 'mine now' }, headers });
      expect(foreign.status).toBe(404);
      expect({ ...foreign.body, request_id: null }).toEqual({ ...unknown.body, request_id: null });
    }
  });

  test('stands in no list, no page of calls and no usage, for members and keys alike', async () => {
    const { secret } = await createKey(theirs.organization, { name: 'foreign key' });
    const made = await oneUnitCall(secret);
    const caller = [{ cookie: ours.cookies.owner }, { key: ours.key.secret }];
    const lists = ['/api/v1/calls?limit=100', `/api/v1/calls?key=${secret.slice(8, 16)}`, '/api/v1/usage', '/api/v1/usage?by=key', '/api/v1/keys'];
    for (const options of caller) {
      for (const path of lists.filter((each) => !('key' in options) || each !== '/api/v1/keys')) {
        const { status, text } = await call('GET', path, options);
        expect(status).toBe(200);
        for (const trace of [made.body.id, theirs.callId, 'foreign key', theirs.key.id, theirs.organization.name]) expect(text).not.toContain(trace);
      }
    }
    expect((await call('GET', `/api/v1/calls/${made.body.id}`, { key: ours.key.secret })).status).toBe(404);
  });

  test('does not count against another organization’s quota', async () => {
    const before = await call('GET', '/api/v1/usage', { cookie: ours.cookies.owner });
    await oneUnitCall(theirs.key.secret);
    const after = await call('GET', '/api/v1/usage', { cookie: ours.cookies.owner });
    expect(after.body.organization).toEqual(before.body.organization);
  });
});
