import type { Knex } from 'knex';

export interface UsageRow {
  label: string;
  calls: number;
  units: number;
}

export interface KeyQuotaRow {
  id: string;
  name: string;
  units_used: number;
  monthly_unit_quota: number;
}

export async function readPeriod(database: Knex): Promise<{ start: Date; end: Date }> {
  const { rows } = await database.raw(`
    select current_period()::timestamp at time zone 'utc' as "start",
           (current_period() + interval '1 month') at time zone 'utc' as "end"`);
  return rows[0];
}

export async function organizationUnitsUsed(database: Knex, organizationId: string): Promise<number> {
  const { rows } = await database.raw(`select used('organization:' || ?) as units`, [organizationId]);
  return rows[0].units;
}

export async function keyQuotas(database: Knex, organizationId: string): Promise<KeyQuotaRow[]> {
  return database('api_key')
    .where('organization_id', organizationId)
    .whereNull('revoked_at')
    .whereRaw('(expires_at is null or expires_at > now())')
    .select('id', 'name', 'monthly_unit_quota', database.raw(`used('key:' || id) as units_used`))
    .orderByRaw('units_used desc, lower(name)');
}

/** Calls and units by UTC day, an idle day included. */
export async function usageByDay(database: Knex, organizationId: string, from: string, to: string): Promise<UsageRow[]> {
  const { rows } = await database.raw(
    `select to_char(day, 'YYYY-MM-DD') as label, count(call.id) as calls, coalesce(sum(call.units), 0)::bigint as units
     from generate_series(date_trunc('day', ?::timestamptz at time zone 'utc'),
                          (?::timestamptz - interval '1 microsecond') at time zone 'utc', interval '1 day') as day
     left join call on call.organization_id = ? and call.created_at >= ?::timestamptz and call.created_at < ?::timestamptz
       and date_trunc('day', call.created_at at time zone 'utc') = day
     group by day order by day`,
    [from, to, organizationId, from, to],
  );
  return rows;
}

export async function usageByKey(database: Knex, organizationId: string, from: string, to: string): Promise<UsageRow[]> {
  const { rows } = await database.raw(
    `select coalesce(api_key.name, 'the Bench') as label, count(*) as calls, sum(call.units)::bigint as units
     from call left join api_key on api_key.id = call.key_id
     where call.organization_id = ? and call.created_at >= ? and call.created_at < ?
     group by call.key_id, api_key.name order by units desc, label limit 10000`,
    [organizationId, from, to],
  );
  return rows;
}

export async function usageByCalculation(database: Knex, organizationId: string, from: string, to: string): Promise<UsageRow[]> {
  const { rows } = await database.raw(
    `select calculation as label, count(*) as calls, sum(units)::bigint as units
     from call where organization_id = ? and created_at >= ? and created_at < ?
     group by calculation order by units desc, label limit 10000`,
    [organizationId, from, to],
  );
  return rows;
}
