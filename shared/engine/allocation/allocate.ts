import { EngineError } from '#shared/engine/engine-error.ts';
import type { Row, Term, WriteOptions } from '#shared/engine/linear/lp-model.ts';
import type { Solution, SolveOptions, Solver } from '#shared/engine/linear/solve.ts';
import type { AllocationInput, Priority } from './allocation-input.ts';
import type { AllocationModel, BoxColumns, Patterns } from './allocation-model.ts';
import { findPatterns } from './box-patterns.ts';
import type { AllocationPlan } from './allocation-plan.ts';
import { buildModel, PRIORITIES, shortTerms } from './build-model.ts';
import { checkInput } from './check-input.ts';
import { orderInput } from './order-input.ts';
import { readPlan, type Draft } from './read-plan.ts';

/** Rounds in which a box may be taken off because its whole packs do not come out. */
const MOST_ROUNDS = 10;
/** Pence by which an earlier optimum may be missed later: below any price, above a solver's tolerance. */
const SHORT_TOLERANCE = 0.01;

/** Relative gap of the second model: its packs are whole, its ways are settled. */
const PACK_GAP = 0.0005;
const LEAST_SECONDS = 1;

export type AllocateOptions = SolveOptions;

type Solved = { solution: Solution; lpText: string };
/** One model on its way to an answer: earlier optima and boxes taken off are rows of its text. */
type Session = {
  model: AllocationModel;
  solver: Solver;
  options: AllocateOptions;
  fixed: Row[];
  caps: Map<string, Row>;
  clock: { spentMilliseconds: number };
  isProven: boolean;
};

/** The time limit is for the whole question, not for each of its solves. */
function remaining(session: Session): SolveOptions {
  const { timeLimitSeconds } = session.options;
  if (timeLimitSeconds === undefined) return session.options;
  const left = timeLimitSeconds - session.clock.spentMilliseconds / 1000;
  return { ...session.options, timeLimitSeconds: Math.max(LEAST_SECONDS, left) };
}

async function solve(session: Session, about: WriteOptions): Promise<Solved> {
  const extraRows = [...(about.extraRows ?? []), ...session.fixed, ...session.caps.values()];
  const lpText = session.model.lp.write({ ...about, extraRows });
  const solution = await session.solver.solve(lpText, remaining(session));
  session.clock.spentMilliseconds += solution.milliseconds;
  return { solution, lpText };
}

function isProof(session: Session, solution: Solution): boolean {
  return solution.status === 'optimal' || (session.options.nodeLimit !== undefined && solution.hasAnswer);
}

function shortRow(priority: Priority, terms: readonly Term[], pence: number): Row {
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
    const { solution } = await solve(session, { sense: 'Minimize', objective: terms, title });
    if (!solution.hasAnswer) throw failed('The least shortfall could not be found in time.');
    session.isProven &&= isProof(session, solution);
    session.fixed.push(shortRow(priority, terms, Math.max(0, solution.objective) + SHORT_TOLERANCE));
  }
}

const TITLE = 'Contribution of one cutting day in pence; weights in kilograms';

/**
 * The greatest contribution after the least shortfall. `hoped` pence short by priority are tried first: nothing short is
 * the usual case, and then one solve answers all phases at once.
 */
async function solvePhases(session: Session, hoped: ReadonlyMap<Priority, number>): Promise<Solved> {
  const rows = PRIORITIES.flatMap((priority) => {
    const terms = shortTerms(session.model, priority);
    return terms.length > 0 ? [shortRow(priority, terms, hoped.get(priority) ?? 0)] : [];
  });
  const hopeful = await solve(session, { title: TITLE, extraRows: rows });
  if (hopeful.solution.hasAnswer) {
    session.fixed.push(...rows);
    return hopeful;
  }
  await fixShortfalls(session);
  return await solve(session, { title: TITLE });
}

/** What the answer falls short by, in the pence of the model's rows. */
function shortPence(session: Session, { solution }: Solved): Map<Priority, number> {
  return new Map(
    PRIORITIES.map((priority) => {
      const terms = shortTerms(session.model, priority);
      const pence = terms.reduce((sum, [each, column]) => sum + each * (solution.columns[column] ?? 0), 0);
      return [priority, pence > SHORT_TOLERANCE ? pence + SHORT_TOLERANCE : 0];
    }),
  );
}

/** A later model keeps the ways and unit sales of the first; its packs are whole, or its boxes follow patterns. */
function packSession(session: Session, { solution }: Solved, patterns?: Patterns): Session {
  const model = buildModel(session.model.input, { isPacked: true, ...(patterns ? { patterns } : {}) });
  const columns = [...model.ways.map(({ column }) => column), ...model.units.map(({ column }) => column)];
  const fixed = columns.map((column): Row => {
    const right = Math.round(solution.columns[column] ?? 0);
    return { name: `keep_${column}`, terms: [[1, column]], sense: '=', right };
  });
  const gap = Math.max(PACK_GAP, session.options.gap ?? 0);
  return { ...session, model, options: { ...session.options, gap }, fixed, caps: new Map(), isProven: true };
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

/**
 * Takes one box off for the first line that whole packs could not meet: of the variants with that line, the one whose
 * last box brings least per gram of it. Null when every one of them is sold already.
 */
function takeOff(session: Session, draft: Draft): { variantId: string; lineId: string } | null {
  const [failure] = draft.failures;
  if (!failure) return null;
  const ranked = session.model.boxes
    .filter(({ variant }) => variant.kindId === failure.variant.kindId)
    .filter(({ variant }) => variant.lines.some(({ id }) => id === failure.line.id))
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

type Whole = { draft: Draft; packRounds: AllocationPlan['packRounds'] };

function readWhole(session: Session, solved: Solved): Draft {
  if (!solved.solution.hasAnswer) throw failed('No whole packs were found in time.');
  return readPlan(session.model, solved.solution);
}

/**
 * Whole packs of the plan: first as counts by line, dealt over the boxes; where a box then misses a line, again with
 * every box held to a pattern of packs that can be filled; where one still does, boxes are taken off one by one.
 */
async function makeWhole(first: Session, plan: Solved): Promise<Whole> {
  const packRounds: AllocationPlan['packRounds'] = [];
  const counted = packSession(first, plan);
  let solved = await solvePhases(counted, shortPence(first, plan));
  let draft = readWhole(counted, solved);
  if (draft.failures.length === 0) return { draft, packRounds };
  const { input, cuts } = counted.model;
  const session = packSession(first, plan, findPatterns(draft.dealt, { variants: input.boxes, limits: cuts }));
  solved = await solvePhases(session, shortPence(counted, solved));
  for (;;) {
    draft = readWhole(session, solved);
    const round = packRounds.length < MOST_ROUNDS ? takeOff(session, draft) : null;
    if (!round) return { draft, packRounds };
    packRounds.push(round);
    solved = await solve(session, { title: TITLE });
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
  const clock = { spentMilliseconds: 0 };
  const about = { solver, options, clock, isProven: true };
  const session: Session = { ...about, model: buildModel(ordered), fixed: [], caps: new Map() };
  const solved = await solvePhases(session, new Map());
  if (!solved.solution.hasAnswer) throw failed('No plan was found in time.');
  const { draft, packRounds } = await makeWhole(session, solved);
  const { failures, dealt: _dealt, ...plan } = draft;
  const [failure] = failures;
  return {
    ...plan,
    isProven: session.isProven && isProof(session, solved.solution),
    gap: solved.solution.gap,
    wholePackPence: Math.round(solved.solution.objective) - plan.contributionPence,
    packRounds,
    unfillable: failure ? { variantId: failure.variant.id, lineId: failure.line.id, name: failure.line.name } : null,
    lpText: solved.lpText,
    milliseconds: clock.spentMilliseconds,
  };
}
