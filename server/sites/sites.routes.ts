import QRCode from 'qrcode';
import * as api from '#shared/sites/sites.api.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import { listPeople } from '../people/people.service.ts';
import type { Feature } from '../platform/features.ts';
import { mount } from '../platform/mount.ts';
import { boardOf } from './board.service.ts';
import * as sites from './sites.service.ts';

export const siteRoutes: Feature = (router, platform) => {
  mount(router, platform, api.listSites, async ({ db, actor, query }) => ({
    sites: await sites.listSites(db, actor.orgId, query),
  }));
  mount(router, platform, api.getSite, async ({ db, actor, params }) => ({
    ...(await sites.getSite(db, actor.orgId, params.id)),
    people: await listPeople(db, actor.orgId, { siteId: params.id, archived: 'no' }),
  }));
  mount(router, platform, api.saveSite, ({ db, actor, params, body }) =>
    sites.saveSite(db, actor.orgId, params.id, body),
  );
  mount(router, platform, api.archiveSite, ({ db, actor, params, body }) =>
    sites.archiveSite(db, actor.orgId, params.id, body.archived),
  );
  mount(router, platform, api.setCrewMember, ({ db, actor, params, body }) =>
    sites.setCrewMember(db, actor.orgId, {
      siteId: params.id,
      personId: params.personId,
      onCrew: body.onCrew,
    }),
  );
  // A read that may make today's code: it runs on the database itself, not in a transaction.
  mount(router, platform, api.getSignAccess, async ({ db, actor, params }) => {
    const site = await sites.getSite(db, actor.orgId, params.id);
    if (site.archivedAt) throw new Refusal('conflict', 'This site is closed: nobody can sign on there.');
    const day = sites.todayAt(site);
    const address = `${platform.publicUrl()}/s/${site.signToken}`;
    return {
      address,
      qrSvg: await QRCode.toString(address, { type: 'svg', margin: 1, errorCorrectionLevel: 'M' }),
      dayCode: await sites.dayCodeFor(db, actor.orgId, site.id, day),
      day,
    };
  });
  mount(router, platform, api.getBoard, ({ db, actor, params }) => boardOf(db, actor.orgId, params.id));
};
