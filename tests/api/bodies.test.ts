import { Readable } from 'node:stream';
import { gzipSync } from 'node:zlib';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/db/connection';
import { operations } from '@/openapi/operations/all';
import { call, type CallOptions } from '../support/client';
import { createWorld, oneUnitInput, oneUnitPath, validRequest, type World } from '../support/world';

let world: World;

beforeAll(async () => {
  world = await createWorld();
});
afterAll(closeDatabase);

const limit = 1024 * 1024;
const input = JSON.stringify(oneUnitInput);
const compute = (options: CallOptions) => call('POST', oneUnitPath, { key: world.key.secret, ...options });
const unitsUsed = async () => (await call('GET', '/api/v1/usage', { key: world.key.secret })).body.organization.units_used as number;

describe('the size of a body', () => {
  test('may be exactly one mebibyte', async () => {
    const answer = await compute({ rawBody: input.padEnd(limit, ' ') });
    expect(answer.status).toBe(200);
  });

  test('one byte more is refused with 413, declared or in chunks of unknown length', async () => {
    const tooLong = input.padEnd(limit + 1, ' ');
    const declared = await compute({ rawBody: tooLong });
    expect(declared.status).toBe(413);
    const chunks = Array.from({ length: 17 }, (_, index) => Buffer.from(tooLong.slice(index * 65_536, (index + 1) * 65_536)));
    const chunked = await compute({ rawBody: Readable.from(chunks) });
    expect(chunked.status).toBe(413);
    expect(chunked.body.code).toBe('body-too-large');
    const within = await compute({ rawBody: Readable.from([Buffer.from(input.slice(0, 20)), Buffer.from(input.slice(20))]) });
    expect(within.status).toBe(200);
  });

  test('leaves the connection usable after a refusal', async () => {
    for (let round = 0; round < 5; round++) await compute({ rawBody: ' '.repeat(limit + 1) });
    expect((await compute({ rawBody: input })).status).toBe(200);
  });
});

describe('the media type', () => {
  const accepted = ['application/json', 'application/json; charset=utf-8', 'application/json;charset="UTF-8"', 'Application/JSON'];
  const refused = ['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data; boundary=x', 'application/json; charset=utf-16', 'application/jsonp', 'application/problem+json', 'json', ''];
  for (const type of accepted) {
    test(`${type} is accepted`, async () => {
      expect((await compute({ rawBody: input, headers: { 'content-type': type } })).status).toBe(200);
    });
  }
  for (const type of refused) {
    test(`${type || 'nothing'} is refused with 415, which names what is accepted`, async () => {
      const answer = await compute({ rawBody: input, headers: { 'content-type': type } });
      expect(answer.status).toBe(415);
      expect(answer.headers.accept).toBe('application/json');
    });
  }

  test('a compressed body is refused with 415, whatever the compression', async () => {
    for (const encoding of ['gzip', 'br', 'deflate', 'zstd', 'gzip, gzip']) {
      const answer = await compute({ rawBody: gzipSync(input), headers: { 'content-encoding': encoding } });
      expect(answer.status, encoding).toBe(415);
      expect(answer.headers['accept-encoding']).toBe('identity');
    }
    expect((await compute({ rawBody: input, headers: { 'content-encoding': 'identity' } })).status).toBe(200);
  });
});

describe('the text of a body', () => {
  const broken: [string, Buffer | string][] = [
    ['empty', ''],
    ['blank', ' \n '],
    ['cut off', input.slice(0, -1)],
    ['two values', `${input}${input}`],
    ['with a comment', `/* ohm */${input}`],
    ['with a comma too many', input.replace('}', ',}')],
    ['with NaN', '{"length_m": NaN}'],
    ['with Infinity', '{"length_m": -Infinity}'],
    ['in single quotes', input.replaceAll('"', "'")],
    ['in UTF-16', Buffer.from(input, 'utf16le')],
    ['with a byte that is not UTF-8', Buffer.concat([Buffer.from('{"line": "'), Buffer.from([0xff]), Buffer.from('"}')])],
    ['with an overlong form', Buffer.concat([Buffer.from('{"line": "'), Buffer.from([0xc0, 0xaf]), Buffer.from('"}')])],
    ['with an encoded surrogate', Buffer.concat([Buffer.from('{"line": "'), Buffer.from([0xed, 0xa0, 0x80]), Buffer.from('"}')])],
    ['after a byte order mark', Buffer.concat([Buffer.from([0xef, 0xbb, 0xbf]), Buffer.from(input)])],
    ['with a bare NUL', `{"line": "\u0000"}`],
  ];
  for (const [name, rawBody] of broken) {
    test(`${name} is refused with 400 and costs nothing`, async () => {
      const before = await unitsUsed();
      const answer = await compute({ rawBody });
      expect(answer.status).toBe(400);
      expect(answer.body.code).toBe('malformed-request');
      expect(await unitsUsed()).toBe(before);
    });
  }

  test('that is JSON but no object is refused with 422 at the root', async () => {
    for (const rawBody of ['null', '[]', '"text"', '7', 'true', '1e999', '"\\ud800"']) {
      const answer = await compute({ rawBody });
      expect(answer.status, rawBody).toBe(422);
      expect(answer.body.errors, rawBody).toEqual([expect.objectContaining({ pointer: '' })]);
    }
  });

  test('nested a hundred thousand levels deep is refused, within a second', async () => {
    const start = performance.now();
    for (const [opened, closed] of [['[', ']'], ['{"line":', '}']] as const) {
      const answer = await compute({ rawBody: `${opened.repeat(100_000)}1${closed.repeat(100_000)}` });
      expect([400, 422]).toContain(answer.status);
    }
    expect(performance.now() - start).toBeLessThan(2000);
  });
});

describe('every operation with a body', () => {
  for (const operation of operations.filter(({ body }) => body)) {
    test(`${operation.id} answers 400, 413, 415 and 422 by its rules`, async () => {
      const { method, path, options } = await validRequest(operation, world);
      const caller = { ...options, cookie: world.cookies.owner };
      const { body: _, ...bare } = caller;
      const from = '127.2.0.1';
      expect((await call(method, path, { ...bare, from, rawBody: '{' })).status).toBe(400);
      expect((await call(method, path, { ...bare, from, rawBody: ' '.repeat(limit + 1) })).status).toBe(413);
      expect((await call(method, path, { ...bare, from, rawBody: '{}', headers: { ...options.headers, 'content-type': 'text/plain' } })).status).toBe(415);
      const unknown = await call(method, path, { ...bare, from, body: { nonsense: true } });
      expect(unknown.status).toBe(422);
      expect(unknown.body.errors.map(({ pointer }: { pointer: string }) => pointer)).toContain('/nonsense');
    });
  }
});
