/** Units used against quota, from the rows that enforce it, and the history, from the call log. */
import { database } from '@/db/connection';
import { organizationQuota } from '@/db/organizations';
import * as rows from '@/db/usage';

export type UsageBy = 'day' | 'key' | 'calculation';

const histories = {
  day: rows.usageByDay,
  key: rows.usageByKey,
  calculation: rows.usageByCalculation,
} satisfies Record<UsageBy, unknown>;

export async function readUsage(organizationId: string, from: string, to: string, by: UsageBy) {
  const [period, used, quota, keys, history] = await Promise.all([
    rows.readPeriod(database()),
    rows.organizationUnitsUsed(database(), organizationId),
    organizationQuota(database(), organizationId),
    rows.keyQuotas(database(), organizationId),
    histories[by](database(), organizationId, from, to),
  ]);
  return {
    period: { start: period.start.toISOString(), end: period.end.toISOString() },
    organization: { units_used: used, monthly_unit_quota: quota },
    keys,
    by,
    history,
  };
}
