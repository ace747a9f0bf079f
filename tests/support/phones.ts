import { newId } from '#shared/kernel/ids.ts';
import { enrol, enrolBody, getSignPage, type Reading, type SignOnBody } from '#shared/signons/signons.api.ts';
import type { DrawnSignature } from '#shared/signons/signature.ts';
import { getSignAccess } from '#shared/sites/sites.api.ts';
import type { z } from 'zod';
import type { Client } from './server.ts';

export type SignAccess = { token: string; dayCode: string };
type Who = z.input<typeof enrolBody>['person'];

/** Secret part of a site's sign-on address and today's code, as the supervisor's screen shows them. */
export async function signAccessOf(supervisor: Client, siteId: string): Promise<SignAccess> {
  const { address, dayCode } = await supervisor.call(getSignAccess, { params: { id: siteId } });
  return { token: address.split('/').at(-1) ?? '', dayCode };
}

/** Ties a phone to a person as the sign-on page does: the notice is read first. */
export async function enrolPhone(
  phone: Client,
  { token, dayCode }: SignAccess,
  person: Who,
  deviceId = newId(),
): Promise<Client> {
  const { notice } = await phone.call(getSignPage, { params: { token } });
  await phone.call(enrol, {
    params: { token },
    body: { dayCode, deviceId, noticeVersion: notice.version, person },
  });
  return phone;
}

export const signature: DrawnSignature = {
  width: 320,
  height: 140,
  strokes: [
    [
      [20, 80, 0],
      [60, 40, 80],
      [100, 90, 160],
    ],
    [
      [120, 60, 300],
      [180, 66, 420],
    ],
  ],
};

/** What a phone sends when somebody signs what it showed. */
export function signOnBodyOf(reading: Reading, changes: Partial<SignOnBody> = {}): SignOnBody {
  const { id, version, language } = reading.declaration;
  return {
    revisionId: reading.revisionId,
    revisionHash: reading.hash,
    signature: { method: 'drawn', drawn: signature },
    declaration: { id, version, language },
    signedAt: new Date().toISOString(),
    readingMs: 600_000,
    answers: reading.questions.map((question) => ({ question: question.id, tries: [question.right] })),
    language: 'en',
    ...changes,
  };
}
