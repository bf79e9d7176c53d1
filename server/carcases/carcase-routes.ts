import * as contract from '#shared/contracts/carcases.ts';
import * as schema from '#shared/contracts/carcases-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import { bookCarcases } from './booking-service.ts';
import { getCarcase } from './carcase-service.ts';
import { closeCuttingDay } from './close-day-service.ts';
import { addCuttingDay, getCuttingDay, listCollectionPoints, listCuttingDays } from './cutting-day-service.ts';
import { chooseSpecification } from './day-specification-service.ts';
import { enterKillSheet } from './kill-sheet-service.ts';
import { enterWeights } from './weights-service.ts';

export function addCarcaseRoutes(api: Api, deps: Deps): void {
  addDayRoutes(api, deps);
  addBeastRoutes(api, deps);
}

function addDayRoutes(api: Api, deps: Deps): void {
  route(api, contract.listCuttingDays, {
    schema: schema.listCuttingDaysSchema,
    handle: async () => ({ days: await listCuttingDays(deps) }),
  });
  route(api, contract.getCuttingDay, {
    schema: schema.getCuttingDaySchema,
    handle: ({ params }) => getCuttingDay(deps.db, params.dayId),
  });
  route(api, contract.addCuttingDay, {
    schema: schema.addCuttingDaySchema,
    handle: ({ body }, caller) => addCuttingDay(deps, signedIn(caller).id, body),
  });
  route(api, contract.chooseSpecification, {
    schema: schema.chooseSpecificationSchema,
    handle: ({ params, body }, caller) => chooseSpecification(deps, signedIn(caller).id, { ...params, ...body }),
  });
  route(api, contract.closeCuttingDay, {
    schema: schema.closeCuttingDaySchema,
    handle: ({ params, body }, caller) =>
      closeCuttingDay(deps, signedIn(caller).id, { dayId: params.dayId, version: body.version }),
  });
  route(api, contract.listCollectionPoints, {
    schema: schema.listCollectionPointsSchema,
    handle: async () => ({ points: await listCollectionPoints(deps) }),
  });
}

function addBeastRoutes(api: Api, deps: Deps): void {
  route(api, contract.bookCarcases, {
    schema: schema.bookCarcasesSchema,
    handle: async ({ body }, caller) => ({ carcases: await bookCarcases(deps, signedIn(caller).id, body) }),
  });
  route(api, contract.getCarcase, {
    schema: schema.getCarcaseSchema,
    handle: ({ params }) => getCarcase(deps.db, params.carcaseId),
  });
  route(api, contract.enterKillSheet, {
    schema: schema.enterKillSheetSchema,
    handle: ({ params, body }, caller) =>
      enterKillSheet(deps, signedIn(caller).id, { ...body, carcaseId: params.carcaseId }),
  });
  route(api, contract.enterWeights, {
    schema: schema.enterWeightsSchema,
    handle: ({ params, body }, caller) =>
      enterWeights(deps, signedIn(caller).id, { ...body, carcaseId: params.carcaseId }),
  });
}
