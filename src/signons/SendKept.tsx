import { useKeepSending } from '../sign/useOutgoing.ts';
import { accountOutbox } from './account-outbox.ts';

/** Goes on sending what was signed on this device without signal, wherever in the application somebody is. Draws nothing. */
export function SendKept() {
  useKeepSending(accountOutbox);
  return null;
}
