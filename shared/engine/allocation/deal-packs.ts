import type { Cut } from '#shared/engine/figures/specification.ts';
import type { MeatState, RecipeLine } from './allocation-input.ts';
import { packableRange } from './check-recipe.ts';

/** Grams of one cut that the plan gives to one line over all boxes of a variant. */
export type Cell = { line: RecipeLine; cut: Cut; state: MeatState; grams: number };
/** A pack that is to be cut: its weight may still move between its cut's limits. */
export type PlannedPack = { lineId: string; cut: Cut; state: MeatState; grams: number };
export type PlannedContents = PlannedPack[];

type CellPlan = Cell & { packsPerBox: number; wish: number; packs: number };

function clamp(value: number, low: number, high: number): number {
  return Math.max(low, Math.min(high, value));
}

/** Packs of this cut that make the line's share of one box: in range if any number is, and nearest to the usual pack. */
function packsPerBox(cell: Cell, gramsPerBox: number, most: number): number {
  const usual = (cell.cut.minPackGrams + cell.cut.maxPackGrams) / 2;
  const counts = Array.from({ length: Math.max(1, most) }, (_, index) => index + 1);
  const off = (count: number) => {
    const grams = gramsPerBox / count;
    const outside = Math.max(0, cell.cut.minPackGrams - grams, grams - cell.cut.maxPackGrams);
    return outside * 1e6 + Math.abs(grams - usual);
  };
  return counts.reduce((best, count) => (off(count) < off(best) ? count : best));
}

function countPacks(cells: readonly Cell[], boxes: number, cuts: ReadonlyMap<string, Cut>): CellPlan[] {
  const total = cells.reduce((sum, { grams }) => sum + grams, 0);
  const gramsPerBox = total / boxes;
  const plans = cells.map((cell): CellPlan => {
    const range = packableRange(cell.line, cuts);
    const perBox = packsPerBox(cell, gramsPerBox, clamp(range?.maxPacks ?? 1, 1, 40));
    const wish = (cell.grams / gramsPerBox) * perBox;
    const least = Math.ceil(cell.grams / cell.cut.maxPackGrams);
    const most = Math.floor(cell.grams / cell.cut.minPackGrams);
    return {
      ...cell,
      packsPerBox: perBox,
      wish,
      packs: Math.min(most, Math.max(Math.floor(wish + 1e-6), Math.min(least, most))),
    };
  });
  fillUp(plans, boxes);
  return plans;
}

/** Gives packs to the cells that were rounded down most, until every box has its share of the line. */
function fillUp(plans: CellPlan[], boxes: number): void {
  for (let guard = 0; guard < boxes * 40; guard += 1) {
    const served = plans.reduce((sum, plan) => sum + plan.packs / plan.packsPerBox, 0);
    if (served > boxes - 1e-9) return;
    const next = plans
      .filter((plan) => (plan.packs + 1) * plan.cut.minPackGrams <= plan.grams)
      .sort((a, b) => b.wish - b.packs - (a.wish - a.packs) || (a.cut.id < b.cut.id ? -1 : 1))[0];
    if (!next) return;
    next.packs += 1;
  }
}

/** Equal packs as near to the cell's grams as their limits allow. */
function cutPacks(plan: CellPlan): PlannedPack[] {
  if (plan.packs <= 0) return [];
  const grams = Math.min(plan.grams, plan.packs * plan.cut.maxPackGrams);
  const each = Math.floor(grams / plan.packs);
  const heavier = grams - each * plan.packs;
  return Array.from({ length: plan.packs }, (_, index) => ({
    lineId: plan.line.id,
    cut: plan.cut,
    state: plan.state,
    grams: each + (index < heavier ? 1 : 0),
  }));
}

/**
 * Cuts one line's grams into whole packs and deals them over the boxes in turn: like packs go together, and a cut that
 * runs out within a box is made up with the next. Grams below a pack are not dealt.
 */
export function dealLine(cells: readonly Cell[], boxes: number, cuts: ReadonlyMap<string, Cut>): PlannedContents[] {
  const dealt: PlannedContents[] = Array.from({ length: boxes }, () => []);
  if (cells.every(({ grams }) => grams <= 0)) return dealt;
  const plans = countPacks(
    cells.filter(({ grams }) => grams > 0),
    boxes,
    cuts,
  );
  const total = Math.max(
    boxes,
    plans.reduce((sum, plan) => sum + plan.packs / plan.packsPerBox, 0),
  );
  let reached = 0;
  for (const plan of plans) {
    const share = 1 / plan.packsPerBox;
    for (const pack of cutPacks(plan)) {
      const middle = ((reached + share / 2) * boxes) / total;
      dealt[clamp(Math.floor(middle), 0, boxes - 1)]?.push(pack);
      reached += share;
    }
  }
  return dealt;
}
