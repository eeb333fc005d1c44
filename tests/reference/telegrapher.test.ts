/**
 * The running solvers against references of 30 digits made by another route (generate.py: matrix exponentials and
 * nodal analysis). A complex value is held to 1e-12 of its magnitude, a real one to 1e-12 of itself.
 */
import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { calculations } from '@/lib/solvers/registry';
import { calculationPath } from '@/lib/solvers/calculation';

interface ReferenceCase {
  readonly calculation: string;
  readonly name: string;
  readonly input: unknown;
  readonly expected: Readonly<Record<string, string | { readonly re: string; readonly im: string }>>;
}

const folder = fileURLToPath(new URL('.', import.meta.url));
const cases: ReferenceCase[] = JSON.parse(readFileSync(`${folder}telegrapher.json`, 'utf8'));
const claimed = 1e-12;

/**
 * Where float64 does not keep 1e-12 of the value itself, how far it does, and why.
 * - A phase within 3e-7 of a quarter turn is known to 2e-16, so what is inverse to that distance is known to 6e-10.
 * - The reflection of a line of 1e-8 m, 3e-9, is the difference of matrix entries near 1: it is right to 1e-16 of a whole reflection.
 */
const conditioned: Readonly<Record<string, Readonly<Record<string, number>>>> = {
  'beside the pole of a shorted quarter wave': { '/input_impedance_ohm': 1e-9, '/input_admittance_s': 1e-9 },
  'electrically tiny': { '/s/s11': 1e-8, '/s/s22': 1e-8, '/insertion_loss_db': 1e-7 },
};

describe.each(cases)('$calculation: $name', ({ calculation, name, input, expected }) => {
  const declared = calculations.find((each) => calculationPath(each) === calculation)!;
  const { result } = declared.solve(declared.input.parse(input));

  it.each(Object.entries(expected))('%s', (pointer, value) => {
    const column = pointer.split('/').slice(1).reduce((node: unknown, key) => (node as Record<string, unknown>)[key], result);
    const [got, wanted] =
      typeof value === 'string'
        ? [[(column as number[])[0]], [Number(value)]]
        : [[(column as { re: number[] }).re[0], (column as { im: number[] }).im[0]], [Number(value.re), Number(value.im)]];
    const size = Math.hypot(...wanted);
    const difference = Math.hypot(...got.map((part, index) => part - wanted[index]));
    expect(got.every((part) => typeof part === 'number')).toBe(true);
    expect(size === 0 ? difference : difference / size, `got ${got}, want ${wanted}`).toBeLessThanOrEqual(conditioned[name]?.[pointer] ?? claimed);
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

describe('the reference data', () => {
  it('covers every calculation', () => {
    for (const calculation of calculations) {
      expect(cases.filter((each) => each.calculation === calculationPath(calculation)).length).toBeGreaterThanOrEqual(10);
    }
  });

  it.runIf(hasMpmath)('is what its generator makes', () => {
    expect(execFileSync(python, [`${folder}generate.py`, '--check'], { encoding: 'utf8' })).toBe('');
  });
});
