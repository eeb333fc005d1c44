/** What the pages of the record and of the methods make of it: filters in the address, digits side by side, formulas set. */
import { describe, expect, it } from 'vitest';
import { partsOf, typeset } from '@/app/methods/_method/typeset';
import { methodsByShelf } from '@/app/methods/_method/where-used';
import { brief, computedLines, digitsBeside, percent, publishedLines } from '@/app/verification/_record/digits';
import { applyFilters, everything, isNarrowed, readFilters, verificationHref } from '@/app/verification/_record/filters';
import { methods } from '@/lib/solvers/registry';
import { verificationRecord } from '@/lib/verification/record';

describe('the filters', () => {
  it('are read from an address as they were written to it', () => {
    const filters = { calculation: 'lines/secondary-constants', method: 'telegrapher-propagation', text: 'cable & line', failing: true, page: 3 };
    const href = verificationHref(filters);
    expect(href).toContain('/verification?calculation=lines/secondary-constants&');
    expect(readFilters(Object.fromEntries(new URL(href, 'http://localhost').searchParams))).toEqual(filters);
    expect(verificationHref({})).toBe('/verification');
  });

  it('take anything that stands in an address', () => {
    expect(readFilters({ calculation: ['lines/x', 'y'], page: '-3', q: 'a'.repeat(9999) })).toEqual({ ...everything, calculation: 'lines/x', text: 'a'.repeat(200) });
    expect(readFilters({ page: '1e9' }).page).toBe(10_000);
    expect(isNarrowed(readFilters({ calculation: '', method: '', q: ' ' }))).toBe(false);
  });

  it('leave what they name', async () => {
    const { checks } = await verificationRecord();
    expect(applyFilters(checks, everything)).toEqual(checks);
    const some = applyFilters(checks, { ...everything, calculation: 'lines/secondary-constants', text: 'CABLE exponential' });
    expect(some.length).toBeGreaterThan(0);
    expect(some.every(({ check }) => check.calculation === 'lines/secondary-constants' && /cable/i.test(check.name))).toBe(true);
    expect(applyFilters(checks, { ...everything, method: 'telegrapher-propagation' }).every((each) => each.methods.includes('telegrapher-propagation'))).toBe(true);
    expect(applyFilters(checks, { ...everything, failing: true })).toEqual([]);
    expect(applyFilters(checks, { ...everything, calculation: 'lines/no-such-thing' })).toEqual([]);
  });
});

describe('the digits', () => {
  it.each([
    ['1.73205080760027686258e-3', 1.732050807600277e-3, '1.732050807600277e-3', ''],
    ['1.73205080760027686258e-3', 1.732050807600275e-3, '1.73205080760027', '5e-3'],
    ['50.1', 50.13245, '50.1', '3245'],
    ['50.1', 49.98, '', '49.98'],
    ['5e-8', 5e-8, '5e-8', ''],
    ['1.5e2', 15.1, '', '1.51e+1'],
    ['0.0', 0, '0', ''],
  ])('%s beside %d: %s agree, %s follow', (published, computed, agreeing, following) => {
    expect(digitsBeside(published, computed)).toEqual({ agreeing, following });
  });

  it('of a complex number stand in two lines, signs apart', () => {
    const published = { re: '1.5', im: '-2.25' };
    expect(publishedLines(published).map(({ before, agreeing, after }) => [before.trim(), agreeing, after.trim()])).toEqual([['', '1.5', ''], ['-', '2.25', 'j']]);
    expect(computedLines(published, { re: 1.5, im: -2.31 }).map(({ before, agreeing, following }) => [before.trim(), agreeing, following])).toEqual([['', '1.5', ''], ['-', '2.', '31']]);
    expect(computedLines(published, { re: -1.5, im: 2.25 }).map(({ before, agreeing, following }) => [before.trim(), agreeing, following])).toEqual([['-', '', '1.5'], ['+', '', '2.25']]);
  });

  it('of what is no number are words', () => {
    expect(publishedLines(null)[0].agreeing).toBe('no finite value');
    expect(computedLines(null, null)[0]).toMatchObject({ agreeing: 'no finite value', following: '' });
    expect(computedLines('1', null)[0]).toMatchObject({ agreeing: '', following: 'no finite value' });
    expect(computedLines(true, false)[0]).toMatchObject({ agreeing: '', following: 'false' });
    expect(computedLines('short', 'short')[0].agreeing).toBe('short');
  });

  it('of a difference are few', () => {
    expect([0, 1.234e-16, 0.00412, 0.05, 12345].map((value) => brief(value))).toEqual(['0', '1.2e-16', '0.0041', '0.05', '1.2e+4']);
    expect([0, 1e-9, 0.83, Infinity].map(percent)).toEqual(['0\u00a0%', '< 0.01\u00a0%', '83\u00a0%', 'not met']);
  });
});

describe.each(methods.map((method) => [method.id, method] as const))('the method %s', (_, { formulas, symbols }) => {
  it('has formulas and symbols that can be set, without a warning', () => {
    for (const latex of [...formulas.flatMap(partsOf), ...symbols.map(({ symbol }) => symbol)]) {
      const html = typeset(latex, { display: true, strict: true });
      expect(html).toContain('<math');
    }
  });
});

describe('the methods', () => {
  it('stand on one shelf each', () => {
    const shelved = methodsByShelf().flatMap(([, those]) => those);
    expect(shelved).toHaveLength(methods.length);
    expect(new Set(shelved).size).toBe(methods.length);
  });

  it('have formulas that part at their wide spaces, and nowhere within braces or an environment', () => {
    expect(partsOf(String.raw`a = b, \qquad c = d`)).toEqual(['a = b', 'c = d']);
    expect(partsOf(String.raw`\text{a \qquad b}`)).toEqual([String.raw`\text{a \qquad b}`]);
    expect(partsOf(String.raw`\begin{cases} a \qquad b \\ c \end{cases}`)).toHaveLength(1);
    expect(partsOf(String.raw`\left( a \qquad b \right) \qquad c`)).toHaveLength(2);
    expect(partsOf(String.raw`x_\{ \qquad y`)).toHaveLength(2);
  });
});
