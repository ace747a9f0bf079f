import { afterAll, beforeAll, expect, test } from 'vitest';
import { newId } from '#shared/kernel/ids.ts';
import { archivePerson, listEmployers, listPeople } from '#shared/people/people.api.ts';
import * as api from '#shared/signons/signons.api.ts';
import { getSite } from '#shared/sites/sites.api.ts';
import { getStatement, listStatements } from '#shared/statements/statements.api.ts';
import { listTalks } from '#shared/talks/talks.api.ts';
import { enrolPhone, signAccessOf, type SignAccess, signature } from '../../support/phones.ts';
import { addSecondOrganisation } from '../../support/second-organisation.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

let world: DemoWorld;
let supervisor: Client;
let wattle: SignAccess;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  wattle = await signAccessOf(supervisor, idOf('sites', 'wattle'));
});
afterAll(() => world.close());

const idOf = (of: 'sites' | 'people', key: string) => world.seeded[of].get(key) ?? '';
const find = (access: SignAccess, name: string, dayCode = access.dayCode) =>
  world.client().call(api.findPerson, { params: { token: access.token }, body: { dayCode, name } });
const wrongFor = ({ dayCode }: SignAccess) => (dayCode === '0000' ? '0001' : '0000');
const noticeVersion = async ({ token }: SignAccess) =>
  (await world.client().call(api.getSignPage, { params: { token } })).notice.version;
const crewOf = async (key: string) =>
  (await supervisor.call(getSite, { params: { id: idOf('sites', key) } })).people.map(({ id }) => id);

test('a stranger’s sign page tells the site, the organisation and the notice, and no name or statement', async () => {
  const page = await world.client().call(api.getSignPage, { params: { token: wattle.token } });

  expect(page).toMatchObject({
    site: 'Lot 7 Wattle Rise',
    organisation: 'Ridgeline Frame and Truss',
    recognised: null,
    dayCodeNeeded: true,
  });
  const { people } = await supervisor.call(listPeople, {});
  const { statements } = await supervisor.call(listStatements, {});
  const text = JSON.stringify(page);
  expect(people.length).toBeGreaterThan(10);
  for (const word of [...people.map(({ name }) => name), ...statements.map(({ title }) => title)])
    expect(text).not.toContain(word);
});

test('the notice on the sign page says who keeps the record, what is collected and why, before anything is asked', async () => {
  const { notice } = await world.client().call(api.getSignPage, { params: { token: wattle.token } });

  const words = notice.paragraphs.join('\n');
  expect(words).toContain('Ridgeline Frame and Truss');
  expect(words).toContain('office@ridgeline.example');
  expect(words).toMatch(/What we collect.*Why:.*Who sees it:.*How long:/s);
  expect(words).not.toContain('{{');
});

test('an address that no site has is answered as missing', async () => {
  const call = world.client().call(api.getSignPage, { params: { token: 'abcdefghijklmnop2345' } });

  await expect(call).rejects.toMatchObject({ code: 'missing' });
});

test('somebody with a wrong day code is refused in words, for finding and for enrolling', async () => {
  await expect(find(wattle, 'Bree', wrongFor(wattle))).rejects.toMatchObject({
    code: 'invalid',
    message: expect.stringContaining('not today’s code'),
    fields: { dayCode: expect.any(String) },
  });
  const wrong = { ...wattle, dayCode: wrongFor(wattle) };
  await expect(enrolPhone(world.client(), wrong, { existing: idOf('people', 'bree') })).rejects.toMatchObject(
    { code: 'invalid', fields: { dayCode: expect.any(String) } },
  );
});

test('somebody without a day code is refused', async () => {
  const response = await world.client().fetch(`/api/sign/${wattle.token}/find`, {
    method: 'POST',
    body: JSON.stringify({ name: 'Bree' }),
  });

  expect(response.status).toBe(400);
});

test('a name is found by the beginning of its words, without accents, and with today’s code only', async () => {
  for (const written of ['joao', 'João', 'PINH', 'pinheiro joa'])
    expect((await find(wattle, written)).people.map(({ name }) => name)).toEqual(['João Pinheiro']);

  expect((await find(wattle, 'tomas arri')).people.map(({ name }) => name)).toEqual(['Tomás Arriaga']);
  expect((await find(wattle, 'inheiro')).people).toEqual([]);
  await expect(find(wattle, 'jo')).rejects.toMatchObject({ code: 'invalid' });
});

test('somebody new enrols, is put on the crew, and is found later without the accents of the name', async () => {
  const id = newId();
  const { employers } = await find(wattle, 'nguyen');
  const employerId = employers[0]?.id ?? '';

  const phone = await enrolPhone(world.client(), wattle, {
    new: { id, name: 'Nguyễn Thị Đào', employerId, trade: 'Framer' },
  });

  expect((await phone.call(api.getSignPage, { params: { token: wattle.token } })).recognised).toEqual({
    personId: id,
    name: 'Nguyễn Thị Đào',
    employer: employers[0]?.name,
  });
  expect(await crewOf('wattle')).toContain(id);
  for (const written of ['nguyen', 'thi dao', 'dao nguyen'])
    expect((await find(wattle, written)).people.map((person) => person.id)).toEqual([id]);
});

test('somebody known enrols on another site, is put on its crew, and needs no day code from then on', async () => {
  const quarry = await signAccessOf(supervisor, idOf('sites', 'quarry'));
  const bree = idOf('people', 'bree');
  expect(await crewOf('quarry')).not.toContain(bree);

  const phone = await enrolPhone(world.client(), quarry, { existing: bree });

  expect(await crewOf('quarry')).toContain(bree);
  const page = await phone.call(api.getSignPage, { params: { token: quarry.token } });
  expect(page).toMatchObject({ recognised: { personId: bree }, dayCodeNeeded: false });
});

test('the cookie of an enrolled phone is out of reach of scripts and of other sites', async () => {
  const phone = world.client();
  const response = await phone.send(api.enrol, {
    params: { token: wattle.token },
    body: {
      dayCode: wattle.dayCode,
      deviceId: newId(),
      noticeVersion: await noticeVersion(wattle),
      person: { existing: idOf('people', 'minh') },
    },
  });

  expect(response.status).toBe(200);
  const line = response.headers.getSetCookie().find((cookie) => cookie.startsWith('tb_device='));
  expect(line).toMatch(/; HttpOnly/);
  expect(line).toMatch(/; SameSite=Lax/);
});

test('a phone that shows another version of the notice than the one in force is refused, and nobody is added (law.md T25)', async () => {
  const id = newId();
  const { employers } = await supervisor.call(listEmployers, {});
  const call = world.client().call(api.enrol, {
    params: { token: wattle.token },
    body: {
      dayCode: wattle.dayCode,
      deviceId: newId(),
      noticeVersion: (await noticeVersion(wattle)) + 1,
      person: { new: { id, name: 'Early Bird', employerId: employers[0]?.id ?? '', trade: 'Framer' } },
    },
  });

  await expect(call).rejects.toMatchObject({
    code: 'invalid',
    fields: { noticeVersion: expect.any(String) },
  });
  expect((await supervisor.call(listPeople, {})).people.map((person) => person.id)).not.toContain(id);
});

test('a phone that names no notice at all is refused (law.md T25)', async () => {
  const response = await world.client().fetch(`/api/sign/${wattle.token}/enrol`, {
    method: 'POST',
    body: JSON.stringify({
      dayCode: wattle.dayCode,
      deviceId: newId(),
      person: { existing: idOf('people', 'bree') },
    }),
  });

  expect(response.status).toBe(400);
});

test('a phone that sends its enrolment twice is known afterwards, with one person added', async () => {
  const { employers } = await supervisor.call(listEmployers, {});
  const person = {
    new: { id: newId(), name: 'Twice Sent', employerId: employers[0]?.id ?? '', trade: 'Framer' },
  };
  const deviceId = newId();

  const phone = await enrolPhone(world.client(), wattle, person, deviceId);
  await enrolPhone(phone, wattle, person, deviceId);

  expect((await phone.call(api.getOwnToSign, { params: { token: wattle.token } })).person.name).toBe(
    'Twice Sent',
  );
  expect((await find(wattle, 'twice sent')).people).toHaveLength(1);
});

test('somebody else can’t take over an enrolled phone', async () => {
  const deviceId = newId();
  const phone = await enrolPhone(world.client(), wattle, { existing: idOf('people', 'kit') }, deviceId);

  await expect(
    enrolPhone(world.client(), wattle, { existing: idOf('people', 'asha') }, deviceId),
  ).rejects.toMatchObject({ code: 'conflict' });

  expect((await phone.call(api.getOwnToSign, { params: { token: wattle.token } })).person.id).toBe(
    idOf('people', 'kit'),
  );
});

test('“not me” forgets the phone, even where its cookie was copied', async () => {
  const phone = await enrolPhone(world.client(), wattle, { existing: idOf('people', 'rua') });
  const copy = world.client();
  for (const [name, value] of phone.cookies) copy.cookies.set(name, value);

  await phone.call(api.forgetDevice, {});

  expect(phone.cookies.has('tb_device')).toBe(false);
  const response = await copy.send(api.getOwnToSign, { params: { token: wattle.token } });
  expect(response.status).toBe(401);
  expect((await copy.call(api.getSignPage, { params: { token: wattle.token } })).recognised).toBeNull();
});

test('a person taken off the lists is no longer known by phone, and enrols anew when brought back', async () => {
  const id = idOf('people', 'asha');
  const phone = await enrolPhone(world.client(), wattle, { existing: id });
  const toSign = () => phone.send(api.getOwnToSign, { params: { token: wattle.token } });
  expect((await toSign()).status).toBe(200);

  await supervisor.call(archivePerson, { params: { id }, body: { archived: true } });

  expect((await toSign()).status).toBe(401);
  expect((await find(wattle, 'asha')).people).toEqual([]);
  await expect(enrolPhone(world.client(), wattle, { existing: id })).rejects.toMatchObject({
    code: 'conflict',
  });

  await supervisor.call(archivePerson, { params: { id }, body: { archived: false } });
  expect((await toSign()).status).toBe(401);
  await enrolPhone(phone, wattle, { existing: id });
  expect((await toSign()).status).toBe(200);
});

test.each(['nonsense', '%', '------------------------------------.x', `${newId()}.x`, `${newId()}.`, '.'])(
  'a phone with the made-up mark “%s” is simply not known',
  async (mark) => {
    const phone = world.client();
    phone.cookies.set('tb_device', mark);

    expect((await phone.call(api.getSignPage, { params: { token: wattle.token } })).recognised).toBeNull();
    expect((await phone.send(api.getOwnToSign, { params: { token: wattle.token } })).status).toBe(401);
  },
);

test('a phone whose id is written in capital letters is known like any other', async () => {
  const phone = await enrolPhone(
    world.client(),
    wattle,
    { existing: idOf('people', 'bree') },
    newId().toUpperCase(),
  );

  expect((await phone.call(api.getSignPage, { params: { token: wattle.token } })).recognised?.name).toBe(
    'Bree Ashcombe',
  );
});

test('a phone of another organisation is not recognised, and its ids lead nowhere', async () => {
  const other = await addSecondOrganisation(world);
  const deviceId = newId();
  const phone = await enrolPhone(world.client(), other.access, { existing: other.personId }, deviceId);
  const own = await phone.call(api.getSignPage, { params: { token: other.access.token } });
  expect(own.recognised?.name).toBe('Olive Stranger');

  const page = await phone.call(api.getSignPage, { params: { token: wattle.token } });
  expect(page).toMatchObject({ recognised: null, dayCodeNeeded: true });
  await expect(phone.call(api.getOwnToSign, { params: { token: wattle.token } })).rejects.toMatchObject({
    code: 'missing',
  });

  const { revisionId, talkId, hash } = await demoIds();
  for (const token of [other.access.token, wattle.token]) {
    await expect(phone.call(api.getOwnReading, { params: { token, revisionId } })).rejects.toMatchObject({
      code: 'missing',
    });
    const common = {
      signature: { method: 'drawn', drawn: signature },
      signedAt: new Date().toISOString(),
      language: 'en',
    } as const;
    await expect(
      phone.call(api.signOn, {
        params: { token, id: newId() },
        body: {
          ...common,
          revisionId,
          revisionHash: hash,
          declaration: { id: 'au-statement', version: 1, language: 'en' },
          readingMs: 1000,
          answers: [],
        },
      }),
    ).rejects.toMatchObject({ code: 'missing' });
    await expect(
      phone.call(api.attend, {
        params: { token, id: newId() },
        body: { ...common, talkId, declaration: { id: 'au-talk', version: 1, language: 'en' } },
      }),
    ).rejects.toMatchObject({ code: 'missing' });
  }

  expect((await find(wattle, 'olive')).people).toEqual([]);
  await expect(enrolPhone(world.client(), wattle, { existing: other.personId })).rejects.toMatchObject({
    code: 'missing',
  });
  await expect(
    enrolPhone(world.client(), wattle, {
      new: { id: newId(), name: 'Lost Hand', employerId: other.employerId, trade: 'Framer' },
    }),
  ).rejects.toMatchObject({ code: 'missing' });
  await expect(
    enrolPhone(world.client(), wattle, { existing: idOf('people', 'bree') }, deviceId),
  ).rejects.toMatchObject({ code: 'conflict' });
});

async function demoIds() {
  const { statements } = await supervisor.call(listStatements, { query: { state: 'issued' } });
  const { revisions } = await supervisor.call(getStatement, { params: { id: statements[0]?.id ?? '' } });
  const { talks } = await supervisor.call(listTalks, { query: { state: 'open' } });
  return {
    revisionId: revisions[0]?.id ?? '',
    hash: revisions[0]?.hash ?? '',
    talkId: talks[0]?.id ?? '',
  };
}

test('the ninth try with a wrong day code within ten minutes has to wait, and so does the right one after it', async () => {
  const quarry = await signAccessOf(supervisor, idOf('sites', 'quarry'));
  const wrong = () => find(quarry, 'Lena', wrongFor(quarry)).catch((error: unknown) => error);
  for (let attempt = 1; attempt <= 8; attempt += 1) expect(await wrong()).toMatchObject({ code: 'invalid' });

  const response = await world.client().send(api.findPerson, {
    params: { token: quarry.token },
    body: { dayCode: wrongFor(quarry), name: 'Lena' },
  });

  expect(response.status).toBe(429);
  const { extra } = (await response.json()) as { extra: { retryAfterSeconds: number } };
  expect(extra.retryAfterSeconds).toBeGreaterThan(0);
  expect(extra.retryAfterSeconds).toBeLessThanOrEqual(600);
  await expect(find(quarry, 'Lena')).rejects.toMatchObject({ code: 'tooMany' });
  // Another site is not held up.
  expect((await find(wattle, 'Bree')).people).toHaveLength(1);
});
