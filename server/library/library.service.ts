import { and, desc, eq } from 'drizzle-orm';
import { type Block, hazardCategoryNames } from '#shared/library/block.ts';
import type { BlockSummary } from '#shared/library/library.api.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import { organisations } from '../account/account.table.ts';
import type { Db } from '../platform/db.ts';
import { blocks } from './library.table.ts';
import { blockTemplates } from './templates.ts';

/** Adds to an organisation's library every shipped block version that it does not have yet. */
export async function addShippedBlocks(db: Db, orgId: string): Promise<void> {
  const values = blockTemplates().map((block) => ({
    orgId,
    id: block.id,
    version: block.version,
    body: block,
  }));
  if (values.length > 0) await db.insert(blocks).values(values).onConflictDoNothing();
}

/** Brings every organisation's library up to the blocks that this version ships; what is there already is left as it is. */
export async function addShippedBlocksToAll(db: Db): Promise<void> {
  for (const { id } of await db.select({ id: organisations.id }).from(organisations))
    await addShippedBlocks(db, id);
}

/** The newest version of every block. */
export async function newestBlocks(db: Db, orgId: string): Promise<Block[]> {
  const rows = await db
    .selectDistinctOn([blocks.id])
    .from(blocks)
    .where(eq(blocks.orgId, orgId))
    .orderBy(blocks.id, desc(blocks.version));
  return rows.map(({ body }) => body);
}

export async function newestBlock(db: Db, orgId: string, id: string): Promise<Block> {
  const [row] = await db
    .select()
    .from(blocks)
    .where(and(eq(blocks.orgId, orgId), eq(blocks.id, id)))
    .orderBy(desc(blocks.version))
    .limit(1);
  if (!row) throw new Refusal('missing', 'This block is not in the library.');
  return row.body;
}

export function summaryOf(block: Block): BlockSummary {
  return {
    id: block.id,
    version: block.version,
    title: block.title,
    summary: block.summary,
    stage: block.stage,
    tools: block.tools,
    highRisk: block.highRisk,
    hazards: block.steps.flatMap((step) =>
      step.hazards.map(({ title }) => title.replace(/\{\{.*?\}\}/g, '…')),
    ),
    words: block.steps
      .flatMap((step) => [
        step.title,
        ...step.hazards.flatMap(({ category, causes }) => [hazardCategoryNames[category], causes]),
      ])
      .join(' '),
    steps: block.steps.length,
    fillIns: block.fillIns.length,
  };
}
