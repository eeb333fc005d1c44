/** What the engine answers to its examples and its checks, in brief: the numbers that may not move by themselves. */
import { calculationPath } from '@/lib/solvers/calculation';
import { engineVersion } from '@/lib/solvers/engine';
import { calculations } from '@/lib/solvers/registry';
import { checkFiles } from '@/lib/verification/checks';

export interface Golden {
  readonly engine: string;
  readonly results: Readonly<Record<string, unknown>>;
}

/** Of a long column its ends and its middle stand for the rest. */
const longest = 5;

export function goldenNow(): Golden {
  const results: Record<string, unknown> = {};
  for (const calculation of calculations) {
    const path = calculationPath(calculation);
    const cases = [
      ...calculation.examples.map(({ name, input }) => ({ name: `example: ${name}`, input })),
      ...checkFiles.flatMap(({ checks }) => checks.filter((check) => check.calculation === path)),
    ];
    for (const { name, input } of cases) results[`${path}: ${name}`] = shortened(calculation.solve(calculation.input.parse(input)).result);
  }
  return { engine: engineVersion, results };
}

function shortened(value: unknown): unknown {
  if (Array.isArray(value)) {
    if (value.length <= longest || typeof value[0] === 'object') return value.map(shortened);
    return [value[0], value[value.length >> 1], value[value.length - 1]];
  }
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(Object.entries(value).map(([key, each]) => [key, shortened(each)]));
}
