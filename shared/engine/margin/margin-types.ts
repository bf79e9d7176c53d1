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
  /** Applies from this age in whole months upwards when the carcase is older than it. */
  ageSteps: readonly { overMonths: number; adjustment: number }[];
};

export type DeadweightInput = {
  coldGrams: number;
  conformation: string;
  fatClass: string;
  ageMonths: number | null;
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
