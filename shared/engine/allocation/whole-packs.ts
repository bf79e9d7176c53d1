import type { Row } from '#shared/engine/linear/lp-model.ts';
import type { Priority } from './allocation-input.ts';
import type { BoxColumns, Patterns } from './allocation-model.ts';
import type { AllocationPlan } from './allocation-plan.ts';
import { findPatterns } from './box-patterns.ts';
import { buildModel, PRIORITIES, shortTerms } from './build-model.ts';
import { failed, SHORT_TOLERANCE, solve, solvePhases, TITLE, type Session, type Solved } from './phases.ts';
import { readPlan, type Draft } from './read-plan.ts';

/** Rounds in which a box may be taken off because its whole packs do not come out. */
const MOST_ROUNDS = 10;
/** Relative gap of the later models: their packs are whole, their ways are settled. */
const PACK_GAP = 0.0005;

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
  const options = { ...session.options, gap };
  return { ...session, phase: 'packs', model, options, fixed, caps: new Map(), isProven: true };
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
export async function makeWhole(first: Session, plan: Solved): Promise<Whole> {
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
