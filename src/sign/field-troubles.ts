import { Refusal } from '#shared/kernel/refusal.ts';
import { waitWords } from './useWait.ts';

/** Where a refusal belongs: beside its field, or over the whole form. */
export function fieldTroubles(
  trouble: Error | null,
  wait: number,
): { name: string | null; dayCode: string | null; whole: string | null } {
  const none = { name: null, dayCode: null, whole: null };
  if (!trouble) return none;
  if (!(trouble instanceof Refusal)) return { ...none, whole: trouble.message };
  if (trouble.code === 'tooMany')
    return {
      ...none,
      whole:
        wait > 0
          ? `Too many tries. Wait ${waitWords(wait)}, then ask your supervisor for today’s code.`
          : null,
    };
  const { name = null, dayCode = null } = trouble.fields;
  return { name, dayCode, whole: name || dayCode ? null : trouble.message };
}
