import { type BlockSummary } from '#shared/library/library.api.ts';
import { stageNames } from '#shared/library/block.ts';

/** Blocks that hold every word, best first: title before tools before hazards before the rest. */
export function findBlocks(blocks: BlockSummary[], query: string): BlockSummary[] {
  const words = query.toLowerCase().split(/\s+/).filter(Boolean);
  return blocks
    .map((block) => ({ block, score: scoreOf(block, words) }))
    .filter(({ score }) => score > 0)
    .toSorted((a, b) => b.score - a.score || a.block.title.localeCompare(b.block.title))
    .map(({ block }) => block);
}

function scoreOf(block: BlockSummary, words: string[]): number {
  const fields: [string, number][] = [
    [block.title, 8],
    [block.tools.join(' '), 4],
    [block.hazards.join(' '), 2],
    [`${block.summary} ${stageNames[block.stage]} ${block.words}`, 1],
  ];
  let total = 1;
  for (const word of words) {
    const best = Math.max(
      ...fields.map(([text, weight]) => (text.toLowerCase().includes(word) ? weight : 0)),
    );
    if (best === 0) return 0;
    total += best;
  }
  return total;
}
