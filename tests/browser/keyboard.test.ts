/** The key story once more without a mouse: what is focused is always visible, and a dialog gives the focus back. */
import { afterAll, beforeAll, expect, test } from 'vitest';
import { createOrganization, type TestOrganization } from '../support/accounts';
import { closeBrowser, newVisitor } from './visitor';
import type { Page } from 'playwright-core';

let organization: TestOrganization;

beforeAll(async () => {
  organization = await createOrganization();
});
afterAll(closeBrowser);

test('a key is issued, looked at and revoked with the keyboard alone', async () => {
  const { page, open } = await newVisitor({ member: organization.members.owner });
  await open('/console/keys');

  await page.keyboard.press('Tab');
  expect(await focused(page)).toBe('Skip to content');
  await tabTo(page, 'Issue the first key');
  await page.keyboard.press('Enter');
  await page.getByRole('dialog').waitFor();

  await tabToField(page, 'name');
  await page.keyboard.type('by-keyboard');
  await page.keyboard.press('Enter');
  await page.locator('[data-secret]').waitFor();
  await tabTo(page, 'I have stored it');
  await page.keyboard.press('Enter');
  await page.getByRole('dialog').waitFor({ state: 'detached' });

  await tabTo(page, 'by-keyboard');
  await page.keyboard.press('Enter');
  await page.getByRole('dialog').waitFor();
  await page.keyboard.press('Escape');
  await page.getByRole('dialog').waitFor({ state: 'detached' });
  expect(await focused(page), 'the focus is back where it was').toBe('by-keyboard');

  await page.keyboard.press('Enter');
  await tabTo(page, 'Revoke');
  await page.keyboard.press('Enter');
  await page.getByRole('heading', { name: 'Revoke by-keyboard?' }).waitFor();
  expect(await focused(page), 'the harmless answer has the focus').toBe('Keep it');
  await tabTo(page, 'Revoke key', 'Shift+Tab');
  await page.keyboard.press('Enter');
  await page.getByRole('row', { name: /by-keyboard.*revoked/ }).waitFor();
});

function focused(page: Page): Promise<string> {
  return page.evaluate(() => (document.activeElement as HTMLElement | null)?.innerText.trim() ?? '');
}

/** Presses the key until the control with these words has the focus, and checks that its focus can be seen. */
async function tabTo(page: Page, words: string, key = 'Tab'): Promise<void> {
  for (let pressed = 0; pressed < 40; pressed++) {
    if ((await focused(page)) === words) {
      const outline = await page.evaluate(() => getComputedStyle(document.activeElement!).outlineStyle);
      expect(outline, `${words} shows its focus`).not.toBe('none');
      return;
    }
    await page.keyboard.press(key);
  }
  throw new Error(`the keyboard does not reach "${words}"`);
}

async function tabToField(page: Page, name: string): Promise<void> {
  for (let pressed = 0; pressed < 40; pressed++) {
    if ((await page.evaluate(() => document.activeElement?.getAttribute('name'))) === name) return;
    await page.keyboard.press('Tab');
  }
  throw new Error(`the keyboard does not reach the field ${name}`);
}
