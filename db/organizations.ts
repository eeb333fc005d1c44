import type { Knex } from 'knex';

export interface NewOrganization {
  name: string;
  monthly_unit_quota: number;
  member_requests_per_minute?: number;
}

export async function insertOrganization(database: Knex, organization: NewOrganization): Promise<string> {
  const [row] = await database('organization').insert(organization).returning('id');
  return row.id;
}

export async function anyOrganization(database: Knex): Promise<boolean> {
  return (await database('organization').first('id')) !== undefined;
}

export async function organizationQuota(database: Knex, id: string): Promise<number> {
  const row = await database('organization').where({ id }).first('monthly_unit_quota');
  return row.monthly_unit_quota;
}
