import { useQuery } from '@tanstack/react-query';
import { useSyncExternalStore } from 'react';
import { sitesQuery } from '../sites/sites.queries.ts';
import { useMayDo } from './session.queries.ts';

const key = 'toeboard.site';
const listeners = new Set<() => void>();

const read = () => localStorage.getItem(key);

export function chooseSite(id: string): void {
  localStorage.setItem(key, id);
  for (const listener of listeners) listener();
}

/** The site whose board runs along the bottom edge: the chosen one, else the first. Null where there is none. */
export function useSiteInHand(): { siteId: string | null; sites: { id: string; name: string }[] } {
  const mayDo = useMayDo();
  const chosen = useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    read,
    () => null,
  );
  const { data } = useQuery({ ...sitesQuery('no'), enabled: mayDo('site.read') });
  const sites = data?.sites ?? [];
  const siteId = sites.find(({ id }) => id === chosen)?.id ?? sites[0]?.id ?? null;
  return { siteId, sites };
}
