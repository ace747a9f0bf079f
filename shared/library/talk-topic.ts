import { z } from 'zod';
import { sourceSchema } from './block.ts';

const id = z.string().regex(/^[a-z0-9-]+$/);
const words = z.string().trim().min(1).max(500);

/** A toolbox talk that a leading hand can give without preparing: what to say, what to ask, what to show. */
export const talkTopicSchema = z.strictObject({
  format: z.literal(1),
  id,
  version: z.number().int().min(1),
  title: z.string().trim().min(1).max(100),
  minutes: z.number().int().min(5).max(10),
  /** Ids of the blocks that it speaks about. */
  blocks: z.array(id).min(1),
  /** An invented account, told as such, to start people talking. */
  story: words,
  points: z.array(words).min(3).max(7),
  /** Asked of the crew; `listenFor` tells the presenter what a good answer holds. */
  questions: z
    .array(z.strictObject({ ask: words, listenFor: words }))
    .min(2)
    .max(5),
  /** A thing to go and look at, or to hold up. */
  showOnSite: words,
  sources: z.array(sourceSchema).min(1),
});
export type TalkTopic = z.infer<typeof talkTopicSchema>;
