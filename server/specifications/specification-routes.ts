import * as contract from '#shared/contracts/specifications.ts';
import * as schema from '#shared/contracts/specifications-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import { compareCuttingDay } from './compare-day.ts';
import { decideCorrection, getCorrection } from './correction-service.ts';
import {
  copySpecification,
  getSpecification,
  listSpecifications,
  restoreSpecification,
  retireSpecification,
  saveSpecification,
} from './specification-service.ts';

export function addSpecificationRoutes(api: Api, deps: Deps): void {
  route(api, contract.listSpecifications, {
    schema: schema.listSpecificationsSchema,
    handle: () => listSpecifications(deps),
  });
  route(api, contract.getSpecification, {
    schema: schema.getSpecificationSchema,
    handle: ({ params }) => getSpecification(deps, params.specificationId),
  });
  route(api, contract.saveSpecification, {
    schema: schema.saveSpecificationSchema,
    handle: ({ body }, caller) => saveSpecification(deps, signedIn(caller).id, body),
  });
  route(api, contract.copySpecification, {
    schema: schema.copySpecificationSchema,
    handle: ({ body }, caller) => copySpecification(deps, signedIn(caller).id, body),
  });
  route(api, contract.restoreSpecification, {
    schema: schema.restoreSpecificationSchema,
    handle: ({ params, body }, caller) => restoreSpecification(deps, signedIn(caller).id, { ...params, ...body }),
  });
  route(api, contract.retireSpecification, {
    schema: schema.retireSpecificationSchema,
    handle: ({ params, body }, caller) => retireSpecification(deps, signedIn(caller).id, { ...params, ...body }),
  });
  addLearningRoutes(api, deps);
}

function addLearningRoutes(api: Api, deps: Deps): void {
  route(api, contract.compareDay, {
    schema: schema.compareDaySchema,
    handle: ({ params }) => compareCuttingDay(deps, params.dayId),
  });
  route(api, contract.getCorrection, {
    schema: schema.getCorrectionSchema,
    handle: ({ params }) => getCorrection(deps, params.specificationId),
  });
  route(api, contract.decideCorrection, {
    schema: schema.decideCorrectionSchema,
    handle: ({ params, body }, caller) => decideCorrection(deps, signedIn(caller).id, { ...params, ...body }),
  });
}
