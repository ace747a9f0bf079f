import * as api from '#shared/signons/register.api.ts';
import type { Feature } from '../platform/features.ts';
import { mount } from '../platform/mount.ts';
import * as register from './register.service.ts';

export const registerRoutes: Feature = (router, platform) => {
  mount(router, platform, api.getRegister, ({ db, actor, query }) =>
    register.registerRows(db, actor.orgId, query),
  );
  mount(router, platform, api.getRegisterCsv, async ({ db, actor, query }) => ({
    fileName: 'sign-on register.csv',
    content: await register.registerCsv(db, actor.orgId, query),
  }));
  mount(router, platform, api.getSignOn, ({ db, actor, params }) =>
    register.signOnRecordOf(db, actor.orgId, params.id),
  );
};
