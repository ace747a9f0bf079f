import { z } from 'zod';

const verified = z.enum(['law', 'regulator', 'secondary', 'memory']);

/** What a place's law asks of a statement and calls things. Data, so that another place is another file. */
export const profileSchema = z.strictObject({
  format: z.literal(1),
  id: z.string().regex(/^[a-z0-9-]+$/),
  version: z.number().int().min(1),
  name: z.string().min(1),
  /** What a statement is called in full. */
  documentTitle: z.string().min(1),
  law: z.string().min(1),
  /** The day on which it was held against the law's text, and what was not. */
  checkedOn: z.iso.date(),
  unverified: z.array(z.string()),
  highRiskTerm: z.string().min(1),
  highRisk: z.array(z.strictObject({ key: z.string(), words: z.string(), clause: z.string() })),
  /** Contents that the law requires, each tied to the rule that checks it. */
  required: z.array(z.strictObject({ rule: z.string(), clause: z.string(), verified })),
  pageSize: z.enum(['A4', 'Letter']),
  emergencyNumber: z.string(),
  signing: z.string(),
  caution: z.string(),
});
export type Profile = z.infer<typeof profileSchema>;
