/** A key as the API gives it, and the words the page has for its parts. */
import type { z } from 'zod';
import type { Scope } from '@/lib/auth/permissions';
import type { issuedKeySchema, keySchema } from '@/openapi/operations/keys';

export type Key = z.output<typeof keySchema>;
export type IssuedKey = z.output<typeof issuedKeySchema>;

const runScopes = ['lines:run', 'terminations:run', 'networks:run'] as const satisfies readonly Scope[];

/** "all calculations, calls": short enough for a row; the exact scopes stand in the key's own sheet. */
export function scopesInWords(scopes: readonly Scope[]): string {
  const runsAll = runScopes.every((scope) => scopes.includes(scope));
  const rest = runsAll ? scopes.filter((scope) => !runScopes.some((run) => run === scope)) : scopes;
  return [...(runsAll ? ['all calculations'] : []), ...rest.map((scope) => scope.split(':')[0])].join(', ');
}

export const stateColours: Record<Key['state'], string> = {
  active: 'text-patina',
  expired: 'text-ochre',
  revoked: 'text-ash',
};
