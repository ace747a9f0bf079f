import { z } from 'zod';
import { endpoint } from '../kernel/endpoint.ts';
import { idParams, idSchema } from '../kernel/ids.ts';
import { isTimeZone, workDate } from '../kernel/work-date.ts';
import { personSchema } from '../people/people.api.ts';

const text = (max: number) => z.string().trim().max(max).default('');

export const siteBody = z.strictObject({
  name: z.string().trim().min(1, 'Write the site’s name.').max(120),
  address: z.string().trim().min(1, 'Write the address: a statement is for one place.').max(240),
  timeZone: z.string().refine(isTimeZone, 'Choose a time zone like Australia/Adelaide.'),
  principalContractor: text(160),
  /** What emergency services need to find the place, and the muster point. */
  emergency: text(600),
});
export const siteSchema = siteBody.extend({
  id: idSchema,
  /** Secret part of the address that the QR code on the site board opens. */
  signToken: z.string(),
  crew: z.number().int(),
  archivedAt: z.string().nullable(),
});
export type Site = z.infer<typeof siteSchema>;

export const listSites = endpoint({
  name: 'sites.list',
  method: 'GET',
  path: '/api/sites',
  access: 'site.read',
  summary: 'Sites',
  query: z.object({ archived: z.enum(['yes', 'no']).default('no') }),
  reply: z.object({ sites: z.array(siteSchema) }),
});

export const getSite = endpoint({
  name: 'sites.get',
  method: 'GET',
  path: '/api/sites/:id',
  access: 'site.read',
  summary: 'One site with its crew',
  params: idParams,
  reply: siteSchema.extend({ people: z.array(personSchema) }),
});

export const saveSite = endpoint({
  name: 'sites.save',
  method: 'PUT',
  path: '/api/sites/:id',
  access: 'site.manage',
  summary: 'Create or change a site',
  params: idParams,
  body: siteBody,
  reply: siteSchema,
});

export const archiveSite = endpoint({
  name: 'sites.archive',
  method: 'PUT',
  path: '/api/sites/:id/archived',
  access: 'site.manage',
  summary: 'Close a site, or open it again; its records stay',
  params: idParams,
  body: z.strictObject({ archived: z.boolean() }),
  reply: siteSchema,
});

export const setCrewMember = endpoint({
  name: 'sites.setCrewMember',
  method: 'PUT',
  path: '/api/sites/:id/crew/:personId',
  access: 'site.manage',
  summary: 'Put a person on a site’s crew, or take one off',
  params: z.object({ id: idSchema, personId: idSchema }),
  body: z.strictObject({ onCrew: z.boolean() }),
  reply: siteSchema,
});

export const getSignAccess = endpoint({
  name: 'sites.signAccess',
  method: 'GET',
  path: '/api/sites/:id/sign-access',
  access: 'signon.take',
  summary: 'The address and QR code of the site’s sign-on page, and today’s day code',
  params: idParams,
  reply: z.object({
    address: z.string(),
    /** QR code of the address (ISO/IEC 18004) as SVG. */
    qrSvg: z.string(),
    dayCode: z.string(),
    day: workDate,
  }),
});

/** What the board along the bottom edge says of a site: a part that is not well names its mend. */
export const boardPartSchema = z.object({
  key: z.enum(['signOn', 'talk', 'draft']),
  words: z.string(),
  well: z.boolean(),
  link: z.string(),
});
export type BoardPart = z.infer<typeof boardPartSchema>;

export const getBoard = endpoint({
  name: 'sites.board',
  method: 'GET',
  path: '/api/sites/:id/board',
  access: 'site.read',
  summary: 'What stands between a site’s crew and the edge right now',
  params: idParams,
  reply: z.object({ siteId: idSchema, site: z.string(), at: z.string(), parts: z.array(boardPartSchema) }),
});
