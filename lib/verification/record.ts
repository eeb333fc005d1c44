/**
 * Every check, run once by this process: the engine is constant, so what it computes is too. Run when somebody first looks, a few
 * milliseconds at a time, so that calls are answered meanwhile.
 */
import { calculationPath } from '../solvers/calculation';
import { engineVersion } from '../solvers/engine';
import { ImpossibleInput } from '../solvers/errors';
import { calculations } from '../solvers/registry';
import { checkFiles, runCheck, type Check, type CheckFile } from './checks';
import { standingOf, standingsByCalculation, standingsByMethod, type RecordedCheck, type Standing } from './standing';

export interface VerificationRecord {
  readonly engine: string;
  /** ISO 8601: since when the process runs whose engine computed this. */
  readonly startedAt: string;
  readonly checks: readonly RecordedCheck[];
  readonly whole: Standing;
  /** By `lines/secondary-constants`. */
  readonly byCalculation: ReadonlyMap<string, Standing>;
  /** By id: the checks whose answer rested on the method. */
  readonly byMethod: ReadonlyMap<string, Standing>;
}

/** Kept on globalThis: the framework's bundles would otherwise run the checks once each. */
const holder = globalThis as typeof globalThis & { linewrightRecord?: Promise<VerificationRecord> };

export function verificationRecord(): Promise<VerificationRecord> {
  return (holder.linewrightRecord ??= makeRecord(checkFiles));
}

export async function makeRecord(files: readonly CheckFile[]): Promise<VerificationRecord> {
  const checks: RecordedCheck[] = [];
  let since = performance.now();
  for (const { title, checks: declared } of files) {
    for (const check of declared) {
      checks.push(recordCheck(check, title));
      if (performance.now() - since < longestStretch) continue;
      await new Promise((resolve) => setImmediate(resolve));
      since = performance.now();
    }
  }
  checks.sort((first, second) => placeOf(first) - placeOf(second));
  return {
    engine: engineVersion,
    startedAt: new Date(Date.now() - process.uptime() * 1000).toISOString(),
    checks,
    whole: standingOf(checks),
    byCalculation: standingsByCalculation(checks),
    byMethod: standingsByMethod(checks),
  };
}

/** By calculation as the registry lists them, and in a calculation as declared: the sort is stable. */
function placeOf({ check }: RecordedCheck): number {
  const place = calculations.findIndex((calculation) => calculationPath(calculation) === check.calculation);
  return place < 0 ? calculations.length : place;
}

/** Milliseconds that nothing else waits for longer. */
const longestStretch = 8;

/** What is declared, for those who need no numbers computed. */
export function declaredCounts(): { readonly checks: number; readonly values: number } {
  const all = checkFiles.flatMap(({ checks }) => checks);
  return { checks: all.length, values: all.reduce((sum, { expected }) => sum + Object.keys(expected).length, 0) };
}

function recordCheck(check: Check, collection: string): RecordedCheck {
  try {
    const checked = runCheck(check);
    return { ...checked, collection, holds: checked.comparisons.every(({ holds }) => holds) };
  } catch (error) {
    const comparisons = Object.entries(check.expected).map(([pointer, published]) => ({ pointer, published, computed: null, difference: null, tolerance: check.tolerance, holds: false }));
    return { check, collection, comparisons, methods: [], failure: reasonOf(error), holds: false };
  }
}

/** For the public: what was refused and why, but nothing of the inside of a failure. */
function reasonOf(error: unknown): string {
  if (error instanceof ImpossibleInput) return `the engine refuses the input: ${error.message}`;
  if (error instanceof Error && error.name === 'ZodError') return 'the engine refuses the input: it does not fit the schema';
  if (error instanceof Error && error.constructor === Error) return error.message;
  console.error(error);
  return 'the engine failed';
}
