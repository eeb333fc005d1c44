import { afterAll, beforeAll, expect, test } from 'vitest';
import { consolePages, roleHas, roles } from '@/lib/auth/permissions';
import { createOrganization, type TestOrganization } from '../support/accounts';
import { closeBrowser, newVisitor } from './visitor';

let organization: TestOrganization;

beforeAll(async () => {
  organization = await createOrganization();
});
afterAll(closeBrowser);

test.each(roles)('%s opens the pages of the role, is refused the others with 403, and the navigation offers no more', async (role) => {
  const { page, open } = await newVisitor({ member: organization.members[role] });
  const allowed = consolePages.filter(({ permission }) => roleHas(role, permission));
  for (const { path, title, permission } of consolePages) {
    const may = roleHas(role, permission);
    expect(await open(path), `${role} on ${path}`).toBe(may ? 200 : 403);
    if (!may) expect(await page.getByRole('heading', { level: 1 }).innerText()).toBe('Not for this role');
    const words = await page.getByRole('navigation', { name: 'Console' }).getByRole('link').allInnerTexts();
    expect(words, `navigation on ${title}`).toEqual(allowed.map((each) => each.title));
  }
});

test.each(roles)('%s lands on the first page of the role', async (role) => {
  const { page, open } = await newVisitor({ member: organization.members[role] });
  await open('/console');
  const first = consolePages.find(({ permission }) => roleHas(role, permission))!;
  expect(new URL(page.url()).pathname).toBe(first.path);
});

test('who may not manage keys is offered neither issuing nor changing', async () => {
  const { page, open } = await newVisitor({ member: organization.members.auditor });
  await open('/console/keys');
  expect(await page.getByRole('button', { name: /issue/i }).count()).toBe(0);
});

test('every console page asks a stranger to sign in', async () => {
  const { page, open } = await newVisitor();
  for (const { path } of consolePages) {
    await open(path);
    const { pathname, searchParams } = new URL(page.url());
    expect([pathname, searchParams.get('next')]).toEqual(['/sign-in', path]);
  }
});
