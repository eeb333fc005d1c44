/** What the controls of the key form hold, and how it becomes what the API takes. */
import type { Scope } from '@/lib/auth/permissions';
import type { Key } from './key';

export interface KeyValues {
  name: string;
  scopes: Scope[];
  monthly_unit_quota: string;
  requests_per_minute: string;
  /** Days from now, `never`, or `at` for the moment in `expires_on`. */
  expires: 'never' | '30' | '90' | '365' | 'at';
  /** Local time, as the browser's own control writes it: 2027-06-30T22:00. */
  expires_on: string;
  /** One address or network a line. */
  allowed_addresses: string;
  /** Present only so that the API's complaints about it find a place. */
  expires_at?: never;
}

export const keyLabels = {
  name: 'Name',
  scopes: 'Scopes',
  monthly_unit_quota: 'Monthly quota',
  requests_per_minute: 'Burst limit',
  expires_at: 'Expiry',
  allowed_addresses: 'Allowed addresses',
} as const;

export const newKeyValues: KeyValues = {
  name: '',
  scopes: ['lines:run', 'terminations:run', 'networks:run'],
  monthly_unit_quota: '10000',
  requests_per_minute: '6000',
  expires: '365',
  expires_on: '',
  allowed_addresses: '',
};

export function valuesOf(key: Key): KeyValues {
  return {
    name: key.name,
    scopes: key.scopes,
    monthly_unit_quota: String(key.monthly_unit_quota),
    requests_per_minute: String(key.requests_per_minute),
    expires: key.expires_at ? 'at' : 'never',
    expires_on: key.expires_at ? localMinute(new Date(key.expires_at)) : '',
    allowed_addresses: key.allowed_addresses.join('\n'),
  };
}

export function bodyOf(values: KeyValues) {
  return {
    name: values.name,
    scopes: values.scopes,
    monthly_unit_quota: numberOf(values.monthly_unit_quota),
    requests_per_minute: numberOf(values.requests_per_minute),
    expires_at: expiryOf(values),
    allowed_addresses: values.allowed_addresses.split(/[\s,;]+/).filter(Boolean),
  };
}

/**
 * "12,000", "12 000" and "12000" are one number; anything else is left for the schema to name. An empty
 * field stays an empty text: left out, it would silently become the API's default.
 */
function numberOf(text: string): number | string {
  const digits = text.replace(/[\s,_]/g, '');
  return /^-?\d+(\.\d+)?$/.test(digits) ? Number(digits) : text;
}

function expiryOf({ expires, expires_on: on }: KeyValues): string | null {
  if (expires === 'never') return null;
  if (expires === 'at') return Number.isNaN(Date.parse(on)) ? '' : new Date(on).toISOString();
  const day = new Date();
  day.setDate(day.getDate() + Number(expires));
  return day.toISOString();
}

function localMinute(date: Date): string {
  return new Date(date.getTime() - date.getTimezoneOffset() * 60_000).toISOString().slice(0, 16);
}
