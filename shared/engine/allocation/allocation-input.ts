import type { SideName, SideSupply } from '#shared/engine/cutout/cutout-types.ts';
import type { Cut, QuarterId } from '#shared/engine/figures/specification.ts';

/** Whose shortfall is made least first: 1 before 2 before 3. */
export type Priority = 1 | 2 | 3;

export type MeatState = 'fresh' | 'frozen';

export type RecipeLine = {
  id: string;
  name: string;
  cutIds: readonly string[];
  minGrams: number;
  maxGrams: number;
  minPacks: number;
  /** Null where any number of packs will do. */
  maxPacks: number | null;
  state: MeatState | 'either';
};

/** What a box promises. A customer's swap is a recipe of its own. */
export type Recipe = { guaranteedGrams: number; lines: readonly RecipeLine[] };

/** One recipe or variant on offer. Only the plain variant of a kind carries demand steps. */
export type BoxVariant = Recipe & {
  id: string;
  kindId: string;
  name: string;
  pricePence: number;
  packagingPence: number;
  /** Sold and held together: the floor of the offer. */
  floor: number;
  priority: Priority;
  /** Further boxes that are expected to sell, at falling value; the value is the price unless stated lower. */
  steps: readonly { boxes: number; valuePence: number }[];
};

export type LooseDemand = {
  cutId: string;
  /** Sold and held packs. */
  floor: number;
  priority: Priority;
  steps: readonly { packs: number; tenthPencePerKg: number }[];
};

/** A side must answer every condition that is stated. */
export type Fit = {
  carcaseId: string | null;
  side: SideName | null;
  minSideGrams: number | null;
  maxSideGrams: number | null;
  conformations: readonly string[] | null;
  fatClasses: readonly string[] | null;
  minHangingDays: number | null;
};

export type TradeUnit =
  { kind: 'side' } | { kind: 'quarter'; quarter: QuarterId } | { kind: 'primal'; primalId: string };

export type TradeLine = {
  id: string;
  name: string;
  tenthPencePerKg: number;
  /** A confirmed line is met or named short; one that is not is filled only where it pays. */
  isConfirmed: boolean;
  priority: Priority;
} & (
  | {
      kind: 'unit';
      unit: TradeUnit;
      quantity: number;
      fit: Fit;
      /** Ways in which the units must be cut: sides where one is closed do not fit. */
      instructions: readonly { choiceId: string; wayId: string }[];
    }
  | { kind: 'cut'; cutId: string; grams: number }
);

/** Stock at hand, in whole packs, counted as grams. */
export type StockItem = { cutId: string; state: MeatState; grams: number };

export type MinceRule = {
  /** Null when mincing is open; else the sentence that says why it is closed. */
  closedReason: string | null;
  productCutId: string;
  minLeanPpht: number;
  costTenthPencePerKg: number;
  allowedCutIds: readonly string[];
};

/** The owner's hand on one choice of one side: cut this way, and not sold whole. */
export type WayLock = { carcaseId: string; side: SideName; choiceId: string; wayId: string };

export type AllocationInput = {
  sides: readonly SideSupply[];
  cuts: readonly Cut[];
  stock: readonly StockItem[];
  boxes: readonly BoxVariant[];
  loose: readonly LooseDemand[];
  trade: readonly TradeLine[];
  mince: MinceRule | null;
  locks: readonly WayLock[];
  /** Packing of a loose or trade kilogram: film, tray, label, labour. */
  packingTenthPencePerKg: number;
};
