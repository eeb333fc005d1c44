/** The public record says what the engine computes, also where that is not what was published. */
import { describe, expect, it, vi } from 'vitest';
import { calculationPath } from '@/lib/solvers/calculation';
import { engineVersion } from '@/lib/solvers/engine';
import { calculations, methods } from '@/lib/solvers/registry';
import { checkFiles, type Check, type CheckFile } from '@/lib/verification/checks';
import { declaredCounts, makeRecord, verificationRecord } from '@/lib/verification/record';
import { bandsOf, shareOf, standingOf } from '@/lib/verification/standing';

const line = { kind: 'lossless', characteristic_impedance_ohm: 50, velocity_factor: 1 };

function check(more: Partial<Check>): Check {
  return {
    calculation: 'lines/secondary-constants',
    name: 'a line in air',
    source: 'definition',
    input: { line, frequency_hz: 1e6 },
    tolerance: 1e-9,
    expected: { '/phase_velocity_m_per_s': '299792458', '/attenuation_db_per_m': '0' },
    ...more,
  };
}

const recordOf = (...checks: Check[]) => makeRecord([{ title: 'made for the test', checks } satisfies CheckFile]);

describe('the record of the running engine', () => {
  it('has every check and every value of the reference data, each once, and the version that computed them', async () => {
    const record = await verificationRecord();
    const declared = checkFiles.flatMap(({ checks }) => checks);
    expect(record.checks).toHaveLength(declared.length);
    expect(new Set(record.checks.map((each) => each.check))).toEqual(new Set(declared));
    expect({ checks: record.whole.checks, values: record.whole.values }).toEqual(declaredCounts());
    expect([...record.byCalculation.values()].reduce((sum, { checks }) => sum + checks, 0)).toBe(declared.length);
    expect(record.engine).toBe(engineVersion);
    expect(Date.parse(record.startedAt)).toBeLessThanOrEqual(Date.now());
  });

  it('is made once in a process', async () => {
    expect(verificationRecord()).toBe(verificationRecord());
    expect(await verificationRecord()).toBe(await verificationRecord());
  });

  it('keeps the checks of a calculation together, in the order of the registry', async () => {
    const { checks } = await verificationRecord();
    const met = checks.map((each) => each.check.calculation).filter((path, index, all) => path !== all[index - 1]);
    expect(met).toEqual(calculations.map(calculationPath).filter((path) => met.includes(path)));
  });

  it('knows no method that the registry does not', async () => {
    const { byMethod } = await verificationRecord();
    const known = new Set(methods.map(({ id }) => id));
    expect([...byMethod.keys()].filter((id) => !known.has(id))).toEqual([]);
  });

  it('lets other work through while it is made', async () => {
    let turns = 0;
    const count = () => {
      turns++;
      again = setImmediate(count);
    };
    let again = setImmediate(count);
    const clock = vi.spyOn(performance, 'now').mockImplementation(() => (turns + 1) * 1e6 + ticks++ * 10);
    let ticks = 0;
    await recordOf(check({}), check({}), check({}));
    clock.mockRestore();
    clearImmediate(again);
    expect(turns).toBeGreaterThan(0);
  });
});

describe('a check', () => {
  it('that holds is counted as holding, under its calculation and the methods it rested on', async () => {
    const { whole, byCalculation, byMethod } = await recordOf(check({}));
    expect(whole).toMatchObject({ checks: 1, values: 2, failingChecks: 0, failingValues: 0 });
    expect(byCalculation.get('lines/secondary-constants')).toEqual(whole);
    expect(byMethod.get('telegrapher-propagation')).toEqual(whole);
  });

  it('whose value is off shows as failing, with its difference', async () => {
    const { whole, checks } = await recordOf(check({}), check({ expected: { '/phase_velocity_m_per_s': '299800000', '/attenuation_db_per_m': '0' } }));
    expect(whole).toMatchObject({ checks: 2, values: 4, failingChecks: 1, failingValues: 1 });
    expect(checks.map(({ holds }) => holds)).toEqual([true, false]);
    expect(whole.worst?.comparison.pointer).toBe('/phase_velocity_m_per_s');
    expect(whole.worst?.share).toBeGreaterThan(1e4);
  });

  it.each([
    ['input is refused', { input: { line, frequency_hz: -1 } }, 'refuses the input'],
    ['calculation is gone', { calculation: 'lines/no-such-thing' }, 'no calculation lines/no-such-thing'],
    ['quantity is gone', { expected: { '/no_such_quantity': '1' } }, 'nothing at /no_such_quantity'],
  ] as const)('whose %s fails whole, says why, and leaves the others as they are', async (_, more, reason) => {
    const { whole, checks } = await recordOf(check({}), check(more));
    expect(whole).toMatchObject({ checks: 2, failingChecks: 1 });
    const failed = checks.find(({ holds }) => !holds)!;
    expect(failed.failure).toContain(reason);
    expect(failed.comparisons.every(({ holds }) => !holds)).toBe(true);
    expect(whole.failingValues).toBe(failed.comparisons.length);
  });
});

describe('the standing', () => {
  it('of nothing is nothing', () => {
    expect(standingOf([])).toEqual({ checks: 0, values: 0, failingChecks: 0, failingValues: 0, worst: null });
  });

  it('measures a difference by what is allowed, and what is no number by whether it is met', () => {
    const shared = { pointer: '/x', published: '1', computed: 1, tolerance: 1e-6, holds: true };
    expect(shareOf({ ...shared, difference: 5e-7 })).toBeCloseTo(0.5);
    expect(shareOf({ ...shared, difference: 0, tolerance: 0 })).toBe(0);
    expect(shareOf({ ...shared, difference: 1e-9, tolerance: 0 })).toBe(Infinity);
    expect(shareOf({ ...shared, difference: null })).toBe(0);
    expect(shareOf({ ...shared, difference: null, holds: false })).toBe(Infinity);
    expect(shareOf({ ...shared, difference: NaN, holds: false })).toBe(Infinity);
  });

  it('is told apart by what is allowed: a table of three digits says nothing about the twelfth', async () => {
    const { checks } = await recordOf(
      check({}),
      check({ tolerance: 5e-3, expected: { '/phase_velocity_m_per_s': '3.00e8' } }),
      check({ comparison: 'at_most', expected: { '/phase_velocity_m_per_s': '3e8' } }),
    );
    const bands = bandsOf(checks);
    expect(bands.map(({ allowed, values }) => [allowed, values])).toEqual([[1e-9, 2], [1e-2, 1], [null, 1]]);
    expect(bands[0].worstDifference).toBeLessThan(1e-15);
    expect(bands[1].worstDifference).toBeCloseTo(6.9e-4, 5);
    expect(bands[2].worstDifference).toBe(0);
  });
});
