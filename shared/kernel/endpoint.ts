import type { z } from 'zod';
import type { Act } from './roles.ts';

/**
 * Who may call: an act of the authorisation table (signed in, by role), `public` (anybody),
 * or `device` (a worker's enrolled phone).
 */
export type Access = Act | 'public' | 'device';

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** A reply that is not JSON: a file with this content type. */
export type FileReply = { file: string };

export type EndpointSpec = {
  /** Dotted name, unique: `statements.issue`. */
  name: string;
  method: Method;
  /** Express path under the origin, e.g. `/api/statements/:id`. */
  path: `/api/${string}`;
  access: Access;
  summary: string;
  params?: z.ZodObject;
  query?: z.ZodObject;
  body?: z.ZodType;
  reply: z.ZodType | FileReply;
  /** Largest accepted body in bytes; 256 kB where not said. */
  maxBytes?: number;
};

/** States one call once: client types, server validation, authorisation and the OpenAPI document are all read from it. */
export function endpoint<const E extends EndpointSpec>(spec: E): E {
  return spec;
}

type Parsed<T> = T extends z.ZodType ? z.output<T> : undefined;
type Given<T> = T extends z.ZodType ? z.input<T> : undefined;

/** What the server's handler receives. */
export type InputOf<E extends EndpointSpec> = {
  params: Parsed<E['params']>;
  query: Parsed<E['query']>;
  body: Parsed<E['body']>;
};

/** What a caller gives. */
export type CallOf<E extends EndpointSpec> = (E['params'] extends z.ZodType
  ? { params: Given<E['params']> }
  : { params?: undefined }) &
  (E['query'] extends z.ZodType ? { query?: Given<E['query']> } : { query?: undefined }) &
  (E['body'] extends z.ZodType ? { body: Given<E['body']> } : { body?: undefined });

/** What a caller gets back. */
export type ReplyOf<E extends EndpointSpec> = E['reply'] extends z.ZodType ? z.output<E['reply']> : Blob;

export function isFileReply(reply: EndpointSpec['reply']): reply is FileReply {
  return 'file' in reply;
}
