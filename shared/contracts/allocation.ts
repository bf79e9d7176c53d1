import type * as schema from './allocation-schema.ts';
import { endpoint } from './endpoint.ts';

export type { Allocation, Lock, PlannedChoice, PlannedSide } from './allocation-schema.ts';

/** The newest answer of a day, and the one that is on sale. */
export const getAllocation = endpoint<typeof schema.getAllocationSchema>('GET', '/api/cutting-days/:dayId/allocation', [
  'owner',
]);
export const publishAllocation = endpoint<typeof schema.publishAllocationSchema>(
  'POST',
  '/api/allocations/:allocationId/publish',
  ['owner'],
);
