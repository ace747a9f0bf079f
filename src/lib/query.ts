import { QueryClient } from '@tanstack/react-query';
import { Refusal } from '#shared/kernel/refusal.ts';

/** Only what may be better in a moment is asked again. */
const worthAnotherTry = (failures: number, error: Error): boolean =>
  failures < 2 && error instanceof Refusal && error.code === 'offline';

export const queryClient = new QueryClient({
  defaultOptions: { queries: { retry: worthAnotherTry, staleTime: 5_000 }, mutations: { retry: false } },
});

/** An error in words for the person: a refusal's own, or that something went wrong. */
export function wordsOf(error: unknown): string {
  if (error instanceof Error && error.message) return error.message;
  return 'Something went wrong.';
}
