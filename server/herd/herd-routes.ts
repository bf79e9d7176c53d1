import { addAnimal, editAnimal, listAnimals, recordMedicine } from '#shared/contracts/herd.ts';
import {
  addAnimalSchema,
  editAnimalSchema,
  listAnimalsSchema,
  recordMedicineSchema,
} from '#shared/contracts/herd-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import * as herd from './herd-service.ts';

export function addHerdRoutes(api: Api, deps: Deps): void {
  route(api, listAnimals, {
    schema: listAnimalsSchema,
    handle: async () => ({ animals: await herd.listHerd(deps) }),
  });
  route(api, addAnimal, {
    schema: addAnimalSchema,
    handle: ({ body }, caller) => herd.addAnimal(deps, signedIn(caller).id, body),
  });
  route(api, editAnimal, {
    schema: editAnimalSchema,
    handle: ({ params, body }, caller) => {
      const { version, ...values } = body;
      return herd.editAnimal(deps, signedIn(caller).id, { animalId: params.animalId, version, values });
    },
  });
  route(api, recordMedicine, {
    schema: recordMedicineSchema,
    handle: ({ params, body }, caller) =>
      herd.recordMedicine(deps, signedIn(caller).id, { ...body, animalId: params.animalId }),
  });
}
