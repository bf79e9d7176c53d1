import { getAllocation, publishAllocation } from '#shared/contracts/allocation.ts';
import { getAllocationSchema, publishAllocationSchema } from '#shared/contracts/allocation-schema.ts';
import { getAllocationModel, getAllocationModelMps } from '#shared/contracts/downloads.ts';
import { getAllocationModelSchema } from '#shared/contracts/downloads-schema.ts';
import { lpToMps } from '#shared/engine/linear/lp-to-mps.ts';
import type { Deps } from '#server/deps.ts';
import { download, route, signedIn, type Api } from '#server/http/route.ts';
import { getAllocation as findRow } from './allocation-queries.ts';
import { getDayAllocations, publishAllocation as publishDay, viewAllocation } from './allocation-service.ts';

const PLAIN = 'text/plain; charset=utf-8';

export function addAllocationRoutes(api: Api, deps: Deps): void {
  route(api, getAllocation, {
    schema: getAllocationSchema,
    handle: ({ params }) => getDayAllocations(deps, params.dayId),
  });
  route(api, publishAllocation, {
    schema: publishAllocationSchema,
    handle: async ({ params, body }, caller) => {
      const wish = { allocationId: params.allocationId, figuresVersion: body.figuresVersion };
      return viewAllocation(deps, await publishDay(deps, { ...wish, byUserId: signedIn(caller).id }));
    },
  });
  download(api, getAllocationModel, {
    schema: getAllocationModelSchema,
    handle: async ({ params }) => {
      const row = await findRow(deps.db, params.allocationId);
      return { contentType: PLAIN, filename: 'allocation.lp', body: row.input.lpText };
    },
  });
  download(api, getAllocationModelMps, {
    schema: getAllocationModelSchema,
    handle: async ({ params }) => {
      const row = await findRow(deps.db, params.allocationId);
      return { contentType: PLAIN, filename: 'allocation.mps', body: lpToMps(row.input.lpText) };
    },
  });
}
