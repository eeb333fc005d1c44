import type { Knex } from 'knex';

export interface NewMember {
  organization_id: string;
  email: string;
  name: string;
  role: string;
  password_hash: string;
}

export interface MemberRow extends NewMember {
  id: string;
  organization_name: string;
  organization_disabled: boolean;
}

export async function insertMember(database: Knex, member: NewMember): Promise<string> {
  const [row] = await database('member').insert(member).returning('id');
  return row.id;
}

const columns = [
  'member.id',
  'member.organization_id',
  'member.email',
  'member.name',
  'member.role',
  'member.password_hash',
  'organization.name as organization_name',
];

export async function findMemberByEmail(database: Knex, email: string): Promise<MemberRow | undefined> {
  return database('member')
    .join('organization', 'organization.id', 'member.organization_id')
    .whereRaw('lower(member.email) = lower(?)', [email])
    .whereNull('member.removed_at')
    .first(...columns, database.raw('organization.disabled_at is not null as organization_disabled'));
}
