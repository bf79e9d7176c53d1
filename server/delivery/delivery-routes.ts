import * as delivery from '#shared/contracts/delivery.ts';
import * as schema from '#shared/contracts/delivery-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import { addDeliveryArea, askDelivery, editDeliveryArea, listDeliveryAreas } from './delivery-service.ts';

export function addDeliveryRoutes(api: Api, deps: Deps): void {
  route(api, delivery.askDelivery, {
    schema: schema.askDeliverySchema,
    handle: ({ query }) => askDelivery(deps, query),
  });
  route(api, delivery.listDeliveryAreas, {
    schema: schema.listDeliveryAreasSchema,
    handle: () => listDeliveryAreas(deps),
  });
  route(api, delivery.addDeliveryArea, {
    schema: schema.addDeliveryAreaSchema,
    handle: ({ body }, caller) => addDeliveryArea(deps, signedIn(caller).id, body),
  });
  route(api, delivery.editDeliveryArea, {
    schema: schema.editDeliveryAreaSchema,
    handle: ({ params, body }, caller) => editDeliveryArea(deps, signedIn(caller).id, { ...params, ...body }),
  });
}
