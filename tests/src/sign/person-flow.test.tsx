import { render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, expect, test } from 'vitest';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { Reading, ToSign } from '#shared/signons/signons.api.ts';
import { memoryStore } from '../../../src/sign/outbox-store.ts';
import { createOutbox, type Outgoing, type Send } from '../../../src/sign/outbox.ts';
import { PersonFlow } from '../../../src/sign/PersonFlow.tsx';
import type { SignApi } from '../../../src/sign/sign-api.ts';

const hash = 'a'.repeat(64);
const declaration = {
  id: 'au-statement',
  version: 1,
  language: 'en' as const,
  words: ['I read it.', 'I agree.'],
};

const reading: Reading = {
  revisionId: 'revision-2',
  statementId: 'statement-1',
  number: 2,
  hash,
  title: 'Trusses at lot 12',
  documentTitle: 'Safe work method statement',
  site: 'Lot 12',
  standing: 'current',
  job: 'Stand 24 trusses.',
  emergency: 'Call 000.',
  responsible: 'Lou Karsten',
  cards: [
    {
      stepId: 'one',
      number: 1,
      title: 'Lift the trusses',
      words: ['Keep out from under.'],
      hurts: ['A truss that drops'],
      controls: ['First', 'Second', 'Third', 'Fourth', 'Fifth'].map((text) => ({
        text,
        level: 'engineering',
        role: '',
      })),
      stopIf: ['Wind over 30 km/h'],
      holdPoints: ['Bracing checked'],
      protective: ['Helmet'],
    },
  ],
  questions: [
    {
      id: 'one.0',
      stepId: 'one',
      ask: 'When do we stop?',
      answers: ['Never', 'Wind over 30 km/h'],
      right: 1,
      why: 'A truss is a sail.',
    },
  ],
  declaration,
  caution: 'Local law comes first.',
};

const toSign: ToSign = {
  person: { id: 'kit', name: 'Kit Ambrose', employer: 'Southern Frames' },
  site: { id: 'site', name: 'Lot 12', timeZone: 'Australia/Adelaide' },
  organisation: 'Ridgeline',
  statements: [
    {
      revisionId: 'revision-2',
      statementId: 'statement-1',
      title: 'Trusses at lot 12',
      number: 2,
      issuedAt: '2026-12-01T00:00:00Z',
      standing: 'older',
      signedAt: '2026-11-20T00:00:00Z',
      changeNote: 'The crane stands on the north side.',
    },
  ],
  talks: [
    {
      id: 'talk',
      topic: 'Leads and steel',
      date: '2026-12-01',
      time: '06:45',
      place: 'Shed',
      presenter: 'Lou Karsten',
      points: ['Hang the leads.'],
      attended: false,
    },
  ],
  talkDeclaration: { ...declaration, id: 'au-talk', words: ['I was at “{{topic}}” on {{date}}.'] },
};

function place(send: Send, changes: Partial<SignApi> = {}) {
  const outbox = createOutbox({ store: memoryStore(), send, maySend: () => true });
  const api: SignApi = {
    toSign: async () => toSign,
    reading: async () => reading,
    carrier: { kind: 'account', accountId: 'a', orgId: 'o', siteId: 'site', personId: 'kit' },
    outbox,
    ...changes,
  };
  return { outbox, view: render(<PersonFlow api={api} />) };
}

const answered: Send = async ({ id }) => ({ id, receivedAt: '2026-12-01T19:44:00Z', superseded: false });
const press = (name: RegExp | string) => userEvent.click(screen.getByRole('button', { name }));

async function signTyped() {
  await press(/type my name/);
  await userEvent.type(screen.getByLabelText(/typed as your signature/), 'Kit Ambrose');
  await userEvent.type(screen.getByLabelText('Name of the witness'), 'Lou Karsten');
  await press('Sign');
}

// jsdom has no layout to scroll.
Element.prototype.scrollIntoView = () => undefined;

beforeEach(() => localStorage.clear());

test('a worker reads what changed, the cards, answers, signs typed, and holds the receipt with the site’s time', async () => {
  const sent: Outgoing[] = [];
  place(async (outgoing) => {
    sent.push(outgoing);
    return { id: outgoing.id, receivedAt: '2026-12-01T19:44:00Z', superseded: false };
  });

  await userEvent.click(await screen.findByRole('button', { name: /Read and sign again/ }));
  expect(await screen.findByText('The crane stands on the north side.')).toBeVisible();
  await press('Next');
  expect(screen.getByRole('heading', { name: 'Lift the trusses' })).toHaveFocus();
  expect(screen.getByText('Step 1 of 1')).toBeVisible();
  await press('Answer 1 question');
  await press('Never');
  expect(screen.getByText('A truss is a sail.')).toBeVisible();
  expect(screen.getByRole('button', { name: 'Next' })).toBeDisabled();
  await press('Wind over 30 km/h');
  await press('Next');
  expect(screen.getByText('I agree.')).toBeVisible();
  await signTyped();

  // 19:44 UTC is 06:14 the next morning in Adelaide, in summer.
  expect(await screen.findByText('Sent 06:14')).toBeVisible();
  expect(sent).toHaveLength(1);
  expect(sent[0]?.signed).toMatchObject({
    kind: 'signOn',
    body: {
      revisionId: 'revision-2',
      revisionHash: hash,
      answers: [{ question: 'one.0', tries: [0, 1] }],
      signature: { method: 'typed', typedName: 'Kit Ambrose', witness: 'Lou Karsten' },
    },
  });
});

test('a card shows the first four controls and all the others one tap away', async () => {
  place(answered);
  await userEvent.click(await screen.findByRole('button', { name: /Read and sign again/ }));
  await press('Next');
  expect(screen.queryByText('Fifth')).toBeNull();

  await press('Show 1 more');

  expect(screen.getByText('Fifth')).toBeVisible();
});

test('the arrow keys turn the cards, and a page that is opened anew opens where it was left', async () => {
  const { view } = place(answered);
  await userEvent.click(await screen.findByRole('button', { name: /Read and sign again/ }));
  await screen.findByText('Before the step');
  await userEvent.keyboard('{ArrowRight}');
  expect(screen.getByText('Step 1 of 1')).toBeVisible();
  view.unmount();

  place(answered);
  await userEvent.click(await screen.findByRole('button', { name: /Read and sign again/ }));

  expect(await screen.findByText('Step 1 of 1')).toBeVisible();
  await userEvent.keyboard('{ArrowLeft}');
  expect(screen.getByText('Before the step')).toBeVisible();
});

test('an empty box is refused in words beside it, and nothing is sent', async () => {
  const { outbox } = place(answered);
  await userEvent.click(await screen.findByRole('button', { name: /Sign that you were there/ }));
  expect(screen.getByText('I was at “Leads and steel” on Tue 1 Dec 2026.')).toBeVisible();

  await press('Sign');

  expect(screen.getByText('Sign in the box first.')).toBeVisible();
  expect(outbox.list()).toHaveLength(0);
});

test('a witness can’t be the signer', async () => {
  const { outbox } = place(answered);
  await userEvent.click(await screen.findByRole('button', { name: /Sign that you were there/ }));
  await press(/type my name/);
  await userEvent.type(screen.getByLabelText(/typed as your signature/), 'Kit Ambrose');
  await userEvent.type(screen.getByLabelText('Name of the witness'), 'kit ambrose');

  await press('Sign');

  expect(screen.getByText('The witness is somebody else than the signer.')).toBeVisible();
  expect(outbox.list()).toHaveLength(0);
});

test('without signal a signature is kept, said so, counts as signed on the list, and is sent when signal is back', async () => {
  let signal = false;
  const { outbox } = place(async (outgoing) => {
    if (!signal) throw new Refusal('offline', 'No signal.');
    return answered(outgoing);
  });
  await userEvent.click(await screen.findByRole('button', { name: /Sign that you were there/ }));
  await signTyped();
  expect(await screen.findByText(/Not sent yet/)).toBeVisible();

  await press('Next: Trusses at lot 12');
  expect(await screen.findByText('Before the step')).toBeVisible();
  await press('Back');
  const signed = within(
    (await screen.findByRole('heading', { name: 'Signed' })).parentElement as HTMLElement,
  );
  expect(signed.getByText('Leads and steel')).toBeVisible();

  signal = true;
  await outbox.flush();
  await waitFor(() => expect(screen.getByText('Sent 06:14')).toBeVisible());
});

test('a signature for a revision that was superseded meanwhile says so and leads to the new one', async () => {
  place(async ({ id }) => ({ id, receivedAt: '2026-12-01T19:44:00Z', superseded: true }));
  await userEvent.click(await screen.findByRole('button', { name: /Sign that you were there/ }));
  await signTyped();

  expect(await screen.findByText(/A newer revision was issued/)).toBeVisible();
  expect(screen.getByRole('button', { name: 'Read the new revision' })).toBeVisible();
});

test('a list that can’t be fetched says why and offers another try', async () => {
  let signal = false;
  place(answered, {
    toSign: async () => {
      if (!signal) throw new Refusal('offline', 'No signal.');
      return toSign;
    },
  });
  expect(await screen.findByRole('heading', { name: 'No signal' })).toBeVisible();

  signal = true;
  await press('Try again');

  expect(await screen.findByRole('heading', { name: 'Kit Ambrose, 2 things to sign' })).toBeVisible();
});

test('nothing to sign is said in words', async () => {
  place(answered, { toSign: async () => ({ ...toSign, statements: [], talks: [] }) });

  expect(await screen.findByText(/No statement is in force for this site/)).toBeVisible();
});
