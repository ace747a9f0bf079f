import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { type RunningApp, startApp } from './support/app.ts';
import { openBrowser, type TestBrowser, Visitor } from './support/browser.ts';
import { enrolAs, signEverything } from './support/signing.ts';

/** The whole job, as people do it: write, issue, sign on two phones, read the register, print, hold a talk. */

let app: RunningApp;
let chromium: TestBrowser;
let supervisor: Visitor;
let officer: Visitor;

beforeAll(async () => {
  app = await startApp();
  chromium = await openBrowser();
  supervisor = await Visitor.desktop(chromium.browser);
  officer = await Visitor.desktop(chromium.browser);
});

afterAll(async () => {
  await chromium.close();
  await app.discard();
});

const title = 'Roof trusses by crane, stage 2';
let statementPath = '';
let steps: string[] = [];

async function signIn(visitor: Visitor, role: string) {
  const account = app.signIns.find((candidate) => candidate.role === role);
  await visitor.go(`${app.url}/sign-in`);
  await visitor.fill('E-mail', account?.email ?? '');
  await visitor.fill('Password', account?.password ?? '');
  await visitor.click('Sign in');
  await visitor.page.waitForFunction(() => !location.pathname.startsWith('/sign-in'));
}

test('a supervisor signs in and starts a statement from a starter', async () => {
  await signIn(supervisor, 'supervisor');
  await supervisor.sees('Drafts that wait');
  await supervisor.click('New statement', 'link');
  await supervisor.sees('Begin from');
  const { page } = supervisor;
  await page.waitForSelector('select[name="siteId"]');
  await page.select('select[name="siteId"]', await optionOf('Old Quarry Road, stage 2', 'siteId'));
  await page.select('select[name="starterId"]', await optionOf('Roof trusses by crane', 'starterId'));
  await supervisor.fill('Title', title);
  await supervisor.click('Start writing');

  await supervisor.sees('fill-ins open');
  await supervisor.sees('Walk the site');
  statementPath = new URL(page.url()).pathname;

  async function optionOf(label: string, name: string): Promise<string> {
    return page.$eval(
      `select[name="${name}"]`,
      (select, wanted) => [...select.options].find(({ text }) => text === wanted)?.value ?? '',
      label,
    );
  }
});

test('a block is put in by typing a slash, and undo takes it out again', async () => {
  const { page } = supervisor;
  const stepCount = () => page.$$eval('[data-node="step"]', (nodes) => nodes.length);
  const before = await stepCount();
  const last = (await page.$$('[data-node="stepTitle"]')).at(-1);
  await last?.scrollIntoView();
  await last?.click();
  await page.keyboard.press('End');
  await page.keyboard.press('Enter');
  await page.keyboard.type('/noise', { delay: 30 });
  await supervisor.sees('Block:');
  await page.keyboard.press('Enter');
  await page.waitForFunction(
    (count) => document.querySelectorAll('[data-node="step"]').length > count,
    {},
    before,
  );

  await page.keyboard.down('Control');
  await page.keyboard.press('z');
  await page.keyboard.up('Control');
  await page.waitForFunction(
    (count) => document.querySelectorAll('[data-node="step"]').length === count,
    {},
    before,
  );
});

test('a step of one’s own is written from the keyboard', async () => {
  const { page } = supervisor;
  await page.keyboard.down('Control');
  await page.keyboard.press('Enter');
  await page.keyboard.up('Control');
  await page.keyboard.type('Sweep the slab');
  await supervisor.click('Hazard');
  await page.keyboard.type('Screws underfoot');
  await page.keyboard.press('Enter');
  await page.keyboard.type('Magnet broom before knock-off');

  const own = await page.$$eval('[data-node="step"]', (nodes) =>
    nodes.map((node) => node.textContent).filter((text) => text.includes('Sweep the slab')),
  );
  expect(own).toHaveLength(1);
  expect(own[0]).toContain('Screws underfoot');
  expect(own[0]).toContain('Magnet broom before knock-off');
  // Rated in place, in the words of the organisation's matrix.
  for (const name of ['Control']) await supervisor.sees(name);
  await page.$$eval('[data-node="hazardTitle"]', (nodes) => {
    const node = nodes.find(({ textContent }) => textContent.includes('Screws underfoot'));
    node?.scrollIntoView({ block: 'center' });
  });
  await (await page.$('::-p-text(Screws underfoot)'))?.click();
  await supervisor.sees('Before controls');
  for (const [index, value] of ['C', '2', 'E', '2'].entries()) {
    const selects = await page.$$('.inspector select');
    const visible = [];
    for (const select of selects) if (await select.isVisible()) visible.push(select);
    await visible[index]?.select(value);
  }
  await supervisor.sees(/Low\s*E2/);
});

test('the particulars and every fill-in are filled, the fill-ins by keyboard alone', async () => {
  const { page } = supervisor;
  const fields: Record<string, string> = {
    job: 'Stand and brace the trusses of stage 2.',
    circumstances: 'Steep drive, water tank by the gate, creek to the east.',
    responsible: 'Sina Vakalahi, supervisor',
    implementation: 'Walked with the crew before the first lift.',
    monitoring: 'Leading hand after every third truss.',
    review: 'Each evening, and at once after any incident.',
    emergency: 'Rescue kit on the deck; two trained people on site.',
  };
  for (const [name, value] of Object.entries(fields)) {
    const field = await page.waitForSelector(`[data-field="${name}"] :is(input, textarea)`);
    await field?.focus();
    await page.keyboard.type(value);
  }
  const open = await page.waitForSelector('::-p-text(fill-ins open)');
  await open?.click();
  for (let guard = 0; guard < 80; guard += 1) {
    const done = await page.evaluate(() => document.body.innerText.includes('Every fill-in is filled'));
    if (done) break;
    const field = await visibleField();
    const isSelect = await field.evaluate((element) => element.tagName === 'SELECT');
    if (isSelect)
      await field.select(
        await field.evaluate((element) => (element as unknown as HTMLSelectElement).options[1]?.value ?? ''),
      );
    else
      await page.keyboard.type(
        await field.evaluate((element) =>
          (element as HTMLInputElement).inputMode === 'decimal' ? '12' : 'As drawn',
        ),
      );
    await page.keyboard.press('Enter');
  }
  await supervisor.sees('Every fill-in is filled');
  await supervisor.sees('Nothing stops the issue');
  await supervisor.sees(/Saved \d\d:\d\d/);
  steps = await page.$$eval('[data-node="stepTitle"]', (nodes) =>
    nodes.map(({ textContent }) => textContent.trim()),
  );
  expect(steps.length).toBeGreaterThan(10);

  async function visibleField() {
    for (const field of await page.$$('.inspector :is(input, select)'))
      if (await field.isVisible()) return field;
    throw new Error('No fill-in is open for typing.');
  }
});

test('it is submitted, and the safety officer issues it', async () => {
  await supervisor.click('Submit');
  await supervisor.sees('Submitted by');
  await signIn(officer, 'safetyOfficer');
  await officer.sees('Exceptions');
  await officer.go(app.url + statementPath);
  await officer.click('Issue');
  await officer.click('Issue revision 1');

  await officer.sees('Revision 1 is in force');
});

test('a worker signs on their own phone with the day code', async () => {
  await supervisor.go(`${app.url}/sites`);
  await supervisor.click('Old Quarry Road, stage 2', 'link');
  await supervisor.sees('Code for');
  const address = await supervisor.page.$eval('a[href*="/s/"]', (link) => link.href);
  const code = /(?:Code for [^\n]*\n+)(\d{4})/.exec(await supervisor.text())?.[1] ?? '';
  const phone = await Visitor.phone(chromium.browser);
  await phone.go(address);
  await enrolAs(phone, code, 'Lena');

  await signEverything(phone);

  await phone.sees('sent');
  expect(await phone.overflows()).toBe(false);
  expect(phone.errors).toEqual([]);
  await phone.close();
});

test('another signs on the supervisor’s device, handed round', async () => {
  const handed = await Visitor.phone(chromium.browser);
  await signIn(handed, 'supervisor');
  const sitePath = new URL(supervisor.page.url()).pathname;
  await handed.go(`${app.url}${sitePath}/hand-round`);
  await handed.sees('Wes Thackeray');
  await clickText(handed, 'Wes Thackeray');

  await signEverything(handed);

  expect(handed.errors).toEqual([]);
  await handed.close();
});

test('the register shows two of the crew, and the CSV says the same', async () => {
  await officer.go(`${app.url}/register?statementId=${statementPath.split('/').at(-1)}`);

  await officer.sees(/2 of \d/);
  await officer.sees('Lena Okafor');
  const csv = await officer.page.evaluate(
    async (id) => (await fetch(`/api/register.csv?statementId=${id}&status=current`)).text(),
    statementPath.split('/').at(-1),
  );
  expect(csv.split('\r\n').filter((line) => line.includes('Signed the current revision'))).toHaveLength(2);
});

test('the PDF holds every step and both signers, read by an independent reader', async () => {
  const bytes = await officer.page.evaluate(async (path) => {
    const response = await fetch(`/api${path}/revisions/1/sheet.pdf`);
    return [
      response.status,
      response.headers.get('content-type'),
      [...new Uint8Array(await response.arrayBuffer())],
    ] as const;
  }, statementPath);

  expect(bytes[0]).toBe(200);
  expect(bytes[1]).toBe('application/pdf');
  const text = await textOfPdf(Uint8Array.from(bytes[2]));
  for (const step of steps) expect(text).toContain(squeezed(step));
  expect(text).toContain(squeezed('Lena Okafor'));
  expect(text).toContain(squeezed('Wes Thackeray'));
});

test('a talk is held with three of the crew and stands in the register of talks', async () => {
  await supervisor.go(`${app.url}/talks/new`);
  await supervisor.sees('Topic');
  const { page } = supervisor;
  await supervisor.fill('Topic', 'The wind number');
  const site = await page.$$eval(
    'select option',
    (options) => options.find(({ textContent }) => textContent === 'Old Quarry Road, stage 2')?.value ?? '',
  );
  await page.select('form select', site);
  await supervisor.fill('Place', 'Site office');
  await supervisor.click('Save the talk');
  await supervisor.sees('Hand the device round');
  const talkPath = new URL(page.url()).pathname;
  await supervisor.click('Hand the device round', 'link');
  await supervisor.sees('0 of 5 have signed the talk');
  for (const name of ['Imran Sheikh', 'Lena Okafor', 'Wes Thackeray']) {
    await clickText(supervisor, name);
    await signEverything(supervisor);
  }
  await supervisor.go(app.url + talkPath);
  await supervisor.click('Close the talk');
  await supervisor.page.locator('::-p-aria([name="Close the talk"][role="button"])').wait();
  await (
    await page.waitForSelector('[role="dialog"] ::-p-aria([name="Close the talk"][role="button"])')
  )?.click();
  await supervisor.sees(/closed/);

  await supervisor.go(`${app.url}/talks`);
  await supervisor.sees('The wind number');
  await supervisor.sees(/3 of 5/);
});

test('nothing went wrong in the browsers on the way', () => {
  expect([...supervisor.errors, ...officer.errors]).toEqual([]);
});

/* Steps that several tests share */

async function clickText(visitor: Visitor, text: string) {
  const found = await visitor.page.waitForSelector(`::-p-text(${text})`);
  await found?.evaluate((element) => {
    element.scrollIntoView({ block: 'center' });
    (element.closest<HTMLElement>('button, a') ?? (element as HTMLElement)).click();
  });
}

const squeezed = (text: string) => text.replace(/\s+/g, '');

async function textOfPdf(data: Uint8Array): Promise<string> {
  const pdf = await getDocument({ data, verbosity: 0 }).promise;
  let text = '';
  for (let number = 1; number <= pdf.numPages; number += 1) {
    const { items } = await (await pdf.getPage(number)).getTextContent();
    text += items.map((item) => ('str' in item ? item.str : '')).join('');
  }
  return squeezed(text);
}
