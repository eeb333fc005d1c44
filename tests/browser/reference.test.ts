import { afterAll, beforeAll, expect, test } from 'vitest';
import { createWorld, type World } from '../support/world';
import { closeBrowser, newVisitor } from './visitor';

let world: World;

beforeAll(async () => {
  world = await createWorld();
});
afterAll(closeBrowser);

test('the reference shows the document and asks nobody else for anything, also when a call is sent from it', async () => {
  const visitor = await newVisitor();
  const { page, open, context } = visitor;
  // Nothing could leave even if it tried; what tries is counted.
  const { origin } = new URL(process.env.LINEWRIGHT_URL!);
  await context.route((url) => url.origin !== origin && url.protocol.startsWith('http'), (route) => route.abort());
  await open('/reference');
  await page.getByRole('heading', { name: 'Linewright', exact: false }).first().waitFor();

  await page.getByRole('button', { name: /Auth Type/ }).first().click();
  await page.getByRole('option', { name: /ApiKey/ }).first().click();
  await page.keyboard.press('Escape');
  await page.getByPlaceholder('Token').first().fill(world.key.secret);

  await page.getByRole('button', { name: /Test Request/ }).first().click();
  const sent = page.waitForRequest((request) => request.url().startsWith(`${origin}/api/v1/`) && !request.url().endsWith('/openapi.json'));
  await page.getByRole('button', { name: /^Send/ }).first().click();
  expect((await sent).headers().authorization, 'the call carries the key').toBe(`Bearer ${world.key.secret}`);

  expect(visitor.elsewhere).toEqual([]);
  expect(await page.evaluate(() => JSON.stringify({ ...localStorage, ...sessionStorage })), 'no key is kept').not.toContain(world.key.secret);
}, 120_000);
