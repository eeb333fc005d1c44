/**
 * The running solvers against published values and against references of 30 digits made by another route. The public verification page
 * shows the same data. Each generator NAME.py stands beside its NAME.json.
 */
import { execFile, execFileSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';
import { describe, expect, it } from 'vitest';
import type { z } from 'zod';
import { calculationPath } from '@/lib/solvers/calculation';
import { calculations } from '@/lib/solvers/registry';
import { checkFiles, runCheck, type CheckFile } from '@/lib/verification/checks';

const folder = fileURLToPath(new URL('.', import.meta.url));
const generators = readdirSync(folder).filter((name) => name.endsWith('.py') && name !== 'support.py');

describe.each(checkFiles)('$title', ({ checks }) => {
  it.each([...checks])('$calculation: $name', (check) => {
    const wrong = runCheck(check).comparisons.filter(({ holds }) => !holds);
    expect(wrong).toEqual([]);
  });
});

/** Debian's python3-mpmath belongs to its own interpreter. */
const python = '/usr/bin/python3';
const hasMpmath = existsSync(python) && canImportMpmath();

function canImportMpmath(): boolean {
  try {
    execFileSync(python, ['-c', 'import mpmath'], { stdio: 'ignore' });
    return true;
  } catch {
    return false;
  }
}

/** What an answer only repeats of its input, says in words, or tells of how it was found. */
const isGiven = new Set(['frequency_hz', 't_order', 'iterations']);

describe('the reference data', () => {
  const checks = checkFiles.flatMap((file) => file.checks);

  it('are at least ten checks for every calculation', () => {
    const few = calculations.map((each) => ({ calculation: calculationPath(each), checks: checks.filter(({ calculation }) => calculation === calculationPath(each)).length })).filter((each) => each.checks < 10);
    expect(few).toEqual([]);
  });

  it('hold a value for every quantity that a calculation answers', () => {
    const missing = calculations.flatMap((each) => {
      const path = calculationPath(each);
      const seen = new Set(checks.filter(({ calculation }) => calculation === path).flatMap(({ expected }) => Object.keys(expected).map((pointer) => pointer.split('/')[1])));
      return Object.keys((each.output as z.ZodObject).shape).filter((name) => !seen.has(name) && !isGiven.has(name)).map((name) => `${path} ${name}`);
    });
    expect(missing).toEqual([]);
  });

  it('name a source, and a reason for every exception', () => {
    for (const { source, exceptions = {}, expected } of checks) {
      expect(source.length).toBeGreaterThan(10);
      expect(Object.keys(expected).length).toBeGreaterThan(0);
      for (const [pointer, { reason }] of Object.entries(exceptions)) {
        expect(Object.keys(expected)).toContain(pointer);
        expect(reason.length).toBeGreaterThan(20);
      }
    }
  });

  it('are all of those on disk', () => {
    const onDisk = generators.map((name) => (JSON.parse(readFileSync(`${folder}${name.replace('.py', '.json')}`, 'utf8')) as CheckFile).title);
    expect(checkFiles.map(({ title }) => title).sort()).toEqual(onDisk.sort());
  });

  it.runIf(hasMpmath).each(generators)('of %s are what it makes', { timeout: 120_000 }, async (name) => {
    const { stdout, stderr } = await promisify(execFile)(python, [`${folder}${name}`, '--check']);
    expect(stdout + stderr).toBe('');
  });
});
