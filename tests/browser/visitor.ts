/** A person at a browser: a fresh profile of one Chromium, signed in or not, with nothing loading from elsewhere unseen. */
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { sessionCookieOf, type TestMember } from '../support/accounts';
import { serverUrl } from '../support/client';

export interface VisitorOptions {
  /** Signed in as this member from the start. */
  readonly member?: TestMember;
  readonly width?: number;
  readonly scheme?: 'light' | 'dark';
}

export interface Visitor {
  readonly page: Page;
  readonly context: BrowserContext;
  /** Requests that left for another origin than the service's own. */
  readonly elsewhere: readonly string[];
  /** Uncaught errors and refusals by the content security policy. */
  readonly faults: readonly string[];
  /** `path` begins with a slash. Resolves when the page is drawn and its data are there. */
  open(path: string): Promise<number>;
}

let browser: Promise<Browser> | undefined;

const flags = ['--headless', '--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'];

function openBrowser(): Promise<Browser> {
  const executablePath = process.env.CHROMIUM_PATH;
  if (!executablePath) throw new Error('CHROMIUM_PATH is not set: the browser tests need a Chromium');
  return (browser ??= chromium.launch({ executablePath, args: flags }));
}

export async function closeBrowser(): Promise<void> {
  await (await browser)?.close();
  browser = undefined;
}

export async function newVisitor({ member, width = 1280, scheme = 'light' }: VisitorOptions = {}): Promise<Visitor> {
  const origin = new URL(serverUrl()).origin;
  const context = await (await openBrowser()).newContext({ viewport: { width, height: 900 }, colorScheme: scheme, reducedMotion: 'reduce' });
  context.setDefaultTimeout(20_000);
  if (member) {
    const [name, value] = (await sessionCookieOf(member)).split('=') as [string, string];
    await context.addCookies([{ name, value, url: origin, httpOnly: true, sameSite: 'Lax' }]);
  }
  const page = await context.newPage();
  const elsewhere: string[] = [];
  const faults: string[] = [];
  page.on('request', (request) => {
    const { protocol, origin: asked } = new URL(request.url());
    if (protocol.startsWith('http') && asked !== origin) elsewhere.push(request.url());
  });
  page.on('pageerror', (error) => faults.push(error.message));
  page.on('console', (message) => {
    if (/content security policy/i.test(message.text())) faults.push(message.text());
  });
  return {
    page,
    context,
    elsewhere,
    faults,
    async open(path) {
      const response = await page.goto(origin + path);
      await settled(page);
      return response?.status() ?? 0;
    },
  };
}

/** No loading pair is left and the typefaces are there. */
export async function settled(page: Page): Promise<void> {
  await page.waitForLoadState('load');
  await page.waitForFunction(() => document.querySelector('[data-loading]') === null);
  await page.evaluate(() => document.fonts.ready);
}
