/** What a known caller may see. */
import { roleHas } from '@/lib/auth/permissions';
import type { Caller } from './admit';

/** Operations that are not public always have a caller; this says so to the compiler and to a reader. */
export function known(caller: Caller | null): Caller {
  if (!caller) throw new Error('a public operation asked for its caller');
  return caller;
}

/** A member, for what keys cannot do. */
export function knownMember(caller: Caller | null): { organizationId: string; memberId: string } {
  const { organizationId, memberId } = known(caller);
  if (memberId === null) throw new Error('an operation for members was reached with a key');
  return { organizationId, memberId };
}

/** The organization whose calls are shown, narrowed to the member where the role sees only its own. */
export function ownCallsOnly(caller: Caller | null): { organizationId: string; memberId?: string } {
  const { organizationId, memberId, role } = known(caller);
  const seesAll = role === null || roleHas(role, 'calls.read_all');
  return seesAll || memberId === null ? { organizationId } : { organizationId, memberId };
}
