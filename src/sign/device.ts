import { forget, recall, remember } from './remembered.ts';
import { createOutbox } from './outbox.ts';
import { deviceStore } from './outbox-store.ts';
import { sendSignature } from './send.ts';

/** The person whom this phone is tied to, shared by all its open pages; in memory too, where storage is refused. */
let owner: string | null = null;

export function setOwner(personId: string | null): void {
  owner = personId;
  if (personId) remember('owner', personId);
  else forget('owner');
}

const ownerNow = () => {
  const remembered = recall('owner');
  return typeof remembered === 'string' ? remembered : owner;
};

/** Signatures made on this phone. One is sent only while the phone is tied to the person who made it. */
export const deviceOutbox = createOutbox({
  store: deviceStore('toeboard-phone'),
  send: sendSignature,
  maySend: ({ kind, personId }) => kind === 'device' && personId === ownerNow(),
});
