import { keepPreviousData, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import * as api from '#shared/talks/talks.api.ts';
import { call } from '../lib/call.ts';

export type TalkFilters = z.input<typeof api.talkQuery>;

export const talksQuery = (filters: TalkFilters) =>
  queryOptions({
    queryKey: ['talks', filters],
    queryFn: () => call(api.listTalks, { query: filters }),
    placeholderData: keepPreviousData,
  });

const soon = 5_000;

/** A talk; while it is open it is asked again, since people sign it on their own phones. */
export const talkQuery = (id: string) =>
  queryOptions({
    queryKey: ['talks', id],
    queryFn: () => call(api.getTalk, { params: { id } }),
    refetchInterval: ({ state }) => (state.data?.state === 'open' ? soon : false),
  });

/** After an act on a talk, its page shows the answer and everything else that shows it is asked again. */
function useTalkAct<Input>(id: string, send: (input: Input) => Promise<api.Talk>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: async (talk) => {
      client.setQueryData(talkQuery(id).queryKey, talk);
      await Promise.all(
        ['board', 'today', 'exceptions'].map((key) => client.invalidateQueries({ queryKey: [key] })),
      );
      await client.invalidateQueries({
        queryKey: ['talks'],
        predicate: ({ queryKey }) => queryKey[1] !== id,
      });
    },
  });
}

export type TalkToSave = z.output<typeof api.talkBody> & { lockVersion: number };

export const useSaveTalk = (id: string) =>
  useTalkAct(id, (body: TalkToSave) => call(api.saveTalk, { params: { id }, body }));

export const useCloseTalk = (id: string) =>
  useTalkAct(id, (lockVersion: number) => call(api.closeTalk, { params: { id }, body: { lockVersion } }));

export function useDiscardTalk(id: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => call(api.discardTalk, { params: { id } }),
    onSuccess: async () => {
      client.removeQueries({ queryKey: ['talks', id] });
      await Promise.all(
        ['talks', 'board', 'today'].map((key) => client.invalidateQueries({ queryKey: [key] })),
      );
    },
  });
}
