import { afterAll, beforeAll, expect, test } from 'vitest';
import { type RunningApp, startApp } from './support/app.ts';
import { openBrowser, type TestBrowser, Visitor } from './support/browser.ts';

/** What goes wrong on a bad day: a session that ends, two writers, no connection, a wrong code, no browser for PDFs. Nothing is lost. */

let app: RunningApp;
let chromium: TestBrowser;
let writer: Visitor;

beforeAll(async () => {
  app = await startApp();
  chromium = await openBrowser();
  writer = await signedIn('supervisor');
});

afterAll(async () => {
  await chromium.close();
  await app.discard();
});

async function signedIn(role: string, url = app.url): Promise<Visitor> {
  const visitor = await Visitor.desktop(chromium.browser);
  const account = app.signIns.find((candidate) => candidate.role === role);
  await visitor.go(`${url}/sign-in`);
  await visitor.fill('E-mail', account?.email ?? '');
  await visitor.fill('Password', account?.password ?? '');
  await visitor.click('Sign in');
  await visitor.page.waitForFunction(() => !location.pathname.startsWith('/sign-in'));
  return visitor;
}

const passwordOf = (role: string) => app.signIns.find((candidate) => candidate.role === role)?.password ?? '';

async function openDraft(visitor: Visitor): Promise<void> {
  await visitor.go(`${app.url}/statements?state=draft`);
  await visitor.page.locator('tbody a').click();
  await visitor.page.waitForSelector('[data-field="place"] input');
}

async function write(visitor: Visitor, field: string, words: string): Promise<void> {
  const input = await visitor.page.waitForSelector(`[data-field="${field}"] :is(input, textarea)`);
  await input?.focus();
  await visitor.page.keyboard.press('End');
  await visitor.page.keyboard.type(words);
}

const stored = (visitor: Visitor, field: string) =>
  visitor.page.evaluate(async (name) => {
    const response = await fetch(`/api${location.pathname}`);
    const { document } = (await response.json()) as {
      document: { content: { attrs: Record<string, string> }[] };
    };
    return document.content[0]?.attrs[name];
  }, field);

test('a session that ends while somebody writes is signed in again in place, and the text is saved', async () => {
  await openDraft(writer);
  // As after a night: the server knows nothing of this session any more.
  await writer.page.evaluate(() =>
    fetch('/api/session/everywhere', {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'x-toeboard': '1' },
      body: '{}',
    }),
  );

  await write(writer, 'place', 'Bay two, after the session ended');
  await writer.sees('Your session has ended');
  await writer.page.type('[role="dialog"] input[type="password"]', passwordOf('supervisor'));
  await writer.page.keyboard.press('Enter');

  await writer.sees(/Saved \d\d:\d\d/);
  expect(await stored(writer, 'place')).toBe('Bay two, after the session ended');
});

test('a second writer’s save is shown as a conflict, and both texts are there to choose from', async () => {
  const other = await signedIn('administrator');
  await openDraft(other);
  await write(other, 'responsible', 'The administrator');
  await other.sees(/Saved \d\d:\d\d/);

  await write(writer, 'responsible', 'The supervisor');
  await writer.sees('Somebody else saved this draft');
  await writer.sees('Ada Quill saved it');
  expect(await stored(writer, 'responsible')).toBe('The administrator');
  await writer.click('Go on with mine');

  await writer.sees(/Saved \d\d:\d\d/);
  expect(await stored(writer, 'responsible')).toBe('The supervisor');
  await write(other, 'review', 'Each night');
  await other.sees('Somebody else saved this draft');
  await other.click('Go on with theirs');
  await other.page.waitForFunction(
    () =>
      document.querySelector<HTMLInputElement>('[data-field="responsible"] input')?.value ===
      'The supervisor',
  );
  await other.close();
});

test('without a connection the text is kept on the device, survives a reload, and is saved afterwards', async () => {
  await openDraft(writer);
  await writer.page.setOfflineMode(true);
  await write(writer, 'monitoring', 'Written with no signal');
  await writer.sees('No connection: kept on this device');

  await writer.page.setOfflineMode(false);
  // As after a flat battery: the page is opened anew before it could send anything.
  const kept = await writer.page.evaluate(
    () => Object.entries(localStorage).find(([name]) => name.startsWith('toeboard.draft'))?.[1] ?? '',
  );
  expect(kept).toContain('Written with no signal');
  await writer.sees(/Saved \d\d:\d\d/);
  expect(await stored(writer, 'monitoring')).toBe('Written with no signal');
});

test('a wrong day code is told in words, and too many of them have to wait', async () => {
  await writer.go(`${app.url}/sites`);
  await writer.page.locator('tbody a').click();
  const address = await writer.page.waitForSelector('a[href*="/s/"]');
  const phone = await Visitor.phone(chromium.browser, { width: 320, height: 568 });
  await phone.go((await address?.evaluate((link) => link.href)) ?? '');
  expect(await phone.overflows()).toBe(false);
  await phone.click('I have read this, go on');
  await phone.page.type('#name', 'Asha');
  await phone.page.type('#day-code', '0000');
  await phone.click('Find me');
  await phone.sees(/not today’s code|Which one/);
  for (let attempt = 0; attempt < 9; attempt += 1) {
    await phone.page.evaluate(async (number) => {
      const token = location.pathname.split('/').at(-1);
      await fetch(`/api/sign/${token}/find`, {
        method: 'POST',
        headers: { 'content-type': 'application/json', 'x-toeboard': '1' },
        body: JSON.stringify({ dayCode: String(9000 + number), name: 'Asha' }),
      });
    }, attempt);
  }
  await phone.go(phone.page.url());
  await phone.click('I have read this, go on');
  await phone.page.type('#name', 'Asha');
  await phone.page.type('#day-code', '0001');
  await phone.click('Find me');

  await phone.sees(/Too many tries|Wait/);
  await phone.close();
});

test('a server without a browser says so, and the print page stands in for the PDF', async () => {
  const bare = await startApp({ env: { CHROME_PATH: '/nowhere/chromium' } });
  const visitor = await signedIn('safetyOfficer', bare.url);
  await visitor.go(`${bare.url}/statements?state=issued`);
  await visitor.page.locator('tbody a').click();

  await visitor.sees('This server has no browser to make PDFs with');
  const { status, print } = await visitor.page.evaluate(async () => {
    const response = await fetch(`/api${location.pathname}/revisions/1/sheet.pdf`);
    return { status: response.status, print: `${location.pathname}/revisions/1/print` };
  });
  expect(status).toBe(503);
  await visitor.go(bare.url + print);
  await visitor.sees('Sign-on');
  await visitor.sees('Tomás Arriaga');
  await visitor.close();
  await bare.discard();
});
