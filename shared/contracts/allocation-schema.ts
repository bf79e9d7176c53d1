import { z } from 'zod';
import { Day, Id, Instant, Rail, Side } from './fields-schema.ts';

/** The owner's hand on one either/or choice of one side. */
export const Lock = z.strictObject({
  carcaseId: Id,
  side: Side,
  choiceId: z.string().max(60),
  wayId: z.string().max(60),
});
export type Lock = z.infer<typeof Lock>;

export const PlannedChoice = z.strictObject({
  choiceId: z.string(),
  name: z.string(),
  primalIds: z.array(z.string()),
  /** Null when the primal is sold whole in a unit. */
  wayId: z.string().nullable(),
  soldTo: z.string().nullable(),
  isLocked: z.boolean(),
  /** What the planned way gives, without the primals that are sold whole. */
  cuts: z.array(z.strictObject({ cutId: z.string(), name: z.string(), grams: z.int() })),
  /** What the lock costs: the optimum without it less the optimum with it. Null where no lock stands. */
  lockCostPence: z.int().nullable(),
  ways: z.array(
    z.strictObject({
      wayId: z.string(),
      name: z.string(),
      closedReason: z.string().nullable(),
    }),
  ),
});
export type PlannedChoice = z.infer<typeof PlannedChoice>;

export const PlannedSide = z.strictObject({
  carcaseId: Id,
  side: Side,
  earTag: z.string(),
  title: z.string(),
  sideGrams: z.int(),
  source: z.enum(['estimated', 'weighed']),
  /** What of this side is paid for, in open checkouts, and free, by primal. */
  rail: Rail,
  choices: z.array(PlannedChoice),
});
export type PlannedSide = z.infer<typeof PlannedSide>;

export const Allocation = z.strictObject({
  id: Id,
  dayId: Id,
  day: Day,
  state: z.enum(['draft', 'published', 'replaced']),
  createdAt: Instant,
  figuresVersion: z.int(),
  isOutOfDate: z.boolean(),
  isProven: z.boolean(),
  /** Basis points between the answer and the best that could exist. */
  gapBasisPoints: z.int(),
  solveMs: z.int(),
  /** Contribution = income - direct costs; gain = contribution - deadweight value. */
  contributionPence: z.int(),
  deadweightPence: z.int(),
  gainPence: z.int(),
  /** What the owner should know before mincing or selling: the usual limits, and whom to ask. */
  cautions: z.array(z.string()),
  /** Why a carcase has no deadweight value. */
  unpriced: z.array(z.string()),
  coldGrams: z.int(),
  productGrams: z.int(),
  locks: z.array(Lock),
  sides: z.array(PlannedSide),
  boxes: z.array(
    z.strictObject({
      boxKindId: Id,
      name: z.string(),
      count: z.int(),
      /** How many of them may be put on sale while weights are estimates; null until it has been worked out. */
      promised: z.int().nullable(),
      sold: z.int(),
      held: z.int(),
      limitedBy: z.array(z.string()),
    }),
  ),
  loose: z.array(
    z.strictObject({
      cutId: z.string(),
      name: z.string(),
      packs: z.int(),
      promised: z.int().nullable(),
      grams: z.int(),
      sold: z.int(),
      held: z.int(),
    }),
  ),
  trade: z.array(
    z.strictObject({ reservationNo: z.int(), businessName: z.string(), name: z.string(), grams: z.int() }),
  ),
  cuts: z.array(
    z.strictObject({
      cutId: z.string(),
      name: z.string(),
      madeGrams: z.int(),
      /** Frozen stock at hand, and what of it the plan uses. */
      stockGrams: z.int(),
      stockUsedGrams: z.int(),
      boxGrams: z.int(),
      looseGrams: z.int(),
      tradeGrams: z.int(),
      mincedGrams: z.int(),
      leftGrams: z.int(),
      /** What one more kilogram would add to the contribution. Null until it has been asked for. */
      worthPencePerKg: z.int().nullable(),
    }),
  ),
  /** How sure it is that all that is offered can be filled, and whether what is sold is itself at risk. */
  promise: z
    .strictObject({ confidencePercent: z.int(), isFloorAtRisk: z.boolean(), worstShortGrams: z.int() })
    .nullable(),
  /** False while the limits, worths and costs of locks are still being worked out: ask again in a moment. */
  isExplained: z.boolean(),
  shortfalls: z.array(z.strictObject({ name: z.string(), missing: z.string() })),
});
export type Allocation = z.infer<typeof Allocation>;

const DayId = z.strictObject({ dayId: Id });
export const getAllocationSchema = {
  params: DayId,
  answer: z.strictObject({ latest: Allocation.nullable(), published: Allocation.nullable() }),
};
export const publishAllocationSchema = {
  params: z.strictObject({ allocationId: Id }),
  body: z.strictObject({ figuresVersion: z.int() }),
  answer: Allocation,
};
