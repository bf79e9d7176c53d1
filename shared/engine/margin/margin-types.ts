import type { Day } from '#shared/domain/day.ts';

/** Tenths of a penny per kg on or off the base. */
export type PriceGrid = {
  name: string;
  source: string;
  conformations: readonly string[];
  fatClasses: readonly string[];
  /** `adjustments[fat class][conformation]`. */
  adjustments: Readonly<Record<string, Readonly<Record<string, number>>>>;
  /** Applies from this cold weight (grams) upwards, the last one that is reached. */
  weightSteps: readonly { fromGrams: number; adjustment: number }[];
  /** The last one that the carcase is older than, by the day: exactly thirty months is not over thirty. */
  ageSteps: readonly { overMonths: number; adjustment: number }[];
};

export type DeadweightInput = {
  coldGrams: number;
  conformation: string;
  fatClass: string;
  /** Null when not known: the carcase then counts as older than every step. */
  bornDay: Day | null;
  killDay: Day;
  baseTenthPencePerKg: number;
  grid: PriceGrid;
  levyPence: number;
  haulagePence: number;
  deductionsPence: number;
};

export type DeadweightValue = {
  tenthPencePerKg: number;
  classAdjustment: number;
  weightAdjustment: number;
  ageAdjustment: number;
  grossPence: number;
  deductedPence: number;
  netPence: number;
};

export type DirectCosts = {
  killPence: number;
  inspectionPence: number;
  levyPence: number;
  haulagePence: number;
  butcheryPence: number;
  packingPence: number;
  deliveryPence: number;
  cardFeesPence: number;
  refundsPence: number;
};

export type Margin = {
  incomePence: number;
  costPence: number;
  contributionPence: number;
  deadweightPence: number;
  gainPence: number;
  /** Per kg of cold deadweight, in tenths of a penny. */
  contributionPerKg: number;
  deadweightPerKg: number;
  gainPerKg: number;
};

export type JointProduct = {
  id: string;
  /** What it will sell for. */
  salesPence: number;
  /** What it costs from split-off until it is sold. */
  furtherCostPence: number;
};

export type JointShare = { id: string; netRealisablePence: number; sharePence: number; marginPence: number };

/** What one sale, or a cost with no sale, brings to the account. Costs stand under the names of `DirectCosts`. */
export type MarginEntry = {
  carcaseId: string | null;
  dayId: string | null;
  channel: string | null;
  /** The kind of box it went in. */
  boxKindId: string | null;
  cutId: string | null;
  incomePence: number;
  costs: Partial<DirectCosts>;
  /** Deadweight value that this entry stands for, and the cold weight behind it. */
  deadweightPence: number;
  coldGrams: number;
};

export type MarginDimension = 'carcaseId' | 'dayId' | 'channel' | 'boxKindId' | 'cutId';

/** What the card company keeps: parts per 100,000 of the price, and a fixed sum. */
export type CardFee = { ratePpht: number; fixedPence: number };
