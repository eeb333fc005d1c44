/**
 * Fills an empty database with a demo organization, so that the first call can be made at once. The
 * passwords and the key are made here, differ on every installation, and are written to demo.json in the
 * data folder (mode 600) for the start command to print.
 */
import { randomBytes } from 'node:crypto';
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { closeDatabase, database } from '@/db/connection';
import { insertMember } from '@/db/members';
import { anyOrganization, insertOrganization } from '@/db/organizations';
import { issueKey } from '@/lib/auth/keys';
import { hashPassword } from '@/lib/auth/passwords';
import { scopes, type Role } from '@/lib/auth/permissions';

const people: { name: string; email: string; role: Role }[] = [
  { name: 'Marit Solberg', email: 'marit@saltmarsh.example', role: 'owner' },
  { name: 'Tomas Okafor', email: 'tomas@saltmarsh.example', role: 'admin' },
  { name: 'Ines Varga', email: 'ines@saltmarsh.example', role: 'developer' },
  { name: 'Ravi Lindqvist', email: 'ravi@saltmarsh.example', role: 'engineer' },
  { name: 'Noor Haddad', email: 'noor@saltmarsh.example', role: 'auditor' },
];

async function seed(): Promise<void> {
  if (await anyOrganization(database())) {
    console.log('database has an organization already');
    return;
  }
  const organizationId = await insertOrganization(database(), { name: 'Saltmarsh Cable Works', monthly_unit_quota: 5_000_000 });
  const members: { email: string; password: string; role: Role; id: string }[] = [];
  for (const { name, email, role } of people) {
    const password = randomBytes(9).toString('base64url');
    const id = await insertMember(database(), { organization_id: organizationId, name, email, role, password_hash: await hashPassword(password) });
    members.push({ email, password, role, id });
  }
  const { secret } = await issueKey(organizationId, members[1]!.id, {
    name: 'drum-test-3',
    scopes,
    monthly_unit_quota: 1_000_000,
    requests_per_minute: 6000,
    expires_at: null,
    allowed_addresses: [],
  });
  const folder = process.env.LINEWRIGHT_DATA ?? '.data';
  const accounts = { members: members.map(({ email, password, role }) => ({ email, password, role })), key: secret };
  writeFileSync(join(folder, 'demo.json'), `${JSON.stringify(accounts, null, 2)}\n`, { mode: 0o600 });
  console.log('seeded the demo organization Saltmarsh Cable Works');
}

try {
  await seed();
} finally {
  await closeDatabase();
}
