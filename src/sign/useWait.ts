import { useEffect, useState } from 'react';
import { Refusal } from '#shared/kernel/refusal.ts';

/** Seconds until the throttle lets the next try through; 0 while nothing is throttled. */
export function useWait(trouble: unknown): number {
  const [now, setNow] = useState(() => Date.now());
  const [until, setUntil] = useState<{ trouble: unknown; at: number } | null>(null);
  const seconds = waitOf(trouble);
  useEffect(() => {
    if (seconds === 0) return;
    const at = Date.now() + seconds * 1000;
    const timer = setInterval(() => {
      setUntil({ trouble, at });
      setNow(Date.now());
    }, 1000);
    return () => clearInterval(timer);
  }, [trouble, seconds]);
  if (seconds === 0) return 0;
  if (!until || until.trouble !== trouble) return seconds;
  return Math.max(0, Math.ceil((until.at - now) / 1000));
}

function waitOf(trouble: unknown): number {
  if (!(trouble instanceof Refusal) || trouble.code !== 'tooMany') return 0;
  const { retryAfterSeconds } = trouble.extra;
  return typeof retryAfterSeconds === 'number' ? retryAfterSeconds : 60;
}

/** "9 min 05 s" */
export function waitWords(seconds: number): string {
  const minutes = Math.floor(seconds / 60);
  return minutes === 0 ? `${seconds} s` : `${minutes} min ${String(seconds % 60).padStart(2, '0')} s`;
}
