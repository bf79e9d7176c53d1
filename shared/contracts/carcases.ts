import type * as schema from './carcases-schema.ts';
import { endpoint } from './endpoint.ts';

export type { Carcase, CarcaseSummary, CutoutNode, CuttingDay, KillSheet, NewCuttingDay } from './carcases-schema.ts';

export const listCuttingDays = endpoint<typeof schema.listCuttingDaysSchema>('GET', '/api/cutting-days', [
  'owner',
  'packer',
]);
export const getCuttingDay = endpoint<typeof schema.getCuttingDaySchema>('GET', '/api/cutting-days/:dayId', [
  'owner',
  'packer',
]);
export const addCuttingDay = endpoint<typeof schema.addCuttingDaySchema>('POST', '/api/cutting-days', ['owner']);
/** Closes a day on which every order is filled or settled and every gram has a place. */
export const closeCuttingDay = endpoint<typeof schema.closeCuttingDaySchema>('POST', '/api/cutting-days/:dayId/close', [
  'owner',
]);
export const listCollectionPoints = endpoint<typeof schema.listCollectionPointsSchema>(
  'GET',
  '/api/collection-points',
  ['owner'],
);
export const bookCarcases = endpoint<typeof schema.bookCarcasesSchema>('POST', '/api/carcases', ['owner']);
export const getCarcase = endpoint<typeof schema.getCarcaseSchema>('GET', '/api/carcases/:carcaseId', ['owner']);
export const enterKillSheet = endpoint<typeof schema.enterKillSheetSchema>(
  'PUT',
  '/api/carcases/:carcaseId/kill-sheet',
  ['owner'],
);
export const enterWeights = endpoint<typeof schema.enterWeightsSchema>('PUT', '/api/carcases/:carcaseId/weights', [
  'owner',
]);
/** Before the day is put on sale; its figures are then a new version and its plan is out of date. */
export const chooseSpecification = endpoint<typeof schema.chooseSpecificationSchema>(
  'PUT',
  '/api/cutting-days/:dayId/specification',
  ['owner'],
);
