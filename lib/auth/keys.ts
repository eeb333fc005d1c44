/** The keys of an organization as the API shows them: issue, read, change, revoke. */
import { database } from '@/db/connection';
import * as rows from '@/db/keys';
import { organizationQuota } from '@/db/organizations';
import { digestKey, displayKey, mintKey, pepperVersion } from './key-text';
import type { Scope } from './permissions';

export interface KeyResource {
  readonly id: string;
  readonly name: string;
  readonly display: string;
  readonly scopes: Scope[];
  readonly monthly_unit_quota: number;
  readonly units_used: number;
  readonly requests_per_minute: number;
  readonly allowed_addresses: string[];
  readonly state: 'active' | 'expired' | 'revoked';
  readonly created_at: string;
  readonly created_by: string;
  readonly expires_at: string | null;
  readonly revoked_at: string | null;
  readonly last_used_at: string | null;
  readonly version: number;
}

export interface KeyToIssue {
  readonly name: string;
  readonly scopes: readonly Scope[];
  readonly monthly_unit_quota: number;
  readonly requests_per_minute: number;
  readonly expires_at: string | null;
  readonly allowed_addresses: readonly string[];
}

export class NameTaken extends Error {
  override readonly name = 'NameTaken';
}

/** The stored version is another than the one the change was based on. */
export class VersionMoved extends Error {
  override readonly name = 'VersionMoved';
}

/** A field that only the database can judge. */
export class KeyFieldRefused extends Error {
  override readonly name = 'KeyFieldRefused';

  constructor(
    readonly pointer: string,
    detail: string,
  ) {
    super(detail);
  }
}

export async function listKeys(organizationId: string): Promise<KeyResource[]> {
  return (await rows.listKeys(database(), organizationId)).map(resourceOf);
}

export async function readKey(organizationId: string, id: string): Promise<KeyResource | undefined> {
  const row = await rows.findKey(database(), organizationId, id);
  return row && resourceOf(row);
}

export async function issueKey(
  organizationId: string,
  memberId: string,
  wanted: KeyToIssue,
): Promise<{ key: KeyResource; secret: string }> {
  await checkFields(organizationId, wanted);
  const minted = mintKey();
  await orNameTaken(() =>
    rows.insertKey(database(), {
      ...wanted,
      id: minted.id,
      organization_id: organizationId,
      digest: digestKey(minted.text),
      pepper_version: pepperVersion,
      ending: minted.ending,
      created_by: memberId,
    }),
  );
  const key = await readKey(organizationId, minted.id);
  if (!key) throw new Error('an issued key cannot be read back');
  return { key, secret: minted.text };
}

/** Undefined when there is no such key in the organization. */
export async function changeKey(
  organizationId: string,
  id: string,
  version: number,
  change: rows.KeyChange,
): Promise<KeyResource | undefined> {
  const current = await readKey(organizationId, id);
  if (!current) return undefined;
  if (current.version !== version) throw new VersionMoved();
  await checkFields(organizationId, change);
  const changed = await orNameTaken(() => rows.updateKey(database(), organizationId, id, version, change));
  if (!changed) throw new VersionMoved();
  return readKey(organizationId, id);
}

export async function revokeKey(organizationId: string, id: string, memberId: string): Promise<KeyResource | undefined> {
  await rows.revokeKey(database(), organizationId, id, memberId);
  return readKey(organizationId, id);
}

async function checkFields(organizationId: string, fields: rows.KeyChange): Promise<void> {
  if (fields.expires_at && Date.parse(fields.expires_at) <= Date.now()) {
    throw new KeyFieldRefused('/expires_at', `expires_at must lie in the future; got ${fields.expires_at}`);
  }
  if (fields.monthly_unit_quota !== undefined) {
    const most = await organizationQuota(database(), organizationId);
    if (fields.monthly_unit_quota > most) {
      throw new KeyFieldRefused(
        '/monthly_unit_quota',
        `monthly_unit_quota must be at most the organization's ${most}; got ${fields.monthly_unit_quota}`,
      );
    }
  }
}

async function orNameTaken<T>(write: () => Promise<T>): Promise<T> {
  try {
    return await write();
  } catch (error) {
    throw rows.isNameTaken(error) ? new NameTaken() : error;
  }
}

function resourceOf(row: rows.KeyRow): KeyResource {
  const { ending, ...rest } = row;
  return {
    ...rest,
    scopes: row.scopes as Scope[],
    display: displayKey(row.id, ending),
    created_at: row.created_at.toISOString(),
    expires_at: row.expires_at?.toISOString() ?? null,
    revoked_at: row.revoked_at?.toISOString() ?? null,
    last_used_at: row.last_used_at?.toISOString() ?? null,
  };
}
