/** What a reader of a report does: looks a calculation's checks up, follows a method to its formulas, and finds both without a script. */
import AxeBuilder from '@axe-core/playwright';
import { afterAll, describe, expect, it } from 'vitest';
import { methods } from '@/lib/solvers/registry';
import { verificationRecord } from '@/lib/verification/record';
import { serverUrl } from '../support/client';
import { closeBrowser, newVisitor } from './visitor';

afterAll(closeBrowser);

/** The longest formula: what is most likely to leave a narrow screen. */
const longest = methods.reduce((first, second) => (second.formulas.join('').length > first.formulas.join('').length ? second : first));

/** Beside the pages that every-page.test.ts looks at; the whole record takes a while. */
const looked = ['/verification', '/verification?q=nothing-has-this-name', `/methods/${longest.id}`];

describe('a reader of the verification page', () => {
  it('sees how the whole record stands, and as many checks as there are', async () => {
    const { whole, engine } = await verificationRecord();
    const { page, open } = await newVisitor();
    await open('/verification');
    const summary = await page.getByRole('region', { name: 'How the record stands' }).innerText();
    expect(summary).toContain('All values hold');
    expect(summary.replaceAll(',', '')).toContain(String(whole.values));
    expect(summary).toContain(engine);
  });

  it('filters by calculation, in an address that can be sent to somebody', async () => {
    const { page, open } = await newVisitor();
    await open('/verification');
    await page.getByLabel('Calculation', { exact: true }).selectOption('lines/secondary-constants');
    await page.getByRole('button', { name: 'Show' }).click();
    await page.waitForURL(/calculation=lines(\/|%2F)secondary-constants/);
    expect(await page.getByRole('heading', { level: 2 }).allInnerTexts()).toEqual([expect.stringContaining('lines/secondary-constants')]);
    await page.getByLabel('Words').fill('velocity no-such-word');
    await page.getByRole('button', { name: 'Show' }).click();
    await page.getByText('No check fits').waitFor();
    await page.getByRole('link', { name: 'All checks' }).click();
    await page.getByRole('heading', { name: 'By calculation' }).waitFor();
    expect(await page.getByLabel('Words').inputValue()).toBe('');
  });

  it('finds published and computed side by side without a script, and more behind a disclosure', async () => {
    const { context } = await newVisitor();
    const page = await (await context.browser()!.newContext({ javaScriptEnabled: false })).newPage();
    await page.goto(`${serverUrl()}/verification?calculation=lines/secondary-constants`);
    const first = page.getByRole('article').first();
    const shown = await first.innerText();
    expect(shown).toContain('1.73205080760027686258085159827e-3');
    expect(shown).toContain('1.732050807600277e-3');
    const folded = first.getByText('attenuation_np_per_m');
    expect(await folded.isVisible()).toBe(false);
    await first.getByText(/\d+ more values/).click();
    expect(await folded.isVisible()).toBe(true);
    await page.context().close();
  });

  it('opens a check on the Bench with its input in the address', async () => {
    const { page, open } = await newVisitor();
    await open('/verification?calculation=lines/secondary-constants');
    expect(await page.getByRole('link', { name: /^Open on the Bench/ }).first().getAttribute('href')).toMatch(/^\/console\/bench\/lines\/secondary-constants#1\../);
  });

  it('gets a page from whatever stands in the address', async () => {
    const { open } = await newVisitor();
    for (const query of ['page=999', 'page=-1&q=%00', 'calculation=no/such', 'method=no-such', 'holds=no', 'q=%3Cscript%3E', 'calculation=a&calculation=b']) expect(await open(`/verification?${query}`), query).toBe(200);
  });
});

describe('a reader of the methods', () => {
  it('comes from the list to formulas that are typeset and stand as MathML for those who hear them', async () => {
    const visitor = await newVisitor();
    const { page, open } = visitor;
    await open('/methods');
    await page.getByRole('link', { name: 'Propagation constant and characteristic impedance from R, L, G, C' }).click();
    await page.waitForURL('**/methods/telegrapher-propagation');
    const formulas = page.getByRole('region', { name: 'Formulas' });
    expect(await formulas.locator('math').count()).toBe(4);
    expect(await formulas.locator('math msqrt').count()).toBe(2);
    // Set in the typeface that comes with the app.
    expect(await formulas.locator('.katex-html').first().evaluate((element) => getComputedStyle(element).fontFamily)).toContain('KaTeX_Main');
    await page.evaluate(() => document.fonts.ready);
    expect(await page.evaluate(() => [...document.fonts].some(({ family, status }) => family.includes('KaTeX_Main') && status === 'loaded'))).toBe(true);
    expect(visitor.elsewhere).toEqual([]);
    await page.getByRole('link', { name: /^See the \d+ checks$/ }).click();
    await page.waitForURL('**/verification?method=telegrapher-propagation');
  });

  it('finds every method’s page, and a page that says so where there is no such method', async () => {
    for (const { id } of methods) expect((await fetch(`${serverUrl()}/methods/${id}`)).status, id).toBe(200);
    const { page, open } = await newVisitor();
    expect(await open('/methods/no-such-method')).toBe(404);
    await page.getByRole('heading', { name: 'There is nothing here' }).waitFor();
  });
});

describe.each(['light', 'dark'] as const)('in %s', (scheme) => {
  it('the pages have no fault of accessibility', async () => {
    const { page, open } = await newVisitor({ scheme });
    for (const path of looked) {
      await open(path);
      const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']).analyze();
      expect(violations.map(({ id, nodes }) => `${path} ${id}: ${nodes.slice(0, 3).map(({ target }) => target.join(' ')).join(', ')}`)).toEqual([]);
    }
  }, 120_000);
});

it('the pages do not scroll sideways on a phone', async () => {
  const { page, open } = await newVisitor({ width: 390 });
  for (const path of [...looked, ...methods.map(({ id }) => `/methods/${id}`)]) {
    await open(path);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth), path).toBe(0);
  }
}, 240_000);
