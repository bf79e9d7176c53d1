import * as promo from '#shared/contracts/promo.ts';
import * as schema from '#shared/contracts/promo-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import { checkPromo, closePromoCode, listPromoCodes, makePromoCode } from './promo-service.ts';

export function addPromoRoutes(api: Api, deps: Deps): void {
  route(api, promo.checkPromo, {
    schema: schema.checkPromoSchema,
    handle: ({ body }, caller) => checkPromo(deps, body, caller),
  });
  route(api, promo.listPromoCodes, { schema: schema.listPromoCodesSchema, handle: () => listPromoCodes(deps) });
  route(api, promo.makePromoCode, {
    schema: schema.makePromoCodeSchema,
    handle: ({ body }, caller) => makePromoCode(deps, signedIn(caller).id, body),
  });
  route(api, promo.closePromoCode, {
    schema: schema.closePromoCodeSchema,
    handle: ({ params }, caller) => closePromoCode(deps, signedIn(caller).id, params.promoId),
  });
}
