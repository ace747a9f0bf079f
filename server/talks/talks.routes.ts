import * as api from '#shared/talks/talks.api.ts';
import type { Feature } from '../platform/features.ts';
import { mount } from '../platform/mount.ts';
import { closeTalk } from './close.service.ts';
import * as talks from './talks.service.ts';

export const talkRoutes: Feature = (router, platform) => {
  mount(router, platform, api.listTalks, async ({ db, actor, query }) => ({
    talks: await talks.listTalks(db, actor.orgId, query),
  }));
  mount(router, platform, api.getTalksCsv, async ({ db, actor, query }) => ({
    fileName: 'toolbox talks.csv',
    content: await talks.talksCsv(db, actor.orgId, query),
  }));
  mount(router, platform, api.getTalk, ({ db, actor, params }) => talks.getTalk(db, actor.orgId, params.id));
  mount(router, platform, api.saveTalk, ({ db, actor, params, body }) =>
    talks.saveTalk(db, actor, params.id, body),
  );
  mount(router, platform, api.closeTalk, ({ db, actor, params, body }) =>
    closeTalk(db, actor, params.id, body.lockVersion),
  );
  mount(router, platform, api.discardTalk, async ({ db, actor, params }) => {
    await talks.discardTalk(db, actor, params.id);
    return { done: true as const };
  });
};
