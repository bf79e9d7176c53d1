import * as contract from '#shared/contracts/margin.ts';
import * as schema from '#shared/contracts/margin-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import { getDayMargin } from './margin-service.ts';
import { getPriceGrids, savePriceGrid } from './price-grid-service.ts';

export function addMarginRoutes(api: Api, deps: Deps): void {
  route(api, contract.getPriceGrids, { schema: schema.getPriceGridsSchema, handle: () => getPriceGrids(deps) });
  route(api, contract.savePriceGrid, {
    schema: schema.savePriceGridSchema,
    handle: ({ body }, caller) => savePriceGrid(deps, signedIn(caller).id, body),
  });
  route(api, contract.getDayMargin, {
    schema: schema.getDayMarginSchema,
    handle: async ({ params, query }) => ({ margin: await getDayMargin(deps, params.dayId, query.basis) }),
  });
}
