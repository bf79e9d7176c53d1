import { getBox, getShopHome, getTrace, listCollections, listCuts } from '#shared/contracts/shop.ts';
import {
  getBoxSchema,
  getShopHomeSchema,
  getTraceSchema,
  listCollectionsSchema,
  listCutsSchema,
} from '#shared/contracts/shop-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, type Api } from '#server/http/route.ts';
import { readBox, readCollections, readCuts, readShopHome, readTrace } from './shop-service.ts';

export function addShopRoutes(api: Api, deps: Deps): void {
  route(api, getShopHome, { schema: getShopHomeSchema, handle: () => readShopHome(deps) });
  route(api, getBox, { schema: getBoxSchema, handle: ({ params }) => readBox(deps, params.slug) });
  route(api, listCuts, { schema: listCutsSchema, handle: () => readCuts(deps) });
  route(api, listCollections, {
    schema: listCollectionsSchema,
    handle: ({ params }) => readCollections(deps, params.dayId),
  });
  route(api, getTrace, { schema: getTraceSchema, handle: ({ params }) => readTrace(deps, params.code) });
}
