import { addPacks, fillOrders, getPackingDay, losePack, packShort, reweighPack } from '#shared/contracts/packs.ts';
import {
  addPacksSchema,
  fillOrdersSchema,
  getPackingDaySchema,
  losePackSchema,
  packShortSchema,
  reweighPackSchema,
} from '#shared/contracts/packs-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import { fillOrders as fillDay } from './fill-service.ts';
import { addPacks as weighIn, losePack as bookOut, reweighPack as weighAgain } from './pack-service.ts';
import { packShort as packOrderShort } from './pack-short.ts';
import { readPackingDay } from './packing-day.ts';

export function addPackRoutes(api: Api, deps: Deps): void {
  route(api, getPackingDay, {
    schema: getPackingDaySchema,
    handle: ({ params }) => readPackingDay(deps.db, params.dayId),
  });
  route(api, addPacks, {
    schema: addPacksSchema,
    handle: ({ params, body }, caller) => weighIn(deps, signedIn(caller).id, { ...params, ...body }),
  });
  route(api, reweighPack, {
    schema: reweighPackSchema,
    handle: ({ params, body }, caller) => weighAgain(deps, signedIn(caller).id, { ...params, ...body }),
  });
  route(api, losePack, {
    schema: losePackSchema,
    handle: ({ params, body }, caller) => bookOut(deps, signedIn(caller).id, { ...params, ...body }),
  });
  route(api, fillOrders, {
    schema: fillOrdersSchema,
    handle: ({ params }, caller) => fillDay(deps, signedIn(caller).id, params.dayId),
  });
  route(api, packShort, {
    schema: packShortSchema,
    handle: ({ params }, caller) => packOrderShort(deps, signedIn(caller).id, params),
  });
}
