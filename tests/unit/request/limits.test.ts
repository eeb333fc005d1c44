import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { limitHeaders, limitsOf, type Limit } from '@/app/api/v1/_request/limits';
import type { AdmissionRow } from '@/db/admission';
import { readLimits } from '../../support/rate-limit-fields';

const fields = (limits: readonly Limit[], units: number) =>
  Object.fromEntries(Object.entries(limitHeaders(limits, units)).map(([name, value]) => [name.toLowerCase(), value]));

const row = {
  key_id: 'jIu9aR5U',
  burst_limit: 600, burst_remaining: 599, burst_seconds: 0.1,
  holder_quota: 1000, holder_used: 250,
  organization_quota: 5000, organization_used: 5000,
  period: '2026-12-01', period_seconds: 31 * 86_400, period_remaining: 1234.5,
} as AdmissionRow;

describe('the limit fields', () => {
  test('of a key are burst, key and organization, as a reader of structured fields sees them', () => {
    expect(readLimits(fields(limitsOf(row), 7))).toEqual([
      { name: 'burst', quota: 600, windowSeconds: 60, remaining: 599, resetSeconds: 1, cost: 1 },
      { name: 'key', quota: 1000, windowSeconds: 2_678_400, remaining: 750, resetSeconds: 1235, cost: 7 },
      { name: 'organization', quota: 5000, windowSeconds: 2_678_400, remaining: 0, resetSeconds: 1235, cost: 7 },
    ]);
  });

  test('of a member are burst and organization', () => {
    expect(readLimits(fields(limitsOf({ ...row, key_id: null }), 0)).map(({ name }) => name)).toEqual(['burst', 'organization']);
  });

  test('are left out where there is no limit', () => {
    expect(limitHeaders([], 0)).toEqual({});
  });

  test('parse for any numbers at all, also above the fifteen digits of the format and below zero', () => {
    const number = fc.oneof(fc.integer({ min: -10, max: 1e6 }), fc.double({ min: -1e20, max: 1e20, noNaN: true }));
    fc.assert(
      fc.property(number, number, number, number, (quota, remaining, resetSeconds, units) => {
        const limit = { name: 'burst', quota: Math.abs(quota), windowSeconds: 1e15, remaining: Math.min(remaining, Math.abs(quota)), resetSeconds };
        const [read] = readLimits(fields([limit], units));
        expect(read.remaining).toBeGreaterThanOrEqual(0);
        expect(read.remaining).toBeLessThanOrEqual(read.quota);
      }),
      { numRuns: 500 },
    );
  });

  test('never promise a unit or a second too early: remainders are rounded down and waits up', () => {
    const [read] = readLimits(fields([{ name: 'x', quota: 10, windowSeconds: 60, remaining: 3.99, resetSeconds: 2.01 }], 1));
    expect(read).toMatchObject({ remaining: 3, resetSeconds: 3 });
  });
});
