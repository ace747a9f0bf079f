import { useEffect, useState } from 'react';

export type Loaded<T> = {
  value: T | null;
  trouble: Error | null;
  /** Fetches again; what was fetched before stays shown meanwhile. */
  reload: () => void;
};

/** Fetches once for a key, and again when asked. */
export function useLoad<T>(key: string, fetchIt: () => Promise<T>): Loaded<T> {
  const [turn, setTurn] = useState(0);
  const [state, setState] = useState<{ key: string; value: T | null; trouble: Error | null } | null>(null);
  useEffect(() => {
    let left = false;
    fetchIt().then(
      (value) => !left && setState({ key, value, trouble: null }),
      (error: unknown) =>
        !left &&
        setState((before) => ({
          key,
          value: before?.key === key ? before.value : null,
          trouble: error instanceof Error ? error : new Error('Something went wrong.'),
        })),
    );
    return () => {
      left = true;
    };
    // The key stands for everything that the fetch depends on.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [key, turn]);
  const current = state?.key === key ? state : null;
  return {
    value: current?.value ?? null,
    trouble: current?.trouble ?? null,
    reload: () => setTurn((count) => count + 1),
  };
}
