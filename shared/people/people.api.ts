import { z } from 'zod';
import { endpoint } from '../kernel/endpoint.ts';
import { idParams, idSchema } from '../kernel/ids.ts';

export const languages = ['en', 'vi', 'es', 'pt', 'hi', 'ne', 'fil', 'zh', 'ar'] as const;
export const languageNames: Record<(typeof languages)[number], string> = {
  en: 'English',
  vi: 'Vietnamese',
  es: 'Spanish',
  pt: 'Portuguese',
  hi: 'Hindi',
  ne: 'Nepali',
  fil: 'Filipino',
  zh: 'Chinese (simplified)',
  ar: 'Arabic',
};

const name = z.string().trim().min(1, 'Write the name.').max(120, 'Use 120 characters at most.');

export const employerBody = z.strictObject({
  name,
  /** Australian business number or the like; free text. */
  businessNumber: z.string().trim().max(40).default(''),
  contact: z.string().trim().max(120).default(''),
});
export const employerSchema = employerBody.extend({ id: idSchema, people: z.number().int() });
export type Employer = z.infer<typeof employerSchema>;

export const personBody = z.strictObject({
  name,
  employerId: idSchema,
  trade: z.string().trim().min(1, 'Write the trade.').max(80),
  /** Phone or e-mail. */
  contact: z.string().trim().max(120).default(''),
  /** Number of the construction induction card. */
  inductionCard: z.string().trim().max(40).default(''),
  language: z.enum(languages).default('en'),
});
export const personSchema = personBody.extend({
  id: idSchema,
  employer: z.string(),
  /** Where the person belongs to the crew. */
  sites: z.array(z.object({ id: idSchema, name: z.string() })),
  signIn: z.boolean(),
  archivedAt: z.string().nullable(),
});
export type Person = z.infer<typeof personSchema>;

export const listEmployers = endpoint({
  name: 'employers.list',
  method: 'GET',
  path: '/api/employers',
  access: 'person.read',
  summary: 'Employers',
  reply: z.object({ employers: z.array(employerSchema) }),
});

export const saveEmployer = endpoint({
  name: 'employers.save',
  method: 'PUT',
  path: '/api/employers/:id',
  access: 'person.manage',
  summary: 'Create or change an employer',
  params: idParams,
  body: employerBody,
  reply: employerSchema,
});

export const personFilters = z.object({
  search: z.string().max(100).optional(),
  siteId: idSchema.optional(),
  employerId: idSchema.optional(),
  archived: z.enum(['yes', 'no']).default('no'),
});

export const listPeople = endpoint({
  name: 'people.list',
  method: 'GET',
  path: '/api/people',
  access: 'person.read',
  summary: 'People, with or without a sign-in',
  query: personFilters,
  reply: z.object({ people: z.array(personSchema) }),
});

export const getPerson = endpoint({
  name: 'people.get',
  method: 'GET',
  path: '/api/people/:id',
  access: 'person.read',
  summary: 'One person',
  params: idParams,
  reply: personSchema,
});

export const savePerson = endpoint({
  name: 'people.save',
  method: 'PUT',
  path: '/api/people/:id',
  access: 'person.manage',
  summary: 'Create or change a person',
  params: idParams,
  body: personBody,
  reply: personSchema,
});

export const archivePerson = endpoint({
  name: 'people.archive',
  method: 'PUT',
  path: '/api/people/:id/archived',
  access: 'person.manage',
  summary: 'Take a person off the lists, or bring one back; records stay, phones are no longer recognised',
  params: idParams,
  body: z.strictObject({ archived: z.boolean() }),
  reply: personSchema,
});
