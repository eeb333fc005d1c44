import { describe, expect, test } from 'vitest';
import { consolePages, permissions, roleHas, roles, rolesWith, scopeMeanings, scopes, type Permission } from '@/lib/auth/permissions';
import { groups } from '@/lib/solvers/calculation';

const names = Object.keys(permissions) as Permission[];

describe('the table of permissions', () => {
  test('knows no role but the five, and each role once', () => {
    for (const name of names) {
      const allowed = rolesWith(name);
      expect(allowed.every((role) => roles.includes(role))).toBe(true);
      expect(new Set(allowed).size).toBe(allowed.length);
    }
  });

  test('gives the owner everything, and nobody what an owner lacks', () => {
    for (const name of names) expect(roleHas('owner', name), name).toBe(true);
  });

  test('gives an admin whatever a developer may, and a developer whatever an engineer may', () => {
    for (const name of names) {
      if (roleHas('engineer', name)) expect(roleHas('developer', name), name).toBe(true);
      if (roleHas('developer', name)) expect(roleHas('admin', name), name).toBe(true);
    }
  });

  test('lets an auditor read everything and change nothing', () => {
    for (const name of names) expect(roleHas('auditor', name), name).toBe(/\.read(_all)?$/.test(name));
  });

  test('lets keys be managed by owners and admins alone', () => {
    expect(rolesWith('keys.manage')).toEqual(['owner', 'admin']);
  });

  test('lets whoever sees all calls see calls', () => {
    for (const role of rolesWith('calls.read_all')) expect(roleHas(role, 'calls.read')).toBe(true);
  });
});

describe('scopes', () => {
  test('run the groups that there are, one each, and each scope has a meaning', () => {
    expect(scopes.filter((scope) => scope.endsWith(':run')).map((scope) => scope.split(':')[0]).sort()).toEqual(groups.toSorted());
    expect(Object.keys(scopeMeanings).sort()).toEqual(scopes.toSorted());
  });

  test('never let a key change anything but its quota: all others read', () => {
    for (const scope of scopes) expect(scope).toMatch(/:(run|read)$/);
  });
});

describe('the pages of the console', () => {
  test('each name a permission of the table, and some page is open to every role', () => {
    for (const { permission } of consolePages) expect(names).toContain(permission);
    for (const role of roles) expect(consolePages.some(({ permission }) => roleHas(role, permission)), role).toBe(true);
  });
});
