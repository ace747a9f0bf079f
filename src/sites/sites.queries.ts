import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import * as api from '#shared/sites/sites.api.ts';
import { call } from '../lib/call.ts';

export const sitesQuery = (archived: 'yes' | 'no') =>
  queryOptions({
    queryKey: ['sites', { archived }],
    queryFn: () => call(api.listSites, { query: { archived } }),
  });

export const siteQuery = (id: string) =>
  queryOptions({ queryKey: ['sites', id], queryFn: () => call(api.getSite, { params: { id } }) });

export const signAccessQuery = (id: string) =>
  queryOptions({
    queryKey: ['sites', id, 'sign-access'],
    queryFn: () => call(api.getSignAccess, { params: { id } }),
    refetchInterval: 60_000,
  });

/** The board says what is so right now: it asks again every few seconds. */
export const boardQuery = (id: string) =>
  queryOptions({
    queryKey: ['board', id],
    queryFn: () => call(api.getBoard, { params: { id } }),
    refetchInterval: 10_000,
  });

/** After a change to sites or crews, everything that shows them is asked again. */
function useSiteChange<Input, Reply>(send: (input: Input) => Promise<Reply>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: () =>
      Promise.all(
        ['sites', 'board', 'people', 'today'].map((queryKey) =>
          client.invalidateQueries({ queryKey: [queryKey] }),
        ),
      ),
  });
}

export const useSaveSite = (id: string) =>
  useSiteChange((body: z.output<typeof api.siteBody>) => call(api.saveSite, { params: { id }, body }));

export const useArchiveSite = (id: string) =>
  useSiteChange((archived: boolean) => call(api.archiveSite, { params: { id }, body: { archived } }));

export const useSetCrewMember = (id: string) =>
  useSiteChange(({ personId, onCrew }: { personId: string; onCrew: boolean }) =>
    call(api.setCrewMember, { params: { id, personId }, body: { onCrew } }),
  );
