import { useCallback } from 'react';
import { useSearchParams } from 'react-router-dom';

/** Filters and sort in the URL, so that a view can be linked and comes back. An empty value leaves the URL. */
export function useUrlFilters(): [
  Record<string, string>,
  (change: Record<string, string | undefined>) => void,
] {
  const [search, setSearch] = useSearchParams();
  const change = useCallback(
    (values: Record<string, string | undefined>) => {
      setSearch(
        (before) => {
          const after = new URLSearchParams(before);
          for (const [name, value] of Object.entries(values)) {
            if (value) after.set(name, value);
            else after.delete(name);
          }
          return after;
        },
        { replace: true },
      );
    },
    [setSearch],
  );
  return [Object.fromEntries(search), change];
}
