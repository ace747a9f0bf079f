import { z } from 'zod';
import { endpoint } from '../kernel/endpoint.ts';
import { idSchema } from '../kernel/ids.ts';
import { boardPartSchema } from '../sites/sites.api.ts';
import { statementRowSchema } from '../statements/statements.api.ts';
import { talkRowSchema } from '../talks/talks.api.ts';

export const exceptionKinds = ['notSigned', 'signedOlder', 'readTooFast', 'talkMissed'] as const;
export const exceptionKindNames = {
  notSigned: 'Has not signed the current revision',
  signedOlder: 'Signed an older revision',
  readTooFast: 'Read faster than a person can read',
  talkMissed: 'Missed a toolbox talk',
} as const;

export const exceptionSchema = z.object({
  kind: z.enum(exceptionKinds),
  siteId: idSchema,
  site: z.string(),
  personId: idSchema,
  person: z.string(),
  employer: z.string(),
  words: z.string(),
  /** When it came about; null where it stands since the revision was issued. */
  at: z.string().nullable(),
  timeZone: z.string(),
  /** Path of the screen that shows the evidence. */
  evidence: z.string(),
});
export type Exception = z.infer<typeof exceptionSchema>;

export const listExceptions = endpoint({
  name: 'audit.exceptions',
  method: 'GET',
  path: '/api/exceptions',
  access: 'audit.read',
  summary: 'Across all sites: who has not signed, signed an older revision, read too fast, or missed a talk',
  query: z.object({ siteId: idSchema.optional(), kind: z.enum(exceptionKinds).optional() }),
  reply: z.object({
    exceptions: z.array(exceptionSchema),
    counts: z.record(z.enum(exceptionKinds), z.number().int()),
    at: z.string(),
    ledger: z.object({ entries: z.number().int(), hash: z.string() }),
  }),
});

export const getToday = endpoint({
  name: 'audit.today',
  method: 'GET',
  path: '/api/today',
  access: 'site.read',
  summary: 'The supervisor’s morning: each site’s board, drafts that wait, talks of the day',
  reply: z.object({
    at: z.string(),
    sites: z.array(z.object({ id: idSchema, name: z.string(), parts: z.array(boardPartSchema) })),
    drafts: z.array(statementRowSchema),
    talks: z.array(talkRowSchema),
  }),
});

export const getLapsing = endpoint({
  name: 'audit.lapsing',
  method: 'GET',
  path: '/api/lapsing',
  access: 'organisation.manage',
  summary: 'What runs out: statement reviews due, invitations not taken up',
  reply: z.object({
    at: z.string(),
    reviews: z.array(
      z.object({
        statementId: idSchema,
        title: z.string(),
        site: z.string(),
        reviewDate: z.string(),
        overdue: z.boolean(),
      }),
    ),
    invitations: z.array(
      z.object({ accountId: idSchema, name: z.string(), email: z.string(), invitedAt: z.string() }),
    ),
  }),
});
