import type { Carcase } from '#shared/contracts/carcases.ts';
import { railOfPrimals } from '#shared/domain/rail-of-primals.ts';
import { railBasis, spokenFor, type PrimalFill } from '#shared/domain/spoken-for.ts';
import { SIDES, type CutoutNode, type SideName } from '#shared/engine/cutout/cutout-types.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import { scale } from '#shared/engine/rounding.ts';
import { findPublishedAllocation, listOffers, type AllocationRow } from '#server/allocation/allocation-queries.ts';
import type { Db, Tx } from '#server/deps.ts';
import type { CarcaseFigures, WaysByCarcase } from './day-figures.ts';

/** How the published plan cuts each side; a primal that leaves whole has no way. */
export async function readPublishedWays(db: Db | Tx, dayId: string): Promise<WaysByCarcase> {
  const published = await findPublishedAllocation(db, dayId);
  return published ? waysOf(published) : {};
}

function waysOf(published: AllocationRow): WaysByCarcase {
  const ways: Record<string, Record<SideName, Record<string, string>>> = {};
  for (const fate of published.plan.plan.fates) {
    if (fate.wayId === null) continue;
    const sides = (ways[fate.carcaseId] ??= { left: {}, right: {} });
    sides[fate.side][fate.choiceId] = fate.wayId;
  }
  return ways;
}

/** The rail of each side: product by primal as it is known now, filled by the share that is sold and held. */
export async function readRails(
  db: Db | Tx,
  { row, cutout }: CarcaseFigures,
  specification: Specification,
): Promise<Carcase['rails']> {
  const spoken = await readSpokenFor(db, row.cuttingDayId);
  return SIDES.map((side) => {
    const taken = spoken.get(`${row.id}/${side}`) ?? new Map<string, PrimalFill>();
    const fills = new Map<string, PrimalFill>();
    for (const [primalId, grams] of productByPrimal(cutout.nodes, side)) {
      fills.set(primalId, shareOf(grams, taken.get(primalId)));
    }
    const sideGrams = cutout.nodes.find((node) => node.path === side)?.grams ?? 0;
    const productGrams = [...fills.values()].reduce((sum, fill) => sum + fill.grams, 0);
    return { side, sideGrams, rail: railOfPrimals(specification, fills), boneFatLossGrams: sideGrams - productGrams };
  });
}

async function readSpokenFor(db: Db | Tx, dayId: string): Promise<Map<string, Map<string, PrimalFill>>> {
  const published = await findPublishedAllocation(db, dayId);
  if (!published) return new Map();
  const offers = await listOffers(db, dayId);
  return spokenFor(railBasis(published.input.input, published.plan.plan), {
    boxes: offers.flatMap(({ boxKindId, sold, held }) => (boxKindId ? [{ kindId: boxKindId, sold, held }] : [])),
    loose: offers.flatMap(({ kind, cutId, sold, held }) => (kind === 'loose' && cutId ? [{ cutId, sold, held }] : [])),
  });
}

/** Weights may have come in since the plan: what is sold is then the same share of what there is. */
function shareOf(grams: number, planned: PrimalFill | undefined): PrimalFill {
  if (!planned || planned.grams === 0) return { grams, soldGrams: 0, heldGrams: 0 };
  const soldGrams = Math.min(grams, scale(grams, planned.soldGrams, planned.grams));
  const heldGrams = Math.min(grams - soldGrams, scale(grams, planned.heldGrams, planned.grams));
  return { grams, soldGrams, heldGrams };
}

function productByPrimal(nodes: readonly CutoutNode[], side: SideName): Map<string, number> {
  const grams = new Map<string, number>();
  for (const node of nodes) {
    if (node.level !== 'line' || (node.kind !== 'cut' && node.kind !== 'trim')) continue;
    const [ofSide, , primalId] = node.path.split('/');
    if (ofSide === side && primalId) grams.set(primalId, (grams.get(primalId) ?? 0) + node.grams);
  }
  return grams;
}
