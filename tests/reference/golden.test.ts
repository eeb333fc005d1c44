/** A number that moves by more than 1e-12 needs a new engine version and a line in CHANGELOG.md. */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { engineVersion } from '@/lib/solvers/engine';
import { goldenNow, type Golden } from './golden';

const golden = JSON.parse(readFileSync(new URL('golden.json', import.meta.url), 'utf8')) as Golden;
const changelog = readFileSync(new URL('../../CHANGELOG.md', import.meta.url), 'utf8');
const allowed = 1e-12;

/** What differs, as pointer and values; complex columns are held to the size of the whole entry. */
function differences(before: unknown, now: unknown, pointer: string): string[] {
  if (typeof before === 'number' && typeof now === 'number') {
    return Math.abs(before - now) <= allowed * Math.max(Math.abs(before), Math.abs(now)) ? [] : [`${pointer}: ${before} is now ${now}`];
  }
  if (typeof before !== 'object' || typeof now !== 'object' || before === null || now === null) return before === now ? [] : [`${pointer}: ${String(before)} is now ${String(now)}`];
  const [old, current] = [before as Record<string, unknown>, now as Record<string, unknown>];
  const complex = complexPairs(old, current);
  if (complex) return complex.every(([p, q]) => Math.hypot(p[0] - q[0], p[1] - q[1]) <= allowed * Math.hypot(...p)) ? [] : [`${pointer}: ${JSON.stringify(before)} is now ${JSON.stringify(now)}`];
  return [...new Set([...Object.keys(old), ...Object.keys(current)])].flatMap((key) => differences(old[key], current[key], `${pointer}/${key}`));
}

type Pair = [number, number];

function complexPairs(before: Record<string, unknown>, now: Record<string, unknown>): [Pair, Pair][] | null {
  const listed = (value: unknown) => (Array.isArray(value) ? value : [value]) as unknown[];
  const [br, bi, nr, ni] = [before.re, before.im, now.re, now.im].map(listed);
  const all = [...br, ...bi, ...nr, ...ni];
  if (!all.every((each) => typeof each === 'number') || br.length !== nr.length || bi.length !== ni.length) return null;
  return br.map((_, index) => [[br[index], bi[index]] as Pair, [nr[index], ni[index]] as Pair]);
}

describe('the golden results', () => {
  it('are those of this engine version, which CHANGELOG.md has an entry for', () => {
    expect(golden.engine, 'npm run golden').toBe(engineVersion);
    expect(changelog).toContain(`## ${engineVersion}`);
  });

  it('have not moved by more than 1e-12', () => {
    const now = JSON.parse(JSON.stringify(goldenNow())) as Golden;
    expect(Object.keys(now.results).sort(), 'npm run golden').toEqual(Object.keys(golden.results).sort());
    expect(differences(golden.results, now.results, '')).toEqual([]);
  });
});
