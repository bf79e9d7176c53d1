import type { Day } from '#shared/domain/day.ts';
import type { QuarterId, Specification } from '#shared/engine/figures/specification.ts';

export type FigureSource = 'estimated' | 'weighed';
export type Figure = { grams: number; source: FigureSource };
export type SideName = 'left' | 'right';
export const SIDES = ['left', 'right'] as const satisfies readonly SideName[];

export type AnimalType = 'steer' | 'heifer' | 'young bull' | 'cow';

export type CarcaseFacts = {
  id: string;
  type: AnimalType;
  /** Null when not known: the carcase then counts as over thirty months. */
  bornDay: Day | null;
  killDay: Day;
  liveGrams: number | null;
  /** As weighed within an hour of sticking; 2 % is taken off. */
  hotGrams: number | null;
  /** As printed on the kill sheet; wins over the hot weight. */
  coldGrams: number | null;
  /**
   * Each side as the kill sheet has it, hot or cold alike: so the hung weight parts until a side is weighed itself. Without
   * them the sides are taken as equal.
   */
  sideGrams?: Readonly<Record<SideName, number>> | null;
  /** The farm's own killing-out figure; null takes the default of the type. */
  killingOutPpht: number | null;
  conformation: string | null;
  fatClass: string | null;
  hanging: { method: 'whole side' | 'in the bag'; days: number };
  /**
   * Measured grams by path: `hung`, `left`, `left/fore`, `left/fore/brisket`, `left/fore/brisket/brisket-joint`.
   * Measured values win; an estimate never overwrites them.
   */
  measured: Readonly<Record<string, number>>;
};

/** A dated setting: which ways that keep vertebral column are closed, and when. */
export type VertebraeRule = { isActive: boolean; months: number; isPremisesAuthorised: boolean };

/** Way chosen by choice; a choice without an entry takes its first open way. */
export type ChosenWays = Readonly<Record<string, string>>;

export type CutoutInput = {
  carcase: CarcaseFacts;
  specification: Specification;
  rule: VertebraeRule;
  ways: Readonly<Record<SideName, ChosenWays>>;
};

export type CutoutNode = {
  /** `carcase`, `left`, `left/fore`, `left/fore/brisket`, `left/fore/brisket/brisket-joint`. */
  path: string;
  parentPath: string | null;
  level: 'carcase' | 'side' | 'quarter' | 'primal' | 'line';
  kind: 'whole' | 'cut' | 'trim' | 'bone' | 'fat' | 'loss';
  name: string;
  /** Set for a line of a cut or trim. */
  cutId: string | null;
  grams: number;
  source: FigureSource;
  /** What the specification foresees with nothing below the carcase weighed. */
  estimatedGrams: number;
  /** Node less the sum of its parts: what the scales disagree by. */
  weighingDifferenceGrams: number;
};

export type Clamp = { what: 'conformation' | 'fat class' | 'meat' | 'fat'; from: number; to: number; sentence: string };

export type ClosedWay = { side: SideName; choiceId: string; wayId: string; reason: string };

export type Cutout = {
  live: Figure | null;
  hot: Figure | null;
  cold: Figure;
  hung: Figure;
  /** Null when the day of birth is not known. */
  ageMonths: number | null;
  isOverThirtyMonths: boolean;
  /** False when no grade was given: the reference class stands in and the error is wider. */
  isGraded: boolean;
  nodes: CutoutNode[];
  closedWays: ClosedWay[];
  clamps: Clamp[];
  /** The two sides with what every way would give: the input of the allocation. */
  sides: SideSupply[];
};

export type WayYield = {
  wayId: string;
  name: string;
  /** Why this way is closed for this side; null when open. */
  closedReason: string | null;
  /** Grams by cut and primal; bone, fat and loss are left out. */
  yields: { primalId: string; cutId: string; grams: number }[];
  costPence: number;
};

export type ChoiceSupply = {
  choiceId: string;
  name: string;
  quarter: QuarterId;
  primals: { primalId: string; name: string; grams: number; hasVertebrae: boolean }[];
  ways: WayYield[];
};

export type SideSupply = {
  /** `<carcase id>/<left|right>`. */
  id: string;
  carcaseId: string;
  side: SideName;
  grams: number;
  quarterGrams: Record<QuarterId, number>;
  coldCarcaseGrams: number;
  conformation: string | null;
  fatClass: string | null;
  hangingDays: number;
  /** Why units that keep vertebral column may not leave whole; null when they may. */
  closedUnitReason: string | null;
  choices: ChoiceSupply[];
};
