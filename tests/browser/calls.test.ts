/** Filters in the URL, pages of the log, and what a member may see of it. */
import { afterAll, beforeAll, expect, test } from 'vitest';
import { createKey, createOrganization, type TestOrganization } from '../support/accounts';
import { oneUnitCall } from '../support/world';
import { closeBrowser, newVisitor, settled } from './visitor';

let organization: TestOrganization;

beforeAll(async () => {
  organization = await createOrganization();
  const { secret } = await createKey(organization, { name: 'many-calls' });
  for (let made = 0; made < 55; made++) await oneUnitCall(secret);
  await oneUnitCall(secret, { body: { nothing: 'of use' } });
});
afterAll(closeBrowser);

test('a filter goes into the URL, survives a reload, and back undoes it', async () => {
  const { page, open } = await newVisitor({ member: organization.members.auditor });
  await open('/console/calls');
  await page.getByLabel('Status').selectOption('422');
  await page.waitForURL('**/console/calls?status=422');
  await expectRows(1);
  await page.reload();
  await settled(page);
  await expectRows(1);
  expect(await page.getByLabel('Status').inputValue()).toBe('422');
  await page.goBack();
  await expectRows(50);

  async function expectRows(count: number) {
    await page.waitForFunction((wanted) => document.querySelectorAll('tbody tr').length === wanted, count);
  }
});

test('older and newer walk the pages, and a page’s link opens the same page', async () => {
  const { page, open } = await newVisitor({ member: organization.members.developer });
  await open('/console/calls');
  await page.getByRole('button', { name: 'Older' }).click();
  await page.waitForFunction(() => document.querySelectorAll('tbody tr').length === 6);
  const second = await page.locator('tbody tr').first().innerText();
  await page.reload();
  await settled(page);
  expect(await page.locator('tbody tr').first().innerText()).toBe(second);
  await page.getByRole('button', { name: 'Newest' }).click();
  await page.waitForFunction(() => document.querySelectorAll('tbody tr').length === 50);
});

test('filters that nothing fits say so and lead back', async () => {
  const { page, open } = await newVisitor({ member: organization.members.admin });
  await open('/console/calls?status=5xx');
  await page.getByRole('heading', { name: 'No call matches' }).waitFor();
  await page.getByRole('button', { name: 'Show all calls' }).click();
  await page.locator('tbody tr').first().waitFor();
});

test('an engineer does not see the calls of keys', async () => {
  const { page, open } = await newVisitor({ member: organization.members.engineer });
  await open('/console/calls');
  await page.getByRole('heading', { name: 'No call yet' }).waitFor();
});

test('a call that does not exist is said calmly', async () => {
  const { page, open } = await newVisitor({ member: organization.members.admin });
  await open('/console/calls/call_01JE0T3M9ZC7V5Q2R8W4XKDNBH');
  await page.getByRole('heading', { name: 'No such call' }).waitFor();
});
