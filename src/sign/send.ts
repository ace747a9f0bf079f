import { attend, attendFor, signOn, signOnFor } from '#shared/signons/signons.api.ts';
import { call } from '../lib/call.ts';
import type { Outgoing, Receipt } from './outbox.ts';

/** Sends one signature the way its carrier goes. The id travels in the address, so that a resend finds the same record. */
export function sendSignature({ id, carrier, signed }: Outgoing): Promise<Receipt> {
  if (carrier.kind === 'device') {
    const { token } = carrier;
    return signed.kind === 'signOn'
      ? call(signOn, { params: { token, id }, body: signed.body })
      : call(attend, { params: { token, id }, body: signed.body });
  }
  const person = { id: carrier.siteId, personId: carrier.personId };
  return signed.kind === 'signOn'
    ? call(signOnFor, { params: { ...person, signOnId: id }, body: signed.body })
    : call(attendFor, { params: { ...person, attendanceId: id }, body: signed.body });
}
