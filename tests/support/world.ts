/** An organization of a test's own with everything an operation can be asked about. */
import { findCalculation, methods } from '@/lib/solvers/registry';
import { roles, type Role } from '@/lib/auth/permissions';
import { readKey } from '@/lib/auth/keys';
import type { Operation } from '@/openapi/operation';
import { createKey, createOrganization, sessionCookieOf, type TestOrganization } from './accounts';
import { call, type CallOptions } from './client';

export interface World {
  readonly organization: TestOrganization;
  /** Carries every scope. */
  readonly key: { id: string; secret: string };
  readonly cookies: Readonly<Record<Role, string>>;
  readonly callId: string;
}

export const oneUnitPath = '/api/v1/terminations/input-impedance';

/** Costs one unit: a single frequency. */
export const oneUnitInput = {
  line: { kind: 'lossless', characteristic_impedance_ohm: 75, velocity_factor: 0.8 },
  length_m: 0.3,
  termination: 50,
  frequency_hz: 1e8,
};

export function oneUnitCall(key: string, options: CallOptions = {}) {
  return call('POST', oneUnitPath, { key, body: oneUnitInput, ...options });
}

export async function createWorld(options: Parameters<typeof createOrganization>[0] = {}): Promise<World> {
  const organization = await createOrganization(options);
  const key = await createKey(organization, { monthly_unit_quota: Math.min(100_000, options.monthly_unit_quota ?? 100_000) });
  const cookies: Partial<Record<Role, string>> = {};
  for (const role of roles) cookies[role] = await sessionCookieOf(organization.members[role]);
  const answer = await oneUnitCall(key.secret);
  if (answer.status !== 200) throw new Error(`the world's first call was answered ${answer.text}`);
  return { organization, key, cookies: cookies as Record<Role, string>, callId: answer.body.id };
}

export interface PreparedCall {
  readonly method: string;
  readonly path: string;
  readonly options: CallOptions;
}

/** A request that the operation answers with success when the caller may make it. */
export async function validRequest(operation: Operation, world: World): Promise<PreparedCall> {
  const target = await createKey(world.organization, { monthly_unit_quota: 1 });
  const path = operation.path.replace(/\{(\w+)\}/g, (_, name: string) => parameterValue(name, world, target.id));
  const version = operation.conditional ? (await readKey(world.organization.id, target.id))!.version : undefined;
  return {
    method: operation.method.toUpperCase(),
    path: `/api/v1${path}`,
    options: {
      ...(operation.body && { body: bodyOf(operation, world) }),
      ...(version !== undefined && { headers: { 'If-Match': `"${version}"` } }),
    },
  };
}

function parameterValue(name: string, { callId }: World, keyId: string): string {
  const values: Record<string, string> = {
    key_id: keyId,
    call_id: callId,
    group: 'terminations',
    calculation: findCalculation('terminations', 'input-impedance')!.id,
    method: methods[0]!.id,
    number: '24',
    mm2: '1.5',
  };
  const value = values[name];
  if (value === undefined) throw new Error(`no value is known for the path parameter ${name}`);
  return value;
}

let issued = 0;

function bodyOf(operation: Operation, { organization }: World): unknown {
  if (operation.id === 'session.start') {
    const { email, password } = organization.members.developer;
    return { email, password };
  }
  const [example] = Object.values(operation.bodyExamples ?? {});
  if (!example) throw new Error(`${operation.id} has a body without an example`);
  const value = example.value as Record<string, unknown>;
  return operation.id === 'keys.issue' ? { ...value, name: `fixture ${++issued} of ${organization.id.slice(0, 8)}` } : value;
}

/** A path below /api/v1 whose parameters are well formed but name nothing. */
export function pathOfNothing(operation: Operation): string {
  const unknown: Record<string, string> = {
    key_id: '00000000',
    call_id: 'call_01JE0T3M9ZC7V5Q2R8W4XKDNBH',
    group: 'lines',
    calculation: 'no-such-calculation',
    method: 'no-such-method',
    number: '99',
    mm2: '0',
  };
  return `/api/v1${operation.path.replace(/\{(\w+)\}/g, (_, name: string) => unknown[name]!)}`;
}
