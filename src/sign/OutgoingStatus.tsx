import { formatTime } from '#shared/kernel/work-date.ts';
import type { Outgoing } from './outbox.ts';

/** Where a signature is, in words: sent and when, on this device, or refused and why. */
function outgoingWords({ state, receivedAt, timeZone, trouble }: Outgoing, durable: boolean): string {
  if (state === 'sent') return `Sent ${receivedAt ? formatTime(receivedAt, timeZone) : ''}`.trim();
  if (state === 'refused') return `Not accepted: ${trouble ?? 'the server refused it.'}`;
  if (!durable)
    return 'Not sent yet. This device keeps nothing for the page: leave it open until it says “Sent”.';
  return 'Kept on this phone, will be sent';
}

export function OutgoingStatus({ outgoing, durable }: { outgoing: Outgoing; durable: boolean }) {
  const colour = { sent: 'text-lichen', waiting: 'text-ink', refused: 'text-line' }[outgoing.state];
  return <p className={`font-semibold ${colour}`}>{outgoingWords(outgoing, durable)}</p>;
}
