import { AxeBuilder } from '@axe-core/playwright';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { createWorld, type World } from '../support/world';
import { allPages } from './pages';
import { closeBrowser, newVisitor } from './visitor';

let world: World;

beforeAll(async () => {
  world = await createWorld();
});
afterAll(closeBrowser);

describe.each(['light', 'dark'] as const)('in %s', (scheme) => {
  test('no page has a serious or critical fault of accessibility, throws, or loads from elsewhere', async () => {
    for (const { path, signedIn } of allPages(world)) {
      const visitor = await newVisitor({ scheme, member: signedIn ? world.organization.members.admin : undefined });
      await visitor.open(path);
      const builder = new AxeBuilder({ page: visitor.page }).withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']);
      // The viewer of the reference is not ours to mend; its colours are.
      if (path === '/reference') builder.exclude('.reference');
      const { violations } = await builder.analyze();
      const grave = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical');
      expect(grave.map(({ id, nodes }) => `${path} ${id}: ${nodes.map(({ target }) => target.join(' ')).join(', ')}`)).toEqual([]);
      expect(visitor.faults, path).toEqual([]);
      expect(visitor.elsewhere, path).toEqual([]);
      await visitor.context.close();
    }
  }, 240_000);
});

test('no page scrolls sideways on a phone', async () => {
  for (const { path, signedIn } of allPages(world)) {
    const { page, open, context } = await newVisitor({ width: 390, member: signedIn ? world.organization.members.admin : undefined });
    await open(path);
    const beyond = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
    expect(beyond, path).toBe(0);
    await context.close();
  }
}, 240_000);

test('every page carries a policy without unsafe-eval, and another nonce each time', async () => {
  const { page, open } = await newVisitor();
  const nonces = new Set<string>();
  for (const path of ['/', '/', '/sign-in', '/no-such-page']) {
    const answer = page.waitForResponse((response) => response.request().isNavigationRequest());
    await open(path);
    const headers = (await answer).headers();
    const policy = headers['content-security-policy'] ?? '';
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toContain('unsafe-eval');
    nonces.add(/'nonce-([^']+)'/.exec(policy)?.[1] ?? '');
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['referrer-policy']).toBe('same-origin');
    expect(headers['permissions-policy']).toContain('camera=()');
  }
  expect(nonces.size).toBe(4);
});

test('the chosen colours hold from the first byte of the next page', async () => {
  const { page, open } = await newVisitor({ scheme: 'light' });
  await open('/problems');
  const change = page.getByRole('button', { name: /^Colours: system/ });
  await change.click();
  await page.getByRole('button', { name: /^Colours: light/ }).click();
  expect(await page.evaluate(() => getComputedStyle(document.body).backgroundColor)).toBe('rgb(23, 20, 18)');
  const answer = page.waitForResponse((response) => response.request().isNavigationRequest());
  await open('/');
  expect(await (await answer).text()).toContain('data-theme="dark"');
});
