/**
 * Who may do what, in one table. A member acts through a role; an API key acts through scopes. Every
 * operation and every console page names one permission of this table, and the tests walk all of them.
 */
export const roles = ['owner', 'admin', 'developer', 'engineer', 'auditor'] as const;
export type Role = (typeof roles)[number];

export const permissions = {
  'calculations.run': ['owner', 'admin', 'developer', 'engineer'],
  'keys.read': ['owner', 'admin', 'developer', 'auditor'],
  'keys.manage': ['owner', 'admin'],
  /** Without `calls.read_all` a member sees the calls they made themselves. */
  'calls.read': ['owner', 'admin', 'developer', 'engineer', 'auditor'],
  'calls.read_all': ['owner', 'admin', 'developer', 'auditor'],
  'usage.read': ['owner', 'admin', 'developer', 'engineer', 'auditor'],
  'session.read': ['owner', 'admin', 'developer', 'engineer', 'auditor'],
} as const satisfies Record<string, readonly Role[]>;
export type Permission = keyof typeof permissions;

export function rolesWith(permission: Permission): readonly Role[] {
  return permissions[permission];
}

export function roleHas(role: Role, permission: Permission): boolean {
  return rolesWith(permission).includes(role);
}

/** The console's pages, in the order of its navigation. */
export const consolePages = [
  { path: '/console/bench', title: 'Bench', permission: 'calculations.run' },
  { path: '/console/keys', title: 'Keys', permission: 'keys.read' },
  { path: '/console/calls', title: 'Calls', permission: 'calls.read' },
  { path: '/console/usage', title: 'Usage', permission: 'usage.read' },
] as const satisfies readonly { path: string; title: string; permission: Permission }[];

/** What a key may be issued for; one per group of calculations, and two to read the record. */
export const scopes = ['lines:run', 'terminations:run', 'networks:run', 'calls:read', 'usage:read'] as const;
export type Scope = (typeof scopes)[number];

export const scopeMeanings: Record<Scope, string> = {
  'lines:run': 'Run the calculations of the lines group',
  'terminations:run': 'Run the calculations of the terminations group',
  'networks:run': 'Run the calculations of the networks group',
  'calls:read': 'Read the call log of the organization',
  'usage:read': 'Read units used against quota',
};
