import { z } from 'zod';
import { idSchema } from '../kernel/ids.ts';
import { profileSchema } from '../profiles/profile.ts';
import { matrixSchema } from '../risk/matrix.ts';
import { documentSchema } from './document/json.ts';
import type { Outline } from './document/outline.ts';

/**
 * A revision as issued: everything that it says, and nothing that can change elsewhere afterwards. Its hash is SHA-256 over
 * its canonical JSON (RFC 8785).
 */
export const frozenSchema = z.strictObject({
  format: z.literal(1),
  statementId: idSchema,
  revision: z.number().int().min(1),
  organisation: z.string(),
  site: z.strictObject({
    id: idSchema,
    name: z.string(),
    address: z.string(),
    timeZone: z.string(),
    principalContractor: z.string(),
    emergency: z.string(),
  }),
  title: z.string(),
  profile: profileSchema,
  matrix: matrixSchema,
  documentFormat: z.literal(1),
  document: documentSchema,
  outline: z.custom<Outline>((value) => typeof value === 'object' && value !== null),
  preparedBy: z.string(),
  issuedBy: z.string(),
  issuedAt: z.string(),
  /** A material revision asks everybody to sign again. */
  material: z.boolean(),
  changeNote: z.string(),
  invented: z.boolean(),
});
export type Frozen = z.infer<typeof frozenSchema>;
