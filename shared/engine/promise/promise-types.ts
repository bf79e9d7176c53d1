import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';

/** Relative error (one standard deviation) in parts per 100,000. */
export type Spread = { carcasePpht: number; primalPpht: number; linePpht: number };

export type PromiseInput = {
  input: AllocationInput;
  plan: AllocationPlan;
  /** Spread of each carcase by id: from live weight or from the kill sheet. */
  spreads: Readonly<Record<string, Spread>>;
  /** 0.9 for nine days in ten. */
  confidence: number;
  scenarios: number;
  seed: number;
};

export type BoxPromise = {
  /** Boxes that may be offered, by variant; never above the plan and never below what is sold and held. */
  boxes: { variantId: string; planned: number; promised: number; floor: number }[];
  /** Loose packs that may be offered, by cut, on the same terms. */
  loose: { cutId: string; planned: number; promised: number; floor: number }[];
  /** Share of scenarios in which the promised boxes and packs can all be filled. */
  jointConfidence: number;
  /** Largest share of the plan's offers that is safe at this confidence, in parts per 100,000. */
  safeSharePpht: number;
  /** True when what is sold and held itself is not safe at this confidence. */
  isFloorAtRisk: boolean;
  /** What is missing for the floor, over the scenarios in which something is; only when the floor is at risk. */
  floorShortfall: { shareOfScenarios: number; meanShortGrams: number; worstShortGrams: number } | null;
};
