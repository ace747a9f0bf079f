import type { Visitor } from './browser.ts';

/** Walks the sign-on page as somebody who is new on this phone, up to the list of what is to be signed. */
export async function enrolAs(phone: Visitor, dayCode: string, name: string): Promise<void> {
  await phone.click('I have read this, go on');
  await phone.sees('Who are you');
  await phone.page.type('#name', name);
  await phone.page.type('#day-code', dayCode);
  await phone.click('Find me');
  await phone.sees('Which one is you');
  const own = await phone.page.waitForSelector(`li button ::-p-text(${name})`);
  await own?.click();
  await phone.sees('to sign');
}

/** Reads every card, answers every question and signs, until a screen says "Signed" and its word is that it was sent. */
export async function signEverything(visitor: Visitor): Promise<void> {
  const { page } = visitor;
  for (let guard = 0; guard < 120; guard += 1) {
    const screen = await page.evaluate(() => {
      const heading =
        document.querySelector('[data-scroll-frame] h1, [role="dialog"] h1')?.textContent ??
        document.querySelector('main h1, h1')?.textContent ??
        '';
      return {
        heading,
        signed: heading === 'Signed',
        canvas: document.querySelector('canvas') !== null,
        answers: document.querySelector('[aria-label="Answers"]') !== null,
      };
    });
    if (screen.signed) {
      await visitor.sees(/sent \d\d:\d\d/);
      await press(visitor, ['Next person', 'Back to the list', 'Next']);
      return;
    }
    if (screen.canvas) await drawAndSign(visitor);
    else if (screen.answers) await answer(visitor);
    else
      await press(visitor, [
        'Read and sign',
        'Sign that you were there',
        'Start',
        'Next',
        'Begin',
        'Go on',
        'Answer',
        'To the',
        'Sign',
      ]);
  }
  throw new Error(`The signing never ended. The page says:\n${(await visitor.text()).slice(0, 1500)}`);
}

/** Presses the first button whose words begin with one of these, once it is there. */
async function press(visitor: Visitor, words: string[]): Promise<void> {
  const handle = await visitor.page
    .waitForFunction(
      (starts) =>
        [...document.querySelectorAll<HTMLButtonElement>('button')].find(
          (button) =>
            !button.disabled &&
            button.offsetParent !== null &&
            starts.some((start) => button.innerText.trim().startsWith(start)),
        ) ?? false,
      { timeout: 10_000 },
      words,
    )
    .catch(async () => {
      throw new Error(
        `None of ${words.join(', ')} is there. The page says:\n${(await visitor.text()).slice(0, 1500)}`,
      );
    });
  await (handle as unknown as { click: () => Promise<void> }).click();
  await new Promise((resolve) => setTimeout(resolve, 60));
}

/** Tries the answers in turn: a wrong one is explained and asked again. */
async function answer({ page }: Visitor): Promise<void> {
  const count = await page.$$eval('[aria-label="Answers"] button', (buttons) => buttons.length);
  for (let index = 0; index < count; index += 1) {
    if (await page.evaluate(() => document.body.innerText.includes('Right.'))) break;
    await (await page.$$('[aria-label="Answers"] button'))[index]?.click();
    await new Promise((resolve) => setTimeout(resolve, 60));
  }
  const next = await page.waitForSelector('button:not([disabled]) ::-p-text(Next)');
  await next?.click();
  await new Promise((resolve) => setTimeout(resolve, 60));
}

async function drawAndSign(visitor: Visitor): Promise<void> {
  const { page } = visitor;
  const canvas = await page.waitForSelector('canvas');
  await canvas?.scrollIntoView();
  await new Promise((resolve) => setTimeout(resolve, 150));
  const box = await canvas?.boundingBox();
  if (!box) throw new Error('There is no box to sign in.');
  await page.mouse.move(box.x + 30, box.y + box.height / 2);
  await page.mouse.down();
  for (let at = 1; at <= 24; at += 1)
    await page.mouse.move(box.x + 30 + at * 7, box.y + box.height / 2 + Math.sin(at) * 24);
  await page.mouse.up();
  const sign = await page.waitForSelector('::-p-aria([name="Sign"][role="button"])');
  await sign?.click();
  await visitor.page.waitForFunction(() => document.querySelector('canvas') === null);
}
