import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { newId } from '#shared/kernel/ids.ts';
import type { Session } from '#shared/account/account.api.ts';
import type { Role } from '#shared/kernel/roles.ts';
import type { Talk } from '#shared/talks/talks.api.ts';
import { sessionQuery } from '../../../src/app/session.queries.ts';
import { TalkPage } from '../../../src/talks/TalkPage.tsx';
import { talkQuery } from '../../../src/talks/talks.queries.ts';

const siteId = newId();
const orgId = newId();
const realFetch = globalThis.fetch;
let talk: Talk;
let sent: { path: string; method: string; body: { lockVersion: number; topic?: string } }[];

/** The network's far end: one talk under a lock version, as the server keeps it. */
function answer(path: string, method: string, body: { lockVersion: number; topic?: string }): Response {
  const problem = (status: number, extra: object) =>
    Response.json(
      { type: 'about:blank', title: 'No', status, detail: 'Somebody saved this talk meanwhile.', ...extra },
      { status },
    );
  if (path.startsWith('/api/sites?'))
    return Response.json({
      sites: [
        {
          id: siteId,
          name: 'Lot 12',
          address: 'Lot 12',
          timeZone: talk.timeZone,
          principalContractor: '',
          emergency: '',
          signToken: 'a'.repeat(20),
          crew: 2,
          archivedAt: null,
        },
      ],
    });
  if (path !== `/api/talks/${talk.id}`) return problem(404, { code: 'missing' });
  if (method === 'GET') return Response.json(talk);
  sent.push({ path, method, body });
  if (body.lockVersion !== talk.lockVersion) return problem(409, { code: 'conflict', extra: { talk } });
  talk = { ...talk, ...body, lockVersion: talk.lockVersion + 1 };
  return Response.json(talk);
}

beforeEach(() => {
  sent = [];
  talk = {
    id: newId(),
    siteId,
    site: 'Lot 12',
    timeZone: 'Australia/Adelaide',
    topic: 'Leads',
    presenter: 'Lou Karsten',
    date: '2026-12-01',
    time: '06:45',
    minutes: 10,
    place: 'Shed',
    points: ['Hang the leads.'],
    mattersRaised: '',
    outcome: '',
    representativePresent: false,
    actions: [],
    state: 'open',
    lockVersion: 3,
    consultation: false,
    attendance: [],
    missing: [{ personId: newId(), name: 'Kit Ambrose', employer: 'Southern Frames' }],
    closedAt: null,
    closedBy: null,
    hash: null,
    ledgerSequence: null,
  };
  globalThis.fetch = async (input, init) =>
    answer(input as string, init?.method ?? 'GET', init?.body ? JSON.parse(init.body as string) : {});
});
afterEach(() => {
  globalThis.fetch = realFetch;
});

async function open(role: Role = 'supervisor') {
  const client = new QueryClient({ defaultOptions: { queries: { retry: false } } });
  const session: Session = {
    account: { id: newId(), email: 'lou@southern.example', name: 'Lou Karsten' },
    role,
    personId: null,
    organisation: {
      id: orgId,
      name: 'Ridgeline',
      timeZone: 'Australia/Adelaide',
      profile: 'au-model',
      matrix: {} as Session['organisation']['matrix'],
      invented: true,
    },
    memberships: [],
    outbox: false,
  };
  client.setQueryData(sessionQuery.queryKey, session);
  const router = createMemoryRouter([{ path: '/talks/:id', Component: TalkPage }], {
    initialEntries: [`/talks/${talk.id}`],
  });
  render(
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  await screen.findByRole('heading', { level: 1, name: 'Leads' });
  return client;
}

const write = async (label: string, words: string) => {
  await userEvent.clear(screen.getByLabelText(label));
  await userEvent.type(screen.getByLabelText(label), words);
};
const press = (name: string) => userEvent.click(screen.getByRole('button', { name }));

test('a supervisor changes an open talk and sees that it is saved', async () => {
  await open();
  await write('Topic', 'Leads and steel');
  expect(screen.getByText('Not saved yet')).toBeVisible();

  await press('Save');

  expect(await screen.findByText(/^Saved \d\d:\d\d$/)).toBeVisible();
  expect(sent[0]?.body).toMatchObject({
    topic: 'Leads and steel',
    lockVersion: 3,
    points: ['Hang the leads.'],
  });
});

test('a stale save keeps what was typed, shows what the other saved, and goes through once the supervisor keeps theirs or mine', async () => {
  await open();
  await write('Topic', 'Mine');
  talk = { ...talk, topic: 'Theirs', lockVersion: 4 };

  await press('Save');

  expect(await screen.findByText('Theirs')).toBeVisible();
  expect(screen.getByLabelText('Topic')).toHaveValue('Mine');
  await press('Keep mine, then save over theirs');
  await press('Save');
  expect(await screen.findByText(/^Saved /)).toBeVisible();
  expect(sent.map(({ body }) => body.lockVersion)).toEqual([3, 4]);
  expect(talk.topic).toBe('Mine');
});

test('a supervisor who takes the other’s version sees it in the form', async () => {
  await open();
  await write('Topic', 'Mine');
  talk = { ...talk, topic: 'Theirs', lockVersion: 4 };
  await press('Save');
  await screen.findByText('Theirs');

  await press('Take theirs');

  expect(screen.getByLabelText('Topic')).toHaveValue('Theirs');
});

test('words that were typed when somebody else closed the talk are still shown', async () => {
  const client = await open();
  await write('Outcome', 'A second ladder goes up');
  talk = {
    ...talk,
    state: 'closed',
    closedAt: '2026-11-30T20:30:00Z',
    closedBy: 'Ama Birdsall',
    hash: 'f'.repeat(64),
    ledgerSequence: 12,
  };

  await client.refetchQueries({ queryKey: talkQuery(talk.id).queryKey });

  expect(await screen.findByText('A second ladder goes up')).toBeVisible();
  expect(screen.getByText(/Somebody else closed this talk/)).toBeVisible();
  expect(screen.getByText('f'.repeat(64))).toBeVisible();
});

test('a talk with unsaved words is not closed: they are to be saved first', async () => {
  await open();
  await write('Outcome', 'Decided');

  await press('Close the talk');

  expect(await screen.findByRole('dialog')).toHaveTextContent('closes with what is saved');
  await press('Back to the talk');
  expect(screen.getByLabelText('Outcome')).toHaveValue('Decided');
  expect(sent).toHaveLength(0);
});

test('before a talk closes it is said what freezes, who has not signed, and that it is a briefing', async () => {
  await open();

  await press('Close the talk');

  const dialog = await screen.findByRole('dialog');
  expect(dialog).toHaveTextContent('freeze and go into the ledger');
  expect(dialog).toHaveTextContent('1 of 1 has not signed: Kit Ambrose');
  expect(dialog).toHaveTextContent('briefing only, not counted as consultation');
});

test('a talk without a topic is refused beside the field and nothing is sent', async () => {
  await open();
  await userEvent.clear(screen.getByLabelText('Topic'));

  await press('Save');

  expect((await screen.findAllByText('Write the topic.')).length).toBeGreaterThan(0);
  expect(sent).toHaveLength(0);
});

test('an administrator reads an open talk and finds nothing to write in', async () => {
  await open('administrator');

  expect(screen.queryByRole('button', { name: 'Save' })).toBeNull();
  expect(screen.getByText(/Briefing only, not counted as consultation/)).toBeVisible();
});
