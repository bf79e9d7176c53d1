import type { Row, Term } from '#shared/engine/linear/lp-model.ts';
import type { RowChange, Solver } from '#shared/engine/linear/solve.ts';
import { openSession } from './allocate.ts';
import type { AllocationInput, WayLock } from './allocation-input.ts';
import type { AllocationModel, BoxColumns } from './allocation-model.ts';
import type { AllocationPlan, BoxLimit, CutWorth, LockCost } from './allocation-plan.ts';
import { buildModel } from './build-model.ts';
import { orderInput } from './order-input.ts';
import { failed, solvePhases } from './phases.ts';
import type { AllocateOptions } from './plan-progress.ts';

export type Explanation = { limits: BoxLimit[]; worths: CutWorth[]; locks: LockCost[] };

/** As for the plan itself: `signal` cancels, the time limit is for each question of the explanation. */
export type ExplainOptions = Omit<AllocateOptions, 'onProgress'>;

/** Kilograms by which a line must fall short before it counts: a gram, above a solver's tolerance. */
const LEAST_LACK = 0.001;

function row(name: string, column: string, about: readonly [sense: Row['sense'], right: number]): Row {
  return { name, terms: [[1, column]], sense: about[0], right: about[1] };
}

/** The plan's ways and unit sales as rows. */
function keepFates(model: AllocationModel, plan: AllocationPlan): Row[] {
  const fates = new Map(plan.fates.map((fate) => [`${fate.sideId} ${fate.choiceId}`, fate]));
  const sold = new Set(plan.trade.flatMap(({ lineId, units }) => units.map(({ sideId }) => `${lineId} ${sideId}`)));
  const ways = model.ways.flatMap(({ side, choice, way, column, primals }): Row[] => {
    const fate = fates.get(`${side.id} ${choice.choiceId}`);
    const isCut = fate?.wayId === way.wayId;
    const gone = new Set(fate?.soldPrimals.map(({ primalId }) => primalId));
    const parts = [...primals].filter(([, part]) => part !== column);
    return [
      row(`keep_${column}`, column, ['=', isCut ? 1 : 0]),
      ...parts.map(([primalId, part]) => row(`keep_${part}`, part, ['=', isCut && !gone.has(primalId) ? 1 : 0])),
    ];
  });
  const units = model.units.map(({ line, side, column }) =>
    row(`keep_${column}`, column, ['=', sold.has(`${line.id} ${side.id}`) ? 1 : 0]),
  );
  return [...ways, ...units];
}

/** What the plan leaves short may stay short, and no more. */
function keepShorts(model: AllocationModel, plan: AllocationPlan): Row[] {
  if (plan.shortfalls.length > 0) return [];
  return model.shorts.map(({ column }) => row(`keep_${column}`, column, ['=', 0]));
}

/**
 * What one more kilogram of each cut would be worth, in pence: ways and unit sales stay, boxes may be broken, and the
 * optimum with 1,000 g more of the cut is compared with the optimum as it is.
 */
export async function worthOfCuts(
  input: AllocationInput,
  plan: AllocationPlan,
  about: { solver: Solver; options?: ExplainOptions },
): Promise<CutWorth[]> {
  const model = buildModel(orderInput(input));
  const fresh = model.left.filter(({ state }) => state === 'fresh');
  const extraRows = [...keepFates(model, plan), ...keepShorts(model, plan)];
  const lpText = model.lp.write({ isRelaxed: true, extraRows });
  const more = fresh.map(({ column, cutId }): RowChange[] => {
    const kg = 1 + stockKg(model, cutId);
    return [{ row: column.replace(/^left_/, 'supply_'), lower: kg, upper: kg }];
  });
  const [base, ...answers] = await about.solver.solveVariations(lpText, [[], ...more], about.options ?? {});
  if (!base?.hasAnswer) throw failed('The worth of the cuts could not be computed.');
  return fresh.map(({ cutId }, index) => {
    const answer = answers[index];
    const pencePerKg = answer?.hasAnswer ? Math.round(answer.objective - base.objective) : 0;
    return { cutId, pencePerKg: Math.max(0, pencePerKg) };
  });
}

function stockKg(model: AllocationModel, cutId: string): number {
  const items = model.input.stock.filter((item) => item.cutId === cutId && item.state === 'fresh');
  return items.reduce((sum, { grams }) => sum + grams, 0) / 1000;
}

/** Loose packs and cuts for the trade as planned: what one more box would have to leave alone. */
function keepOffers(model: AllocationModel, plan: AllocationPlan): Row[] {
  const loose = model.loose.map(({ demand, sources }, index): Row => {
    const planned = plan.loose.find(({ cutId }) => cutId === demand.cutId)?.grams ?? 0;
    const terms = sources.map(({ column }): Term => [1, column]);
    return { name: `offer_loose${index + 1}`, terms, sense: '>=', right: planned / 1000 };
  });
  const trade = model.tradeCuts.map(({ line, column }) => {
    const planned = plan.trade.find(({ lineId }) => lineId === line.id)?.cutGrams ?? 0;
    return row(`offer_${column}`, column, ['>=', planned / 1000]);
  });
  return [...loose.filter(({ terms }) => terms.length > 0), ...trade];
}

/** Rows that hold every offer of the plan, and one more of the variant in question. */
function forceOneMore(model: AllocationModel, plan: AllocationPlan, chosen: BoxColumns): Row[] {
  return model.boxes.flatMap(({ variant, boxes, lacks }) => {
    const planned = plan.boxes.find(({ variantId }) => variantId === variant.id)?.boxes ?? 0;
    if (variant.id === chosen.variant.id) return [row(`force_${boxes}`, boxes, ['=', planned + 1])];
    const whole = lacks.map(({ column }) => row(`none_${column}`, column, ['=', 0]));
    return [row(`force_${boxes}`, boxes, ['=', planned]), ...whole];
  });
}

/**
 * What stops one more of each box: the lines that lack grams when it is forced beside everything else on offer, with
 * ways and unit sales as planned. A box without such lines is limited by its demand or by what it brings.
 */
export async function limitsOfBoxes(
  input: AllocationInput,
  plan: AllocationPlan,
  about: { solver: Solver; options?: ExplainOptions },
): Promise<BoxLimit[]> {
  const ordered = orderInput(input);
  const room = { ...ordered, boxes: ordered.boxes.map((box) => ({ ...box, steps: [...box.steps, ONE_MORE] })) };
  const model = buildModel(room, { isElastic: true });
  const kept = [...keepFates(model, plan), ...keepShorts(model, plan), ...keepOffers(model, plan)];
  const limits: BoxLimit[] = [];
  for (const chosen of model.boxes) {
    const objective = chosen.lacks.map(({ column }): Term => [1, column]);
    const extraRows = [...kept, ...forceOneMore(model, plan, chosen)];
    const lpText = model.lp.write({ sense: 'Minimize', objective, isRelaxed: true, extraRows });
    const solution = await about.solver.solve(lpText, about.options);
    if (!solution.hasAnswer) throw failed(`What limits ${chosen.variant.name} could not be computed.`);
    const lines = chosen.lacks.flatMap(({ line, column }) => {
      const kg = solution.columns[column] ?? 0;
      return kg > LEAST_LACK ? [{ lineId: line.id, name: line.name, shortGrams: Math.round(kg * 1000) }] : [];
    });
    limits.push({ variantId: chosen.variant.id, name: chosen.variant.name, lines });
  }
  return limits;
}

const ONE_MORE = { boxes: 1, valuePence: 0 };

async function optimum(input: AllocationInput, about: { solver: Solver; options?: ExplainOptions }) {
  const session = openSession(input, about.solver, about.options ?? {});
  const { solution } = await solvePhases(session, new Map());
  if (!solution.hasAnswer) throw failed('The cost of a lock could not be computed in time.');
  return { session, solution };
}

function isSameLock(a: WayLock, b: WayLock): boolean {
  return a.carcaseId === b.carcaseId && a.side === b.side && a.choiceId === b.choiceId;
}

/**
 * The cost of each lock: the optimum without it less the optimum with it, in pence, all other locks standing. It is shown
 * with the way that the plan would then take; where there is no lock nothing is compared. `heldPence` is the optimum with
 * all of them, where the plan has it already.
 */
export async function costsOfLocks(
  input: AllocationInput,
  about: { solver: Solver; options?: ExplainOptions; heldPence?: number },
): Promise<LockCost[]> {
  const { locks } = orderInput(input);
  if (locks.length === 0) return [];
  const heldPence = about.heldPence ?? (await optimum(input, about)).solution.objective;
  const costs: LockCost[] = [];
  for (const lock of locks) {
    const others = input.locks.filter((other) => !isSameLock(other, lock));
    const free = await optimum({ ...input, locks: others }, about);
    const chosen = free.session.model.ways.find(
      ({ side, choice, column }) =>
        side.carcaseId === lock.carcaseId &&
        side.side === lock.side &&
        choice.choiceId === lock.choiceId &&
        (free.solution.columns[column] ?? 0) > 0.5,
    );
    costs.push({
      ...lock,
      costPence: Math.max(0, Math.round(free.solution.objective - heldPence)),
      freeWayId: chosen?.way.wayId ?? null,
    });
  }
  return costs;
}

/** All three explanations of a plan. */
export async function explain(
  input: AllocationInput,
  plan: AllocationPlan,
  about: { solver: Solver; options?: ExplainOptions },
): Promise<Explanation> {
  return {
    limits: await limitsOfBoxes(input, plan, about),
    worths: await worthOfCuts(input, plan, about),
    locks: await costsOfLocks(input, { ...about, heldPence: plan.contributionPence + plan.wholePackPence }),
  };
}
