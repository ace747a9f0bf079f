import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type Browser, type BrowserContext, launch, type Page } from 'puppeteer-core';
import { findBrowser } from '../../../server/print/browser.ts';

const require = createRequire(import.meta.url);

export type TestBrowser = { browser: Browser; close: () => Promise<void> };

export async function openBrowser(): Promise<TestBrowser> {
  const executablePath = await findBrowser(process.env.CHROME_PATH, process.env.PATH ?? '');
  if (!executablePath) throw new Error('These tests need Chromium.');
  const userDataDir = await mkdtemp(join(tmpdir(), 'tb-browser-'));
  const browser = await launch({
    executablePath,
    userDataDir,
    args: ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-dev-shm-usage'],
  });
  return {
    browser,
    async close() {
      await browser.close();
      await rm(userDataDir, { recursive: true, force: true });
    },
  };
}

/** One person's browser: its own cookies. Console errors and page errors are gathered; a test looks at them at its end. */
export class Visitor {
  readonly page: Page;
  readonly context: BrowserContext;
  readonly errors: string[] = [];

  private constructor(page: Page, context: BrowserContext) {
    this.page = page;
    this.context = context;
    page.on('pageerror', (error) => this.errors.push(String(error)));
    page.on('console', (message) => {
      // A refused request is logged by Chromium itself; the page shows it in words.
      if (message.type() === 'error' && !message.text().startsWith('Failed to load resource'))
        this.errors.push(message.text());
    });
  }

  static async desktop(browser: Browser): Promise<Visitor> {
    const context = await browser.createBrowserContext();
    const page = await context.newPage();
    await page.setViewport({ width: 1440, height: 900 });
    return new Visitor(page, context);
  }

  static async phone(browser: Browser, { width = 360, height = 740 } = {}): Promise<Visitor> {
    const context = await browser.createBrowserContext();
    const page = await context.newPage();
    await page.setViewport({ width, height, isMobile: true, hasTouch: true, deviceScaleFactor: 2 });
    return new Visitor(page, context);
  }

  async go(url: string): Promise<void> {
    await this.page.goto(url, { waitUntil: 'networkidle2' });
  }

  /** Clicks what has this role and accessible name. */
  async click(name: string, role = 'button'): Promise<void> {
    await this.page.locator(`::-p-aria([name="${name}"][role="${role}"])`).click();
  }

  async fill(label: string, value: string): Promise<void> {
    await this.page.locator(`::-p-aria([name="${label}"])`).fill(value);
  }

  /** Waits until the page says this, anywhere. */
  async sees(text: string | RegExp, timeout = 15_000): Promise<void> {
    const source = typeof text === 'string' ? text.replace(/[.*+?^${}()|[\]\\]/g, '\\$&') : text.source;
    await this.page
      .waitForFunction(
        (pattern) => new RegExp(pattern, 'i').test(document.body.innerText),
        { timeout },
        source,
      )
      .catch(async () => {
        const shown = await this.page.evaluate(() => document.body.innerText.slice(-1800));
        throw new Error(`Waited in vain for "${source}" at ${this.page.url()}. The page says:\n${shown}`);
      });
  }

  text(): Promise<string> {
    return this.page.evaluate(() => document.body.innerText);
  }

  /** Violations of WCAG 2.2 A and AA that axe finds, in words. */
  async axe(): Promise<string[]> {
    await this.page.evaluate(await readFile(require.resolve('axe-core/axe.min.js'), 'utf8'));
    return this.page.evaluate(async () => {
      const { axe } = window as unknown as {
        axe: {
          run: (options: unknown) => Promise<{ violations: { id: string; nodes: { html: string }[] }[] }>;
        };
      };
      const { violations } = await axe.run({
        runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'],
      });
      return violations.map(
        ({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 160)).join(' | ')}`,
      );
    });
  }

  /** Whether the page scrolls sideways, which a phone must not. */
  overflows(): Promise<boolean> {
    return this.page.evaluate(
      () => document.documentElement.scrollWidth > document.documentElement.clientWidth + 1,
    );
  }

  async close(): Promise<void> {
    await this.context.close();
  }
}
