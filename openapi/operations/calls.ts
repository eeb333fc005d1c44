/** The call log: one row for every answered call of a known caller. */
import { defineOperation } from '../operation';
import { z } from '../zod';
import { callId, cursor, dateTime, keyId, moment, units } from './fields';

const digest = (description: string) =>
  z
    .union([z.string().regex(/^[0-9a-f]{64}$/), z.null()])
    .meta({ description, examples: ['9f86d081884c7d659a2feaa0c55ad015a3bf4f1b2b0b822cd15d6c15b0f00a08'] });

const callShape = {
  id: callId,
  created_at: dateTime('When the call came in.'),
  calculation: z.string().max(100).meta({ description: 'Group and id of the calculation.', examples: ['lines/secondary-constants'] }),
  status: z.number().int().min(200).max(599).meta({ description: 'HTTP status of the answer.', examples: [200] }),
  problem: z.union([z.string().max(60), z.null()]).meta({ description: 'Code of the problem where the call was refused.', examples: ['invalid-input'] }),
  units: units('What the call was charged.', 1),
  duration_ms: z.number().min(0).max(1e9).meta({ description: 'From the request’s arrival to its record, in milliseconds.', examples: [2.4] }),
  key: z
    .union([z.object({ id: keyId, name: z.string().max(60).meta({ description: 'Name of the key.', examples: ['drum-test-3'] }) }), z.null()])
    .meta({ description: 'The key that made the call; null for a member on the Bench.' }),
  member: z
    .union([z.object({ name: z.string().max(200).meta({ description: 'Name of the member.', examples: ['Marit Solberg'] }) }), z.null()])
    .meta({ description: 'The member who made the call on the Bench; null for a key.' }),
  request_id: z.string().max(40).meta({ description: 'The X-Request-Id of the answer.', examples: ['req_01JE0T3M9ZC7V5Q2R8W4XKDNBH'] }),
};

export const callSchema = z.object(callShape).meta({ id: 'Call', description: 'One row of the call log.' });

export const callDetailSchema = z
  .object({
    ...callShape,
    client_request_id: z.union([z.string().max(128), z.null()]).meta({ description: 'The X-Request-Id that the caller sent.', examples: ['build-4711'] }),
    address: z.union([z.string().max(50), z.null()]).meta({ description: 'Network address the call came from.', examples: ['198.51.100.23'] }),
    engine: z.string().max(20).meta({ description: 'Version of the engine that answered.', examples: ['1.0.0'] }),
    digests: z
      .object({
        input: digest('SHA-256 of the canonical JSON (RFC 8785) of the input.'),
        result: digest('SHA-256 of the canonical JSON (RFC 8785) of the result.'),
      })
      .meta({ description: 'What the call was about and what it gave, as fingerprints.' }),
    request: z.unknown().meta({ description: 'The request body; null where it was not kept.' }),
    answer: z.unknown().meta({ description: 'The answer body; null where it was not kept: the same request computes it again.' }),
  })
  .meta({ id: 'CallDetail', description: 'One call with its request and answer.' });

export const listCallsQuery = z.strictObject({
  calculation: z.string().regex(/^[a-z]+\/[a-z-]+$/).max(100).optional().meta({ description: 'Only this calculation.', examples: ['networks/cascade'] }),
  status: z
    .enum(['2xx', '4xx', '5xx', '422', '429'])
    .optional()
    .meta({ description: 'Only answers of this class or status.', examples: ['4xx'] }),
  key: z.union([keyId, z.literal('none')]).optional().meta({ description: 'Only calls of this key; `none` for calls made on the Bench.', examples: ['jIu9aR5U'] }),
  from: moment('Only calls at or after this time.', '2026-12-01T00:00:00Z').optional(),
  to: moment('Only calls before this time.', '2026-12-02T00:00:00Z').optional(),
  cursor: cursor.optional(),
  limit: z.coerce.number().int().min(1).max(100).default(20).meta({ description: 'Rows on a page.', examples: [50] }),
});

export const listCalls = defineOperation({
  id: 'calls.list',
  method: 'get',
  path: '/calls',
  tag: 'Calls',
  summary: 'List calls, newest first',
  description: 'A page of the call log. An engineer sees their own calls, other roles and keys with the scope see all.',
  access: { permission: 'calls.read', scope: 'calls:read' },
  query: listCallsQuery,
  answers: {
    200: {
      description: 'A page of calls.',
      schema: z
        .object({
          data: z.array(callSchema).max(100).meta({ description: 'The calls, newest first.' }),
          next_cursor: z.union([cursor, z.null()]).meta({ description: 'Send as `cursor` for the next page; null on the last.', examples: ['eyJhdCI6MX0.c2ln'] }),
        })
        .meta({ id: 'CallPage', description: 'A page of the call log.' }),
    },
  },
});

export const readCall = defineOperation({
  id: 'calls.read',
  method: 'get',
  path: '/calls/{call_id}',
  tag: 'Calls',
  summary: 'Read one call',
  description: 'One call with its request and answer, where the organization keeps them.',
  access: { permission: 'calls.read', scope: 'calls:read' },
  parameters: z.strictObject({ call_id: callId }),
  answers: { 200: { description: 'The call.', schema: callDetailSchema } },
});
