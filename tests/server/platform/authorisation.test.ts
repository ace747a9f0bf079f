import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { EndpointSpec } from '#shared/kernel/endpoint.ts';
import { newId } from '#shared/kernel/ids.ts';
import { type Act, mayDo, type Role, roles } from '#shared/kernel/roles.ts';
import { listStatements } from '#shared/statements/statements.api.ts';
import { listTalks } from '#shared/talks/talks.api.ts';
import { getRegister } from '#shared/signons/register.api.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';
import { strangerIn } from '../../support/second-organisation.ts';

/* Made from the endpoints themselves: one that is added tomorrow is held to the same. */

let world: DemoWorld;
const clients = new Map<Role, Client>();

beforeAll(async () => {
  world = await startDemoWorld();
  for (const role of roles) clients.set(role, await world.as(role));
});
afterAll(() => world.close());

const pathOf = ({ path }: EndpointSpec, id = newId()) =>
  path
    .replace(/:token/, 'a'.repeat(20))
    .replace(/:number/, '1')
    .replace(/:hash/, 'a'.repeat(10))
    .replace(/:\w+/g, id);
const send = (client: Client, endpoint: EndpointSpec, path = pathOf(endpoint)) =>
  client.fetch(path, { method: endpoint.method, ...(endpoint.method === 'GET' ? {} : { body: '{}' }) });
const closed = () => world.server.platform.endpoints.filter(({ access }) => access !== 'public');

test('whoever is not signed in, or not known by phone, is refused by every endpoint that is not public', async () => {
  for (const endpoint of closed()) {
    const response = await send(world.client(), endpoint);
    expect([endpoint.name, response.status]).toEqual([endpoint.name, 401]);
  }
});

test('every role is refused whatever the authorisation table does not give it', async () => {
  for (const endpoint of closed().filter(({ access }) => access !== 'device')) {
    for (const role of roles.filter((candidate) => !mayDo(candidate, endpoint.access as Act))) {
      const response = await send(clients.get(role) as Client, endpoint);
      expect([endpoint.name, role, response.status]).toEqual([endpoint.name, role, 403]);
    }
  }
});

test('what a role may read answers, or says that it is not there; never a bug', async () => {
  for (const endpoint of closed().filter(({ access, method }) => access !== 'device' && method === 'GET')) {
    for (const role of roles.filter((candidate) => mayDo(candidate, endpoint.access as Act))) {
      const { status } = await send(clients.get(role) as Client, endpoint);
      expect([endpoint.name, role, [200, 403, 404].includes(status)]).toEqual([endpoint.name, role, true]);
    }
  }
});

describe('somebody of another organisation', () => {
  test('finds nothing under any id of this one', async () => {
    const stranger = await strangerIn(world);
    const officer = clients.get('safetyOfficer') as Client;
    const { statements } = await officer.call(listStatements, { query: {} });
    const { talks } = await officer.call(listTalks, { query: {} });
    const { rows } = await officer.call(getRegister, { query: {} });
    const ids = [
      ...statements.map(({ id }) => id),
      ...talks.map(({ id }) => id),
      ...rows.flatMap(({ signOn }) => (signOn ? [signOn.id] : [])),
      ...world.seeded.sites.values(),
      ...world.seeded.people.values(),
    ];
    const reading = closed().filter(
      ({ method, path, access }) =>
        method === 'GET' && access !== 'device' && path.includes(':') && !path.includes('library'),
    );

    for (const endpoint of reading)
      for (const id of ids) {
        const { status } = await send(stranger, endpoint, pathOf(endpoint, id));
        expect([endpoint.name, status]).toEqual([endpoint.name, 404]);
      }
  });
});
