import { sessionQuery } from '../app/session.queries.ts';
import { queryClient } from '../lib/query.ts';
import { createOutbox } from '../sign/outbox.ts';
import { deviceStore } from '../sign/outbox-store.ts';
import { sendSignature } from '../sign/send.ts';

/**
 * Signatures taken on a signed-in device. One is sent only while the account that took it is signed in, in the organisation it was
 * taken for: the record says who handed the device round.
 */
export const accountOutbox = createOutbox({
  store: deviceStore('toeboard-signed-in'),
  send: sendSignature,
  maySend(carrier) {
    const session = queryClient.getQueryData(sessionQuery.queryKey);
    return (
      carrier.kind === 'account' &&
      carrier.accountId === session?.account.id &&
      carrier.orgId === session.organisation.id
    );
  },
});
