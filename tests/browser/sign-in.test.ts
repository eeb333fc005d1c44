import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { sameSitePath } from '@/app/(sign-in)/sign-in/same-site-path';
import { createOrganization, type TestOrganization } from '../support/accounts';
import { closeBrowser, newVisitor, type Visitor } from './visitor';

let organization: TestOrganization;

beforeAll(async () => {
  organization = await createOrganization();
});
afterAll(closeBrowser);

async function signIn({ page }: Visitor, email: string, password: string): Promise<void> {
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
}

describe('signing in', () => {
  test('a wrong password and an unknown address get the same words, and the address stays in the form', async () => {
    const visitor = await newVisitor();
    const { page, open } = visitor;
    const words: string[] = [];
    for (const email of [organization.members.admin.email, 'nobody@nowhere.example']) {
      await open('/sign-in');
      await signIn(visitor, email, 'not the password');
      const alert = page.getByText('E-mail or password is wrong.').locator('..');
      words.push(await alert.innerText());
      expect(await page.getByLabel('E-mail').inputValue()).toBe(email);
      expect(await page.getByLabel('Password').inputValue()).toBe('');
    }
    expect(words[0]).toBe(words[1]);
  });

  test('empty fields are named before anything is sent', async () => {
    const { page, open } = await newVisitor();
    await open('/sign-in');
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.getByText('E-mail is missing').waitFor();
    await page.getByText('Password is missing').waitFor();
  });

  test('a filtered list that was asked for before signing in is where signing in leads', async () => {
    const visitor = await newVisitor();
    await visitor.open('/console/calls?status=4xx&range=24h');
    await signIn(visitor, organization.members.developer.email, organization.members.developer.password);
    await visitor.page.waitForURL('**/console/calls?status=4xx&range=24h');
  });

  test('signing out ends the session on the server', async () => {
    const { page, open } = await newVisitor({ member: organization.members.auditor });
    await open('/console/usage');
    await page.getByRole('button', { name: 'Sign out' }).click();
    await page.waitForURL('**/sign-in');
    await open('/console/usage');
    expect(new URL(page.url()).pathname).toBe('/sign-in');
  });

  test('a session that ended elsewhere leads to sign-in and back', async () => {
    const { page, context, open } = await newVisitor({ member: organization.members.admin });
    await open('/console/keys');
    await context.clearCookies();
    await page.getByRole('button', { name: /^Issue/ }).click();
    await page.getByRole('dialog').getByLabel('Name').fill('never-made');
    await page.getByRole('button', { name: 'Issue key' }).click();
    await page.waitForURL('**/sign-in?next=%2Fconsole%2Fkeys');
  });
});

describe('where sign-in may lead', () => {
  test.each(['/console/keys', '/console/calls?status=4xx&range=24h', '/console/calls/call_01JE0T3M9ZC7V5Q2R8W4XKDNBH'])('%s is a path of this site', (next) => {
    expect(sameSitePath(next)).toBe(next);
  });

  test.each(['//evil.example', '/\\evil.example', '/\t/evil.example', 'https://evil.example', 'javascript:alert(1)', '/console\\..', '', 'console', ['/console', '/x'], undefined])('%j is not', (next) => {
    expect(sameSitePath(next)).toBeNull();
  });
});
