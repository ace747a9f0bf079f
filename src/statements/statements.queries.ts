import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import * as api from '#shared/statements/statements.api.ts';
import { call } from '../lib/call.ts';

export type StatementFilters = z.input<NonNullable<typeof api.listStatements.query>>;

export const statementsQuery = (filters: StatementFilters) =>
  queryOptions({
    queryKey: ['statements', filters],
    queryFn: () => call(api.listStatements, { query: filters }),
  });

export const statementQuery = (id: string) =>
  queryOptions({ queryKey: ['statements', id], queryFn: () => call(api.getStatement, { params: { id } }) });

export const sheetQuery = (id: string, number: number) =>
  queryOptions({
    queryKey: ['statements', id, 'sheet', number],
    queryFn: () => call(api.getSheet, { params: { id, number } }),
  });

export const draftSheetQuery = (id: string) =>
  queryOptions({
    queryKey: ['statements', id, 'draft-sheet'],
    queryFn: () => call(api.getDraftSheet, { params: { id } }),
  });

export const verifyQuery = (hash: string) =>
  queryOptions({ queryKey: ['verify', hash], queryFn: () => call(api.verifyHash, { params: { hash } }) });

/** After an act on a statement, its page shows the answer and everything else that shows it is asked again. */
export function useStatementAct<Input>(id: string, send: (input: Input) => Promise<api.Statement>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: async (statement) => {
      client.setQueryData(statementQuery(id).queryKey, statement);
      await Promise.all(
        ['board', 'today', 'register', 'exceptions'].map((key) =>
          client.invalidateQueries({ queryKey: [key] }),
        ),
      );
      await client.invalidateQueries({
        queryKey: ['statements'],
        predicate: ({ queryKey }) => queryKey[1] !== id,
      });
    },
  });
}
