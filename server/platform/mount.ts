import express, { type NextFunction, type Request, type Response, type Router } from 'express';
import type { z } from 'zod';
import { type EndpointSpec, type FileReply, type InputOf, isFileReply } from '#shared/kernel/endpoint.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import { type Act, mayDo } from '#shared/kernel/roles.ts';
import { type ActorOf, type DeviceActor, deviceOf, userOf } from './actor.ts';
import type { Db } from './db.ts';
import { requireKeepable } from './keepable.ts';
import { refuseCrossSite } from './cross-site.ts';
import type { Platform } from './platform.ts';

export type Handled<E extends EndpointSpec> = InputOf<E> & {
  /** The transaction of a write, the database of a read. */
  db: Db;
  actor: ActorOf<E['access']>;
  /** The enrolled phone behind a public request, if there is one. */
  device: () => Promise<DeviceActor | null>;
  request: Request;
  response: Response;
  /** Registers what is to be done once the write is committed; its failure is logged and hurts nobody. */
  after: (work: () => unknown) => void;
};

export type FileContent = { fileName: string; content: Buffer | string; inline?: boolean };

type Answer<E extends EndpointSpec> = E['reply'] extends z.ZodType ? z.input<E['reply']> : FileContent;
export type Handler<E extends EndpointSpec> = (handled: Handled<E>) => Promise<Answer<E>>;

const usualBytes = 256 * 1024;

/**
 * Gives an endpoint its handler. For every request: read the body (before anything that waits), find the actor, check the
 * authorisation table, parse the input, run a write in one transaction, send the parsed reply. `transaction: false` is for a
 * handler that must do something slow or throttled first; it then opens its own with `db.transaction`.
 */
export function mount<E extends EndpointSpec>(
  router: Router,
  platform: Platform,
  endpoint: E,
  handler: Handler<E>,
  { transaction = endpoint.method !== 'GET' }: { transaction?: boolean } = {},
): void {
  platform.endpoints.push(endpoint);
  const { db } = platform.database;
  const answer = async (request: Request, response: Response) => {
    const actor = (await actorFor(endpoint, db, request)) as ActorOf<E['access']>;
    const input = inputOf(endpoint, request);
    const later: (() => unknown)[] = [];
    const handled = (on: Db): Handled<E> => ({
      ...input,
      db: on,
      actor,
      device: () => deviceOf(on, request),
      request,
      response,
      after: (work) => void later.push(work),
    });
    const result = await (transaction ? db.transaction((tx) => handler(handled(tx))) : handler(handled(db)));
    send(endpoint, response, result);
    for (const work of later) await runLater(platform, work);
  };
  const method = endpoint.method.toLowerCase() as 'get' | 'post' | 'put' | 'patch' | 'delete';
  router[method](
    endpoint.path,
    express.json({ limit: endpoint.maxBytes ?? usualBytes, strict: true }),
    refuseCrossSite,
    platform.session,
    (request: Request, response: Response, next: NextFunction) => {
      answer(request, response).catch(next);
    },
  );
}

async function actorFor(endpoint: EndpointSpec, db: Db, request: Request) {
  if (endpoint.access === 'public') return { kind: 'public' } as const;
  if (endpoint.access === 'device') {
    const device = await deviceOf(db, request);
    if (!device)
      throw new Refusal('signedOut', 'This phone is not known here. Find yourself with the day code.');
    return device;
  }
  const actor = await userOf(db, request);
  const act: Act = endpoint.access;
  if (!mayDo(actor.role, act))
    throw new Refusal('forbidden', 'Your role in this organisation may not do this.');
  return actor;
}

function inputOf<E extends EndpointSpec>(endpoint: E, request: Request): InputOf<E> {
  for (const given of [request.params, request.query, request.body]) requireKeepable(given);
  return {
    params: endpoint.params?.parse(request.params),
    query: endpoint.query?.parse(request.query),
    body: endpoint.body?.parse(request.body ?? {}),
  } as InputOf<E>;
}

function send<E extends EndpointSpec>(endpoint: E, response: Response, result: Answer<E>): void {
  response.setHeader('Cache-Control', 'no-store');
  if (!isFileReply(endpoint.reply)) {
    response.json(endpoint.reply.parse(result));
    return;
  }
  const { fileName, content, inline = false } = result as FileContent;
  response.setHeader('Content-Type', contentTypeOf(endpoint.reply));
  // RFC 6266: the plain name for old clients, the UTF-8 one for the rest.
  const plain = fileName.replace(/[^\w. -]/g, '_');
  response.setHeader(
    'Content-Disposition',
    `${inline ? 'inline' : 'attachment'}; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(fileName)}`,
  );
  response.send(content);
}

function contentTypeOf({ file }: FileReply): string {
  return file.startsWith('text/') ? `${file}; charset=utf-8` : file;
}

async function runLater(platform: Platform, work: () => unknown): Promise<void> {
  try {
    await work();
  } catch (error) {
    platform.log.error({ err: error }, 'Work after a commit failed');
  }
}
