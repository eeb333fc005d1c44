import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/db/connection';
import { roles, scopes, type Permission, type Scope } from '@/lib/auth/permissions';
import type { Access } from '@/openapi/operation';
import { operations } from '@/openapi/operations/all';
import { createKey, sessionCookieOf } from '../support/accounts';
import { call, type CallOptions } from '../support/client';
import { createWorld, oneUnitInput, oneUnitPath, validRequest, type World } from '../support/world';

let world: World;

beforeAll(async () => {
  world = await createWorld();
});
afterAll(closeDatabase);

type Guarded = Exclude<Access, 'public'>;
const guarded = operations.filter((operation) => operation.access !== 'public').map((operation) => ({ operation, access: operation.access as Guarded }));
const open = operations.filter((operation) => operation.access === 'public');

/** Written out here once more, so that a change of the table is a change of two files. */
const expectedRoles: Record<Permission, string> = {
  'calculations.run': 'owner admin developer engineer',
  'keys.read': 'owner admin developer auditor',
  'keys.manage': 'owner admin',
  'calls.read': 'owner admin developer engineer auditor',
  'calls.read_all': 'owner admin developer auditor',
  'usage.read': 'owner admin developer engineer auditor',
  'session.read': 'owner admin developer engineer auditor',
};

const scopeSets: Scope[][] = Array.from({ length: 2 ** scopes.length }, (_, bits) => scopes.filter((__, place) => bits & (1 << place)));

describe('a member', () => {
  for (const { operation, access } of guarded) {
    for (const role of roles) {
      const allowed = expectedRoles[access.permission].split(' ').includes(role);
      test(`as ${role} ${allowed ? 'may' : 'may not'} ${operation.id}`, async () => {
        const { method, path, options } = await validRequest(operation, world);
        const cookie = operation.id === 'session.end' ? await sessionCookieOf(world.organization.members[role]) : world.cookies[role];
        const answer = await call(method, path, { ...options, cookie });
        if (allowed) {
          // Engineers see their own calls only; the world's call was made by a key.
          const unseen = operation.id === 'calls.read' && role === 'engineer';
          expect(answer.status).toBe(unseen ? 404 : Number(Object.keys(operation.answers)[0]));
        } else {
          expect(answer.status).toBe(403);
          expect(answer.body.code).toBe('insufficient-role');
        }
      });
    }
  }
});

describe('a key', () => {
  for (const { operation, access } of guarded) {
    test(`${access.scope ? `with ${access.scope}, and no other,` : 'of no scope'} may ${operation.id}`, async () => {
      for (const set of scopeSets) {
        const { secret } = await createKey(world.organization, { scopes: set });
        const { method, path, options } = await validRequest(operation, world);
        const answer = await call(method, path, { ...options, key: secret });
        if (access.scope && set.includes(access.scope)) {
          expect(answer.status, set.join(' ')).toBe(Number(Object.keys(operation.answers)[0]));
        } else {
          expect(answer.status, set.join(' ')).toBe(403);
          expect(answer.body.code).toBe('insufficient-scope');
          expect(answer.headers['www-authenticate']).toBe(
            `Bearer realm="linewright", error="insufficient_scope"${access.scope ? `, scope="${access.scope}"` : ''}`,
          );
        }
      }
    });
  }

  test('never manages keys, members or sessions, whatever its scopes', () => {
    const reachable = guarded.filter(({ access }) => access.scope).map(({ operation }) => operation.tag);
    expect([...new Set(reachable)].sort()).toEqual(['Calculations', 'Calls', 'Usage']);
  });
});

describe('a stranger', () => {
  for (const { operation } of guarded) {
    test(`hears 401 from ${operation.id} before anything else is looked at`, async () => {
      const { method, path, options } = await validRequest(operation, world);
      for (const given of [{}, { headers: { Accept: 'text/html' } }, ...(operation.body ? [{ rawBody: '{' }, { headers: { 'content-type': 'text/csv' } }] : [])] as CallOptions[]) {
        const answer = await call(method, `${path}?nonsense=1`, { body: options.body, ...given });
        expect(answer.status).toBe(401);
        expect(answer.body.code).toBe('authentication-required');
        expect(answer.headers['www-authenticate']).toBe('Bearer realm="linewright"');
      }
    });
  }

  for (const operation of open.filter(({ id }) => id !== 'session.start')) {
    test(`may ${operation.id}`, async () => {
      const { method, path, options } = await validRequest(operation, world);
      expect((await call(method, path, options)).status).toBe(200);
    });
  }

  test('meets no open operation that changes anything but a session', () => {
    expect(open.filter(({ method }) => method !== 'get').map(({ id }) => id)).toEqual(['session.start']);
  });
});

describe('an engineer', () => {
  test('sees the calls they made on the Bench and no others; an admin sees both', async () => {
    const own = await createWorld();
    const made = await call('POST', oneUnitPath, { cookie: own.cookies.engineer, body: oneUnitInput });
    const others = await call('POST', oneUnitPath, { cookie: own.cookies.developer, body: oneUnitInput });
    const idsSeenBy = async (cookie: string) => (await call('GET', '/api/v1/calls', { cookie })).body.data.map(({ id }: { id: string }) => id);
    expect(await idsSeenBy(own.cookies.engineer)).toEqual([made.body.id]);
    expect((await idsSeenBy(own.cookies.admin)).sort()).toEqual([own.callId, made.body.id, others.body.id].sort());
    expect((await call('GET', `/api/v1/calls/${others.body.id}`, { cookie: own.cookies.engineer })).status).toBe(404);
    expect((await call('GET', `/api/v1/calls/${made.body.id}`, { cookie: own.cookies.engineer })).status).toBe(200);
  });
});
