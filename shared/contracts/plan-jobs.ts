import { endpoint } from './endpoint.ts';
import type * as schema from './plan-jobs-schema.ts';

export type { Outcome, PlanJob, WhatIf } from './plan-jobs-schema.ts';

/** Solves with the owner's locks and keeps the answer as a draft. */
export const startPlan = endpoint<typeof schema.startPlanSchema>('POST', '/api/cutting-days/:dayId/plan-jobs', [
  'owner',
]);
/** Solves the day as it is and as supposed. Nothing is kept. */
export const startWhatIf = endpoint<typeof schema.startWhatIfSchema>('POST', '/api/cutting-days/:dayId/what-if-jobs', [
  'owner',
]);
export const getPlanJob = endpoint<typeof schema.getPlanJobSchema>('GET', '/api/plan-jobs/:jobId', ['owner']);
export const cancelPlanJob = endpoint<typeof schema.cancelPlanJobSchema>('POST', '/api/plan-jobs/:jobId/cancel', [
  'owner',
]);
