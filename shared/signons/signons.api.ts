import { z } from 'zod';
import { done } from '../account/account.api.ts';
import { endpoint } from '../kernel/endpoint.ts';
import { idParams, idSchema } from '../kernel/ids.ts';
import { instant } from '../kernel/work-date.ts';
import { languages } from '../people/people.api.ts';
import { signatureSchema } from './signature.ts';

const token = z.string().regex(/^[a-z0-9]{16,40}$/, 'This is not the address of a site’s sign-on page.');
const tokenParams = z.object({ token });
const dayCode = z.string().regex(/^\d{4}$/, 'The day code is four digits.');
const language = z.enum(languages);

export const declarationSchema = z.object({
  id: z.string(),
  version: z.number().int(),
  language,
  words: z.array(z.string()),
});
export type Declaration = z.infer<typeof declarationSchema>;

/** What stands to be signed at one site by one person. */
export const toSignSchema = z.object({
  person: z.object({ id: idSchema, name: z.string(), employer: z.string() }),
  site: z.object({ id: idSchema, name: z.string(), timeZone: z.string() }),
  organisation: z.string(),
  statements: z.array(
    z.object({
      revisionId: idSchema,
      statementId: idSchema,
      title: z.string(),
      number: z.number().int(),
      issuedAt: z.string(),
      /** `signed`: nothing to do. `older`: signed an earlier revision that no longer counts. `open`: never signed. */
      standing: z.enum(['signed', 'older', 'open']),
      signedAt: z.string().nullable(),
      changeNote: z.string(),
    }),
  ),
  talks: z.array(
    z.object({
      id: idSchema,
      topic: z.string(),
      date: z.string(),
      time: z.string(),
      place: z.string(),
      presenter: z.string(),
      points: z.array(z.string()),
      attended: z.boolean(),
    }),
  ),
  talkDeclaration: declarationSchema,
});
export type ToSign = z.infer<typeof toSignSchema>;

export const crewCardSchema = z.object({
  stepId: z.string(),
  number: z.number().int(),
  title: z.string(),
  words: z.array(z.string()),
  hurts: z.array(z.string()),
  controls: z.array(z.object({ text: z.string(), level: z.string(), role: z.string() })),
  stopIf: z.array(z.string()),
  holdPoints: z.array(z.string()),
  protective: z.array(z.string()),
});

export const readingSchema = z.object({
  revisionId: idSchema,
  statementId: idSchema,
  number: z.number().int(),
  hash: z.string(),
  title: z.string(),
  documentTitle: z.string(),
  site: z.string(),
  standing: z.enum(['current', 'superseded', 'withdrawn']),
  job: z.string(),
  emergency: z.string(),
  responsible: z.string(),
  cards: z.array(crewCardSchema),
  questions: z.array(
    z.object({
      id: z.string(),
      stepId: z.string(),
      ask: z.string(),
      answers: z.array(z.string()),
      right: z.number().int(),
      why: z.string(),
    }),
  ),
  declaration: declarationSchema,
  caution: z.string(),
});
export type Reading = z.infer<typeof readingSchema>;

/* The site's sign-on page on a worker's own phone */

export const getSignPage = endpoint({
  name: 'sign.page',
  method: 'GET',
  path: '/api/sign/:token',
  access: 'public',
  summary:
    'What the sign-on page may say to anybody, and whether this phone is known; no names, no statements',
  params: tokenParams,
  reply: z.object({
    site: z.string(),
    organisation: z.string(),
    recognised: z.object({ personId: idSchema, name: z.string(), employer: z.string() }).nullable(),
    /** A known phone whose person is on the crew needs no day code. */
    dayCodeNeeded: z.boolean(),
    /** The privacy collection notice, shown before anything is collected. */
    notice: z.object({ version: z.number().int(), paragraphs: z.array(z.string()) }),
    invented: z.boolean(),
  }),
});

export const findPerson = endpoint({
  name: 'sign.find',
  method: 'POST',
  path: '/api/sign/:token/find',
  access: 'public',
  summary: 'Find yourself by the name you write, with the day code; throttled',
  params: tokenParams,
  body: z.strictObject({
    dayCode,
    name: z.string().trim().min(3, 'Write at least three letters of your name.').max(120),
  }),
  reply: z.object({
    people: z.array(z.object({ id: idSchema, name: z.string(), employer: z.string() })),
    employers: z.array(z.object({ id: idSchema, name: z.string() })),
  }),
});

export const newPersonSchema = z.strictObject({
  id: idSchema,
  name: z.string().trim().min(2, 'Write your name.').max(120),
  employerId: idSchema,
  trade: z.string().trim().min(1, 'Write your trade.').max(80),
  contact: z.string().trim().max(120).default(''),
  inductionCard: z.string().trim().max(40).default(''),
  language: language.default('en'),
});

export const enrolBody = z.strictObject({
  dayCode,
  deviceId: idSchema,
  noticeVersion: z.number().int(),
  person: z.union([z.strictObject({ existing: idSchema }), z.strictObject({ new: newPersonSchema })]),
});

export const enrol = endpoint({
  name: 'sign.enrol',
  method: 'POST',
  path: '/api/sign/:token/enrol',
  access: 'public',
  summary:
    'Tie this phone to a person and put the person on the site’s crew, with the day code; sets the device cookie',
  params: tokenParams,
  body: enrolBody,
  reply: z.object({ personId: idSchema, name: z.string() }),
});

export const forgetDevice = endpoint({
  name: 'sign.forgetDevice',
  method: 'DELETE',
  path: '/api/sign/device',
  access: 'device',
  summary: '"Not me": this phone is no longer tied to the person',
  reply: done,
});

export const getOwnToSign = endpoint({
  name: 'sign.toSign',
  method: 'GET',
  path: '/api/sign/:token/to-sign',
  access: 'device',
  summary: 'What this phone’s person has to sign at the site',
  params: tokenParams,
  reply: toSignSchema,
});

export const getOwnReading = endpoint({
  name: 'sign.reading',
  method: 'GET',
  path: '/api/sign/:token/revisions/:revisionId',
  access: 'device',
  summary: 'A revision as crew cards, with its questions and the words to be signed',
  params: tokenParams.extend({ revisionId: idSchema }),
  reply: readingSchema,
});

/** What every signature under a statement carries; ids are made on the device, so that a resend changes nothing. */
export const signOnBody = z.strictObject({
  revisionId: idSchema,
  /** The hash of what was shown, as the device received it. */
  revisionHash: z.string().regex(/^[0-9a-f]{64}$/),
  signature: signatureSchema,
  declaration: z.strictObject({ id: z.string().max(80), version: z.number().int(), language }),
  /** The device's own clock when the person signed. */
  signedAt: instant,
  readingMs: z.number().int().min(0).max(86_400_000),
  answers: z
    .array(
      z.strictObject({
        question: z.string().max(120),
        tries: z.array(z.number().int().min(0).max(9)).max(20),
      }),
    )
    .max(40),
  language,
});
export type SignOnBody = z.infer<typeof signOnBody>;

export const signOnReceiptSchema = z.object({
  id: idSchema,
  receivedAt: z.string(),
  /** True when the revision had been superseded meanwhile: kept for what was signed, and the person must read the new one. */
  superseded: z.boolean(),
});
const signOnBytes = 512 * 1024;

export const signOn = endpoint({
  name: 'sign.signOn',
  method: 'PUT',
  path: '/api/sign/:token/sign-ons/:id',
  access: 'device',
  summary: 'Sign a revision on one’s own phone',
  params: tokenParams.extend({ id: idSchema }),
  body: signOnBody,
  reply: signOnReceiptSchema,
  maxBytes: signOnBytes,
});

export const attendanceBody = z.strictObject({
  talkId: idSchema,
  signature: signatureSchema,
  declaration: z.strictObject({ id: z.string().max(80), version: z.number().int(), language }),
  signedAt: instant,
  language,
});

export const attend = endpoint({
  name: 'sign.attend',
  method: 'PUT',
  path: '/api/sign/:token/attendances/:id',
  access: 'device',
  summary: 'Sign a toolbox talk on one’s own phone',
  params: tokenParams.extend({ id: idSchema }),
  body: attendanceBody,
  reply: signOnReceiptSchema.omit({ superseded: true }),
  maxBytes: signOnBytes,
});

/* A signed-in person's own, and a device handed round by a supervisor */

const sitePerson = z.object({ id: idSchema, personId: idSchema });

export const getMyToSign = endpoint({
  name: 'signOns.mine',
  method: 'GET',
  path: '/api/me/to-sign',
  access: 'signon.own',
  summary: 'What the signed-in person has to sign, site by site',
  reply: z.object({ sites: z.array(toSignSchema) }),
});

export const getToSign = endpoint({
  name: 'signOns.toSign',
  method: 'GET',
  path: '/api/sites/:id/people/:personId/to-sign',
  access: 'signon.own',
  summary: 'What a person has to sign at a site; one’s own, or anybody’s for who may hand a device round',
  params: sitePerson,
  reply: toSignSchema,
});

export const getReading = endpoint({
  name: 'signOns.reading',
  method: 'GET',
  path: '/api/revisions/:id/reading',
  access: 'revision.read',
  summary: 'A revision as crew cards',
  params: idParams,
  reply: readingSchema,
});

export const signOnFor = endpoint({
  name: 'signOns.take',
  method: 'PUT',
  path: '/api/sites/:id/people/:personId/sign-ons/:signOnId',
  access: 'signon.own',
  summary:
    'Sign a revision on a signed-in device; another person’s only where the role may hand a device round',
  params: sitePerson.extend({ signOnId: idSchema }),
  body: signOnBody,
  reply: signOnReceiptSchema,
  maxBytes: signOnBytes,
});

export const attendFor = endpoint({
  name: 'signOns.takeAttendance',
  method: 'PUT',
  path: '/api/sites/:id/people/:personId/attendances/:attendanceId',
  access: 'signon.own',
  summary: 'Sign a toolbox talk on a signed-in device',
  params: sitePerson.extend({ attendanceId: idSchema }),
  body: attendanceBody,
  reply: signOnReceiptSchema.omit({ superseded: true }),
  maxBytes: signOnBytes,
});
