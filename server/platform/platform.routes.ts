import { sql } from 'drizzle-orm';
import { getHealth, getOpenApi } from '#shared/platform/platform.api.ts';
import type { Feature } from './features.ts';
import { mount } from './mount.ts';
import { openApiOf } from './openapi.ts';

export const platformRoutes: Feature = (router, platform) => {
  mount(router, platform, getHealth, async ({ db, response }) => {
    const well = await db.execute(sql`select 1`).then(
      () => true,
      () => false,
    );
    if (!well) response.status(503);
    return {
      version: platform.version,
      database: well ? ('well' as const) : ('unwell' as const),
      engine: platform.config.databaseUrl ? ('postgresql' as const) : ('embedded' as const),
      pdf: platform.print.available,
    };
  });
  mount(router, platform, getOpenApi, () =>
    Promise.resolve(
      openApiOf(platform.endpoints, platform.version) as { openapi: string; paths: Record<string, unknown> },
    ),
  );
};
