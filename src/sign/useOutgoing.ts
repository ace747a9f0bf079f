import { useEffect, useSyncExternalStore } from 'react';
import type { Outbox, Outgoing } from './outbox.ts';

export function useOutgoing({ subscribe, list }: Outbox): Outgoing[] {
  return useSyncExternalStore(subscribe, list);
}

const soonest = 3_000;
const latest = 60_000;

/** Sends what waits, now and whenever signal may have come back, with pauses that double up to a minute. */
export function useKeepSending(outbox: Outbox): void {
  useEffect(() => {
    let timer: ReturnType<typeof setTimeout> | undefined;
    let pause = soonest;
    let left = false;
    const sendNow = async () => {
      clearTimeout(timer);
      await outbox.flush();
      const waits = outbox.list().some(({ state }) => state === 'waiting');
      if (left) return;
      timer = setTimeout(() => void sendNow(), waits ? pause : latest);
      pause = waits ? Math.min(latest, pause * 2) : soonest;
    };
    const signalMayBeBack = () => {
      pause = soonest;
      void sendNow();
    };
    const onVisible = () => document.visibilityState === 'visible' && signalMayBeBack();
    window.addEventListener('online', signalMayBeBack);
    document.addEventListener('visibilitychange', onVisible);
    void sendNow();
    return () => {
      left = true;
      clearTimeout(timer);
      window.removeEventListener('online', signalMayBeBack);
      document.removeEventListener('visibilitychange', onVisible);
    };
  }, [outbox]);
}
