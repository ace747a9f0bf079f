import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { newId } from '#shared/kernel/ids.ts';
import { SignPage } from '../../../src/sign/SignPage.tsx';

const token = 'a'.repeat(20);
const kit = { id: newId(), name: 'Kit Ambrose', employer: 'Southern Frames' };
const employer = { id: newId(), name: 'Southern Frames' };
const realFetch = globalThis.fetch;

/** The network's far end: one site with today's code, and who this phone is tied to. */
let site: {
  there: boolean;
  signal: boolean;
  code: string;
  wrongTries: number;
  owner: typeof kit | null;
  enrolled: unknown[];
};

const problem = (status: number, code: string, detail: string, more = {}) =>
  Response.json({ type: 'about:blank', title: 'No', status, code, detail, ...more }, { status });

function answer(path: string, method: string, body: Record<string, unknown>): Response {
  if (!site.signal) throw new TypeError('Failed to fetch');
  if (!site.there) return problem(404, 'missing', 'There is no open site at this address.');
  if (path === `/api/sign/${token}`) return Response.json(opened());
  if (path === '/api/sign/device' && method === 'DELETE') {
    site.owner = null;
    return Response.json({ done: true });
  }
  if (path.endsWith('/to-sign'))
    return Response.json({
      person: kit,
      site: { id: newId(), name: 'Lot 12', timeZone: 'Australia/Adelaide' },
      organisation: 'Ridgeline',
      statements: [],
      talks: [],
      talkDeclaration: { id: 'au-talk', version: 1, language: 'en', words: [] },
    });
  if (body.dayCode !== site.code) {
    site.wrongTries += 1;
    if (site.wrongTries > 2)
      return problem(429, 'tooMany', 'Too many tries.', { extra: { retryAfterSeconds: 545 } });
    return problem(400, 'invalid', 'Not today’s.', { fields: { dayCode: 'This is not today’s code.' } });
  }
  if (path.endsWith('/find'))
    return Response.json({
      people: String(body.name).startsWith('Kit') ? [kit] : [],
      employers: [employer],
    });
  site.enrolled.push(body);
  site.owner = kit;
  return Response.json({ personId: kit.id, name: kit.name });
}

const opened = () => ({
  site: 'Lot 12',
  organisation: 'Ridgeline',
  recognised: site.owner && { personId: kit.id, name: kit.name, employer: kit.employer },
  dayCodeNeeded: site.owner === null,
  notice: { version: 1, paragraphs: ['We keep your name and your signature.'] },
  invented: true,
});

beforeEach(() => {
  localStorage.clear();
  site = { there: true, signal: true, code: '0417', wrongTries: 0, owner: null, enrolled: [] };
  globalThis.fetch = async (input, init) =>
    answer(input as string, init?.method ?? 'GET', init?.body ? JSON.parse(init.body as string) : {});
});
afterEach(() => {
  globalThis.fetch = realFetch;
});

const press = (name: string | RegExp) => userEvent.click(screen.getByRole('button', { name }));

async function find(name: string, code: string) {
  await userEvent.clear(screen.getByLabelText('Your name'));
  await userEvent.type(screen.getByLabelText('Your name'), name);
  await userEvent.clear(screen.getByLabelText('Day code'));
  await userEvent.type(screen.getByLabelText('Day code'), code);
  await press('Find me');
}

async function openToFind() {
  render(<SignPage token={token} />);
  expect(await screen.findByText('We keep your name and your signature.')).toBeVisible();
  await press('I have read this, go on');
}

test('a stranger reads the notice before anything is asked, finds themselves with the day code, and is known', async () => {
  await openToFind();
  await find('Kit', '0417');
  await userEvent.click(await screen.findByRole('button', { name: /Kit Ambrose/ }));

  expect(
    await screen.findByRole('heading', { name: 'Kit Ambrose, nothing left to sign here' }),
  ).toBeVisible();
  expect(site.enrolled).toMatchObject([{ dayCode: '0417', noticeVersion: 1, person: { existing: kit.id } }]);
});

test('a wrong day code is told beside the field and what was typed stays', async () => {
  await openToFind();
  await find('Kit', '1234');

  expect(await screen.findByText('This is not today’s code.')).toBeVisible();
  expect(screen.getByLabelText('Your name')).toHaveValue('Kit');
  expect(screen.getByLabelText('Day code')).toHaveFocus();
});

test('too many wrong codes say how long to wait, and the button waits', async () => {
  await openToFind();
  for (const code of ['1111', '2222', '3333']) await find('Kit', code);

  expect(await screen.findByText(/Too many tries. Wait 9 min 0\d s/)).toBeVisible();
  expect(screen.getByRole('button', { name: /^Wait 9 min/ })).toBeDisabled();
});

test('whoever is on no list adds themselves, and what is missing is told beside its field', async () => {
  await openToFind();
  await find('Noor Castell', '0417');
  expect(await screen.findByText('Nobody here is called “Noor Castell”')).toBeVisible();
  await press('I am not on the list');
  await press('Add me');
  expect(screen.getByText('Choose who you work for.')).toBeVisible();
  expect(screen.getByText('Write your trade.')).toBeVisible();

  await userEvent.selectOptions(screen.getByLabelText('Who you work for'), 'Southern Frames');
  await userEvent.type(screen.getByLabelText('Your trade'), 'Framer');
  await press('Add me');

  await screen.findByRole('heading', { name: /nothing left to sign here/ });
  expect(site.enrolled).toMatchObject([
    { person: { new: { name: 'Noor Castell', employerId: employer.id, trade: 'Framer' } } },
  ]);
});

test('“not me” asks first, and the phone is then known to nobody and enrols under a new id', async () => {
  await openToFind();
  await find('Kit', '0417');
  await userEvent.click(await screen.findByRole('button', { name: /Kit Ambrose/ }));
  await userEvent.click(await screen.findByRole('button', { name: 'Not me' }));
  expect(screen.getByText(/What Kit Ambrose has signed stays in the register/)).toBeVisible();
  await press('Forget this phone');

  await userEvent.click(await screen.findByRole('button', { name: 'I have read this, go on' }));
  await find('Kit', '0417');
  await userEvent.click(await screen.findByRole('button', { name: /Kit Ambrose/ }));
  await screen.findByRole('heading', { name: /nothing left to sign here/ });
  const [first, second] = site.enrolled as { deviceId: string }[];
  expect(first?.deviceId).not.toBe(second?.deviceId);
});

test('a site that is closed or unknown is told in the server’s words', async () => {
  site.there = false;
  render(<SignPage token={token} />);

  expect(await screen.findByText('There is no open site at this address.')).toBeVisible();
});

test('no signal is said in words, and another try opens the page', async () => {
  site.signal = false;
  render(<SignPage token={token} />);
  expect(await screen.findByRole('heading', { name: 'No signal' })).toBeVisible();

  site.signal = true;
  await press('Try again');

  expect(await screen.findByText('We keep your name and your signature.')).toBeVisible();
});
