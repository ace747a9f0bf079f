import { newId } from '#shared/kernel/ids.ts';
import type { Signature } from '#shared/signons/signature.ts';
import type { Reading, SignOnBody, ToSign } from '#shared/signons/signons.api.ts';
import type { Carrier, Outgoing } from './outbox.ts';

export type SignedReading = Omit<SignOnBody, 'language' | 'signedAt'>;

const waiting = { state: 'waiting', receivedAt: null, superseded: false, trouble: null } as const;

/** A signature under a statement, ready to be kept and sent. */
export function outgoingSignOn(
  carrier: Carrier,
  { person, site }: ToSign,
  reading: Reading,
  signed: SignedReading,
): Outgoing {
  return {
    ...waiting,
    id: newId(),
    carrier,
    signed: {
      kind: 'signOn',
      body: { ...signed, signedAt: new Date().toISOString(), language: reading.declaration.language },
    },
    title: `${reading.title}, revision ${reading.number}`,
    person: person.name,
    timeZone: site.timeZone,
  };
}

/** A signature under a toolbox talk, ready to be kept and sent. */
export function outgoingAttendance(
  carrier: Carrier,
  { person, site, talkDeclaration }: ToSign,
  talk: ToSign['talks'][number],
  signature: Signature,
): Outgoing {
  const { id, version, language } = talkDeclaration;
  return {
    ...waiting,
    id: newId(),
    carrier,
    signed: {
      kind: 'attendance',
      body: {
        talkId: talk.id,
        signature,
        declaration: { id, version, language },
        signedAt: new Date().toISOString(),
        language,
      },
    },
    title: `Toolbox talk: ${talk.topic}`,
    person: person.name,
    timeZone: site.timeZone,
  };
}
