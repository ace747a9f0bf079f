import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Refusal } from '#shared/kernel/refusal.ts';
import * as signing from '#shared/signons/signons.api.ts';
import * as api from '#shared/statements/statements.api.ts';
import { enrolPhone, signAccessOf, signOnBodyOf } from '../../support/phones.ts';
import { refusalOf } from '../../support/refusals.ts';
import { demoStatement, issueNextRevision } from '../../support/revisions.ts';
import { strangerIn } from '../../support/second-organisation.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';
import { newId } from '#shared/kernel/ids.ts';

/** The sheet as it is printed; the tests follow one statement through three revisions. */

let world: DemoWorld;
let supervisor: Client;
let officer: Client;
let id: string;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  officer = await world.as('safetyOfficer');
  id = (await demoStatement(officer)).id;
});
afterAll(() => world.close());

const sheetOf = (number: number) => officer.call(api.getSheet, { params: { id, number } });
const signersOf = ({ signatures }: api.Sheet) =>
  signatures.map(({ name, revision }) => [name, revision] as const);

async function sign(key: string) {
  const access = await signAccessOf(supervisor, world.seeded.sites.get('wattle') ?? '');
  const phone = await enrolPhone(world.client(), access, { existing: world.seeded.people.get(key) ?? '' });
  const { statements } = await phone.call(signing.getOwnToSign, { params: { token: access.token } });
  const reading = await phone.call(signing.getOwnReading, {
    params: { token: access.token, revisionId: statements[0]?.revisionId ?? '' },
  });
  await phone.call(signing.signOn, {
    params: { token: access.token, id: newId() },
    body: signOnBodyOf(reading),
  });
}

describe('the sheet of a revision', () => {
  test('carries everything that was frozen, each signer once in the order of signing, and the way to verify it', async () => {
    const sheet = await sheetOf(1);

    expect(sheet.frozen).toMatchObject({
      title: 'Roof trusses by crane, Lot 7',
      organisation: 'Ridgeline Frame and Truss',
      preparedBy: 'Sina Vakalahi',
      issuedBy: 'Oskar Brandt',
      invented: true,
    });
    expect(signersOf(sheet)).toEqual(
      [
        'Sina Vakalahi',
        'Tran Van Minh',
        'Bree Ashcombe',
        'João Pinheiro',
        'Dell Cartwright',
        'Tomás Arriaga',
      ].map((name) => [name, 1]),
    );
    expect(sheet.signatures.find(({ name }) => name === 'Tomás Arriaga')).toMatchObject({
      method: 'typed',
      svg: null,
      typedName: 'Tomás Arriaga',
      witness: 'Sina Vakalahi',
    });
    expect(sheet.signatures[0]).toMatchObject({ method: 'drawn', svg: expect.stringMatching(/^<svg/) });
    expect(sheet.verifyAddress).toBe(
      `${world.server.platform.publicUrl()}/verify/${sheet.revision?.hash.slice(0, 10)}`,
    );
    expect(sheet.verifyQrSvg).toMatch(/^<svg/);
  });

  test('after a revision that is not material it shows whose signatures still count, each with the revision signed', async () => {
    await issueNextRevision({ supervisor, officer }, { material: false, changeNote: 'Spelling' });
    await sign('kit');

    const [first, second] = [await sheetOf(1), await sheetOf(2)];
    expect(signersOf(first)).toHaveLength(6);
    expect(signersOf(second)).toEqual([...signersOf(first), ['Kit Marlowe-Hale', 2]]);
    expect([first.revision?.standing, second.revision?.standing]).toEqual(['superseded', 'current']);
  });

  test('after a material revision it shows nobody until they sign again; the earlier sheets stay as they were', async () => {
    await issueNextRevision({ supervisor, officer }, { material: true, changeNote: 'Another crane' });
    expect((await sheetOf(3)).signatures).toEqual([]);

    await sign('minh');

    expect(signersOf(await sheetOf(3))).toEqual([['Tran Van Minh', 3]]);
    expect(signersOf(await sheetOf(2))).toHaveLength(7);
  });

  test('a revision that does not exist is not there; to another organisation none is', async () => {
    const stranger = await strangerIn(world);

    expect(await refusalOf(sheetOf(4))).toMatchObject({ code: 'missing' });
    expect(await refusalOf(sheetOf(0))).toMatchObject({ code: 'invalid' });
    for (const endpoint of [api.getSheet, api.getSheetPdf])
      expect(
        await stranger.call(endpoint, { params: { id, number: 1 } }).catch((error: Refusal) => error),
      ).toMatchObject({ code: 'missing' });
    expect(await refusalOf(stranger.call(api.getDraftSheet, { params: { id } }))).toMatchObject({
      code: 'missing',
    });
  });
});

test('the sheet of a draft has no number, hash, issuer or signature', async () => {
  const { statements } = await officer.call(api.listStatements, { query: { state: 'draft' } });

  const sheet = await officer.call(api.getDraftSheet, { params: { id: statements[0]?.id ?? '' } });

  expect(sheet).toMatchObject({ revision: null, signatures: [], verifyAddress: null, verifyQrSvg: null });
  expect(sheet.frozen).toMatchObject({ title: 'Roof trusses by hand, stage 2', issuedBy: '' });
});

test('a worker does not get the office’s sheets', async () => {
  const worker = await world.as('worker');

  expect(await refusalOf(worker.call(api.getSheet, { params: { id, number: 1 } }))).toMatchObject({
    code: 'forbidden',
  });
});
