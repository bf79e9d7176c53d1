import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { AllocationPlan, BoxLimit, CutWorth, LockCost } from '#shared/engine/allocation/allocation-plan.ts';

/** What an allocation was asked: kept, so that its answer can be traced and checked by another solver. */
export type AllocationQuestion = { input: AllocationInput; lpText: string };

/** What it answered, with its explanations. Variant, kind and cut ids are those of the products' tables. */
export type AllocationAnswer = {
  plan: Omit<AllocationPlan, 'lpText'>;
  limits: BoxLimit[];
  worths: CutWorth[];
  lockCosts: LockCost[];
  /** Carcases whose kill sheet the figures rest on; the others are estimates. */
  weighedCarcaseIds: string[];
};
