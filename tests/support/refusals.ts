import type { Refusal } from '#shared/kernel/refusal.ts';

/** The refusal that a call was answered with; null where it was not refused. */
export const refusalOf = (call: Promise<unknown>): Promise<Refusal | null> =>
  call.then(
    () => null,
    (error: Refusal) => error,
  );

/** The codes of several calls, in order; `undefined` for one that was not refused. */
export const codesOf = async (calls: Promise<unknown>[]): Promise<(Refusal['code'] | undefined)[]> =>
  (await Promise.all(calls.map(refusalOf))).map((refusal) => refusal?.code);
