import * as contract from '#shared/contracts/standing-orders.ts';
import * as schema from '#shared/contracts/standing-orders-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import { readMyStanding, setStandingState, startStanding } from './standing-service.ts';
import { payTurn, readTurn, skipTurn } from './turn-service.ts';

export function addStandingRoutes(api: Api, deps: Deps): void {
  route(api, contract.listMyStanding, {
    schema: schema.listMyStandingSchema,
    handle: (_input, caller) => readMyStanding(deps, signedIn(caller).id),
  });
  route(api, contract.startStanding, {
    schema: schema.startStandingSchema,
    handle: ({ body }, caller) => startStanding(deps, signedIn(caller), body),
  });
  route(api, contract.setStandingState, {
    schema: schema.setStandingStateSchema,
    handle: ({ params, body }, caller) =>
      setStandingState(deps, signedIn(caller).id, { standingId: params.standingId, state: body.state }),
  });
  route(api, contract.getTurn, {
    schema: schema.getTurnSchema,
    handle: ({ params }) => readTurn(deps, params.token),
  });
  route(api, contract.skipTurn, {
    schema: schema.skipTurnSchema,
    handle: ({ params }) => skipTurn(deps, params.token),
  });
  route(api, contract.payTurn, {
    schema: schema.payTurnSchema,
    handle: ({ params }) => payTurn(deps, params.token),
  });
}
