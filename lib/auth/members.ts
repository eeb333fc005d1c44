import { database } from '@/db/connection';
import { findSession } from '@/db/sessions';
import type { Role } from './permissions';

export interface Member {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly organization: { readonly id: string; readonly name: string };
}

/** The member of a session that is in force, or null. */
export async function memberOfSession(sessionId: string): Promise<Member | null> {
  const row = await findSession(database(), sessionId);
  if (!row) return null;
  return {
    id: row.member_id,
    name: row.name,
    email: row.email,
    role: row.role as Role,
    organization: { id: row.organization_id, name: row.organization_name },
  };
}
