import * as contract from '#shared/contracts/shortfalls.ts';
import * as schema from '#shared/contracts/shortfalls-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import { refundShortfall, swapShortfall } from './settle-shortfall.ts';
import { findShortfalls } from './shortfalls.ts';

export function addShortfallRoutes(api: Api, deps: Deps): void {
  route(api, contract.listShortfalls, {
    schema: schema.listShortfallsSchema,
    handle: async () => ({ products: await findShortfalls(deps.db) }),
  });
  route(api, contract.refundShortfall, {
    schema: schema.refundShortfallSchema,
    handle: async ({ body }, caller) => ({
      products: await refundShortfall(deps, { ...body, byUserId: signedIn(caller).id }),
    }),
  });
  route(api, contract.swapShortfall, {
    schema: schema.swapShortfallSchema,
    handle: async ({ body }, caller) => ({
      products: await swapShortfall(deps, { ...body, byUserId: signedIn(caller).id }),
    }),
  });
}
