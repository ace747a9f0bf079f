import * as api from '#shared/audit/audit.api.ts';
import type { Feature } from '../platform/features.ts';
import { mount } from '../platform/mount.ts';
import * as audit from './audit.service.ts';

export const auditRoutes: Feature = (router, platform) => {
  mount(router, platform, api.listExceptions, ({ db, actor, query }) =>
    audit.listExceptions(db, actor.orgId, query),
  );
  mount(router, platform, api.getToday, ({ db, actor }) => audit.todayOf(db, actor.orgId));
  mount(router, platform, api.getLapsing, ({ db, actor }) => audit.lapsingOf(db, actor.orgId));
};
