import type { ChoiceSupply, SideSupply, WayYield } from '#shared/engine/cutout/cutout-types.ts';
import type { Cut } from '#shared/engine/figures/specification.ts';
import { LpModel, type Term } from '#shared/engine/linear/lp-model.ts';
import { Namer } from '#shared/engine/linear/namer.ts';
import type {
  AllocationInput,
  BoxVariant,
  LooseDemand,
  MeatState,
  Priority,
  RecipeLine,
  TradeLine,
} from './allocation-input.ts';
import type { FittingUnit } from './trade-fit.ts';

export type CutLine = Extract<TradeLine, { kind: 'cut' }>;

/** A way of a choice; `primals` names the column that says 'cut this way' for each primal that the choice covers. */
export type WayColumn = {
  side: SideSupply;
  choice: ChoiceSupply;
  way: WayYield;
  column: string;
  primals: ReadonlyMap<string, string>;
};
export type UnitColumn = FittingUnit & { column: string };
/** `packs` is set in the second model only, where packs are whole. */
export type CellColumn = { line: RecipeLine; cutId: string; state: MeatState; column: string; packs: string | null };
/** Boxes of one variant that hold the same number of packs of each cut in each line. */
export type Pattern = readonly { line: RecipeLine; cutId: string; state: MeatState; packs: number }[];
export type PatternColumns = { pattern: Pattern; boxes: string; grams: string[] };
export type BoxColumns = {
  variant: BoxVariant;
  boxes: string;
  floor: string;
  steps: string[];
  cells: CellColumn[];
  /** In the elastic model only: kilograms that a line lacks. */
  lacks: { line: RecipeLine; column: string }[];
  /** In the third model only: how many boxes follow each pattern. */
  patterns: PatternColumns[];
};
/** Patterns by variant. */
export type Patterns = ReadonlyMap<string, readonly Pattern[]>;
export type LooseColumns = {
  demand: LooseDemand;
  sources: { state: MeatState; column: string }[];
  packs: string | null;
};
export type ShortColumn = { priority: Priority; column: string; penceEach: number };

/**
 * The mixed-integer program of one cutting day. Weights stand in kilograms (three decimals are grams), the objective
 * in pence. Every column that the plan is read from is named here.
 */
export type AllocationModel = {
  /** The second model: packs of every cut in every line are whole. */
  isPacked: boolean;
  /** For explanations: lines may lack grams, in columns of their own. */
  isElastic: boolean;
  /** The third model: every box follows one of these. */
  patterns: Patterns | null;
  input: AllocationInput;
  cuts: ReadonlyMap<string, Cut>;
  lp: LpModel;
  namer: Namer;
  ways: WayColumn[];
  units: UnitColumn[];
  boxes: BoxColumns[];
  loose: LooseColumns[];
  tradeCuts: { line: CutLine; column: string }[];
  minced: { cutId: string; column: string }[];
  left: { cutId: string; state: MeatState; column: string }[];
  shorts: ShortColumn[];
  /** What takes from the supply of a cut and state, in kilograms. */
  uses: Map<string, Term[]>;
  /** What brings to it. */
  yields: Map<string, Term[]>;
  /** What must be in whole packs of a cut made on the day. */
  packed: Map<string, Term[]>;
};

export function heapKey(cutId: string, state: MeatState): string {
  return `${cutId} ${state}`;
}

export function addTerm(heaps: Map<string, Term[]>, key: string, term: Term): void {
  const terms = heaps.get(key);
  if (terms) terms.push(term);
  else heaps.set(key, [term]);
}

/** Tenths of a penny per kilogram to pence per kilogram. */
export function pencePerKg(tenthPencePerKg: number): number {
  return tenthPencePerKg / 10;
}

export function emptyModel(
  input: AllocationInput,
  kind: Pick<AllocationModel, 'isPacked' | 'isElastic' | 'patterns'>,
): AllocationModel {
  return {
    ...kind,
    input,
    cuts: new Map(input.cuts.map((cut) => [cut.id, cut])),
    lp: new LpModel(),
    namer: new Namer(),
    ways: [],
    units: [],
    boxes: [],
    loose: [],
    tradeCuts: [],
    minced: [],
    left: [],
    shorts: [],
    uses: new Map(),
    yields: new Map(),
    packed: new Map(),
  };
}

export function getCut(model: Pick<AllocationModel, 'cuts'>, cutId: string): Cut {
  const cut = model.cuts.get(cutId);
  if (!cut) throw new RangeError(`the specification makes no ${cutId}`);
  return cut;
}

export function stockGrams(input: AllocationInput, cutId: string, state: MeatState): number {
  return input.stock
    .filter((item) => item.cutId === cutId && item.state === state)
    .reduce((sum, { grams }) => sum + grams, 0);
}

/** Frozen meat is only what lies in stock; fresh is what the day makes and what is at hand. */
export function hasSupply(model: AllocationModel, cutId: string, state: MeatState): boolean {
  if (stockGrams(model.input, cutId, state) > 0) return true;
  return state === 'fresh' && model.yields.has(heapKey(cutId, 'fresh'));
}

/** A column of what a confirmed promise falls short by. Without a promise there is none. */
export function addShort(
  model: AllocationModel,
  short: Omit<ShortColumn, 'column'> & { name: string; most: number; isWhole: boolean },
): Term[] {
  if (short.most <= 0) return [];
  const column = model.lp.addColumn(short.name, { upper: short.most, kind: short.isWhole ? 'integer' : 'continuous' });
  model.shorts.push({ priority: short.priority, column, penceEach: short.penceEach });
  return [[1, column]];
}
