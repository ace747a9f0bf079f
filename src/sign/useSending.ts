import { useState } from 'react';

export type Sending = {
  busy: boolean;
  trouble: Error | null;
  /** Runs one request; its failure is kept as `trouble`, and what was typed stays. */
  send: (work: () => Promise<void>) => void;
};

export function useSending(): Sending {
  const [busy, setBusy] = useState(false);
  const [trouble, setTrouble] = useState<Error | null>(null);
  return {
    busy,
    trouble,
    send(work) {
      if (busy) return;
      setBusy(true);
      setTrouble(null);
      work()
        .catch((error: unknown) =>
          setTrouble(error instanceof Error ? error : new Error('Something went wrong.')),
        )
        .finally(() => setBusy(false));
    },
  };
}
