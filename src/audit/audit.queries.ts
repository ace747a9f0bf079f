import { queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import * as api from '#shared/audit/audit.api.ts';
import { call } from '../lib/call.ts';

export type ExceptionFilters = z.input<NonNullable<typeof api.listExceptions.query>>;

export const exceptionsQuery = (filters: ExceptionFilters) =>
  queryOptions({
    queryKey: ['exceptions', filters],
    queryFn: () => call(api.listExceptions, { query: filters }),
    refetchInterval: 30_000,
  });

export const todayQuery = queryOptions({
  queryKey: ['today'],
  queryFn: () => call(api.getToday, {}),
  refetchInterval: 15_000,
});

export const lapsingQuery = queryOptions({ queryKey: ['lapsing'], queryFn: () => call(api.getLapsing, {}) });
