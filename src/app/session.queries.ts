import { queryOptions, useQuery } from '@tanstack/react-query';
import { getSession, type Session } from '#shared/account/account.api.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import { type Act, mayDo } from '#shared/kernel/roles.ts';
import { call } from '../lib/call.ts';

/** Who is signed in; null when nobody is. */
export const sessionQuery = queryOptions({
  queryKey: ['session'],
  queryFn: async (): Promise<Session | null> => {
    try {
      return await call(getSession, {});
    } catch (error) {
      if (error instanceof Refusal && error.code === 'signedOut') return null;
      throw error;
    }
  },
  staleTime: 60_000,
});

/** The session of a page that only a signed-in person reaches. */
export function useSession(): Session {
  const { data } = useQuery(sessionQuery);
  if (!data) throw new Error('This page needs a session.');
  return data;
}

/** Whether the signed-in role may do an act: the same table that the server enforces. */
export function useMayDo(): (act: Act) => boolean {
  const { role } = useSession();
  return (act) => mayDo(role, act);
}
