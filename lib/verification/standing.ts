/** How a set of checks stands: how many hold, and which value comes nearest to what is allowed. */
import type { CheckedCase, Comparison } from './checks';

/** A check as the running engine answers it. */
export interface RecordedCheck extends CheckedCase {
  /** Title of the file of references that it belongs to. */
  readonly collection: string;
  /** Why there is no answer to compare; then no value of it holds. */
  readonly failure?: string;
  readonly holds: boolean;
}

export interface Worst {
  readonly recorded: RecordedCheck;
  readonly comparison: Comparison;
  /** Its difference over its tolerance; Infinity where what was published is no number and not met. */
  readonly share: number;
}

export interface Standing {
  readonly checks: number;
  readonly values: number;
  readonly failingChecks: number;
  readonly failingValues: number;
  /** The value that uses most of its allowed difference; null where there is none. */
  readonly worst: Worst | null;
}

export function standingOf(checks: readonly RecordedCheck[]): Standing {
  let values = 0;
  let failingValues = 0;
  let worst: Worst | null = null;
  for (const recorded of checks) {
    for (const comparison of recorded.comparisons) {
      values++;
      if (!comparison.holds) failingValues++;
      const share = shareOf(comparison);
      if (!worst || share > worst.share) worst = { recorded, comparison, share };
    }
  }
  return { checks: checks.length, values, failingChecks: checks.filter(({ holds }) => !holds).length, failingValues, worst };
}

export function standingsByCalculation(checks: readonly RecordedCheck[]): Map<string, Standing> {
  return standings(checks, ({ check }) => [check.calculation]);
}

/** A check stands under every method that its answer rested on. */
export function standingsByMethod(checks: readonly RecordedCheck[]): Map<string, Standing> {
  return standings(checks, ({ methods }) => methods);
}

function standings(checks: readonly RecordedCheck[], namesOf: (recorded: RecordedCheck) => readonly string[]): Map<string, Standing> {
  const grouped = new Map<string, RecordedCheck[]>();
  for (const recorded of checks) {
    for (const name of namesOf(recorded)) {
      const those = grouped.get(name);
      if (those) those.push(recorded);
      else grouped.set(name, [recorded]);
    }
  }
  return new Map([...grouped].map(([name, those]) => [name, standingOf(those)]));
}

/** How much of its allowed difference a value uses: 1 is all of it. */
export function shareOf({ difference, tolerance, holds }: Comparison): number {
  if (difference === null || Number.isNaN(difference)) return holds ? 0 : Infinity;
  if (difference === 0) return 0;
  return tolerance > 0 ? difference / tolerance : Infinity;
}

/** What was found at one degree of demand: references to 1e-12 and a table of three digits say different things about a method. */
export interface Band {
  /** The largest allowed difference in it, a power of ten; null for limits, which are kept or not. */
  readonly allowed: number | null;
  readonly checks: number;
  readonly values: number;
  readonly worstDifference: number;
}

/** From the most demanding on; limits come last. */
export function bandsOf(checks: readonly RecordedCheck[]): Band[] {
  const found = new Map<number, { checks: Set<RecordedCheck>; values: number; worst: number }>();
  for (const recorded of checks) {
    const isLimit = (recorded.check.comparison ?? 'equal') !== 'equal';
    for (const { difference, tolerance } of recorded.comparisons) {
      if (difference === null) continue;
      // A hair below the logarithm, so that 1e-12 belongs to itself and not to 1e-11.
      const decade = isLimit ? Infinity : Math.ceil(Math.log10(tolerance) - 1e-9);
      const band = found.get(decade) ?? { checks: new Set(), values: 0, worst: 0 };
      found.set(decade, band);
      band.checks.add(recorded);
      band.values++;
      band.worst = Math.max(band.worst, difference);
    }
  }
  return [...found]
    .sort(([first], [second]) => first - second)
    .map(([decade, { checks, values, worst }]) => ({ allowed: decade === Infinity ? null : Number(`1e${decade}`), checks: checks.size, values, worstDifference: worst }));
}
