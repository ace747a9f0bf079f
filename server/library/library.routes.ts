import * as api from '#shared/library/library.api.ts';
import type { Feature } from '../platform/features.ts';
import { mount } from '../platform/mount.ts';
import { newestBlock, newestBlocks, summaryOf } from './library.service.ts';
import { starters } from './templates.ts';

export const libraryRoutes: Feature = (router, platform) => {
  mount(router, platform, api.listBlocks, async ({ db, actor }) => ({
    blocks: (await newestBlocks(db, actor.orgId)).map(summaryOf),
  }));
  mount(router, platform, api.getBlock, ({ db, actor, params }) =>
    newestBlock(db, actor.orgId, params.blockId),
  );
  mount(router, platform, api.listStarters, () =>
    Promise.resolve({
      starters: starters().map(({ id, title, summary, blocks }) => ({ id, title, summary, blocks })),
    }),
  );
};
