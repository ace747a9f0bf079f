import { z } from 'zod';
import { stages } from './block.ts';

const id = z.string().regex(/^[a-z0-9-]+$/);

/** A ready-made order of blocks for one kind of job. A statement made from it still has every fill-in open. */
export const starterSchema = z.strictObject({
  format: z.literal(1),
  id,
  title: z.string().trim().min(1).max(100),
  summary: z.string().trim().min(1).max(600),
  stage: z.enum(stages),
  /** Letters of the model high risk construction work list, reg 291: those of its blocks, sorted. */
  highRisk: z.array(z.string().regex(/^[a-r]$/)),
  /** Ids of blocks, in the order of the work. */
  blocks: z.array(id).min(1),
});
export type Starter = z.infer<typeof starterSchema>;
