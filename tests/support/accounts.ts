/** Organizations of a test's own, with one member a role and keys as wanted, made through the app's own code. */
import { randomBytes } from 'node:crypto';
import { database } from '@/db/connection';
import { insertMember } from '@/db/members';
import { insertOrganization, type NewOrganization } from '@/db/organizations';
import { issueKey, type KeyToIssue } from '@/lib/auth/keys';
import { hashPassword } from '@/lib/auth/passwords';
import { roles, scopes, type Role } from '@/lib/auth/permissions';
import { startSession } from '@/lib/auth/sessions';

export interface TestMember {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly password: string;
  readonly role: Role;
}

export interface TestOrganization {
  readonly id: string;
  readonly name: string;
  readonly members: Readonly<Record<Role, TestMember>>;
}

const password = 'salt marsh and copper';
let passwordHash: Promise<string> | undefined;

export async function createOrganization(options: Partial<NewOrganization> = {}): Promise<TestOrganization> {
  const suffix = randomBytes(5).toString('hex');
  const name = options.name ?? `Test Works ${suffix}`;
  const id = await insertOrganization(database(), { monthly_unit_quota: 1_000_000, member_requests_per_minute: 6000, ...options, name });
  const members: Partial<Record<Role, TestMember>> = {};
  for (const role of roles) {
    const member = { name: `${role} of ${suffix}`, email: `${role}@${suffix}.example`, role };
    const memberId = await insertMember(database(), { ...member, organization_id: id, password_hash: await (passwordHash ??= hashPassword(password)) });
    members[role] = { ...member, id: memberId, password };
  }
  return { id, name, members: members as Record<Role, TestMember> };
}

export async function createKey(organization: TestOrganization, options: Partial<KeyToIssue> = {}): Promise<{ id: string; secret: string }> {
  const { key, secret } = await issueKey(organization.id, organization.members.admin.id, {
    name: `key ${randomBytes(5).toString('hex')}`,
    scopes,
    monthly_unit_quota: 100_000,
    requests_per_minute: 60_000,
    expires_at: null,
    allowed_addresses: [],
    ...options,
  });
  return { id: key.id, secret };
}

/** The Cookie header of a new session, as signing in would set it. */
export async function sessionCookieOf(member: TestMember): Promise<string> {
  const { cookie } = await startSession(member.id, '127.0.0.1', 'test');
  return cookie.split(';')[0]!;
}
