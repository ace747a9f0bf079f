import { z } from 'zod';
import { endpoint } from '../kernel/endpoint.ts';
import { blockSchema, stages } from './block.ts';

export const blockSummarySchema = z.object({
  id: z.string(),
  version: z.number().int(),
  title: z.string(),
  summary: z.string(),
  stage: z.enum(stages),
  tools: z.array(z.string()),
  highRisk: z.array(z.string()),
  hazards: z.array(z.string()),
  /** Further words to be found by: kinds of hazard, and what the block says of causes. */
  words: z.string(),
  steps: z.number().int(),
  fillIns: z.number().int(),
});
export type BlockSummary = z.infer<typeof blockSummarySchema>;

export const starterSummarySchema = z.object({
  id: z.string(),
  title: z.string(),
  summary: z.string(),
  blocks: z.array(z.string()),
});

export const listBlocks = endpoint({
  name: 'library.blocks',
  method: 'GET',
  path: '/api/library/blocks',
  access: 'library.read',
  summary: 'The newest version of every block in the organisation’s library',
  reply: z.object({ blocks: z.array(blockSummarySchema) }),
});

export const getBlock = endpoint({
  name: 'library.block',
  method: 'GET',
  path: '/api/library/blocks/:blockId',
  access: 'library.read',
  summary: 'One block, whole',
  params: z.object({ blockId: z.string().max(80) }),
  reply: blockSchema,
});

export const listStarters = endpoint({
  name: 'library.starters',
  method: 'GET',
  path: '/api/library/starters',
  access: 'library.read',
  summary: 'Starter statements, each a list of blocks',
  reply: z.object({ starters: z.array(starterSummarySchema) }),
});
