/** What of the record is shown: all of it stands in the address, so that a view can be sent to somebody. */
import type { RecordedCheck } from '@/lib/verification/standing';

export interface Filters {
  readonly calculation: string;
  readonly method: string;
  readonly text: string;
  /** Only what does not hold. */
  readonly failing: boolean;
  /** From 1. */
  readonly page: number;
}

export const everything: Filters = { calculation: '', method: '', text: '', failing: false, page: 1 };

export type SearchParams = Readonly<Record<string, string | readonly string[] | undefined>>;

export function readFilters(parameters: SearchParams): Filters {
  const one = (name: string) => {
    const value = parameters[name];
    return ((typeof value === 'string' ? value : value?.[0]) ?? '').trim().slice(0, 200);
  };
  const page = Number(one('page'));
  return {
    calculation: one('calculation'),
    method: one('method'),
    text: one('q'),
    failing: one('holds') === 'no',
    page: Number.isInteger(page) && page > 0 ? Math.min(page, 10_000) : 1,
  };
}

export function isNarrowed({ calculation, method, text, failing }: Filters): boolean {
  return Boolean(calculation || method || text || failing);
}

export function verificationHref(wanted: Partial<Filters>): string {
  const { calculation, method, text, failing, page } = { ...everything, ...wanted };
  // A slash may stand in a query as it is, and reads better.
  const pairs = [
    calculation && `calculation=${encodeURIComponent(calculation).replaceAll('%2F', '/')}`,
    method && `method=${encodeURIComponent(method)}`,
    text && `q=${encodeURIComponent(text)}`,
    failing && 'holds=no',
    page > 1 && `page=${page}`,
  ].filter(Boolean);
  return pairs.length > 0 ? `/verification?${pairs.join('&')}` : '/verification';
}

/** Every word must occur somewhere in the check: its name, its source, its collection, its calculation or what it compares. */
export function applyFilters(checks: readonly RecordedCheck[], { calculation, method, text, failing }: Filters): RecordedCheck[] {
  const words = text.toLowerCase().split(/\s+/).filter(Boolean);
  return checks.filter((recorded) => {
    const { check, methods, holds, collection } = recorded;
    if (calculation && check.calculation !== calculation) return false;
    if (method && !methods.includes(method)) return false;
    if (failing && holds) return false;
    if (words.length === 0) return true;
    const where = [check.name, check.source, check.calculation, collection, ...methods, ...Object.keys(check.expected)].join(' ').toLowerCase();
    return words.every((word) => where.includes(word));
  });
}
