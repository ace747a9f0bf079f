import { randomUUID } from 'node:crypto';
import { cp, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { Client as PgClient } from 'pg';
import { inject } from 'vitest';
import type { NodePgDatabase } from 'drizzle-orm/node-postgres';
import { type CallOf, type EndpointSpec, isFileReply, type ReplyOf } from '#shared/kernel/endpoint.ts';
import { signIn } from '#shared/account/account.api.ts';
import { type Problem, Refusal } from '#shared/kernel/refusal.ts';
import type { Role } from '#shared/kernel/roles.ts';
import { demoSignIns } from '../../server/commands/demo-sign-ins.ts';
import { seedDemo } from '../../server/commands/seed.ts';
import type { Seeded } from '../../server/commands/seeded.ts';
import { readConfig } from '../../server/platform/config.ts';
import { type RunningServer, startServer } from '../../server/platform/server.ts';

const root = fileURLToPath(new URL('../../', import.meta.url));

/** One person's client: its own cookies, the same problems as the browser's `call`. */
export class Client {
  readonly url: string;
  readonly cookies = new Map<string, string>();

  constructor(url: string) {
    this.url = url;
  }

  /** Calls an endpoint; a problem is thrown as the Refusal that it is. */
  async call<E extends EndpointSpec>(endpoint: E, given: CallOf<E>): Promise<ReplyOf<E>> {
    const response = await this.send(endpoint, given);
    if (!response.ok) {
      const problem = (await response.json()) as Problem;
      if (problem.code === 'bug') throw new Error(`A bug: ${problem.detail}`);
      throw new Refusal(problem.code, problem.detail, {
        fields: problem.fields ?? {},
        extra: problem.extra ?? {},
      });
    }
    if (isFileReply(endpoint.reply)) return (await response.blob()) as ReplyOf<E>;
    return endpoint.reply.parse(await response.json()) as ReplyOf<E>;
  }

  /** The bare response. */
  async send<E extends EndpointSpec>(endpoint: E, { params, query, body }: CallOf<E>): Promise<Response> {
    let path: string = endpoint.path;
    for (const [name, value] of Object.entries(params ?? {}))
      path = path.replace(`:${name}`, encodeURIComponent(String(value)));
    const search = new URLSearchParams(
      Object.entries(query ?? {}).filter(([, value]) => value !== undefined) as [string, string][],
    );
    return this.fetch(`${path}${search.size > 0 ? `?${search}` : ''}`, {
      method: endpoint.method,
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    });
  }

  async fetch(path: string, init: RequestInit = {}): Promise<Response> {
    const response = await fetch(this.url + path, {
      ...init,
      headers: {
        'x-toeboard': '1',
        ...(init.body ? { 'content-type': 'application/json' } : {}),
        cookie: [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; '),
        ...(init.headers as Record<string, string> | undefined),
      },
    });
    for (const line of response.headers.getSetCookie()) {
      const [, name = '', value = ''] = /^([^=]+)=([^;]*)/.exec(line) ?? [];
      if (value === '') this.cookies.delete(name);
      else this.cookies.set(name, value);
    }
    return response;
  }
}

export type World = {
  url: string;
  db: NodePgDatabase;
  server: RunningServer;
  client: () => Client;
  close: () => Promise<void>;
};

/** A whole server in this process on an empty, migrated database of its own. Close it at the end of the file. */
export async function startEmptyWorld(): Promise<World> {
  const dataDir = await mkdtemp(join(tmpdir(), 'tb-world-'));
  const postgres = process.env.TEST_POSTGRES;
  const databaseUrl = postgres ? await createPostgresDatabase(postgres) : undefined;
  if (!databaseUrl) await cp(inject('engineTemplate'), dataDir, { recursive: true });
  const config = readConfig({
    NODE_ENV: 'test',
    PORT: '0',
    TOEBOARD_DATA: dataDir,
    DATABASE_URL: databaseUrl,
    LOG_LEVEL: 'silent',
    PATH: process.env.PATH,
  });
  const server = await startServer({
    config,
    version: 'test',
    migrations: join(root, 'server/platform/migrations'),
    pages: null,
    durable: false,
  });
  const url = `http://127.0.0.1:${server.port}`;
  return {
    url,
    db: server.platform.database.db,
    server,
    client: () => new Client(url),
    async close() {
      await server.close();
      await rm(dataDir, { recursive: true, force: true });
    },
  };
}

/** A database of its own on the PostgreSQL server at this address; the server is thrown away with all of them. */
async function createPostgresDatabase(address: string): Promise<string> {
  const name = `world_${randomUUID().replaceAll('-', '')}`;
  const client = new PgClient({ connectionString: address });
  await client.connect();
  await client.query(`create database ${name}`);
  await client.end();
  const url = new URL(address);
  url.pathname = `/${name}`;
  return url.href;
}

export type DemoWorld = World & {
  seeded: Seeded;
  /** Somebody of the demo organisation, signed in. */
  as: (role: Role) => Promise<Client>;
};

/** The same with the demo organisation in it. */
export async function startDemoWorld(): Promise<DemoWorld> {
  const world = await startEmptyWorld();
  const seeded = await seedDemo(world.server.platform);
  return {
    ...world,
    seeded,
    async as(role) {
      const client = world.client();
      const signInOf = demoSignIns(root).find((candidate) => candidate.role === role);
      if (!signInOf) throw new Error(`There is no demo sign-in for ${role}.`);
      await client.call(signIn, { body: { email: signInOf.email, password: signInOf.password } });
      return client;
    },
  };
}
