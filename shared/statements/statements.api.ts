import { z } from 'zod';
import { done } from '../account/account.api.ts';
import { endpoint } from '../kernel/endpoint.ts';
import { idParams, idSchema } from '../kernel/ids.ts';
import { profileSchema } from '../profiles/profile.ts';
import { documentSchema } from './document/json.ts';
import { frozenSchema } from './frozen.ts';

export const titleSchema = z
  .string()
  .trim()
  .min(1, 'Give the statement a title.')
  .max(140, 'Use 140 characters at most.');
const documentBytes = 2 * 1024 * 1024;

/**
 * `draft`: being written. `submitted`: waits for the safety officer. `issued`: nothing is being written, the current revision is in
 * force. `withdrawn`: out of force for good. A draft or submitted statement may have an earlier revision in force.
 */
export const statementStates = ['draft', 'submitted', 'issued', 'withdrawn'] as const;
export const statementState = z.enum(statementStates);

export const statementRowSchema = z.object({
  id: idSchema,
  siteId: idSchema,
  site: z.string(),
  timeZone: z.string(),
  title: z.string(),
  state: statementState,
  /** Number of the revision in force; null where none is. */
  currentRevision: z.number().int().nullable(),
  updatedAt: z.string(),
  updatedBy: z.string(),
  issuedAt: z.string().nullable(),
});
export type StatementRow = z.infer<typeof statementRowSchema>;

export const revisionRowSchema = z.object({
  id: idSchema,
  number: z.number().int(),
  hash: z.string(),
  issuedAt: z.string(),
  issuedBy: z.string(),
  material: z.boolean(),
  changeNote: z.string(),
  standing: z.enum(['current', 'superseded', 'withdrawn']),
});
export type RevisionRow = z.infer<typeof revisionRowSchema>;

export const statementSchema = statementRowSchema.extend({
  documentFormat: z.number().int(),
  document: documentSchema,
  lockVersion: z.number().int(),
  profile: profileSchema,
  /** What the safety officer asked to be changed when handing the draft back. */
  returnNote: z.string(),
  submittedBy: z.string().nullable(),
  submittedAt: z.string().nullable(),
  revisions: z.array(revisionRowSchema),
});
export type Statement = z.infer<typeof statementSchema>;

export const listStatements = endpoint({
  name: 'statements.list',
  method: 'GET',
  path: '/api/statements',
  access: 'statement.read',
  summary: 'Statements, newest change first',
  query: z.object({
    siteId: idSchema.optional(),
    state: statementState.optional(),
    search: z.string().max(100).optional(),
  }),
  reply: z.object({ statements: z.array(statementRowSchema) }),
});

export const createStatementBody = z.strictObject({
  siteId: idSchema,
  title: titleSchema,
  /** A starter to begin from; null begins from nothing. */
  starterId: z.string().max(80).nullable(),
});

export const createStatement = endpoint({
  name: 'statements.create',
  method: 'PUT',
  path: '/api/statements/:id',
  access: 'statement.write',
  summary: 'Start a statement for a site; a resend changes nothing',
  params: idParams,
  body: createStatementBody,
  reply: statementSchema,
});

export const getStatement = endpoint({
  name: 'statements.get',
  method: 'GET',
  path: '/api/statements/:id',
  access: 'statement.read',
  summary: 'A statement with its draft and its revisions',
  params: idParams,
  reply: statementSchema,
});

export const saveDraftBody = z.strictObject({
  /** The version that this was written over; a stale one is answered 409 with the stored draft in `extra`. */
  lockVersion: z.number().int(),
  title: titleSchema,
  document: documentSchema,
});

/** What a 409 of `statements.saveDraft` carries in `extra`, so that nothing is lost. */
export const draftConflictSchema = z.object({
  lockVersion: z.number().int(),
  title: z.string(),
  document: documentSchema,
  updatedAt: z.string(),
  updatedBy: z.string(),
});
export type DraftConflict = z.infer<typeof draftConflictSchema>;

export const saveDraft = endpoint({
  name: 'statements.saveDraft',
  method: 'PUT',
  path: '/api/statements/:id/draft',
  access: 'statement.write',
  summary: 'Save the draft over the version that it was based on',
  params: idParams,
  body: saveDraftBody,
  reply: z.object({ lockVersion: z.number().int(), updatedAt: z.string() }),
  maxBytes: documentBytes,
});

const lockOnly = z.strictObject({ lockVersion: z.number().int() });

export const submitDraft = endpoint({
  name: 'statements.submit',
  method: 'POST',
  path: '/api/statements/:id/submit',
  access: 'statement.write',
  summary: 'Hand the draft to the safety officer',
  params: idParams,
  body: lockOnly,
  reply: statementSchema,
});

export const recallDraft = endpoint({
  name: 'statements.recall',
  method: 'POST',
  path: '/api/statements/:id/recall',
  access: 'statement.write',
  summary: 'Take a submitted draft back to go on writing',
  params: idParams,
  body: lockOnly,
  reply: statementSchema,
});

export const returnDraft = endpoint({
  name: 'statements.return',
  method: 'POST',
  path: '/api/statements/:id/return',
  access: 'statement.issue',
  summary: 'Ask for changes: hands a submitted draft back with a note',
  params: idParams,
  body: lockOnly.extend({ note: z.string().trim().min(1, 'Say what should change.').max(2000) }),
  reply: statementSchema,
});

export const issueBody = lockOnly.extend({
  material: z.boolean(),
  changeNote: z.string().trim().max(1000).default(''),
});

export const issueStatement = endpoint({
  name: 'statements.issue',
  method: 'POST',
  path: '/api/statements/:id/issue',
  access: 'statement.issue',
  summary: 'Freeze a submitted draft as the next revision; refused while a gap blocks it',
  params: idParams,
  body: issueBody,
  reply: statementSchema,
});

export const reviseStatement = endpoint({
  name: 'statements.revise',
  method: 'POST',
  path: '/api/statements/:id/revise',
  access: 'statement.write',
  summary: 'Start the next revision’s draft from the one in force',
  params: idParams,
  body: lockOnly,
  reply: statementSchema,
});

export const withdrawStatement = endpoint({
  name: 'statements.withdraw',
  method: 'POST',
  path: '/api/statements/:id/withdraw',
  access: 'statement.issue',
  summary: 'Take the statement out of force; its records stay',
  params: idParams,
  body: lockOnly.extend({ reason: z.string().trim().min(1, 'Say why.').max(1000) }),
  reply: statementSchema,
});

export const discardStatement = endpoint({
  name: 'statements.discard',
  method: 'DELETE',
  path: '/api/statements/:id',
  access: 'statement.write',
  summary: 'Throw away a draft that was never issued',
  params: idParams,
  reply: done,
});

export const signatureOnSheetSchema = z.object({
  name: z.string(),
  employer: z.string(),
  trade: z.string(),
  revision: z.number().int(),
  signedAt: z.string(),
  method: z.enum(['drawn', 'typed']),
  svg: z.string().nullable(),
  typedName: z.string().nullable(),
  witness: z.string().nullable(),
});
export type SignatureOnSheet = z.infer<typeof signatureOnSheetSchema>;

/** What the printed sheet is made of; the server renders it for the PDF, the browser for its own print. */
export const sheetSchema = z.object({
  frozen: frozenSchema,
  /** Null for a draft, which has no number and no hash. */
  revision: revisionRowSchema.nullable(),
  signatures: z.array(signatureOnSheetSchema),
  /** The address behind the QR code, and the code itself as SVG; null for a draft. */
  verifyAddress: z.string().nullable(),
  verifyQrSvg: z.string().nullable(),
  printedAt: z.string(),
  /** Whether the server can make the PDF; where not, the print page stands in. */
  pdf: z.boolean(),
});
export type Sheet = z.infer<typeof sheetSchema>;

const revisionParams = z.object({ id: idSchema, number: z.coerce.number().int().min(1) });

export const getSheet = endpoint({
  name: 'statements.sheet',
  method: 'GET',
  path: '/api/statements/:id/revisions/:number/sheet',
  access: 'statement.read',
  summary: 'An issued revision with its signatures, as printed',
  params: revisionParams,
  reply: sheetSchema,
});

export const getDraftSheet = endpoint({
  name: 'statements.draftSheet',
  method: 'GET',
  path: '/api/statements/:id/draft/sheet',
  access: 'statement.read',
  summary: 'The draft as it would be printed, marked as not for use',
  params: idParams,
  reply: sheetSchema,
});

export const getSheetPdf = endpoint({
  name: 'statements.sheetPdf',
  method: 'GET',
  path: '/api/statements/:id/revisions/:number/sheet.pdf',
  access: 'statement.read',
  summary: 'An issued revision with its signatures as PDF; 503 where the server has no browser',
  params: revisionParams,
  reply: { file: 'application/pdf' },
});

export const getDraftPdf = endpoint({
  name: 'statements.draftPdf',
  method: 'GET',
  path: '/api/statements/:id/draft/sheet.pdf',
  access: 'statement.read',
  summary: 'The draft as PDF, marked as not for use',
  params: idParams,
  reply: { file: 'application/pdf' },
});

export const verifyHash = endpoint({
  name: 'statements.verify',
  method: 'GET',
  path: '/api/verify/:hash',
  access: 'public',
  summary: 'Whether a printed copy is current, superseded, withdrawn or unknown; shows no content',
  params: z.object({
    hash: z.string().regex(/^[0-9a-f]{10,64}$/, 'The short hash is ten digits from 0 to 9 and a to f.'),
  }),
  reply: z.object({
    standing: z.enum(['current', 'superseded', 'withdrawn', 'unknown']),
    number: z.number().int().nullable(),
    issuedAt: z.string().nullable(),
  }),
});
