import { z } from 'zod';
import { endpoint } from '../kernel/endpoint.ts';
import { idParams, idSchema } from '../kernel/ids.ts';
import { languages } from '../people/people.api.ts';
import { declarationSchema } from './signons.api.ts';

const language = z.enum(languages);

export const registerStatuses = ['current', 'older', 'none'] as const;
export const registerStatusNames = {
  current: 'Signed the current revision',
  older: 'Signed an older revision',
  none: 'Not signed',
} as const;

export const registerQuery = z.object({
  statementId: idSchema.optional(),
  siteId: idSchema.optional(),
  status: z.enum(registerStatuses).optional(),
  employerId: idSchema.optional(),
  search: z.string().max(100).optional(),
  sort: z.enum(['name', 'employer', 'statement', 'signedAt', 'status']).default('name'),
  direction: z.enum(['up', 'down']).default('up'),
});

export const registerRowSchema = z.object({
  statementId: idSchema,
  statement: z.string(),
  siteId: idSchema,
  site: z.string(),
  timeZone: z.string(),
  /** The revision in force. */
  currentRevision: z.number().int(),
  personId: idSchema,
  name: z.string(),
  employer: z.string(),
  trade: z.string(),
  onCrew: z.boolean(),
  status: z.enum(registerStatuses),
  signOn: z
    .object({
      id: idSchema,
      revision: z.number().int(),
      signedAt: z.string(),
      receivedAt: z.string(),
      method: z.enum(['drawn', 'typed']),
      handedRoundBy: z.string().nullable(),
      readingMs: z.number().int(),
    })
    .nullable(),
});
export type RegisterRow = z.infer<typeof registerRowSchema>;

export const getRegister = endpoint({
  name: 'register.rows',
  method: 'GET',
  path: '/api/register',
  access: 'register.read',
  summary:
    'Who signed the current revision, an older one, or none: per statement in force and person of the crew',
  query: registerQuery,
  reply: z.object({
    rows: z.array(registerRowSchema),
    /** Over the whole scope, before the status filter. */
    counts: z.object({ current: z.number().int(), older: z.number().int(), none: z.number().int() }),
  }),
});

export const getRegisterCsv = endpoint({
  name: 'register.csv',
  method: 'GET',
  path: '/api/register.csv',
  access: 'register.read',
  summary: 'The register as CSV (RFC 4180), times in each site’s own zone',
  query: registerQuery,
  reply: { file: 'text/csv' },
});

export const signOnRecordSchema = z.object({
  id: idSchema,
  statementId: idSchema,
  statement: z.string(),
  revision: z.number().int(),
  revisionHash: z.string(),
  standing: z.enum(['current', 'superseded', 'withdrawn']),
  site: z.string(),
  timeZone: z.string(),
  person: z.object({
    id: idSchema,
    name: z.string(),
    employer: z.string(),
    trade: z.string(),
    inductionCard: z.string(),
  }),
  method: z.enum(['drawn', 'typed']),
  svg: z.string().nullable(),
  typedName: z.string().nullable(),
  witness: z.string().nullable(),
  declaration: declarationSchema,
  signedAt: z.string(),
  receivedAt: z.string(),
  readingMs: z.number().int(),
  wordsOnCards: z.number().int(),
  answers: z.array(z.object({ question: z.string(), tries: z.array(z.string()), right: z.boolean() })),
  language,
  device: z.string(),
  handedRoundBy: z.string().nullable(),
  ledger: z.object({ sequence: z.number().int(), hash: z.string() }),
});
export type SignOnRecord = z.infer<typeof signOnRecordSchema>;

export const getSignOn = endpoint({
  name: 'register.signOn',
  method: 'GET',
  path: '/api/sign-ons/:id',
  access: 'register.read',
  summary: 'One sign-on with all that was kept of it',
  params: idParams,
  reply: signOnRecordSchema,
});
