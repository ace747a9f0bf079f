import { queryOptions } from '@tanstack/react-query';
import { getBlock, listBlocks } from '#shared/library/library.api.ts';
import { call } from '../lib/call.ts';

export const blocksQuery = queryOptions({
  queryKey: ['library', 'blocks'],
  queryFn: () => call(listBlocks, {}),
  staleTime: 300_000,
});

export const blockQuery = (blockId: string) =>
  queryOptions({
    queryKey: ['library', 'blocks', blockId],
    queryFn: () => call(getBlock, { params: { blockId } }),
    staleTime: 300_000,
  });
