import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/db/connection';
import { mintKey } from '@/lib/auth/key-text';
import { call } from '../support/client';
import { createWorld, oneUnitInput, oneUnitPath, type World } from '../support/world';

let world: World;

beforeAll(async () => {
  world = await createWorld();
});
afterAll(closeDatabase);

const ask = (authorization: string) => call('POST', oneUnitPath, { body: oneUnitInput, headers: { authorization } });

const realm = 'Bearer realm="linewright"';

describe('the Authorization header', () => {
  const forms: [name: string, header: (key: string) => string, status: number, challenge: string | undefined][] = [
    ['Bearer and the key', (key) => `Bearer ${key}`, 200, undefined],
    ['the scheme in lower case', (key) => `bearer ${key}`, 200, undefined],
    ['several blanks between', (key) => `Bearer    ${key}  `, 200, undefined],
    ['the scheme alone', () => 'Bearer', 400, `${realm}, error="invalid_request"`],
    ['two keys', (key) => `Bearer ${key} ${key}`, 400, `${realm}, error="invalid_request"`],
    ['two keys with a comma', (key) => `Bearer ${key}, ${key}`, 400, `${realm}, error="invalid_request"`],
    ['another scheme', (key) => `Basic ${Buffer.from(`${key}:`).toString('base64')}`, 401, realm],
    ['the key without a scheme', (key) => key, 401, realm],
    ['a mistyped key', (key) => `Bearer ${key.slice(0, -1)}${key.endsWith('a') ? 'b' : 'a'}`, 401, `${realm}, error="invalid_token"`],
    ['a well-formed key that nobody issued', () => `Bearer ${mintKey().text}`, 401, `${realm}, error="invalid_token"`],
    ['a quoted key', (key) => `Bearer "${key}"`, 401, `${realm}, error="invalid_token"`],
    ['nothing', () => '', 401, realm],
  ];
  for (const [name, header, status, challenge] of forms) {
    test(`as ${name} is answered ${status}`, async () => {
      const answer = await ask(header(world.key.secret));
      expect(answer.status).toBe(status);
      expect(answer.headers['www-authenticate']).toBe(challenge);
    });
  }

  test('wins over a session cookie, so that a wrong key is never answered as a member', async () => {
    const answer = await call('POST', oneUnitPath, { body: oneUnitInput, cookie: world.cookies.owner, headers: { authorization: `Bearer ${mintKey().text}` } });
    expect(answer.status).toBe(401);
  });

  test('is the only place for a key: other headers, a cookie and the body name no caller', async () => {
    const { secret } = world.key;
    const others = [{ headers: { 'x-api-key': secret } }, { cookie: `lw_session=${secret}` }, { cookie: `key=${secret}` }, { body: { ...oneUnitInput, key: secret } }];
    for (const other of others) expect((await call('POST', oneUnitPath, { body: oneUnitInput, ...other })).status).toBe(401);
  });
});

describe('a key in the URL', () => {
  test('is refused with 400 wherever it stands, with a right header beside it too, and is not repeated in the answer', async () => {
    const { secret } = world.key;
    for (const path of [`${oneUnitPath}?key=${secret}`, `${oneUnitPath}?a=b&token=Bearer%20${secret}`, `/api/v1/calls?cursor=${secret}`, `/api/v1/health?${secret}`]) {
      const answer = await call(path.startsWith(oneUnitPath) ? 'POST' : 'GET', path, { key: secret, ...(path.startsWith(oneUnitPath) && { body: oneUnitInput }) });
      expect(answer.status).toBe(400);
      expect(answer.body.code).toBe('key-in-url');
      expect(answer.text).not.toContain(secret.slice(16, 48));
    }
  });

  test('costs nothing', async () => {
    const before = await call('GET', '/api/v1/usage', { key: world.key.secret });
    await call('POST', `${oneUnitPath}?key=${world.key.secret}`, { key: world.key.secret, body: oneUnitInput });
    const after = await call('GET', '/api/v1/usage', { key: world.key.secret });
    expect(after.body.organization.units_used).toBe(before.body.organization.units_used);
  });
});
