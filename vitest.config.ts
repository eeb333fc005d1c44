import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';
import { BaseSequencer, type TestSpecification } from 'vitest/node';

const root = fileURLToPath(new URL('.', import.meta.url));

/** The contract first, then the people, then the faults that hurt; what counts what was seen comes last. */
const liveOrder = ['tests/api/', 'tests/browser/', 'tests/faults/', 'tests/api/zz-coverage.test.ts'];

function rankOf(file: string): number {
  const path = file.slice(root.length);
  return liveOrder.findLastIndex((start) => path.startsWith(start));
}

class InOrder extends BaseSequencer {
  override async sort(files: TestSpecification[]): Promise<TestSpecification[]> {
    return [...files].sort(
      (left, right) => rankOf(left.moduleId) - rankOf(right.moduleId) || left.moduleId.localeCompare(right.moduleId),
    );
  }
}

export default defineConfig({
  resolve: { alias: { '@': root.replace(/\/$/, '') } },
  test: {
    sequence: { sequencer: InOrder },
    projects: [
      {
        extends: true,
        test: {
          name: 'fast',
          include: ['tests/{unit,reference,property,house}/**/*.test.ts'],
          testTimeout: 30_000,
          hookTimeout: 60_000,
          sequence: { groupOrder: 0 },
        },
      },
      {
        extends: true,
        test: {
          name: 'live',
          include: ['tests/{api,browser,faults}/**/*.test.ts'],
          globalSetup: ['tests/support/global-setup.ts'],
          // One file at a time in one worker: they share an app, its database and its rate limits.
          fileParallelism: false,
          maxWorkers: 1,
          testTimeout: 60_000,
          hookTimeout: 120_000,
          sequence: { groupOrder: 1 },
        },
      },
    ],
  },
});
