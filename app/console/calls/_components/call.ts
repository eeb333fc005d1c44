/** A call as the API gives it, and how the pages show its parts. */
import type { z } from 'zod';
import type { callDetailSchema, callSchema } from '@/openapi/operations/calls';

export type Call = z.output<typeof callSchema>;
export type CallDetail = z.output<typeof callDetailSchema>;

/** Answered, refused for now (limit or quota), refused, failed. */
export function statusColour(status: number): string {
  if (status < 400) return 'text-patina';
  return status === 429 ? 'text-ochre' : 'text-garnet';
}

/** Who made the call: a key's name, or the member who sat at the Bench. */
export function callerOf({ key, member }: Pick<Call, 'key' | 'member'>): string {
  return key?.name ?? (member ? `${member.name}, on the Bench` : '–');
}
