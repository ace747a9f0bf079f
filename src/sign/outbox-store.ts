import type { Outgoing } from './outbox.ts';

/** Where signatures lie until they are answered. `durable` turns false where the device refuses to keep them. */
export type OutboxStore = {
  all: () => Promise<Outgoing[]>;
  put: (outgoing: Outgoing) => Promise<void>;
  remove: (id: string) => Promise<void>;
  readonly durable: boolean;
};

/** Keeps signatures as long as the page is open; for a device that refuses storage. */
export function memoryStore(): OutboxStore {
  const kept = new Map<string, Outgoing>();
  return {
    durable: false,
    all: () => Promise.resolve([...kept.values()]),
    put: (outgoing) => Promise.resolve(void kept.set(outgoing.id, outgoing)),
    remove: (id) => Promise.resolve(void kept.delete(id)),
  };
}

/** Keeps signatures in the browser's own database, and in memory where that is refused or full. */
export function deviceStore(name = 'toeboard-outbox'): OutboxStore {
  const memory = memoryStore();
  const opening = open(name).catch(() => null);
  let durable = true;
  void opening.then((database) => (durable = database !== null));
  const attempt = async <T>(work: (database: IDBDatabase) => Promise<T>, otherwise: () => Promise<T>) => {
    const database = await opening;
    if (!database) return otherwise();
    try {
      return await work(database);
    } catch {
      durable = false;
      return otherwise();
    }
  };
  return {
    get durable() {
      return durable;
    },
    all: () => attempt((database) => ask(database, 'readonly', (box) => box.getAll()), memory.all),
    put: (outgoing) =>
      attempt(
        async (database) => {
          await ask(database, 'readwrite', (box) => box.put(outgoing));
          // Asks the browser not to clear the queue when the phone runs short of space; a refusal changes nothing.
          void navigator.storage?.persist?.();
        },
        () => memory.put(outgoing),
      ),
    remove: (id) =>
      attempt(
        async (database) => {
          await memory.remove(id);
          await ask(database, 'readwrite', (box) => box.delete(id));
        },
        () => memory.remove(id),
      ),
  };
}

const boxName = 'outgoing';

function open(name: string): Promise<IDBDatabase> {
  return new Promise((resolve, reject) => {
    const request = indexedDB.open(name, 1);
    request.onupgradeneeded = () => request.result.createObjectStore(boxName, { keyPath: 'id' });
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(request.error ?? new Error('Storage was refused.'));
    request.onblocked = () => reject(new Error('Storage is held by another page.'));
  });
}

/** One request, resolved when its transaction is complete: only then is it kept. */
function ask<T>(
  database: IDBDatabase,
  mode: IDBTransactionMode,
  request: (box: IDBObjectStore) => IDBRequest<T>,
): Promise<T> {
  return new Promise((resolve, reject) => {
    const transaction = database.transaction(boxName, mode, { durability: 'strict' });
    const asked = request(transaction.objectStore(boxName));
    transaction.oncomplete = () => resolve(asked.result);
    transaction.onabort = () => reject(transaction.error ?? new Error('Storage is full.'));
    transaction.onerror = () => reject(transaction.error ?? new Error('Storage failed.'));
  });
}
