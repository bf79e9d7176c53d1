import type { RailPrimal } from '#shared/contracts/fields-schema.ts';
import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';
import { apportion } from '#shared/engine/apportion.ts';
import { scale } from '#shared/engine/rounding.ts';

/** What one primal of one side gives of one cut; a primal that leaves whole for a butcher is one lot of its own. */
type Lot = { id: string; sideId: string; primalId: string; cutId: string; grams: number; isSoldWhole: boolean };

type Cuts = ReadonlyMap<string, number>;

/** The kilograms that hang on a day's rail, and what each box, pack and butcher takes of them. Never changes once planned. */
export type RailBasis = {
  lots: Lot[];
  sideIds: string[];
  /** By box kind: how many were planned, and the grams of each cut in all of them. */
  boxes: ReadonlyMap<string, { boxes: number; cuts: Cuts }>;
  loose: ReadonlyMap<string, { packs: number; grams: number }>;
  /** Cuts that butchers have confirmed. */
  trade: Cuts;
  /** Grams of each cut that are in stock already, and so hang on no rail. */
  stock: Cuts;
  mince: { cutId: string; from: Cuts } | null;
};

/** How many boxes of each kind, and packs of each cut, are paid for and in open checkouts. */
export type Counts = {
  boxes: readonly { kindId: string; sold: number; held: number }[];
  loose: readonly { cutId: string; sold: number; held: number }[];
};

export type PrimalFill = Pick<RailPrimal, 'grams' | 'soldGrams' | 'heldGrams'>;

/** The parts of a plan that say where the beef goes. */
export type PlannedGoods = Pick<AllocationPlan, 'fates' | 'boxes' | 'loose' | 'trade' | 'cuts'>;

export function railBasis(input: AllocationInput, plan: PlannedGoods): RailBasis {
  const confirmed = new Set(input.trade.filter((line) => line.isConfirmed).map((line) => line.id));
  const boxes = new Map<string, { boxes: number; cuts: Map<string, number> }>();
  for (const box of plan.boxes) {
    const kind = boxes.get(box.kindId) ?? { boxes: 0, cuts: new Map<string, number>() };
    kind.boxes += box.boxes;
    for (const { cutId, grams } of box.contents) add(kind.cuts, cutId, grams);
    boxes.set(box.kindId, kind);
  }
  const trade = new Map<string, number>();
  const tradeCuts = new Map(input.trade.flatMap((line) => (line.kind === 'cut' ? [[line.id, line.cutId]] : [])));
  for (const line of plan.trade) {
    const cutId = tradeCuts.get(line.lineId);
    if (cutId && confirmed.has(line.lineId)) add(trade, cutId, line.cutGrams);
  }
  const stock = new Map<string, number>();
  for (const item of input.stock) add(stock, item.cutId, item.grams);
  const minced = new Map(plan.cuts.filter((cut) => cut.mincedGrams > 0).map((cut) => [cut.cutId, cut.mincedGrams]));
  return {
    lots: lotsOf(input, plan, confirmed),
    sideIds: input.sides.map((side) => side.id),
    boxes,
    loose: new Map(plan.loose.map(({ cutId, packs, grams }) => [cutId, { packs, grams }])),
    trade,
    stock,
    mince: input.mince ? { cutId: input.mince.productCutId, from: minced } : null,
  };
}

function lotsOf(input: AllocationInput, plan: PlannedGoods, confirmed: ReadonlySet<string>): Lot[] {
  const fates = new Map(plan.fates.map((fate) => [`${fate.sideId} ${fate.choiceId}`, fate]));
  return input.sides.flatMap((side) =>
    side.choices.flatMap((choice) => {
      const fate = fates.get(`${side.id} ${choice.choiceId}`);
      const whole = new Map(fate?.soldPrimals.map((sold) => [sold.primalId, sold.tradeLineId]));
      // A primal that leaves whole keeps the width that it would have had cut, so that a rail never jumps.
      const way =
        choice.ways.find((each) => each.wayId === fate?.wayId) ??
        choice.ways.find((each) => each.closedReason === null) ??
        choice.ways[0];
      return (way?.yields ?? []).map(({ primalId, cutId, grams }) => {
        const line = whole.get(primalId);
        const id = `${side.id} ${primalId} ${cutId}`;
        if (line === undefined) return { id, sideId: side.id, primalId, cutId, grams, isSoldWhole: false };
        return { id, sideId: side.id, primalId, cutId: '', grams, isSoldWhole: confirmed.has(line) };
      });
    }),
  );
}

/** Sold, held and all grams by side and primal, to the gram: what is sold of a cut is spread over all that gives it. */
export function spokenFor(basis: RailBasis, counts: Counts): Map<string, Map<string, PrimalFill>> {
  const sold = takenOfLots(basis, takenCuts(basis, counts, 'sold'));
  const held = takenOfLots(basis, takenCuts(basis, counts, 'held'));
  const sides = new Map<string, Map<string, PrimalFill>>(basis.sideIds.map((id) => [id, new Map()]));
  for (const lot of basis.lots) {
    const side = sides.get(lot.sideId) ?? new Map<string, PrimalFill>();
    const fill = side.get(lot.primalId) ?? { grams: 0, soldGrams: 0, heldGrams: 0 };
    const soldGrams = lot.isSoldWhole ? lot.grams : Math.min(lot.grams, sold.get(lot.id) ?? 0);
    fill.grams += lot.grams;
    fill.soldGrams += soldGrams;
    fill.heldGrams += Math.min(lot.grams - soldGrams, held.get(lot.id) ?? 0);
    side.set(lot.primalId, fill);
    sides.set(lot.sideId, side);
  }
  return sides;
}

/** Grams of each cut in what is sold or held, as it leaves: mince still counts as mince. */
function takenCuts(basis: RailBasis, counts: Counts, state: 'sold' | 'held'): Map<string, number> {
  const taken = new Map(state === 'sold' ? basis.trade : []);
  for (const box of counts.boxes) {
    const planned = basis.boxes.get(box.kindId);
    if (!planned || planned.boxes === 0) continue;
    for (const [cutId, grams] of planned.cuts) add(taken, cutId, scale(grams, box[state], planned.boxes));
  }
  for (const packs of counts.loose) {
    const planned = basis.loose.get(packs.cutId);
    if (planned && planned.packs > 0) add(taken, packs.cutId, scale(planned.grams, packs[state], planned.packs));
  }
  return taken;
}

/** Mince is taken back to the cuts that went into it; what comes from stock is left out; the rest is spread over the lots. */
function takenOfLots(basis: RailBasis, taken: Cuts): Map<string, number> {
  const lots = new Map<string, Lot[]>();
  for (const lot of basis.lots) {
    if (lot.cutId) lots.set(lot.cutId, [...(lots.get(lot.cutId) ?? []), lot]);
  }
  const hanging = (cutId: string) => (lots.get(cutId) ?? []).reduce((sum, lot) => sum + lot.grams, 0);
  const ofRail = new Map<string, number>();
  for (const [cutId, grams] of taken) {
    const from = basis.mince?.cutId === cutId ? basis.mince.from : new Map<string, number>();
    const minced = [...from.values()].reduce((sum, each) => sum + each, 0);
    const supply = hanging(cutId) + minced + (basis.stock.get(cutId) ?? 0);
    if (supply === 0) continue;
    add(ofRail, cutId, scale(grams, hanging(cutId), supply));
    const ofMinced = Math.min(minced, scale(grams, minced, supply));
    if (ofMinced === 0) continue;
    const shares = apportion(
      ofMinced,
      [...from].map(([id, weight]) => ({ id, weight })),
    );
    for (const [id, part] of shares) add(ofRail, id, part);
  }
  const result = new Map<string, number>();
  for (const [cutId, grams] of ofRail) {
    const of = (lots.get(cutId) ?? []).filter((lot) => lot.grams > 0);
    const total = Math.min(grams, hanging(cutId));
    if (of.length === 0 || total === 0) continue;
    for (const [id, part] of apportion(
      total,
      of.map((lot) => ({ id: lot.id, weight: lot.grams })),
    )) {
      result.set(id, part);
    }
  }
  return result;
}

function add(sums: Map<string, number>, key: string, grams: number): void {
  sums.set(key, (sums.get(key) ?? 0) + grams);
}

/** All sides of a day as one. */
export function sumSides(sides: ReadonlyMap<string, ReadonlyMap<string, PrimalFill>>): Map<string, PrimalFill> {
  const day = new Map<string, PrimalFill>();
  for (const primals of sides.values()) {
    for (const [primalId, fill] of primals) {
      const sum = day.get(primalId) ?? { grams: 0, soldGrams: 0, heldGrams: 0 };
      sum.grams += fill.grams;
      sum.soldGrams += fill.soldGrams;
      sum.heldGrams += fill.heldGrams;
      day.set(primalId, sum);
    }
  }
  return day;
}
