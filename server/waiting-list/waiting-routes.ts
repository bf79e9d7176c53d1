import * as contract from '#shared/contracts/waiting-list.ts';
import * as schema from '#shared/contracts/waiting-list-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, type Api } from '#server/http/route.ts';
import { countByBox } from './waiting-queries.ts';
import { confirmPlace, joinWaitingList, leavePlace, readPlace } from './waiting-service.ts';

export function addWaitingRoutes(api: Api, deps: Deps): void {
  route(api, contract.joinWaitingList, {
    schema: schema.joinWaitingListSchema,
    handle: ({ body }) => joinWaitingList(deps, body),
  });
  route(api, contract.getWaitingPlace, {
    schema: schema.getWaitingPlaceSchema,
    handle: ({ params }) => readPlace(deps, params.token),
  });
  route(api, contract.confirmWaitingPlace, {
    schema: schema.confirmWaitingPlaceSchema,
    handle: ({ params }) => confirmPlace(deps, params.token),
  });
  route(api, contract.leaveWaitingPlace, {
    schema: schema.leaveWaitingPlaceSchema,
    handle: ({ params }) => leavePlace(deps, params.token),
  });
  route(api, contract.listWaiting, {
    schema: schema.listWaitingSchema,
    handle: async () => ({ boxes: await countByBox(deps.db) }),
  });
}
