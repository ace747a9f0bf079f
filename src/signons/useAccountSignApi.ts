import { useMemo } from 'react';
import { getReading, getToSign } from '#shared/signons/signons.api.ts';
import { useSession } from '../app/session.queries.ts';
import { call } from '../lib/call.ts';
import type { SignApi } from '../sign/sign-api.ts';
import { accountOutbox } from './account-outbox.ts';

/** Signing on a signed-in device: one's own signature, or another's while the device is handed round. */
export function useAccountSignApi({ siteId, personId }: { siteId: string; personId: string }): SignApi {
  const session = useSession();
  const accountId = session.account.id;
  const orgId = session.organisation.id;
  const isOwn = session.personId === personId;
  const { name } = session.account;
  return useMemo(
    () => ({
      toSign: () => call(getToSign, { params: { id: siteId, personId } }),
      reading: (id) => call(getReading, { params: { id } }),
      carrier: { kind: 'account', accountId, orgId, siteId, personId },
      outbox: accountOutbox,
      ...(isOwn ? {} : { witness: name }),
    }),
    [siteId, personId, accountId, orgId, isOwn, name],
  );
}
