/** What the page shows, kept in the URL: how many days, and summed by what. */
import type { z } from 'zod';
import type { usageSchema } from '@/openapi/operations/usage';

export type UsageData = z.output<typeof usageSchema>;
export type HistoryRow = UsageData['history'][number];

export const spans = ['7', '30', '90'] as const;
export type Span = (typeof spans)[number];

export const sums = { day: 'Day', key: 'Key', calculation: 'Calculation' } as const;
export type Sum = keyof typeof sums;

export interface UsageView {
  readonly days: Span;
  readonly by: Sum;
}

export function viewOf(parameters: URLSearchParams): UsageView {
  const by = parameters.get('by') ?? 'day';
  return {
    days: spans.find((span) => span === parameters.get('days')) ?? '30',
    by: Object.hasOwn(sums, by) ? (by as Sum) : 'day',
  };
}

/** Whole days in UTC, today included: the days that the service itself counts in. */
export function usagePath({ days, by }: UsageView, now: Date): string {
  const from = new Date(Date.UTC(now.getUTCFullYear(), now.getUTCMonth(), now.getUTCDate() - Number(days) + 1));
  return `/usage?${new URLSearchParams({ from: from.toISOString(), by })}`;
}
