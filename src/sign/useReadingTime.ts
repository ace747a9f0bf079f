import { useEffect, useRef } from 'react';

/**
 * Counts the time that something stands open in sight, and hands it over whenever it is hidden, changed or left. `page` tells
 * one card from the next; null stops the count.
 */
export function useReadingTime(page: string | null, onRead: (ms: number) => void): void {
  const report = useRef(onRead);
  useEffect(() => {
    report.current = onRead;
  }, [onRead]);
  useEffect(() => {
    if (page === null) return;
    let since: number | null = document.visibilityState === 'visible' ? performance.now() : null;
    const stop = () => {
      if (since !== null) report.current(performance.now() - since);
      since = null;
    };
    const onVisibility = () => {
      if (document.visibilityState === 'visible') since ??= performance.now();
      else stop();
    };
    document.addEventListener('visibilitychange', onVisibility);
    window.addEventListener('pagehide', stop);
    return () => {
      document.removeEventListener('visibilitychange', onVisibility);
      window.removeEventListener('pagehide', stop);
      stop();
    };
  }, [page]);
}
