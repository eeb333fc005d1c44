import type { Knex } from 'knex';

export interface NewKey {
  id: string;
  organization_id: string;
  name: string;
  digest: Buffer;
  pepper_version: number;
  ending: string;
  scopes: readonly string[];
  monthly_unit_quota: number;
  requests_per_minute: number;
  allowed_addresses: readonly string[];
  expires_at: string | null;
  created_by: string;
}

export type KeyChange = Partial<
  Pick<NewKey, 'name' | 'scopes' | 'monthly_unit_quota' | 'requests_per_minute' | 'allowed_addresses' | 'expires_at'>
>;

export interface KeyRow {
  id: string;
  name: string;
  ending: string;
  scopes: string[];
  monthly_unit_quota: number;
  units_used: number;
  requests_per_minute: number;
  allowed_addresses: string[];
  state: 'active' | 'expired' | 'revoked';
  created_at: Date;
  created_by: string;
  expires_at: Date | null;
  revoked_at: Date | null;
  last_used_at: Date | null;
  version: number;
}

export async function insertKey(database: Knex, key: NewKey): Promise<void> {
  await database('api_key').insert(key);
}

/** The constraint that keeps names apart; a broken one is answered as 409 rather than as a failure. */
export function isNameTaken(error: unknown): boolean {
  return typeof error === 'object' && error !== null && 'constraint' in error && error.constraint === 'api_key_name';
}

export async function listKeys(database: Knex, organizationId: string): Promise<KeyRow[]> {
  return keyRows(database)
    .where('api_key.organization_id', organizationId)
    .orderByRaw(`(api_key.revoked_at is not null or coalesce(api_key.expires_at <= now(), false)), lower(api_key.name), api_key.created_at`);
}

export async function findKey(database: Knex, organizationId: string, id: string): Promise<KeyRow | undefined> {
  return keyRows(database).where({ 'api_key.organization_id': organizationId, 'api_key.id': id }).first();
}

/** Applies the change if the key still has this version; false when it has moved on or does not exist. */
export async function updateKey(
  database: Knex,
  organizationId: string,
  id: string,
  version: number,
  change: KeyChange,
): Promise<boolean> {
  const changed = await database('api_key')
    .where({ organization_id: organizationId, id, version })
    // Its name stands in the log of the calls it made.
    .whereNull('revoked_at')
    .update({ ...change, version: version + 1 });
  return changed === 1;
}

export async function revokeKey(database: Knex, organizationId: string, id: string, memberId: string): Promise<void> {
  await database('api_key')
    .where({ organization_id: organizationId, id })
    .whereNull('revoked_at')
    .update({ revoked_at: database.fn.now(), revoked_by: memberId, version: database.raw('version + 1') });
}

/** At most one write a minute and key, so that a busy key is not a hot row. */
export async function touchKeys(database: Knex, ids: readonly string[]): Promise<void> {
  await database('api_key')
    .whereIn('id', ids)
    .whereRaw(`(last_used_at is null or last_used_at < now() - interval '1 minute')`)
    .update({ last_used_at: database.fn.now() });
}

function keyRows(database: Knex) {
  return database('api_key')
    .join('member', 'member.id', 'api_key.created_by')
    .select<KeyRow[]>(
      'api_key.id',
      'api_key.name',
      'api_key.ending',
      'api_key.scopes',
      'api_key.monthly_unit_quota',
      'api_key.requests_per_minute',
      'api_key.created_at',
      'member.name as created_by',
      'api_key.expires_at',
      'api_key.revoked_at',
      'api_key.last_used_at',
      'api_key.version',
      database.raw(`used('key:' || api_key.id) as units_used`),
      database.raw('api_key.allowed_addresses::text[] as allowed_addresses'),
      database.raw(`case when api_key.revoked_at is not null then 'revoked'
                         when api_key.expires_at <= now() then 'expired' else 'active' end as state`),
    );
}
