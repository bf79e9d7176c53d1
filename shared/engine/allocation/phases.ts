import { EngineError } from '#shared/engine/engine-error.ts';
import type { Row, Term, WriteOptions } from '#shared/engine/linear/lp-model.ts';
import type { Solution, SolveOptions, SolveProgress, Solver } from '#shared/engine/linear/solve.ts';
import type { Priority } from './allocation-input.ts';
import type { AllocationModel } from './allocation-model.ts';
import { PRIORITIES, shortTerms } from './build-model.ts';
import { leadingSums } from './leading-sums.ts';
import { relativeGap, type AllocateOptions, type PlanPhase } from './plan-progress.ts';

/** Pence by which an earlier optimum may be missed later: below any price, above a solver's tolerance. */
export const SHORT_TOLERANCE = 0.01;
const LEAST_SECONDS = 1;
/** Relative gap of a shortfall, and the share of the remaining time that its search may take: the plan needs the rest. */
const SHORT_GAP = 0.001;
const SHORT_TIME = 1 / 3;

export type Solved = { solution: Solution; lpText: string };
/** One model on its way to an answer: earlier optima and boxes taken off are rows of its text. */
export type Session = {
  model: AllocationModel;
  solver: Solver;
  options: AllocateOptions;
  phase: PlanPhase;
  fixed: Row[];
  caps: Map<string, Row>;
  clock: { spentMilliseconds: number };
  isProven: boolean;
};

function report(session: Session, solve: Partial<SolveProgress>): void {
  const { phase, clock, options } = session;
  const { milliseconds = 0, nodes = 0, best = null, bound = null } = solve;
  const spent = clock.spentMilliseconds + milliseconds;
  options.onProgress?.({ phase, milliseconds: spent, nodes, best, bound, gap: relativeGap(best, bound) });
}

/** The time limit is for the whole question, not for each of its solves. */
function remaining(session: Session): SolveOptions {
  const { timeLimitSeconds, onProgress, ...plain } = session.options;
  const heard = onProgress ? { onProgress: (progress: SolveProgress) => report(session, progress) } : {};
  if (timeLimitSeconds === undefined) return { ...plain, ...heard };
  const left = timeLimitSeconds - session.clock.spentMilliseconds / 1000;
  return { ...plain, ...heard, timeLimitSeconds: Math.max(LEAST_SECONDS, left) };
}

async function ask(session: Session, lpText: string, options: SolveOptions = {}): Promise<Solution> {
  report(session, {});
  const solution = await session.solver.solve(lpText, { ...remaining(session), ...options });
  session.clock.spentMilliseconds += solution.milliseconds;
  return solution;
}

function rowsOf(session: Session, about: WriteOptions): Row[] {
  return [...(about.extraRows ?? []), ...session.fixed, ...session.caps.values()];
}

export async function solve(session: Session, about: WriteOptions, options: SolveOptions = {}): Promise<Solved> {
  const lpText = session.model.lp.write({ ...about, extraRows: rowsOf(session, about) });
  return { solution: await ask(session, lpText, options), lpText };
}

export function isProof(session: Session, solution: Solution): boolean {
  return solution.status === 'optimal' || (session.options.nodeLimit !== undefined && solution.hasAnswer);
}

function shortRow(priority: Priority, terms: readonly Term[], pence: number): Row {
  return { name: `shortfall_${priority}`, terms, sense: '<=', right: pence };
}

export function failed(sentence: string): EngineError {
  return new EngineError('SOLVER_FAILED', `${sentence} Nothing was changed; try again with more time.`, {
    node: 'plan',
  });
}

/**
 * Finds the least shortfall of each priority in turn, each held while the next is sought. Returns the last answer: what
 * comes after begins from it.
 */
async function fixShortfalls(session: Session, options: SolveOptions): Promise<SolveOptions> {
  const { phase } = session;
  session.phase = 'shortfall';
  const gap = Math.max(SHORT_GAP, session.options.gap ?? 0);
  let begun = options;
  for (const priority of PRIORITIES) {
    const terms = shortTerms(session.model, priority);
    if (terms.length === 0) continue;
    const title = `Least shortfall of priority ${priority}, in pence of what it would have brought`;
    const time = remaining(session).timeLimitSeconds;
    const limit = time === undefined ? {} : { timeLimitSeconds: Math.max(LEAST_SECONDS, time * SHORT_TIME) };
    const { solution } = await solve(
      session,
      { sense: 'Minimize', objective: terms, title },
      { ...begun, gap, ...limit },
    );
    if (!solution.hasAnswer) throw failed('The least shortfall could not be found in time.');
    session.isProven &&= isProof(session, solution);
    session.fixed.push(shortRow(priority, terms, Math.max(0, solution.objective) + SHORT_TOLERANCE));
    begun = { ...options, start: solution.columns };
  }
  session.phase = phase;
  return begun;
}

export const TITLE = 'Contribution of one cutting day in pence; weights in kilograms';

/**
 * The greatest contribution after the least shortfall. `hoped` pence short by priority are tried first: nothing short is
 * the usual case, and then one solve answers all phases at once.
 */
export async function solvePhases(session: Session, hoped: ReadonlyMap<Priority, number>): Promise<Solved> {
  const rows = PRIORITIES.flatMap((priority) => {
    const terms = shortTerms(session.model, priority);
    return terms.length > 0 ? [shortRow(priority, terms, hoped.get(priority) ?? 0)] : [];
  });
  // Later models have their ways settled: what is left in them is packs.
  const options = session.phase === 'packs' ? {} : { sumsFirst: leadingSums(session.model) };
  const hopeful = await solve(session, { title: TITLE, extraRows: rows }, options);
  if (hopeful.solution.hasAnswer) {
    session.fixed.push(...rows);
    return hopeful;
  }
  if (hopeful.solution.status === 'limit') throw failed('No plan was found in time.');
  return await solve(session, { title: TITLE }, await fixShortfalls(session, options));
}
