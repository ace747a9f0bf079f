import { z } from 'zod';
import { done } from '../account/account.api.ts';
import { endpoint } from '../kernel/endpoint.ts';
import { idParams, idSchema } from '../kernel/ids.ts';
import { wallTime, workDate } from '../kernel/work-date.ts';

const long = z.string().trim().max(4000).default('');

export const talkActionSchema = z.strictObject({
  id: idSchema,
  words: z.string().trim().min(1, 'Say what is to be done.').max(500),
  owner: z.string().trim().min(1, 'Name an owner.').max(120),
  dueDate: workDate,
});

/** The record of a toolbox talk. Fields after model WHS Act s 48: matters raised, outcome and who was told make it consultation. */
export const talkBody = z.strictObject({
  siteId: idSchema,
  topic: z.string().trim().min(1, 'Write the topic.').max(160),
  presenter: z.string().trim().min(1, 'Name who presents.').max(120),
  date: workDate,
  time: wallTime,
  minutes: z.number().int().min(1).max(240).default(10),
  place: z.string().trim().min(1, 'Say where.').max(160),
  points: z.array(z.string().trim().min(1).max(500)).max(40).default([]),
  mattersRaised: long,
  outcome: long,
  representativePresent: z.boolean().default(false),
  actions: z.array(talkActionSchema).max(40).default([]),
});
export type TalkBody = z.infer<typeof talkBody>;

export const talkRowSchema = z.object({
  id: idSchema,
  siteId: idSchema,
  site: z.string(),
  timeZone: z.string(),
  topic: z.string(),
  presenter: z.string(),
  date: z.string(),
  time: z.string(),
  state: z.enum(['open', 'closed']),
  attended: z.number().int(),
  /** The site's crew when the talk was closed, or now while it is open. */
  crew: z.number().int(),
  /** Without matters raised and an outcome a talk is a briefing, and does not count as consultation. */
  consultation: z.boolean(),
  openActions: z.number().int(),
});
export type TalkRow = z.infer<typeof talkRowSchema>;

export const talkSchema = talkBody.extend({
  id: idSchema,
  site: z.string(),
  timeZone: z.string(),
  state: z.enum(['open', 'closed']),
  lockVersion: z.number().int(),
  consultation: z.boolean(),
  attendance: z.array(
    z.object({
      id: idSchema,
      personId: idSchema,
      name: z.string(),
      employer: z.string(),
      signedAt: z.string(),
      method: z.enum(['drawn', 'typed']),
      svg: z.string().nullable(),
      typedName: z.string().nullable(),
      witness: z.string().nullable(),
      handedRoundBy: z.string().nullable(),
    }),
  ),
  missing: z.array(z.object({ personId: idSchema, name: z.string(), employer: z.string() })),
  closedAt: z.string().nullable(),
  closedBy: z.string().nullable(),
  hash: z.string().nullable(),
  ledgerSequence: z.number().int().nullable(),
});
export type Talk = z.infer<typeof talkSchema>;

export const talkQuery = z.object({
  siteId: idSchema.optional(),
  personId: idSchema.optional(),
  state: z.enum(['open', 'closed']).optional(),
  from: workDate.optional(),
  to: workDate.optional(),
  search: z.string().max(100).optional(),
});

export const listTalks = endpoint({
  name: 'talks.list',
  method: 'GET',
  path: '/api/talks',
  access: 'talk.read',
  summary: 'The register of toolbox talks, newest first',
  query: talkQuery,
  reply: z.object({ talks: z.array(talkRowSchema) }),
});

export const getTalksCsv = endpoint({
  name: 'talks.csv',
  method: 'GET',
  path: '/api/talks.csv',
  access: 'talk.read',
  summary: 'The register of talks as CSV (RFC 4180)',
  query: talkQuery,
  reply: { file: 'text/csv' },
});

export const getTalk = endpoint({
  name: 'talks.get',
  method: 'GET',
  path: '/api/talks/:id',
  access: 'talk.read',
  summary: 'One talk with its attendance',
  params: idParams,
  reply: talkSchema,
});

export const saveTalk = endpoint({
  name: 'talks.save',
  method: 'PUT',
  path: '/api/talks/:id',
  access: 'talk.write',
  summary: 'Create a talk (lockVersion 0) or change an open one; a closed one is refused',
  params: idParams,
  body: talkBody.extend({ lockVersion: z.number().int().min(0) }),
  reply: talkSchema,
});

export const closeTalk = endpoint({
  name: 'talks.close',
  method: 'POST',
  path: '/api/talks/:id/close',
  access: 'talk.write',
  summary: 'Freeze the talk with its attendance and enter it in the ledger',
  params: idParams,
  body: z.strictObject({ lockVersion: z.number().int() }),
  reply: talkSchema,
});

export const discardTalk = endpoint({
  name: 'talks.discard',
  method: 'DELETE',
  path: '/api/talks/:id',
  access: 'talk.write',
  summary: 'Throw away an open talk that nobody has signed',
  params: idParams,
  reply: done,
});
