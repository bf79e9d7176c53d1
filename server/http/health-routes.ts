import { sql } from 'drizzle-orm';
import { getHealth } from '#shared/contracts/office.ts';
import { getHealthSchema } from '#shared/contracts/office-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, type Api } from './route.ts';

export function addHealthRoutes(api: Api, deps: Deps): void {
  route(api, getHealth, {
    schema: getHealthSchema,
    handle: async () => {
      await deps.db.execute(sql`select 1`);
      return { ok: true as const };
    },
  });
}
