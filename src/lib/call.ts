import type { CallOf, EndpointSpec, ReplyOf } from '#shared/kernel/endpoint.ts';
import { isFileReply } from '#shared/kernel/endpoint.ts';
import { type Problem, Refusal } from '#shared/kernel/refusal.ts';

/** The address of a call, for links and downloads too. */
export function addressOf(
  endpoint: EndpointSpec,
  given: { params?: object | undefined; query?: object | undefined },
): string {
  let path: string = endpoint.path;
  for (const [name, value] of Object.entries(given.params ?? {}) as [string, string | number][])
    path = path.replace(`:${name}`, encodeURIComponent(`${value}`));
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries((given.query ?? {}) as Record<string, unknown>))
    if (value !== undefined && value !== '') search.set(name, `${value as string | number}`);
  return search.size > 0 ? `${path}?${search}` : path;
}

/**
 * What to do when the session has ended in the middle of work: the application puts a sign-in over the page and resolves when it is
 * done; the call then goes on. Null where nobody offers that.
 */
export const signInAgain: { wait: (() => Promise<void>) | null } = { wait: null };

const needsSession = ({ access, name }: EndpointSpec) =>
  access !== 'public' && access !== 'device' && name !== 'account.session';

/** Calls an endpoint. Every "no" is thrown as the Refusal that it is; no connection is one too (`offline`). */
export async function call<E extends EndpointSpec>(
  endpoint: E,
  given: CallOf<E>,
  signal?: AbortSignal,
): Promise<ReplyOf<E>> {
  let response = await send(endpoint, given, signal);
  if (response.status === 401 && signInAgain.wait && needsSession(endpoint)) {
    await signInAgain.wait();
    response = await send(endpoint, given, signal);
  }
  if (!response.ok) throw await refusalOf(response);
  if (isFileReply(endpoint.reply)) return (await response.blob()) as ReplyOf<E>;
  return endpoint.reply.parse(await response.json()) as ReplyOf<E>;
}

async function send<E extends EndpointSpec>(
  endpoint: E,
  given: CallOf<E>,
  signal?: AbortSignal,
): Promise<Response> {
  try {
    return await fetch(addressOf(endpoint, given), {
      method: endpoint.method,
      credentials: 'same-origin',
      // The server takes changes only with this header, which another site's form can't set.
      headers: {
        'X-Toeboard': '1',
        ...(given.body === undefined ? {} : { 'Content-Type': 'application/json' }),
      },
      ...(given.body === undefined ? {} : { body: JSON.stringify(given.body) }),
      ...(signal ? { signal } : {}),
    });
  } catch (error) {
    if (signal?.aborted) throw error;
    throw new Refusal('offline', 'There is no connection to the server.');
  }
}

async function refusalOf(response: Response): Promise<Error> {
  const problem = (await response.json().catch(() => null)) as Problem | null;
  if (!problem?.code)
    return new Refusal(
      'unavailable',
      `The server answered ${response.status} without words. Try again in a moment.`,
    );
  if (problem.code === 'bug') return new Error(problem.detail);
  return new Refusal(problem.code, problem.detail, {
    fields: problem.fields ?? {},
    extra: problem.extra ?? {},
  });
}
