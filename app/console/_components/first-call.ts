/** A command that works as it stands for what the key may do. */
import { curlCommand } from '@/app/_format/curl';
import type { Scope } from '@/lib/auth/permissions';

const line = { kind: 'lossless', characteristic_impedance_ohm: 75, velocity_factor: 0.66 };

const firstBodies: readonly (readonly [Scope, string, Record<string, unknown>])[] = [
  ['lines:run', 'lines/secondary-constants', { line, frequency_hz: 1e8 }],
  ['terminations:run', 'terminations/input-impedance', { line, length_m: 0.5, termination: 50, frequency_hz: 1e8 }],
  ['networks:run', 'networks/cascade', { elements: [{ kind: 'line', line, length_m: 0.5 }], frequency_hz: 1e8 }],
];

const firstReads: readonly (readonly [Scope, string])[] = [
  ['calls:read', 'calls?limit=5'],
  ['usage:read', 'usage'],
];

export function firstCall(origin: string, scopes: readonly Scope[]): string {
  const run = firstBodies.find(([scope]) => scopes.includes(scope));
  if (run) return curlCommand(origin, run[1], run[2]);
  const read = firstReads.find(([scope]) => scopes.includes(scope));
  return curlCommand(origin, read?.[1] ?? 'calculations');
}
