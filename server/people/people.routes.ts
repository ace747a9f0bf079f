import * as api from '#shared/people/people.api.ts';
import type { Feature } from '../platform/features.ts';
import { mount } from '../platform/mount.ts';
import * as people from './people.service.ts';

export const peopleRoutes: Feature = (router, platform) => {
  mount(router, platform, api.listEmployers, async ({ db, actor }) => ({
    employers: await people.listEmployers(db, actor.orgId),
  }));
  mount(router, platform, api.saveEmployer, ({ db, actor, params, body }) =>
    people.saveEmployer(db, actor.orgId, params.id, body),
  );
  mount(router, platform, api.listPeople, async ({ db, actor, query }) => ({
    people: await people.listPeople(db, actor.orgId, query),
  }));
  mount(router, platform, api.getPerson, ({ db, actor, params }) =>
    people.getPerson(db, actor.orgId, params.id),
  );
  mount(router, platform, api.savePerson, ({ db, actor, params, body }) =>
    people.savePerson(db, actor.orgId, params.id, body),
  );
  mount(router, platform, api.archivePerson, ({ db, actor, params, body }) =>
    people.archivePerson(db, actor.orgId, params.id, body.archived),
  );
};
