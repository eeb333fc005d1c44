/** The engineer's story on the Bench: from a worked example to a number, a plot, a script and a line in the log. */
import AxeBuilder from '@axe-core/playwright';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { figuresOf } from '@/app/console/bench/_answer/figures-of';
import { resultView, type ResultPart } from '@/app/console/bench/_answer/result-view';
import { showAt } from '@/app/console/bench/_answer/show-value';
import { readerOf } from '@/app/console/bench/_form/json-schema';
import { chartsOf, plotGroupsOf } from '@/app/console/bench/_plot/panels';
import { calculationPath, type Calculation } from '@/lib/solvers/calculation';
import { calculations } from '@/lib/solvers/registry';
import { createOrganization, type TestMember } from '../support/accounts';
import { serverUrl } from '../support/client';
import { closeBrowser, newVisitor, type Visitor } from './visitor';

const inputImpedance = '/console/bench/terminations/input-impedance';

let engineer: TestMember;
let visitor: Visitor;
let page: Page;

beforeAll(async () => {
  engineer = (await createOrganization()).members.engineer;
  visitor = await newVisitor({ member: engineer });
  await visitor.context.grantPermissions(['clipboard-read', 'clipboard-write']);
  page = visitor.page;
});

afterAll(closeBrowser);

function pathOnBench(calculation: Calculation): string {
  return `/console/bench/${calculationPath(calculation)}`;
}

/** The Calculate button and the answer that it brings. */
async function calculate(on: Page): Promise<Record<string, unknown>> {
  const answered = on.waitForResponse((response) => response.request().method() === 'POST' && response.url().includes('/api/v1/'));
  await on.getByRole('button', { name: 'Calculate' }).click();
  const answer = await answered;
  await on.getByRole('link', { name: /^call_/ }).waitFor();
  return answer.json();
}

const answerOf = (on: Page) => on.getByRole('region', { name: 'Answer' });

describe('an engineer on the Bench', () => {
  it('finds every calculation in the list', async () => {
    await visitor.open('/console/bench');
    for (const { title } of calculations) await expectVisible(page, title);
  });

  it.each(calculations.map((calculation) => [calculationPath(calculation), calculation] as const))('%s runs from its example and shows the numbers of the API', async (_, calculation) => {
    await visitor.open(pathOnBench(calculation));
    const { result } = await calculate(page);
    const part = resultView(readerOf(calculation.output, 'output'), result);
    const shown = await answerOf(page).locator('dl').first().innerText();
    for (const quantity of figuresOf(part)) {
      const at = quantity.single ? 0 : Math.floor(Math.max(quantity.re.length, quantity.words.length) / 2);
      expect(shown).toContain(quantity.title);
      expect(shown).toContain(showAt(quantity, at).value);
    }
  });

  it('types a unit of their own, sees what it is, and the answer is out of date until it is run again', async () => {
    await visitor.open(inputImpedance);
    await calculate(page);
    await page.getByLabel('Length', { exact: true }).fill('12 ft');
    await expectVisible(page, '3.6576 m');
    await expectVisible(page, 'Out of date.');
    const sent = page.waitForRequest((request) => request.method() === 'POST');
    await page.keyboard.press('Control+Enter');
    expect((await sent).postDataJSON()).toMatchObject({ length_m: 3.6576 });
    await page.getByText('Out of date.').waitFor({ state: 'detached' });
  });

  it('sees what is wrong in place of the help, from the form and from the solver', async () => {
    await visitor.open(inputImpedance);
    await page.getByLabel('Resistance', { exact: true }).fill('3 mm');
    await page.getByLabel('Length', { exact: true }).fill('-0.3');
    await page.getByRole('button', { name: 'Calculate' }).click();
    await expectVisible(page, 'mm is a length; this field takes ohm/m');
    await expectVisible(page, 'Length must be at least 0; got -0.3');
    expect(await page.getByLabel('Resistance', { exact: true }).evaluate((field) => field === document.activeElement && field.getAttribute('aria-invalid'))).toBe('true');

    await page.getByLabel('Resistance', { exact: true }).fill('0.12');
    await page.getByLabel('Length', { exact: true }).fill('3.2');
    await page.getByLabel('Reference impedance', { exact: true }).fill('-5');
    await page.getByRole('button', { name: 'Calculate' }).click();
    await expectVisible(page, 'Reference impedance must have a real part greater than 0; got -5');
    await page.getByText(/^req_/).waitFor();
  });

  it('reads exact values with the arrow keys, and the figures follow', async () => {
    await visitor.open(inputImpedance);
    const { result } = await calculate(page);
    const cursor = page.getByRole('slider', { name: 'Cursor on Input impedance' });
    await cursor.focus();
    await page.keyboard.press('Home');
    await page.keyboard.press('ArrowRight');
    expect(await cursor.getAttribute('aria-valuenow')).toBe('1');
    const frequencies = (result as { frequency_hz: number[] }).frequency_hz;
    expect(await answerOf(page).innerText()).toContain(`At ${frequencies[1] / 1e6} MHz`);
  });

  it('copies the call as a script, and a link that reopens the input', async () => {
    await visitor.open(inputImpedance);
    await page.getByLabel('Length', { exact: true }).fill('7 m');
    await calculate(page);
    await page.getByRole('button', { name: 'Copy curl snippet' }).click();
    const script = await page.evaluate(() => navigator.clipboard.readText());
    expect(script).toContain(`${new URL(serverUrl()).origin}/api/v1/terminations/input-impedance`);
    expect(script).toContain('"length_m":7');

    await page.getByRole('button', { name: 'Copy link' }).click();
    const link = await page.evaluate(() => navigator.clipboard.readText());
    await page.goto('about:blank');
    await page.goto(link);
    await expect.poll(() => page.getByLabel('Length', { exact: true }).inputValue()).toBe('7');
  });

  it('finds the call in the log', async () => {
    await visitor.open(inputImpedance);
    const { id } = await calculate(page);
    await page.getByRole('link', { name: String(id) }).click();
    await page.waitForURL(`**/console/calls/${id}`);
    await page.getByRole('heading', { name: 'terminations/input-impedance' }).waitFor();
  });

  it('had nothing load from elsewhere and nothing refused by the security policy', () => {
    expect(visitor.elsewhere).toEqual([]);
    expect(visitor.faults).toEqual([]);
  });
});

describe.each([
  ['light', 1280],
  ['dark', 1280],
  ['light', 390],
] as const)('in %s at %i px', (colorScheme, width) => {
  let shown: Visitor;

  beforeAll(async () => {
    shown = await newVisitor({ member: engineer, scheme: colorScheme, width });
  });

  it.each(calculations.map((calculation) => [calculationPath(calculation), calculation] as const))('%s is accessible and never wider than the window', async (_, calculation) => {
    await shown.open(pathOnBench(calculation));
    await calculate(shown.page);
    await shown.page.locator(isDrawn(answerToFirstExample(calculation)) ? 'figure svg' : 'main dl').first().waitFor();
    const { violations } = await new AxeBuilder({ page: shown.page }).analyze();
    expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 160)).join(' | ')}`)).toEqual([]);
    expect(await shown.page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)).toBe(0);
  });
});

async function expectVisible(on: Page, text: string): Promise<void> {
  await on.getByText(text, { exact: true }).first().waitFor({ state: 'visible' });
}

/** What the page draws: lines against an axis of more than one point, and reflections. */
function isDrawn({ axis, columns, singles, parts, lists }: ResultPart): boolean {
  const hasLines = axis !== undefined && axis.re.length > 1 && plotGroupsOf(columns).length > 0;
  return hasLines || chartsOf([...columns, ...singles]).length > 0 || parts.some(isDrawn) || lists.some(({ records }) => records.slice(0, 1).some(isDrawn));
}

function answerToFirstExample({ input, output, examples, solve }: Calculation): ResultPart {
  return resultView(readerOf(output, 'output'), solve(input.parse(examples[0].input)).result);
}
