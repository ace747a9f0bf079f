import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import { getRegister, getSignOn, type registerQuery } from '#shared/signons/register.api.ts';
import { getMyToSign } from '#shared/signons/signons.api.ts';
import { call } from '../lib/call.ts';

export type RegisterFilters = z.input<typeof registerQuery>;

export const registerRowsQuery = (filters: RegisterFilters) =>
  queryOptions({
    queryKey: ['register', filters],
    queryFn: () => call(getRegister, { query: filters }),
    placeholderData: keepPreviousData,
  });

export const signOnQuery = (id: string) =>
  queryOptions({ queryKey: ['sign-ons', id], queryFn: () => call(getSignOn, { params: { id } }) });

export const myToSignQuery = queryOptions({
  queryKey: ['to-sign', 'mine'],
  queryFn: () => call(getMyToSign, {}),
});
