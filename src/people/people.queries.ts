import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import * as api from '#shared/people/people.api.ts';
import { call } from '../lib/call.ts';

export type PersonFilters = z.input<typeof api.personFilters>;

export const peopleQuery = (filters: PersonFilters) =>
  queryOptions({ queryKey: ['people', filters], queryFn: () => call(api.listPeople, { query: filters }) });

export const personQuery = (id: string) =>
  queryOptions({ queryKey: ['people', id], queryFn: () => call(api.getPerson, { params: { id } }) });

export const employersQuery = queryOptions({
  queryKey: ['employers'],
  queryFn: () => call(api.listEmployers, {}),
});

function usePeopleChange<Input, Reply>(send: (input: Input) => Promise<Reply>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: () =>
      Promise.all(
        ['people', 'employers', 'sites', 'board'].map((queryKey) =>
          client.invalidateQueries({ queryKey: [queryKey] }),
        ),
      ),
  });
}

export const useSavePerson = (id: string) =>
  usePeopleChange((body: z.output<typeof api.personBody>) => call(api.savePerson, { params: { id }, body }));

export const useArchivePerson = (id: string) =>
  usePeopleChange((archived: boolean) => call(api.archivePerson, { params: { id }, body: { archived } }));

export const useSaveEmployer = () =>
  usePeopleChange(({ id, ...body }: z.output<typeof api.employerBody> & { id: string }) =>
    call(api.saveEmployer, { params: { id }, body }),
  );
