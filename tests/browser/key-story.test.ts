/** An admin's morning: issue a key, see it work in the log, take it away again. */
import { afterAll, beforeAll, expect, test } from 'vitest';
import { createOrganization, type TestOrganization } from '../support/accounts';
import { call } from '../support/client';
import { oneUnitCall } from '../support/world';
import { closeBrowser, newVisitor, settled, type Visitor } from './visitor';

let organization: TestOrganization;
let visitor: Visitor;

beforeAll(async () => {
  organization = await createOrganization();
  visitor = await newVisitor();
});
afterAll(closeBrowser);

test('an admin signs in, issues a key, finds its call in the log and revokes it, and the next call is refused', async () => {
  const { page, open } = visitor;
  const { email, password } = organization.members.admin;

  await open('/console/keys');
  expect(new URL(page.url()).pathname).toBe('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL('**/console/keys');
  await settled(page);

  await page.getByRole('button', { name: 'Issue the first key' }).click();
  const form = page.getByRole('dialog');
  await form.getByLabel('Name').fill('drum-test-3');
  await form.getByLabel('Monthly quota').fill('12,000');
  await form.getByRole('button', { name: 'Issue key' }).click();

  const secret = await page.locator('[data-secret]').innerText();
  expect(secret).toMatch(/^lw_(live|test)_[0-9A-Za-z]{46}$/);
  await page.keyboard.press('Escape');
  expect(await page.locator('[data-secret]').isVisible(), 'Escape keeps the secret in view').toBe(true);
  await page.getByRole('button', { name: 'I have stored it' }).click();
  await page.getByRole('button', { name: 'drum-test-3' }).waitFor();
  expect(await page.content(), 'the secret is gone from the page').not.toContain(secret);
  await page.reload();
  await settled(page);
  expect(await page.content(), 'and does not come back').not.toContain(secret);

  const answer = await oneUnitCall(secret);
  expect(answer.status).toBe(200);
  const { id } = answer.body as { id: string };

  await page.getByRole('navigation', { name: 'Console' }).getByRole('link', { name: 'Calls' }).click();
  await page.waitForURL('**/console/calls');
  const row = page.getByRole('row', { name: new RegExp(id) });
  await row.waitFor();
  expect(await row.innerText()).toContain('drum-test-3');
  await row.getByRole('link').click();
  await page.waitForURL(`**/console/calls/${id}`);
  await page.getByText(String(answer.headers['x-request-id'])).waitFor();
  expect(await page.getByRole('region', { name: 'request' }).innerText()).toContain('"length_m": 0.3');

  await page.getByRole('navigation', { name: 'Console' }).getByRole('link', { name: 'Keys' }).click();
  await page.getByRole('button', { name: 'drum-test-3' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Revoke' }).click();
  await page.getByRole('button', { name: 'Revoke key' }).click();
  await page.getByRole('row', { name: /drum-test-3.*revoked/ }).waitFor();
  expect((await call('GET', '/api/v1/calls', { key: secret })).status).toBe(401);

  expect(visitor.faults).toEqual([]);
  expect(visitor.elsewhere).toEqual([]);
});

test('a change of a key that somebody else changed meanwhile is refused and said so', async () => {
  const first = await newVisitor({ member: organization.members.admin });
  const second = await newVisitor({ member: organization.members.owner });
  await first.open('/console/keys');
  await issue(first, 'shared-key');
  await second.open('/console/keys');

  await beginChange(first, '50');
  await beginChange(second, '60');
  await first.page.getByRole('button', { name: 'Change key' }).click();
  await first.page.getByRole('dialog').waitFor({ state: 'detached' });
  await second.page.getByRole('button', { name: 'Change key' }).click();
  await second.page.getByText('Somebody changed this key meanwhile.').waitFor();
});

test('the API’s complaints stand beside their fields', async () => {
  const { page, open } = await newVisitor({ member: organization.members.admin });
  await open('/console/keys');
  await page.getByRole('button', { name: /^Issue/ }).click();
  const form = page.getByRole('dialog');
  await form.getByLabel('Name').fill('too-much');
  // More than the organization has: only the server can know.
  await form.getByLabel('Monthly quota').fill('900000000000');
  await form.getByRole('button', { name: 'Issue key' }).click();
  const quota = form.getByLabel('Monthly quota');
  await page.waitForFunction(() => document.querySelector('input[name=monthly_unit_quota]')?.getAttribute('aria-invalid') === 'true');
  const noteId = await quota.getAttribute('aria-describedby');
  expect(await page.locator(`[id="${noteId}"]`).innerText()).toMatch(/^Monthly quota must be at most/);
});

async function issue({ page }: Visitor, name: string): Promise<void> {
  await page.getByRole('button', { name: /^Issue/ }).click();
  await page.getByRole('dialog').getByLabel('Name').fill(name);
  await page.getByRole('button', { name: 'Issue key' }).click();
  await page.getByRole('button', { name: 'I have stored it' }).click();
}

async function beginChange({ page }: Visitor, burst: string): Promise<void> {
  await page.getByRole('button', { name: 'shared-key' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Change' }).click();
  await page.getByRole('dialog').getByLabel('Burst limit').fill(burst);
}
