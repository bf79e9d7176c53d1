import type * as schema from './allocation-schema.ts';
import { endpoint } from './endpoint.ts';

export type { Allocation, Lock, PlannedChoice, PlannedSide } from './allocation-schema.ts';

/** The newest answer of a day, and the one that is on sale. */
export const getAllocation = endpoint<typeof schema.getAllocationSchema>('GET', '/api/cutting-days/:dayId/allocation', [
  'owner',
]);
/** Solves with the owner's locks and keeps the answer as a draft. */
export const allocate = endpoint<typeof schema.allocateSchema>('POST', '/api/cutting-days/:dayId/allocations', [
  'owner',
]);
export const publishAllocation = endpoint<typeof schema.publishAllocationSchema>(
  'POST',
  '/api/allocations/:allocationId/publish',
  ['owner'],
);
