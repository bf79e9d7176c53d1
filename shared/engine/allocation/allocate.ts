import { EngineError } from '#shared/engine/engine-error.ts';
import type { Row, Term, WriteOptions } from '#shared/engine/linear/lp-model.ts';
import type { Solution, SolveOptions, Solver } from '#shared/engine/linear/solve.ts';
import type { AllocationInput, Priority } from './allocation-input.ts';
import type { AllocationModel, BoxColumns } from './allocation-model.ts';
import type { AllocationPlan } from './allocation-plan.ts';
import { buildModel, PRIORITIES, shortTerms } from './build-model.ts';
import { checkInput } from './check-input.ts';
import { orderInput } from './order-input.ts';
import { readPlan, type Draft } from './read-plan.ts';

/** Rounds in which a box may be taken off because its whole packs do not come out. */
const MOST_ROUNDS = 10;
/** Pence by which an earlier optimum may be missed later: below any price, above a solver's tolerance. */
const SHORT_TOLERANCE = 0.01;

export type AllocateOptions = SolveOptions;

type Solved = { solution: Solution; lpText: string };
type Session = {
  model: AllocationModel;
  solver: Solver;
  options: AllocateOptions;
  /** Earlier optima, fixed. */
  fixed: Row[];
  /** Boxes taken off. */
  caps: Map<string, Row>;
  spentMilliseconds: number;
  isProven: boolean;
};

/** The time limit is for the whole question, not for each of its solves. */
function remaining(session: Session): SolveOptions {
  const { timeLimitSeconds } = session.options;
  if (timeLimitSeconds === undefined) return session.options;
  return { ...session.options, timeLimitSeconds: Math.max(0.5, timeLimitSeconds - session.spentMilliseconds / 1000) };
}

async function solve(session: Session, about: WriteOptions & { rows: readonly Row[] }): Promise<Solved> {
  const extraRows = [...about.rows, ...session.caps.values()];
  const lpText = session.model.lp.write({ ...about, extraRows });
  const solution = await session.solver.solve(lpText, remaining(session));
  session.spentMilliseconds += solution.milliseconds;
  return { solution, lpText };
}

function isProof(session: Session, solution: Solution): boolean {
  return solution.status === 'optimal' || (session.options.nodeLimit !== undefined && solution.hasAnswer);
}

function fixRow(priority: Priority, terms: readonly Term[], pence: number): Row {
  return { name: `shortfall_${priority}`, terms, sense: '<=', right: pence };
}

function failed(sentence: string): EngineError {
  return new EngineError('SOLVER_FAILED', `${sentence} Nothing was changed; try again with more time.`, {
    node: 'plan',
  });
}

/** Finds the least shortfall of each priority in turn, each held while the next is sought. */
async function fixShortfalls(session: Session): Promise<void> {
  for (const priority of PRIORITIES) {
    const terms = shortTerms(session.model, priority);
    if (terms.length === 0) continue;
    const title = `Least shortfall of priority ${priority}, in pence of what it would have brought`;
    const { solution } = await solve(session, { sense: 'Minimize', objective: terms, title, rows: session.fixed });
    if (!solution.hasAnswer) throw failed('The least shortfall could not be found in time.');
    session.isProven &&= isProof(session, solution);
    session.fixed.push(fixRow(priority, terms, Math.max(0, solution.objective) + SHORT_TOLERANCE));
  }
}

const TITLE = 'Contribution of one cutting day in pence; weights in kilograms';

/** Nothing short is tried first: it is the usual case, and then one solve answers all phases at once. */
async function solveFirst(session: Session): Promise<Solved> {
  const none = PRIORITIES.flatMap((priority) => {
    const terms = shortTerms(session.model, priority);
    return terms.length > 0 ? [fixRow(priority, terms, 0)] : [];
  });
  const hopeful = await solve(session, { title: TITLE, rows: none });
  if (hopeful.solution.hasAnswer) {
    session.fixed = none;
    return hopeful;
  }
  await fixShortfalls(session);
  return await solve(session, { title: TITLE, rows: session.fixed });
}

/** Contribution of the last box of a variant per gram of these cuts in it; the least is given up first. */
function worthPerGram(draft: Draft, columns: BoxColumns, cutIds: readonly string[]): number {
  const box = draft.boxes.find(({ variantId }) => variantId === columns.variant.id);
  if (!box || box.boxes <= columns.variant.floor) return Infinity;
  const grams = box.contents.reduce((sum, each) => sum + (cutIds.includes(each.cutId) ? each.grams : 0), 0);
  if (grams === 0) return Infinity;
  let open = box.boxes - columns.variant.floor;
  let last = columns.variant.pricePence;
  for (const step of columns.variant.steps) {
    if (open <= 0) break;
    last = step.valuePence;
    open -= step.boxes;
  }
  return (last - columns.variant.packagingPence) / (grams / box.boxes);
}

/** Takes one box off for the first line that whole packs could not meet; null when every box is sold already. */
function takeOff(session: Session, draft: Draft): { variantId: string; lineId: string } | null {
  const [failure] = draft.failures;
  if (!failure) return null;
  const ranked = session.model.boxes
    .map((columns) => ({ columns, worth: worthPerGram(draft, columns, failure.line.cutIds) }))
    .filter(({ worth }) => worth < Infinity)
    .sort((a, b) => a.worth - b.worth || (a.columns.variant.id < b.columns.variant.id ? -1 : 1));
  const chosen = ranked[0]?.columns;
  if (!chosen) return null;
  const boxes = draft.boxes.find(({ variantId }) => variantId === chosen.variant.id)?.boxes ?? 0;
  const name = `cap_${chosen.boxes}`;
  session.caps.set(name, { name, terms: [[1, chosen.boxes]], sense: '<=', right: boxes - 1 });
  return { variantId: chosen.variant.id, lineId: failure.line.id };
}

async function solveWhole(
  session: Session,
): Promise<{ solved: Solved; draft: Draft; packRounds: AllocationPlan['packRounds'] }> {
  const packRounds: AllocationPlan['packRounds'] = [];
  let solved = await solveFirst(session);
  for (;;) {
    if (!solved.solution.hasAnswer) throw failed('No plan was found in time.');
    const draft = readPlan(session.model, solved.solution);
    const round = packRounds.length < MOST_ROUNDS ? takeOff(session, draft) : null;
    if (!round) return { solved, draft, packRounds };
    packRounds.push(round);
    solved = await solve(session, { title: TITLE, rows: session.fixed });
  }
}

/**
 * Plans one cutting day: the fate of every primal, boxes, loose packs, trade and mince of greatest contribution after
 * the least shortfall of what is promised. The same input gives the same plan, in whatever order it comes.
 */
export async function allocate(
  input: AllocationInput,
  solver: Solver,
  options: AllocateOptions = {},
): Promise<AllocationPlan> {
  const ordered = orderInput(input);
  checkInput(ordered);
  const session: Session = {
    model: buildModel(ordered),
    solver,
    options,
    fixed: [],
    caps: new Map(),
    spentMilliseconds: 0,
    isProven: true,
  };
  const { solved, draft, packRounds } = await solveWhole(session);
  const { failures, ...plan } = draft;
  const [failure] = failures;
  return {
    ...plan,
    isProven: session.isProven && isProof(session, solved.solution),
    gap: solved.solution.gap,
    packRounds,
    unfillable: failure ? { variantId: failure.variant.id, lineId: failure.line.id, name: failure.line.name } : null,
    lpText: solved.lpText,
    milliseconds: session.spentMilliseconds,
  };
}
