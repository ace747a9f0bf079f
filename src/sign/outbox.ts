import type { z } from 'zod';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { attendanceBody, SignOnBody } from '#shared/signons/signons.api.ts';
import type { OutboxStore } from './outbox-store.ts';

export type AttendanceBody = z.infer<typeof attendanceBody>;

/** Who carries a signature to the server: a worker's own phone, or somebody signed in. A signature is never sent by anybody else. */
export type Carrier =
  | { kind: 'device'; token: string; personId: string }
  | { kind: 'account'; accountId: string; orgId: string; siteId: string; personId: string };

/** A signature on its way. The id is made before it is kept, so that a resend changes nothing. */
export type Outgoing = {
  id: string;
  carrier: Carrier;
  signed: { kind: 'signOn'; body: SignOnBody } | { kind: 'attendance'; body: AttendanceBody };
  /** What was signed and by whom, for the screen. */
  title: string;
  person: string;
  timeZone: string;
  state: 'waiting' | 'sent' | 'refused';
  receivedAt: string | null;
  superseded: boolean;
  /** Why it waits or was refused, in words. */
  trouble: string | null;
};

export type Receipt = { id: string; receivedAt: string; superseded?: boolean };
export type Send = (outgoing: Outgoing) => Promise<Receipt>;

export type Outbox = {
  list: () => Outgoing[];
  subscribe: (listener: () => void) => () => void;
  /** Resolves once the signature is kept on the device, before anything is sent. */
  keep: (outgoing: Outgoing) => Promise<void>;
  /** Sends what waits and this carrier may send; a second call meanwhile joins the first. */
  flush: () => Promise<void>;
  /** Puts a refused signature back in the queue. */
  tryAgain: (id: string) => Promise<void>;
  forget: (id: string) => Promise<void>;
  /** Whether whoever is at the device now may send it. */
  maySend: (carrier: Carrier) => boolean;
  /** False where the device keeps nothing once the page is closed. */
  isDurable: () => boolean;
};

export function createOutbox({
  store,
  send,
  maySend,
}: {
  store: OutboxStore;
  send: Send;
  maySend: (carrier: Carrier) => boolean;
}): Outbox {
  let items: Outgoing[] = [];
  let flushing: Promise<void> | null = null;
  const listeners = new Set<() => void>();
  const show = (next: Outgoing[]) => {
    items = next;
    for (const listener of listeners) listener();
  };
  const change = (id: string, changes: Partial<Outgoing>) =>
    show(items.map((kept) => (kept.id === id ? { ...kept, ...changes } : kept)));
  const loading = store.all().then((kept) => {
    const fresh = new Set(items.map(({ id }) => id));
    show([...kept.filter(({ id }) => !fresh.has(id)), ...items]);
  });

  async function sendOne(outgoing: Outgoing): Promise<void> {
    try {
      const { receivedAt, superseded = false } = await send(outgoing);
      change(outgoing.id, { state: 'sent', receivedAt, superseded, trouble: null });
      await store.remove(outgoing.id);
    } catch (error) {
      change(outgoing.id, troubleOf(error));
    }
  }

  async function sendAll(): Promise<void> {
    await loading;
    const tried = new Set<string>();
    for (;;) {
      const outgoing = items.find(
        ({ id, state, carrier }) => state === 'waiting' && !tried.has(id) && maySend(carrier),
      );
      if (!outgoing) return;
      tried.add(outgoing.id);
      await sendOne(outgoing);
    }
  }

  return {
    list: () => items,
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    async keep(outgoing) {
      if (items.some(({ id }) => id === outgoing.id)) return;
      show([...items, outgoing]);
      await store.put(outgoing);
    },
    flush() {
      flushing ??= sendAll().finally(() => (flushing = null));
      return flushing;
    },
    async tryAgain(id) {
      change(id, { state: 'waiting', trouble: null });
      await this.flush();
    },
    async forget(id) {
      show(items.filter((kept) => kept.id !== id));
      await store.remove(id);
    },
    maySend,
    isDurable: () => store.durable,
  };
}

/** A refusal that another try can't mend stays on the device as refused; everything else waits for the next try. */
function troubleOf(error: unknown): Pick<Outgoing, 'state' | 'trouble'> {
  const trouble = error instanceof Error ? error.message : 'It could not be sent.';
  const final =
    error instanceof Refusal &&
    ['invalid', 'forbidden', 'missing', 'conflict', 'tooLarge'].includes(error.code);
  return { state: final ? 'refused' : 'waiting', trouble };
}
