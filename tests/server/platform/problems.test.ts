import { afterAll, beforeAll, expect, test } from 'vitest';
import { getHealth, getOpenApi } from '#shared/platform/platform.api.ts';
import { askPasswordReset, getSession } from '#shared/account/account.api.ts';
import { startEmptyWorld, type World } from '../../support/server.ts';

let world: World;
beforeAll(async () => (world = await startEmptyWorld()));
afterAll(() => world.close());

const problemOf = async (response: Response) => {
  expect(response.headers.get('content-type')).toContain('application/problem+json');
  const problem = (await response.json()) as Record<string, unknown>;
  return { ...problem, httpStatus: response.status } as Record<string, unknown>;
};

test('health says version, database, engine and whether PDFs can be made', async () => {
  const health = await world.client().call(getHealth, {});

  expect(health).toMatchObject({
    version: 'test',
    database: 'well',
    engine: process.env.TEST_POSTGRES ? 'postgresql' : 'embedded',
  });
  expect(typeof health.pdf).toBe('boolean');
});

test('an address that does not exist answers a problem', async () => {
  expect(await problemOf(await world.client().fetch('/api/nothing'))).toMatchObject({
    httpStatus: 404,
    code: 'missing',
  });
});

test('malformed JSON answers 400 in words', async () => {
  const response = await world.client().fetch('/api/session', { method: 'POST', body: '{"email":' });

  expect(await problemOf(response)).toMatchObject({ httpStatus: 400, code: 'invalid' });
});

test('a body over the limit answers 413 and names the limit', async () => {
  const response = await world
    .client()
    .fetch('/api/session', { method: 'POST', body: JSON.stringify({ email: 'x'.repeat(10_000_000) }) });

  const problem = await problemOf(response);
  expect(problem).toMatchObject({ httpStatus: 413, code: 'tooLarge' });
  expect(problem.detail).toContain('256 kB');
});

test('input that does not fit names every field', async () => {
  const response = await world
    .client()
    .fetch('/api/session', { method: 'POST', body: JSON.stringify({ email: 'nobody' }) });

  const problem = await problemOf(response);
  expect(problem.httpStatus).toBe(400);
  expect(Object.keys(problem.fields as object).sort()).toEqual(['email', 'password']);
});

test('nobody signed in answers 401', async () => {
  expect(await problemOf(await world.client().send(getSession, {}))).toMatchObject({
    httpStatus: 401,
    code: 'signedOut',
  });
});

test.each([
  ['from another site by Fetch Metadata', { 'sec-fetch-site': 'cross-site' }],
  ['from another origin', { origin: 'https://elsewhere.example' }],
])('a changing request %s is refused', async (_name, headers) => {
  const response = await world
    .client()
    .fetch('/api/password-resets', { method: 'POST', body: '{"email":"a@b.example"}', headers });

  expect(await problemOf(response)).toMatchObject({ httpStatus: 403, code: 'forbidden' });
});

test('a changing request without the header that our pages set is refused', async () => {
  const response = await fetch(`${world.url}/api/password-resets`, {
    method: 'POST',
    body: 'email=a@b.example',
  });

  expect(response.status).toBe(403);
});

test('every mounted endpoint stands in the OpenAPI document, and nothing else', async () => {
  const document = await world.client().call(getOpenApi, {});

  const documented = Object.entries(document.paths).flatMap(([path, operations]) =>
    Object.keys(operations as object).map((method) => `${method} ${path}`),
  );
  const mounted = world.server.platform.endpoints.map(
    ({ method, path }) => `${method.toLowerCase()} ${path.replace(/:(\w+)/g, '{$1}')}`,
  );
  expect(documented.sort()).toEqual(mounted.sort());
  expect(new Set(world.server.platform.endpoints.map(({ name }) => name)).size).toBe(mounted.length);
});

test('asking for a password answers the same for an address that nobody has', async () => {
  expect(await world.client().call(askPasswordReset, { body: { email: 'nobody@nowhere.example' } })).toEqual({
    done: true,
  });
});
