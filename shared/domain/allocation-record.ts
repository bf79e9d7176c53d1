import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';
import type { Explanation } from '#shared/engine/allocation/explain.ts';
import type { BoxPromise, Spread } from '#shared/engine/promise/promise-types.ts';

/** What an allocation was asked: kept, so that its answer can be traced and checked by another solver. */
export type AllocationQuestion = {
  input: AllocationInput;
  lpText: string;
  /** How far the weights of each carcase may still be off. */
  spreads: Record<string, Spread>;
};

/** What it answered. Variant, kind and cut ids are those of the products' tables. */
export type AllocationAnswer = {
  plan: Omit<AllocationPlan, 'lpText'>;
  /** Carcases whose kill sheet the figures rest on; the others are estimates. */
  weighedCarcaseIds: string[];
  /** How many may be put on sale while weights are estimates; null until it has been worked out. */
  promise: BoxPromise | null;
  /** Null until it has been worked out. */
  explanation: Explanation | null;
};
