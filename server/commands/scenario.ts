import { z } from 'zod';
import { languages } from '#shared/people/people.api.ts';
import { particularsSchema } from '#shared/statements/document/attributes.ts';

const key = z.string().regex(/^[a-z]+$/);

/** The demo scenario as data. Everything in it is invented. */
export const scenarioSchema = z.strictObject({
  format: z.literal(1),
  note: z.string(),
  organisation: z.strictObject({
    name: z.string(),
    timeZone: z.string(),
    profileId: z.string(),
    matrixId: z.string(),
    contact: z.string(),
  }),
  sites: z.array(
    z.strictObject({
      key,
      name: z.string(),
      address: z.string(),
      timeZone: z.string(),
      principalContractor: z.string(),
      emergency: z.string(),
    }),
  ),
  employers: z.array(
    z.strictObject({ key, name: z.string(), businessNumber: z.string(), contact: z.string() }),
  ),
  people: z.array(
    z.strictObject({
      key,
      name: z.string(),
      employer: key,
      trade: z.string(),
      inductionCard: z.string(),
      language: z.enum(languages),
      sites: z.array(key),
    }),
  ),
  statement: z.strictObject({
    site: key,
    title: z.string(),
    starter: z.string(),
    particulars: particularsSchema.partial(),
    /** Values of the fill-ins by their labels. */
    fillIns: z.record(z.string(), z.string()),
    signOns: z.array(
      z.strictObject({
        person: key,
        hoursAfter: z.number(),
        readingSeconds: z.number(),
        how: z.enum(['phone', 'handedRound', 'typed']),
      }),
    ),
  }),
  draft: z.strictObject({ site: key, title: z.string(), starter: z.string() }),
  talks: z.array(
    z.strictObject({
      site: key,
      daysAgo: z.number(),
      topic: z.string(),
      presenter: z.string(),
      time: z.string(),
      place: z.string(),
      points: z.array(z.string()),
      mattersRaised: z.string(),
      outcome: z.string(),
      actions: z.array(z.strictObject({ words: z.string(), owner: z.string(), dueInDays: z.number() })),
      attendance: z.array(key),
      closed: z.boolean(),
    }),
  ),
});
export type Scenario = z.infer<typeof scenarioSchema>;
