/** How a solve may end. `limit`: the best answer so far, or none. */
export type SolveStatus = 'optimal' | 'infeasible' | 'limit';

export type Solution = {
  status: SolveStatus;
  /** False when no feasible answer was found before the limit. */
  hasAnswer: boolean;
  objective: number;
  /** Relative distance between the answer and the best that could exist; 0 for a plain linear program. */
  gap: number;
  columns: Record<string, number>;
  nodes: number;
  milliseconds: number;
};

export type SolveProgress = { milliseconds: number; nodes: number; best: number | null; bound: number };

export type SolveOptions = {
  /** Relative gap at which an answer counts as proven; 0.0001 by default. */
  gap?: number;
  timeLimitSeconds?: number;
  nodeLimit?: number;
  /** A known answer to begin from, by column; columns that it does not name begin at zero. */
  start?: Readonly<Record<string, number>>;
  /**
   * Sums of whole-number columns, branched on before the columns themselves. Where many columns are nearly alike, such as
   * one way of every side, how many of them are taken settles the answer far sooner than which.
   */
  sumsFirst?: readonly (readonly string[])[];
  onProgress?: (progress: SolveProgress) => void;
  signal?: AbortSignal;
};

/** New limits of rows by name: `row <= upper`, `row >= lower`. */
export type RowChange = { row: string; lower: number; upper: number };

export type Solver = {
  /** Solves a model in CPLEX LP text. */
  solve: (lpText: string, options?: SolveOptions) => Promise<Solution>;
  /** Solves one linear model again and again with changed rows, warm from the last answer. */
  solveVariations: (lpText: string, variations: readonly RowChange[][], options?: SolveOptions) => Promise<Solution[]>;
};
