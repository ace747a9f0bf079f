import { Refusal } from '#shared/kernel/refusal.ts';
import type { NodeJson } from '#shared/statements/document/json.ts';
import type { DraftConflict } from '#shared/statements/statements.api.ts';

/** A draft as it is sent: what is written, and the version that it was written over. */
export type Draft = { lockVersion: number; title: string; document: NodeJson };

export type SaveState =
  | { kind: 'saved'; at: string | null }
  | { kind: 'unsaved' }
  | { kind: 'saving' }
  /** No connection: kept on this device, tried again. */
  | { kind: 'offline' }
  /** Somebody else saved meanwhile; nothing is sent until a person has chosen. */
  | { kind: 'conflict'; theirs: DraftConflict; mine: Omit<Draft, 'lockVersion'> }
  /** The server refuses what is written, in words; the next change is tried again. */
  | { kind: 'refused'; words: string };

type Parts = {
  /** Sends a draft; answers the new version and when. */
  send: (draft: Draft) => Promise<{ lockVersion: number; updatedAt: string }>;
  /** Keeps what is not saved yet on this device; null forgets it. */
  keep: (draft: Draft | null) => void;
  onState: (state: SaveState) => void;
  lockVersion: number;
  savedAt: string | null;
  delayMs?: number;
  retryMs?: number;
};

/**
 * Saves a draft by itself, one request at a time. The word "saved" comes only from the server's answer. Everything unsaved stands on
 * this device before it is sent. No framework and no clock but timers, so that it can be tested alone.
 */
export function createAutosave({
  send,
  keep,
  onState,
  lockVersion: first,
  savedAt,
  delayMs = 1200,
  retryMs = 5000,
}: Parts) {
  let lockVersion = first;
  let waiting: Omit<Draft, 'lockVersion'> | null = null;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let sending = false;
  let state: SaveState = { kind: 'saved', at: savedAt };

  const show = (next: SaveState) => {
    state = next;
    onState(next);
  };
  const later = (ms: number) => {
    clearTimeout(timer);
    timer = setTimeout(() => void flush(), ms);
  };

  function change(content: Omit<Draft, 'lockVersion'>): void {
    waiting = content;
    keep({ lockVersion, ...content });
    if (state.kind === 'conflict') return;
    if (!sending) show({ kind: 'unsaved' });
    later(delayMs);
  }

  /** Sends what waits now. Resolves when nothing is on its way any more. */
  async function flush(): Promise<void> {
    clearTimeout(timer);
    if (sending || !waiting || state.kind === 'conflict') return;
    const content = waiting;
    waiting = null;
    sending = true;
    show({ kind: 'saving' });
    try {
      const reply = await send({ lockVersion, ...content });
      lockVersion = reply.lockVersion;
      sending = false;
      if (waiting !== null) {
        keep({ lockVersion, ...(waiting as Omit<Draft, 'lockVersion'>) });
        return await flush();
      }
      keep(null);
      show({ kind: 'saved', at: reply.updatedAt });
    } catch (error) {
      sending = false;
      waiting ??= content;
      fail(error, waiting);
    }
  }

  function fail(error: unknown, mine: Omit<Draft, 'lockVersion'>): void {
    if (error instanceof Refusal && error.code === 'conflict' && 'document' in error.extra) {
      return show({ kind: 'conflict', theirs: error.extra as DraftConflict, mine });
    }
    if (error instanceof Refusal && error.code !== 'offline' && error.code !== 'unavailable') {
      return show({ kind: 'refused', words: error.message });
    }
    show({ kind: 'offline' });
    later(retryMs);
  }

  return {
    change,
    flush,
    state: () => state,
    lockVersion: () => lockVersion,
    hasUnsaved: () => waiting !== null || sending,
    /** Goes on over the stored version: mine replaces theirs. */
    keepMine(): Promise<void> {
      if (state.kind !== 'conflict') return Promise.resolve();
      lockVersion = state.theirs.lockVersion;
      show({ kind: 'unsaved' });
      return flush();
    },
    /** Goes on from the stored version: what was mine is let go here (the caller has put it aside). */
    takeTheirs(): void {
      if (state.kind !== 'conflict') return;
      lockVersion = state.theirs.lockVersion;
      waiting = null;
      keep(null);
      show({ kind: 'saved', at: state.theirs.updatedAt });
    },
    stop: () => clearTimeout(timer),
  };
}

export type Autosave = ReturnType<typeof createAutosave>;
