import type { PGlite } from '@electric-sql/pglite';

/** What the socket server uses of the engine. */
type Served = Pick<
  PGlite,
  'waitReady' | 'isInTransaction' | 'runExclusive' | 'execProtocolRawStream' | 'execProtocolRaw' | 'exec'
>;

const parts = new Set([...'PBDECH'].map((letter) => letter.charCodeAt(0)));
const ends = new Set([...'SQ'].map((letter) => letter.charCodeAt(0)));
const sync = new Uint8Array(['S'.charCodeAt(0), 0, 0, 0, 4]);

/**
 * The engine as the socket server must see it. A query with values comes as several messages (Parse, Bind, … Sync), and all
 * connections share one backend with one unnamed statement. The server lets others in between messages except in a transaction, so
 * that one connection's Bind could meet another's Parse and answer with somebody else's rows. Here a query counts as a transaction
 * until its Sync.
 */
export function wholeQueries(engine: Served): PGlite {
  let open = false;
  const served: Served = {
    waitReady: engine.waitReady,
    isInTransaction: () => open || engine.isInTransaction(),
    runExclusive: (work) => engine.runExclusive(work),
    execProtocolRaw: (message, options) => engine.execProtocolRaw(message, options),
    async execProtocolRawStream(message, options) {
      const kind = message[0] ?? 0;
      if (parts.has(kind)) open = true;
      if (ends.has(kind)) open = false;
      await engine.execProtocolRawStream(message, options);
    },
    // The server's own ROLLBACK for a client that broke off: after an error the engine skips everything up to a Sync.
    async exec(...given) {
      if (open) await engine.execProtocolRaw(sync);
      open = false;
      return engine.exec(...given);
    },
  };
  return served as PGlite;
}
