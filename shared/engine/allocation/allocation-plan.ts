import type { SideName } from '#shared/engine/cutout/cutout-types.ts';
import type { MeatState, Priority, TradeUnit } from './allocation-input.ts';

/** The fate of one choice of one side. */
export type PlannedFate = {
  sideId: string;
  carcaseId: string;
  side: SideName;
  choiceId: string;
  /** Null when everything that the choice covers leaves whole. */
  wayId: string | null;
  /** Primals of this choice that leave whole, alone or within a quarter or side, and to which trade line. */
  soldPrimals: { primalId: string; tradeLineId: string }[];
};

export type PlannedBox = {
  variantId: string;
  kindId: string;
  name: string;
  /** Boxes on offer, sold and held included. */
  boxes: number;
  /** Of the floor, how many cannot be made. */
  short: number;
  /** Grams by recipe line, cut and state over all boxes of the variant. */
  contents: { lineId: string; cutId: string; state: MeatState; grams: number; packs: number }[];
  incomePence: number;
};

export type PlannedLoose = { cutId: string; packs: number; grams: number; short: number; incomePence: number };

export type PlannedUnit = { unit: TradeUnit; sideId: string; grams: number; incomePence: number };

export type PlannedTrade = {
  lineId: string;
  name: string;
  units: PlannedUnit[];
  cutGrams: number;
  /** Units or grams that cannot be met. */
  short: number;
  incomePence: number;
};

/** Where the grams of one cut come from and go to. Made + stock = boxes + loose + trade + minced + left. */
export type CutBalance = {
  cutId: string;
  madeGrams: number;
  stockGrams: number;
  boxGrams: number;
  looseGrams: number;
  tradeGrams: number;
  mincedGrams: number;
  leftGrams: number;
  /** Of what is left, frozen stock that nothing took; plans of earlier days do not say. */
  leftStockGrams?: number;
};

export type Shortfall = {
  kind: 'box' | 'loose' | 'trade';
  /** Variant, cut or trade line. */
  id: string;
  name: string;
  priority: Priority;
  /** Boxes, packs, units or grams. */
  short: number;
  unit: 'boxes' | 'packs' | 'units' | 'grams';
};

export type PlanMoney = {
  boxPence: number;
  loosePence: number;
  tradePence: number;
  clearancePence: number;
  packagingPence: number;
  packingPence: number;
  butcheryPence: number;
  mincingPence: number;
};

export type AllocationPlan = {
  fates: PlannedFate[];
  boxes: PlannedBox[];
  loose: PlannedLoose[];
  trade: PlannedTrade[];
  cuts: CutBalance[];
  shortfalls: Shortfall[];
  money: PlanMoney;
  /** Recomputed in pence from the whole-number plan. */
  contributionPence: number;
  /** Only a proven plan may be published. */
  isProven: boolean;
  /** Relative, of the last phase. */
  gap: number;
  /** What whole packs cost against the optimum of the model, where a cut may be shared to the gram. */
  wholePackPence: number;
  /** Boxes taken off because their whole packs would not have met a recipe line. */
  packRounds: { variantId: string; lineId: string }[];
  /** A line that whole packs could not meet even so: the plan may be looked at but not published. */
  unfillable: { variantId: string; lineId: string; name: string } | null;
  /** The model of the last phase, earlier optima as rows: any other solver can check it. */
  lpText: string;
  milliseconds: number;
};

export type BoxLimit = {
  variantId: string;
  name: string;
  lines: { lineId: string; name: string; shortGrams: number }[];
};

export type CutWorth = { cutId: string; pencePerKg: number };

export type LockCost = {
  carcaseId: string;
  side: SideName;
  choiceId: string;
  wayId: string;
  /** The optimum without this lock less the optimum with it. */
  costPence: number;
  /** What the plan would do without it. */
  freeWayId: string | null;
};
