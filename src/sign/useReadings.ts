import { useCallback, useEffect, useRef } from 'react';
import type { Reading, ToSign } from '#shared/signons/signons.api.ts';
import type { SignApi } from './sign-api.ts';

/** Fetches every statement that is still to be signed as soon as the list is known, so that signal lost after that does not matter. */
export function useReadings(
  { reading }: Pick<SignApi, 'reading'>,
  toSign: ToSign | null,
): (revisionId: string) => Promise<Reading> {
  const kept = useRef(new Map<string, Promise<Reading>>());
  const fetchIt = useRef(reading);
  useEffect(() => {
    fetchIt.current = reading;
  }, [reading]);
  const readingOf = useCallback((revisionId: string) => {
    const known = kept.current.get(revisionId);
    if (known) return known;
    const fetching = fetchIt.current(revisionId);
    kept.current.set(revisionId, fetching);
    fetching.catch(() => kept.current.delete(revisionId));
    return fetching;
  }, []);
  useEffect(() => {
    for (const { revisionId, standing } of toSign?.statements ?? [])
      if (standing !== 'signed') void readingOf(revisionId).catch(() => undefined);
  }, [toSign, readingOf]);
  return readingOf;
}
