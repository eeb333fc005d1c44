/** API keys: issue, read, change, revoke. For signed-in members only; a key never manages keys. */
import { scopes } from '@/lib/auth/permissions';
import { defineOperation } from '../operation';
import { z } from '../zod';
import { dateTime, keyId, lineOfText, optionalDateTime, units } from './fields';

const name = lineOfText()
  .trim()
  .min(1)
  .max(60)
  .meta({ title: 'Name', description: 'What the key is for, as the call log will show it. Unique among keys in force.', examples: ['drum-test-3'] });

const scopeList = z
  .array(z.enum(scopes))
  .min(1)
  .max(scopes.length)
  .meta({ title: 'Scopes', description: 'What the key may do.', examples: [['lines:run', 'terminations:run']] });

const monthlyUnitQuota = z
  .number()
  .int()
  .min(0)
  .max(1e12)
  .meta({ title: 'Monthly quota', description: 'Units the key may use in a calendar month (UTC).', examples: [10000] });

const requestsPerMinute = z
  .number()
  .int()
  .min(1)
  .max(60000)
  .meta({ title: 'Burst limit', description: 'Requests in a minute, evenly refilled.', examples: [6000] });

const expiresAt = z
  .union([z.iso.datetime().max(35), z.null()])
  .meta({ title: 'Expires', description: 'From then on the key is refused; null for never.', examples: ['2027-06-30T22:00:00Z'] });

// The generator's own names for these formats are known to no validator.
const address = z.union([
  z.ipv4().openapi({ format: 'ipv4' }),
  z.ipv6().openapi({ format: 'ipv6' }),
  z.cidrv4().openapi({ format: 'ipv4-cidr', pattern: z.regexes.cidrv4.source }),
  z.cidrv6().openapi({ format: 'ipv6-cidr', pattern: z.regexes.cidrv6.source }),
]);

const allowedAddresses = z
  .array(address.meta({ description: 'An address or a network in CIDR form.', examples: ['198.51.100.0/24'] }))
  .max(50)
  .meta({ title: 'Allowed addresses', description: 'Networks the key may be used from; empty for any.', examples: [['198.51.100.0/24']] });

export const keySchema = z
  .object({
    id: keyId,
    name,
    display: z.string().max(40).meta({ description: 'The key with its secret left out.', examples: ['lw_live_jIu9aR5U…6h'] }),
    scopes: scopeList,
    monthly_unit_quota: monthlyUnitQuota,
    units_used: units('Units used this month, from the row that enforces the quota.'),
    requests_per_minute: requestsPerMinute,
    allowed_addresses: z.array(z.string().max(50)).max(50).meta({ description: 'Networks the key may be used from; empty for any.', examples: [['198.51.100.0/24']] }),
    state: z.enum(['active', 'expired', 'revoked']).meta({ description: 'Whether the key works now.', examples: ['active'] }),
    created_at: dateTime('When the key was issued.'),
    created_by: z.string().max(200).meta({ description: 'The member who issued it.', examples: ['Marit Solberg'] }),
    expires_at: optionalDateTime('From then on the key is refused; null for never.'),
    revoked_at: optionalDateTime('When the key was revoked; null while it is not.'),
    last_used_at: optionalDateTime('When the key was last used, at most a minute behind; null for never.'),
    version: z.number().int().min(1).max(1e9).meta({ description: 'Rises with every change; the ETag is made of it.', examples: [1] }),
  })
  .meta({ id: 'Key', description: 'An API key, without its secret.' });

export const issuedKeySchema = z
  .object({
    key: keySchema,
    secret: z.string().max(64).meta({
      description: 'The whole key. It is shown this once and stored nowhere.',
      examples: ['lw_live_jIu9aR5U0000000000000000000000000000000000000'],
    }),
  })
  .meta({ id: 'IssuedKey', description: 'A new key with its secret, shown once.' });

export const issueKeyBody = z
  .strictObject({
    name,
    scopes: scopeList,
    monthly_unit_quota: monthlyUnitQuota.default(10000),
    requests_per_minute: requestsPerMinute.default(6000),
    expires_at: expiresAt.default(null),
    allowed_addresses: allowedAddresses.default([]),
  })
  .meta({ id: 'KeyToIssue', description: 'What a new key is to be.' });

export const changeKeyBody = z
  .strictObject({
    name: name.optional(),
    scopes: scopeList.optional(),
    monthly_unit_quota: monthlyUnitQuota.optional(),
    requests_per_minute: requestsPerMinute.optional(),
    expires_at: expiresAt.optional(),
    allowed_addresses: allowedAddresses.optional(),
  })
  .meta({ id: 'KeyChange', description: 'The fields to change; the others stay.' });

const keyParameters = z.strictObject({ key_id: keyId });

export const listKeys = defineOperation({
  id: 'keys.list',
  method: 'get',
  path: '/keys',
  tag: 'Keys',
  summary: 'List the keys',
  description: 'All keys of the organization, those in force first, then by name.',
  access: { permission: 'keys.read' },
  answers: {
    200: {
      description: 'The keys.',
      schema: z.object({ data: z.array(keySchema).max(10000).meta({ description: 'The keys.' }) }).meta({ id: 'KeyList', description: 'Keys of the organization.' }),
    },
  },
});

export const issueKey = defineOperation({
  id: 'keys.issue',
  method: 'post',
  path: '/keys',
  tag: 'Keys',
  summary: 'Issue a key',
  description: 'Makes a key and answers its secret, this once. A key’s quota cannot pass that of the organization.',
  access: { permission: 'keys.manage' },
  body: issueKeyBody,
  bodyExamples: {
    'bench fixture': {
      summary: 'A key for one test fixture',
      value: { name: 'drum-test-3', scopes: ['lines:run', 'terminations:run'], monthly_unit_quota: 5000 },
    },
  },
  answers: { 201: { description: 'The key and its secret.', schema: issuedKeySchema, headers: ['Location', 'ETag'] } },
  problems: ['name-taken'],
});

export const readKey = defineOperation({
  id: 'keys.read',
  method: 'get',
  path: '/keys/{key_id}',
  tag: 'Keys',
  summary: 'Read one key',
  description: 'One key of the organization, without its secret.',
  access: { permission: 'keys.read' },
  parameters: keyParameters,
  answers: { 200: { description: 'The key.', schema: keySchema, headers: ['ETag'] } },
});

export const changeKey = defineOperation({
  id: 'keys.change',
  method: 'patch',
  path: '/keys/{key_id}',
  tag: 'Keys',
  summary: 'Change a key',
  description: 'Changes the given fields at once; If-Match must name the version that the change is based on.',
  access: { permission: 'keys.manage' },
  parameters: keyParameters,
  body: changeKeyBody,
  bodyExamples: { quota: { summary: 'A larger quota', value: { monthly_unit_quota: 50000 } } },
  conditional: true,
  answers: { 200: { description: 'The key as it is now.', schema: keySchema, headers: ['ETag'] } },
  problems: ['name-taken'],
});

export const revokeKey = defineOperation({
  id: 'keys.revoke',
  method: 'delete',
  path: '/keys/{key_id}',
  tag: 'Keys',
  summary: 'Revoke a key',
  description: 'The next request with the key is refused. The key stays in the list and the log; revoking twice changes nothing.',
  access: { permission: 'keys.manage' },
  parameters: keyParameters,
  answers: { 200: { description: 'The key, revoked.', schema: keySchema, headers: ['ETag'] } },
});
