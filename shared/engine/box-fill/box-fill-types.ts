import type { MeatState, Recipe } from '#shared/engine/allocation/allocation-input.ts';

export type WeighedPack = { id: string; cutId: string; grams: number; state: MeatState };

/** A pack put to a recipe line of a box. */
export type PlacedPack = WeighedPack & { lineId: string };

export type MissingLine = { lineId: string; name: string; shortGrams: number; shortPacks: number };

export type BoxCheck = {
  isFilled: boolean;
  grams: number;
  /** Grams above the guarantee; negative when below it. */
  giveAwayGrams: number;
  /** Lines with too little. */
  missing: MissingLine[];
  /** Lines with too much, or with a pack that is not allowed. */
  excess: { lineId: string; name: string; overGrams: number; overPacks: number }[];
};

export type BoxToFill = {
  id: string;
  recipe: Recipe;
  /** Grams given away to this customer in earlier fills; the least goes first when boxes tie. */
  earlierGiveAwayGrams: number;
};

export type FilledBox = BoxCheck & { boxId: string; packs: PlacedPack[] };

export type BoxFill = {
  boxes: FilledBox[];
  unusedPackIds: string[];
  /** Over all filled boxes. */
  giveAwayGrams: number;
  packedGrams: number;
  /** No fill of the same boxes from the same packs gives away less. */
  lowerBoundGrams: number;
  unfilledBoxIds: string[];
};

/** `kept`: boxes that are finished already and stay as they are. */
export type BoxFillInput = {
  boxes: readonly BoxToFill[];
  packs: readonly WeighedPack[];
  kept: readonly { boxId: string; packs: readonly PlacedPack[] }[];
  seed: number;
};
