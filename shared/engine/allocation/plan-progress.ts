import type { SolveOptions } from '#shared/engine/linear/solve.ts';

/** `shortfall`: the least that promises fall short by; `contribution`: the plan itself; `packs`: its whole packs. */
export type PlanPhase = 'shortfall' | 'contribution' | 'packs';

/** How far a plan has come while it is worked out. */
export type PlanProgress = {
  phase: PlanPhase;
  /** Solver time spent since the question was asked, over all phases. */
  milliseconds: number;
  /** Branches searched in the phase's present solve. */
  nodes: number;
  /** Best answer of the phase so far, in pence; null before there is one. In `shortfall`, pence that are missing. */
  best: number | null;
  /** What no answer of the phase can pass, in pence; null before it is known. */
  bound: number | null;
  /** Relative distance between the two; null while one of them is missing. */
  gap: number | null;
};

/**
 * How a plan may be worked out. All of it is optional:
 *
 * - `onProgress` hears at the start of every solve and then about four times a second.
 * - `signal` cancels: `allocate` rejects with the signal's reason at once and keeps nothing. A solve cannot be
 *   interrupted inside its thread, so the thread is ended and a new one takes its place.
 * - `timeLimitSeconds` is for the whole question. What is best by then is the answer, with its `gap` and
 *   `isProven: false`; when nothing was found at all, SOLVER_FAILED is thrown.
 * - `gap` (relative, 0.0001 unless stated) is how near the optimum counts as proven.
 */
export type AllocateOptions = Omit<SolveOptions, 'onProgress' | 'start'> & {
  onProgress?: (progress: PlanProgress) => void;
};

/** Relative distance of an answer from what no answer can pass, whichever way is better. */
export function relativeGap(best: number | null, bound: number | null): number | null {
  if (best === null || bound === null || !Number.isFinite(bound)) return null;
  return Math.abs(bound - best) / Math.max(1, Math.abs(best));
}
