import type { Knex } from 'knex';

export interface NewSession {
  id: string;
  member_id: string;
  expires_at: Date;
  address: string | null;
  user_agent: string | null;
}

export interface SessionRow {
  member_id: string;
  name: string;
  email: string;
  role: string;
  organization_id: string;
  organization_name: string;
  expires_at: Date;
}

export async function insertSession(database: Knex, session: NewSession): Promise<void> {
  await database('session').insert(session);
}

export async function endSession(database: Knex, id: string): Promise<void> {
  await database('session').where({ id }).whereNull('ended_at').update({ ended_at: database.fn.now() });
}

/** A session that is in force, with its member; none when it ended, expired or the member was removed. */
export async function findSession(database: Knex, id: string): Promise<SessionRow | undefined> {
  return database('session')
    .join('member', 'member.id', 'session.member_id')
    .join('organization', 'organization.id', 'member.organization_id')
    .where('session.id', id)
    .whereNull('session.ended_at')
    .where('session.expires_at', '>', database.fn.now())
    .whereNull('member.removed_at')
    .whereNull('organization.disabled_at')
    .first(
      'session.member_id',
      'member.name',
      'member.email',
      'member.role',
      'member.organization_id',
      'organization.name as organization_name',
      'session.expires_at',
    );
}
