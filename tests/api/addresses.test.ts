import { networkInterfaces } from 'node:os';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { admit } from '@/db/admission';
import { admissionDatabase, closeDatabase } from '@/db/connection';
import { digestKey } from '@/lib/auth/key-text';
import { createKey } from '../support/accounts';
import { call } from '../support/client';
import { startSecondServer, type SecondServer } from '../support/second-server';
import { createWorld, oneUnitCall, type World } from '../support/world';

let world: World;
let behindProxy: SecondServer;

beforeAll(async () => {
  world = await createWorld();
  behindProxy = await startSecondServer({ TRUST_PROXY: '1' });
});
afterAll(async () => {
  await behindProxy.stop();
  await closeDatabase();
});

/** Allow list, address, and whether a prefix comparison written out by hand lets it in. */
const lists: [allowed: string[], address: string, isIn: boolean][] = [
  [['127.0.0.1'], '127.0.0.1', true],
  [['127.0.0.1'], '127.0.0.2', false],
  [['127.0.0.0/30'], '127.0.0.3', true],
  [['127.0.0.0/30'], '127.0.0.4', false],
  [['10.0.0.0/8', '127.8.0.0/16'], '127.8.255.254', true],
  [['10.0.0.0/8', '127.8.0.0/16'], '127.9.0.1', false],
  [['0.0.0.0/0'], '127.0.0.1', true],
  [['::/0'], '127.0.0.1', false],
];

const otherFamilies: typeof lists = [
  [['2001:db8::/32'], '2001:db8:ffff::1', true],
  [['2001:db8::/32'], '2001:db9::1', false],
  [['2001:db8::1'], '2001:db8:0:0:0:0:0:1', true],
  [['::1', '198.51.100.0/24'], '198.51.100.7', true],
  [['fe80::/10'], 'febf::1', true],
  [['fe80::/10'], 'fec0::1', false],
  [['0.0.0.0/0'], '2001:db8::1', false],
];

describe('an allow list', () => {
  for (const [allowed, address, isIn] of lists) {
    test(`of ${allowed.join(', ')} ${isIn ? 'lets in' : 'keeps out'} ${address}`, async () => {
      const { secret } = await createKey(world.organization, { allowed_addresses: allowed });
      const answer = await oneUnitCall(secret, { from: address });
      expect(answer.status).toBe(isIn ? 200 : 403);
      if (!isIn) expect(answer.body.code).toBe('address-not-allowed');
    });
  }

  for (const [allowed, address, isIn] of [...lists, ...otherFamilies]) {
    test(`of ${allowed.join(', ')} ${isIn ? 'lets in' : 'keeps out'} ${address} as a trusted proxy names it`, async () => {
      const { secret } = await createKey(world.organization, { allowed_addresses: allowed });
      const answer = await oneUnitCall(secret, { server: behindProxy.url, headers: { 'X-Forwarded-For': `192.0.2.1, ${address}` } });
      expect(answer.status).toBe(isIn ? 200 : 403);
    });
  }

  test('lets nobody in whose address is not known', async () => {
    const { secret } = await createKey(world.organization, { allowed_addresses: ['0.0.0.0/0', '::/0'] });
    const { verdict } = await admit(admissionDatabase(), { keyDigest: digestKey(secret), sessionId: null, scope: 'lines:run', roles: [], address: null, units: 0 });
    expect(verdict).toBe('address');
  });

  test('is kept on every operation that takes keys, and tells nothing of quota or body', async () => {
    const { secret } = await createKey(world.organization, { allowed_addresses: ['192.0.2.0/24'], monthly_unit_quota: 0 });
    for (const path of ['/api/v1/calls', '/api/v1/usage', `/api/v1/calls/${world.callId}`]) {
      expect((await call('GET', path, { key: secret })).body.code).toBe('address-not-allowed');
    }
    expect((await oneUnitCall(secret, { rawBody: '{' })).body.code).toBe('address-not-allowed');
  });
});

describe('X-Forwarded-For', () => {
  test('from a stranger changes nothing, in no spelling and with no other forwarding field', async () => {
    const { secret } = await createKey(world.organization, { allowed_addresses: ['203.0.113.7'] });
    const claims: Record<string, string | string[]>[] = [
      { 'X-Forwarded-For': '203.0.113.7' },
      { 'x-forwarded-for': ['203.0.113.7', '203.0.113.7'] },
      { 'X-FORWARDED-FOR': '127.0.0.1, 203.0.113.7' },
      { Forwarded: 'for=203.0.113.7' },
      { 'X-Real-IP': '203.0.113.7' },
      { 'CF-Connecting-IP': '203.0.113.7' },
      { 'X-Client-IP': '203.0.113.7' },
      { 'X-Forwarded-For': '::ffff:203.0.113.7' },
    ];
    for (const headers of claims) expect((await oneUnitCall(secret, { headers })).status, JSON.stringify(headers)).toBe(403);
  });

  test('is not what the log says either', async () => {
    const answer = await oneUnitCall(world.key.secret, { from: '127.0.0.33', headers: { 'X-Forwarded-For': '203.0.113.7' } });
    const { body } = await call('GET', `/api/v1/calls/${answer.body.id}`, { key: world.key.secret });
    expect(body.address).toBe('127.0.0.33');
  });

  test('of a trusted proxy counts by its last entry alone, the one the proxy wrote itself', async () => {
    const { secret } = await createKey(world.organization, { allowed_addresses: ['203.0.113.7'] });
    const ask = async (field: string) => (await oneUnitCall(secret, { server: behindProxy.url, headers: { 'X-Forwarded-For': field } })).status;
    expect(await ask('198.51.100.1, 203.0.113.7')).toBe(200);
    expect(await ask('::ffff:203.0.113.7')).toBe(200);
    expect(await ask('203.0.113.7, 198.51.100.1')).toBe(403);
    expect(await ask('203.0.113.7, unknown')).toBe(403);
    expect(await ask('203.0.113.7, ')).toBe(403);
  });
});

describe('a caller over IPv6', () => {
  const hasLoopback = Object.values(networkInterfaces()).flat().some((each) => each?.address === '::1');

  test('is known by the IPv6 address where this machine has one', async () => {
    if (!hasLoopback) return expect(networkInterfaces()).not.toHaveProperty('::1');
    const server = await startSecondServer({ HOST: '::1' });
    try {
      const allowed = await createKey(world.organization, { allowed_addresses: ['::1/128'] });
      const foreign = await createKey(world.organization, { allowed_addresses: ['127.0.0.0/8'] });
      expect((await oneUnitCall(allowed.secret, { server: server.url, from: '::1' })).status).toBe(200);
      expect((await oneUnitCall(foreign.secret, { server: server.url, from: '::1' })).status).toBe(403);
    } finally {
      await server.stop();
    }
  });
});
