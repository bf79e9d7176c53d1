import { endpoint } from './endpoint.ts';
import type * as schema from './herd-schema.ts';

export type { Animal, NewAnimal, Sex } from './herd-schema.ts';

export const listAnimals = endpoint<typeof schema.listAnimalsSchema>('GET', '/api/animals', ['owner']);
export const addAnimal = endpoint<typeof schema.addAnimalSchema>('POST', '/api/animals', ['owner']);
export const editAnimal = endpoint<typeof schema.editAnimalSchema>('PUT', '/api/animals/:animalId', ['owner']);
export const recordMedicine = endpoint<typeof schema.recordMedicineSchema>('POST', '/api/animals/:animalId/medicines', [
  'owner',
]);
