/** Units used against quota, read from the rows that enforce it, and the history from the call log. */
import { defineOperation } from '../operation';
import { z } from '../zod';
import { dateTime, keyId, moment, units } from './fields';

const quotaShape = {
  units_used: units('Units used this month, from the row that enforces the quota.'),
  monthly_unit_quota: units('Units allowed this month.', 10000),
};

export const usageQuery = z.strictObject({
  from: moment('Start of the history; 30 days ago when left out.', '2026-11-01T00:00:00Z').optional(),
  to: moment('End of the history; now when left out.', '2026-12-01T00:00:00Z').optional(),
  by: z.enum(['day', 'key', 'calculation']).default('day').meta({ description: 'What the history is summed by; days are UTC.', examples: ['day'] }),
});

export const usageSchema = z
  .object({
    period: z
      .object({
        start: dateTime('First instant of the quota month.', '2026-12-01T00:00:00.000Z'),
        end: dateTime('First instant of the next one, when the counts start again.', '2027-01-01T00:00:00.000Z'),
      })
      .meta({ description: 'The quota month (UTC).' }),
    organization: z.object(quotaShape).meta({ description: 'All callers together.' }),
    keys: z
      .array(z.object({ id: keyId, name: z.string().max(60).meta({ description: 'Name of the key.', examples: ['drum-test-3'] }), ...quotaShape }))
      .max(10000)
      .meta({ description: 'Keys in force, by units used.' }),
    by: z.enum(['day', 'key', 'calculation']).meta({ description: 'What the history is summed by.', examples: ['day'] }),
    history: z
      .array(
        z.object({
          label: z.string().max(200).meta({ description: 'A day (UTC), a key’s name, or a calculation.', examples: ['2026-12-01'] }),
          calls: units('Calls answered, refusals included.', 120),
          units: units('Units charged.', 340),
        }),
      )
      .max(10000)
      .meta({ description: 'Calls and units; every day of the range has a row, also an idle one.' }),
  })
  .meta({ id: 'Usage', description: 'Units used against quota, and the history.' });

export const readUsage = defineOperation({
  id: 'usage.read',
  method: 'get',
  path: '/usage',
  tag: 'Usage',
  summary: 'Read usage',
  description: 'Units used against quota this month, and calls and units over a range of time of at most 366 days.',
  access: { permission: 'usage.read', scope: 'usage:read' },
  query: usageQuery,
  answers: { 200: { description: 'The usage.', schema: usageSchema } },
});
