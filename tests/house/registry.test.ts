/** The registry is written by hand: nothing on disk is missing from it, and each name is said once. */
import { describe, expect, it } from 'vitest';
import { calculationPath, groups } from '@/lib/solvers/calculation';
import { calculations, methods } from '@/lib/solvers/registry';
import { sourceFiles, sourceText } from '../support/source-files';

const folder = 'lib/solvers/calculations/';
const onDisk = sourceFiles().filter((file) => file.startsWith(folder)).map((file) => file.slice(folder.length).replace(/\.ts$/, ''));

describe('the registry', () => {
  it('lists every file of lib/solvers/calculations under the name of its folder and file, and nothing else', () => {
    expect(calculations.map(calculationPath).sort()).toEqual(onDisk.sort());
  });

  it('knows a folder for every group', () => {
    expect(new Set(onDisk.map((path) => path.split('/')[0]))).toEqual(new Set(groups));
  });

  it('names every calculation and every method once', () => {
    expect(new Set(calculations.map(calculationPath)).size).toBe(calculations.length);
    const byId = new Map(calculations.flatMap((calculation) => calculation.methods).map((method) => [method.id, method]));
    for (const calculation of calculations) {
      for (const method of calculation.methods) expect(method, `${method.id} is declared twice`).toBe(byId.get(method.id));
    }
    expect(methods).toHaveLength(byId.size);
  });
});

describe("README's table", () => {
  it('lists every calculation of the registry, and nothing else', () => {
    const rows = sourceText('README.md').split('\n').filter((line) => line.startsWith('|'));
    const listed = rows.flatMap((row) => /^\|\s*`([a-z]+\/[a-z0-9-]+)`\s*\|/.exec(row)?.[1] ?? []);
    expect(listed.sort()).toEqual(calculations.map(calculationPath).sort());
  });
});
