import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/connection';
import { createOrganization, type TestOrganization } from '../support/accounts';
import { call, type Answer, type CallOptions } from '../support/client';

let organization: TestOrganization;
let next = 0;

/** Tries are counted by address, so every test calls from one of its own. */
const freshAddress = () => `127.1.0.${++next}`;

const signIn = (email: string, password: string, options: CallOptions = {}) =>
  call('POST', '/api/v1/session', { body: { email, password }, from: freshAddress(), ...options });

const cookieOf = (answer: Answer) => answer.headers['set-cookie']!.split(';')[0]!;

const withoutRequestId = ({ body }: Answer) => ({ ...body, request_id: null });

beforeAll(async () => {
  organization = await createOrganization();
});
afterAll(closeDatabase);

describe('signing in', () => {
  test('sets a cookie that scripts cannot read, other sites cannot post with, and that ends after twelve hours', async () => {
    const { email, password, name } = organization.members.admin;
    const answer = await signIn(email, password);
    expect(answer.status).toBe(201);
    expect(answer.body.member).toEqual({ name, email, role: 'admin' });
    const [pair, ...attributes] = answer.headers['set-cookie']!.split('; ');
    expect(pair).toMatch(/^lw_session=[\w-]+\.[\w-]+\.[\w-]+$/);
    const isSecure = process.env.PUBLIC_URL?.startsWith('https:');
    expect(attributes.sort()).toEqual(['HttpOnly', 'Max-Age=43200', 'Path=/', 'SameSite=Lax', ...(isSecure ? ['Secure'] : [])].sort());
    expect(Date.parse(answer.body.expires_at) - Date.now()).toBeGreaterThan(43_100_000);
    const session = await call('GET', '/api/v1/session', { cookie: cookieOf(answer) });
    expect(session.status).toBe(200);
    expect(session.body.member.email).toBe(email);
  });

  test('takes the e-mail address in any case and with blanks around it', async () => {
    const { email, password } = organization.members.engineer;
    expect((await signIn(`  ${email.toUpperCase()} `, password)).status).toBe(201);
  });

  test('answers an unknown account, a wrong password and a disabled organization with the same bytes', async () => {
    const disabled = await createOrganization();
    await database()('organization').where({ id: disabled.id }).update({ disabled_at: new Date() });
    const answers = [
      await signIn('nobody@nowhere.example', 'a wrong password'),
      await signIn(organization.members.owner.email, 'a wrong password'),
      await signIn(disabled.members.owner.email, disabled.members.owner.password),
    ];
    for (const answer of answers) {
      expect(answer.status).toBe(401);
      expect(answer.headers['set-cookie']).toBeUndefined();
      expect(withoutRequestId(answer)).toEqual(withoutRequestId(answers[0]!));
      expect(Object.keys(answer.headers).sort()).toEqual(Object.keys(answers[0]!.headers).sort());
    }
  });

  test('takes as long for an unknown account as for a wrong password', async () => {
    const timed = async (email: string) => {
      const start = performance.now();
      await signIn(email, 'a wrong password');
      return performance.now() - start;
    };
    const known: number[] = [];
    const unknown: number[] = [];
    for (let round = 0; round < 5; round++) {
      known.push(await timed(organization.members.auditor.email));
      unknown.push(await timed(`stranger${round}@nowhere.example`));
    }
    const median = (times: number[]) => times.toSorted((a, b) => a - b)[2];
    const ratio = median(known) / median(unknown);
    expect(ratio).toBeGreaterThan(0.5);
    expect(ratio).toBeLessThan(2);
  });

  test('names every wrong field at once', async () => {
    const answer = await call('POST', '/api/v1/session', { body: { email: 7, pass: 'x' }, from: freshAddress() });
    expect(answer.status).toBe(422);
    expect(answer.body.errors.map((error: { pointer: string }) => error.pointer).sort()).toEqual(['/email', '/pass', '/password']);
  });

  test('answers an e-mail address with a NUL or a lone surrogate like any unknown one', async () => {
    for (const email of ['nul\u0000@nowhere.example', 'half\ud800@nowhere.example']) {
      expect([401, 422]).toContain((await signIn(email, 'a wrong password')).status);
    }
  });
});

describe('a session', () => {
  test('is refused from the very next request after signing out, and signing out clears the cookie', async () => {
    const { email, password } = organization.members.developer;
    const cookie = cookieOf(await signIn(email, password));
    const other = cookieOf(await signIn(email, password));
    const ended = await call('DELETE', '/api/v1/session', { cookie });
    expect(ended.status).toBe(204);
    expect(ended.headers['set-cookie']).toMatch(/^lw_session=; .*Max-Age=0/);
    const after = await call('GET', '/api/v1/session', { cookie });
    expect(after.status).toBe(401);
    expect(after.body.code).toBe('invalid-credentials');
    expect((await call('DELETE', '/api/v1/session', { cookie })).status).toBe(401);
    expect((await call('GET', '/api/v1/session', { cookie: other })).status).toBe(200);
  });

  test('is refused once its row has expired, its member was removed or its organization disabled', async () => {
    const own = await createOrganization();
    const cookies = await Promise.all((['owner', 'admin', 'developer'] as const).map(async (role) => cookieOf(await signIn(own.members[role].email, own.members[role].password))));
    await database()('session').where({ member_id: own.members.owner.id }).update({ expires_at: new Date(Date.now() - 1000) });
    await database()('member').where({ id: own.members.admin.id }).update({ removed_at: new Date() });
    expect((await call('GET', '/api/v1/session', { cookie: cookies[0] })).status).toBe(401);
    expect((await call('GET', '/api/v1/session', { cookie: cookies[1] })).status).toBe(401);
    await database()('organization').where({ id: own.id }).update({ disabled_at: new Date() });
    const disabled = await call('GET', '/api/v1/session', { cookie: cookies[2] });
    expect(disabled.status).toBe(403);
    expect(disabled.body.code).toBe('organization-disabled');
  });

  test('is refused when its token is forged: other signature, no signature, or another algorithm', async () => {
    const { email, password } = organization.members.developer;
    const token = cookieOf(await signIn(email, password)).slice('lw_session='.length);
    const [header, payload, signature] = token.split('.') as [string, string, string];
    const encode = (value: unknown) => Buffer.from(JSON.stringify(value)).toString('base64url');
    const forged = [
      `${header}.${payload}.${signature[0] === 'A' ? 'B' : 'A'}${signature.slice(1)}`,
      `${header}.${payload}.`,
      `${encode({ alg: 'none', typ: 'session+jwt' })}.${payload}.`,
      `${encode({ alg: 'HS512', typ: 'session+jwt' })}.${payload}.${signature}`,
      'not-a-token',
    ];
    for (const each of forged) {
      expect((await call('GET', '/api/v1/session', { cookie: `lw_session=${each}` })).status).toBe(401);
    }
  });

  test('changes nothing on behalf of another site', async () => {
    const { email, password } = organization.members.admin;
    const cookie = cookieOf(await signIn(email, password));
    const foreign = [{ 'Sec-Fetch-Site': 'cross-site' }, { 'Sec-Fetch-Site': 'same-site' }, { Origin: 'https://elsewhere.example' }, { Origin: 'null' }];
    for (const headers of foreign) {
      const refused = await call('DELETE', '/api/v1/session', { cookie, headers });
      expect(refused.status).toBe(403);
      expect(refused.body.code).toBe('cross-origin');
      const signedIn = await signIn(email, password, { headers });
      expect(signedIn.status).toBe(403);
    }
    expect((await call('GET', '/api/v1/session', { cookie })).status).toBe(200);
    const own = { Origin: process.env.LINEWRIGHT_URL!, 'Sec-Fetch-Site': 'same-origin' };
    expect((await call('DELETE', '/api/v1/session', { cookie, headers: own })).status).toBe(204);
  });
});

/** Every try costs the server a tenth of a second on purpose, so most of them are put into the count directly. */
async function countTries(limit: 'account' | 'address', name: string, points: number): Promise<void> {
  await database()('sign_in_attempt').insert({ key: `${limit}:${name}`, points, expire: Date.now() + 900_000 });
}

async function triesCounted(limit: 'account' | 'address', name: string): Promise<number> {
  return (await database()('sign_in_attempt').where({ key: `${limit}:${name}` }).first('points'))?.points ?? 0;
}

const accountName = (email: string) => createHash('sha256').update(email).digest('base64url');

describe('tries at a password', () => {
  test('are ten for an account, from wherever they come and however many at a time; then even the right one waits', async () => {
    const { members } = await createOrganization();
    const guesses = await Promise.all(Array.from({ length: 14 }, () => signIn(members.owner.email, 'a wrong password')));
    expect(guesses.filter(({ status }) => status === 401)).toHaveLength(10);
    const refused = guesses.filter(({ status }) => status === 429);
    expect(refused).toHaveLength(4);
    const late = await signIn(members.owner.email, members.owner.password);
    expect(late.status).toBe(429);
    expect(late.body.code).toBe('too-many-attempts');
    const wait = Number(late.headers['retry-after']);
    expect(wait).toBeGreaterThan(14 * 60);
    expect(wait).toBeLessThanOrEqual(15 * 60);
  });

  test('are given back by the right password', async () => {
    const { members } = await createOrganization();
    await countTries('account', accountName(members.admin.email), 9);
    const from = freshAddress();
    await countTries('address', from, 20);
    expect((await signIn(members.admin.email, members.admin.password, { from })).status).toBe(201);
    expect(await triesCounted('account', accountName(members.admin.email))).toBe(0);
    expect(await triesCounted('address', from)).toBe(20);
    expect((await signIn(members.admin.email, 'a wrong password', { from })).status).toBe(401);
    expect(await triesCounted('account', accountName(members.admin.email))).toBe(1);
    expect(await triesCounted('address', from)).toBe(21);
  });

  test('are fifty from an address, over all accounts', async () => {
    const from = freshAddress();
    await countTries('address', from, 46);
    const guesses = await Promise.all(Array.from({ length: 9 }, (_, index) => signIn(`guess${index}@nowhere.example`, 'a wrong password', { from })));
    expect(guesses.filter(({ status }) => status === 401)).toHaveLength(4);
    expect(guesses.filter(({ status }) => status === 429)).toHaveLength(5);
    const { email, password } = organization.members.owner;
    expect((await signIn(email, password, { from })).status).toBe(429);
    expect((await signIn(email, password)).status).toBe(201);
  });

  test('cannot be multiplied by claiming other addresses in X-Forwarded-For', async () => {
    const from = freshAddress();
    await countTries('address', from, 48);
    const guesses = await Promise.all(
      Array.from({ length: 5 }, (_, index) => signIn(`claim${index}@nowhere.example`, 'x', { from, headers: { 'X-Forwarded-For': `203.0.113.${index}` } })),
    );
    expect(guesses.filter(({ status }) => status === 429)).toHaveLength(3);
  });
});
