import { afterAll, beforeAll, expect, test } from 'vitest';
import * as api from '#shared/account/account.api.ts';
import { listPeople } from '#shared/people/people.api.ts';
import { demoSignIns } from '../../../server/commands/demo-sign-ins.ts';
import { projectRoot } from '../../../server/library/templates.ts';
import { type DemoWorld, startDemoWorld } from '../../support/server.ts';

let world: DemoWorld;
beforeAll(async () => (world = await startDemoWorld()));
afterAll(() => world.close());

const signInOf = (role: string) => {
  const found = demoSignIns(projectRoot).find((candidate) => candidate.role === role);
  if (!found) throw new Error(role);
  return { email: found.email, password: found.password };
};

const linkIn = (text: string) => /\/reset\/(\S+)/.exec(text)?.[1] ?? '';

test('everybody of the demo signs in at the same moment, and each gets their own role', async () => {
  const roles = ['supervisor', 'safetyOfficer', 'worker', 'administrator'];

  const sessions = await Promise.all(
    [...roles, ...roles, ...roles].map((role) => world.client().call(api.signIn, { body: signInOf(role) })),
  );

  expect(sessions.map(({ role }) => role)).toEqual([...roles, ...roles, ...roles]);
});

test('an unknown address and a wrong password are refused in the same words', async () => {
  const wrong = world
    .client()
    .call(api.signIn, { body: { ...signInOf('worker'), password: 'not this one at all' } });
  const unknown = world
    .client()
    .call(api.signIn, { body: { email: 'nobody@nowhere.example', password: 'not this one at all' } });

  const messages = await Promise.all(
    [wrong, unknown].map((attempt) => attempt.then(String, (error: Error) => error.message)),
  );
  expect(new Set(messages)).toEqual(new Set(['E-mail or password is not right.']));
});

test('signing in gives a new session id', async () => {
  const client = world.client();
  await client.call(api.signIn, { body: signInOf('supervisor') });
  const first = client.cookies.get('tb_session');

  await client.call(api.signIn, { body: signInOf('supervisor') });

  expect(client.cookies.get('tb_session')).not.toBe(first);
  const planted = world.client();
  planted.cookies.set('tb_session', first ?? '');
  await expect(planted.call(api.getSession, {})).rejects.toMatchObject({ code: 'signedOut' });
});

test('after too many tries with one address even the right password has to wait, and the answer says how long', async () => {
  const email = 'throttled@nowhere.example';
  for (let attempt = 0; attempt < 8; attempt += 1)
    await world
      .client()
      .call(api.signIn, { body: { email, password: 'wrong' } })
      .catch(() => undefined);

  const response = await world.client().send(api.signIn, { body: { email, password: 'wrong' } });

  expect(response.status).toBe(429);
  expect(Number(response.headers.get('retry-after'))).toBeGreaterThan(0);
});

test('a role is refused what the table does not give it', async () => {
  const worker = await world.as('worker');

  await expect(worker.call(listPeople, {})).rejects.toMatchObject({ code: 'forbidden' });
});

test('signing out everywhere ends the other sessions too', async () => {
  const here = await world.as('administrator');
  const there = await world.as('administrator');

  await here.call(api.signOutEverywhere, { body: {} });

  await expect(there.call(api.getSession, {})).rejects.toMatchObject({ code: 'signedOut' });
});

test('a forgotten password is set by a mailed link, once, and every session ends', async () => {
  const open = await world.as('administrator');
  const visitor = world.client();
  await visitor.call(api.askPasswordReset, { body: { email: signInOf('administrator').email } });

  const mail = await waitFor(async () =>
    (await visitor.call(api.readOutbox, {})).mails.find(({ to }) => to.startsWith('ada')),
  );
  const body = { token: linkIn(mail.text), password: 'another sentence to keep' };
  await visitor.call(api.resetPassword, { body });

  await expect(open.call(api.getSession, {})).rejects.toMatchObject({ code: 'signedOut' });
  await expect(visitor.call(api.resetPassword, { body })).rejects.toMatchObject({ code: 'invalid' });
  const session = await visitor.call(api.signIn, {
    body: { email: signInOf('administrator').email, password: body.password },
  });
  expect(session.role).toBe('administrator');
  await visitor.call(api.changePassword, {
    body: { current: body.password, password: signInOf('administrator').password },
  });
});

test('an invited member sets a password by mail and joins; the last administrator stays one', async () => {
  const administrator = await world.as('administrator');
  const session = await administrator.call(api.getSession, {});
  const id = '01940000-0000-7000-8000-00000000aaaa';
  const invitation = {
    email: 'New.Hand@ridgeline.example',
    name: 'New Hand',
    role: 'supervisor' as const,
    personId: null,
  };

  const member = await administrator.call(api.inviteMember, { params: { id }, body: invitation });
  const again = await administrator.call(api.inviteMember, { params: { id }, body: invitation });

  expect(again).toEqual(member);
  expect(member).toMatchObject({ email: 'new.hand@ridgeline.example', joinedAt: null });
  const mails = await waitFor(async () => {
    const { mails: all } = await administrator.call(api.readOutbox, {});
    const own = all.filter(({ to }) => to === 'new.hand@ridgeline.example');
    return own.length > 0 ? own : undefined;
  });
  expect(mails).toHaveLength(1);
  const visitor = world.client();
  await visitor.call(api.resetPassword, {
    body: { token: linkIn(mails[0]?.text ?? ''), password: 'a sentence of my own' },
  });
  expect(
    (await visitor.call(api.signIn, { body: { email: invitation.email, password: 'a sentence of my own' } }))
      .role,
  ).toBe('supervisor');
  await expect(
    administrator.call(api.changeMemberRole, {
      params: { id: session.account.id },
      body: { role: 'worker' },
    }),
  ).rejects.toMatchObject({ code: 'conflict' });
  await administrator.call(api.removeMember, { params: { id } });
  await expect(visitor.call(api.getSession, {})).rejects.toMatchObject({ code: 'signedOut' });
});

async function waitFor<T>(look: () => Promise<T | undefined>): Promise<T> {
  for (let attempt = 0; attempt < 50; attempt += 1) {
    const found = await look();
    if (found !== undefined) return found;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Error('Waited in vain.');
}
