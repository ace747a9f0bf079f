import { constants } from 'node:fs';
import { access, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { delimiter, join } from 'node:path';
import { type Browser, launch } from 'puppeteer-core';
import { Refusal } from '#shared/kernel/refusal.ts';

const names = ['chromium', 'chromium-browser', 'google-chrome-stable', 'google-chrome'];

/** Where Chromium is: the given path, else the first of its usual names along PATH; null where there is none. */
export async function findBrowser(given: string | undefined, path: string): Promise<string | null> {
  const candidates = given
    ? [given]
    : path.split(delimiter).flatMap((folder) => names.map((name) => join(folder, name)));
  for (const candidate of candidates) {
    const usable = await access(candidate, constants.X_OK).then(
      () => true,
      () => false,
    );
    if (usable) return candidate;
  }
  return null;
}

export type PdfPage = { html: string; footerHtml: string };

/** Makes PDFs of pages of our own. One browser is kept alive; pages are printed one at a time. */
export type PrintService = {
  available: boolean;
  pdf: (page: PdfPage) => Promise<Buffer>;
  close: () => Promise<void>;
};

const flags = [
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--disable-dev-shm-usage',
];

/** `executable` null gives a service that refuses, so that the screen can offer the browser's own print. */
export function createPrintService(executable: string | null): PrintService {
  let browser: Promise<Browser> | null = null;
  let profile: string | null = null;
  let queue: Promise<unknown> = Promise.resolve();

  async function start(): Promise<Browser> {
    profile = await mkdtemp(join(tmpdir(), 'toeboard-print-'));
    // Chromium refuses to run as root inside its sandbox; the page has no script, no network and only our own HTML.
    const asRoot = process.getuid?.() === 0 ? ['--no-sandbox'] : [];
    const started = await launch({
      executablePath: executable ?? '',
      args: [...flags, ...asRoot],
      userDataDir: profile,
    });
    started.on('disconnected', () => (browser = null));
    return started;
  }

  async function print({ html, footerHtml }: PdfPage): Promise<Buffer> {
    browser ??= start().catch((error: unknown) => {
      browser = null;
      throw error;
    });
    const page = await (await browser).newPage();
    try {
      await page.setJavaScriptEnabled(false);
      await page.setRequestInterception(true);
      page.on('request', (request) => {
        const allowed = request.url().startsWith('data:') || request.url() === 'about:blank';
        void (allowed ? request.continue() : request.abort());
      });
      await page.setContent(html, { waitUntil: 'load' });
      const pdf = await page.pdf({
        preferCSSPageSize: true,
        printBackground: true,
        displayHeaderFooter: true,
        headerTemplate: '<span></span>',
        footerTemplate: footerHtml,
        tagged: true,
        outline: true,
      });
      return Buffer.from(pdf);
    } finally {
      await page.close();
    }
  }

  return {
    available: executable !== null,
    pdf(page) {
      if (executable === null)
        return Promise.reject(
          new Refusal(
            'unavailable',
            'This server has no browser to make a PDF with. Print the page from your own browser instead.',
          ),
        );
      const next = queue.then(() => print(page));
      queue = next.catch(() => undefined);
      return next;
    },
    async close() {
      await queue;
      await (await browser?.catch(() => null))?.close();
      if (profile) await rm(profile, { recursive: true, force: true });
    },
  };
}
