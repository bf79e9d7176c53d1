import type { AllocationAnswer } from '#shared/domain/allocation-record.ts';
import type { PlannedGoods } from '#shared/domain/spoken-for.ts';
import type { AllocationInput, TradeLine } from '#shared/engine/allocation/allocation-input.ts';
import type { CutBalance, PlannedFate, PlannedTrade } from '#shared/engine/allocation/allocation-plan.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { cutCarcase } from './make-carcase-facts.ts';

type Box = { kindId: string; boxes: number; contents: Record<string, number> };

export type HandPlan = {
  carcaseIds: string[];
  boxes: Box[];
  /** Packs and grams by cut. */
  loose?: Record<string, { packs: number; grams: number }>;
  /** Goes into the mincer, by cut. */
  minced?: Record<string, number>;
  trade?: { line: TradeLine; primalIds?: string[]; sideId?: string; cutGrams?: number }[];
};

/**
 * A plan written by hand for steers of the reference class, every choice cut in its first open way: what the solver
 * would keep, without waiting for it.
 */
export function makePlan(by: HandPlan): { input: AllocationInput; plan: PlannedGoods } {
  const sides = by.carcaseIds.flatMap((id) => cutCarcase({ id }).sides);
  const trade = by.trade ?? [];
  const fates = sides.flatMap((side) =>
    side.choices.map((choice): PlannedFate => {
      const line = trade.find((each) => each.sideId === side.id);
      const whole = choice.primals.filter((primal) => line?.primalIds?.includes(primal.primalId));
      const way = choice.ways.find((each) => each.closedReason === null);
      const { carcaseId } = side;
      return {
        ...{ sideId: side.id, carcaseId, side: side.side, choiceId: choice.choiceId },
        wayId: whole.length === choice.primals.length ? null : (way?.wayId ?? null),
        soldPrimals: whole.map(({ primalId }) => ({ primalId, tradeLineId: line?.line.id ?? '' })),
      };
    }),
  );
  const input: AllocationInput = {
    sides,
    cuts: traditionalSide.cuts,
    stock: [],
    boxes: [],
    loose: [],
    trade: trade.map((each) => each.line),
    mince: {
      closedReason: null,
      productCutId: 'mince',
      minLeanPpht: 85_000,
      costTenthPencePerKg: 700,
      allowedCutIds: Object.keys(by.minced ?? {}),
    },
    locks: [],
    packingTenthPencePerKg: 600,
  };
  return { input, plan: { fates, ...goodsOf(by), cuts: balancesOf(by) } };
}

function goodsOf(by: HandPlan): Pick<PlannedGoods, 'boxes' | 'loose' | 'trade'> {
  return {
    boxes: by.boxes.map(({ kindId, boxes, contents }) => ({
      ...{ variantId: kindId, kindId, name: kindId, boxes, short: 0, incomePence: 0 },
      contents: Object.entries(contents).map(([cutId, grams]) => ({
        ...{ lineId: cutId, cutId, state: 'fresh', grams: grams * boxes, packs: boxes },
      })),
    })),
    loose: Object.entries(by.loose ?? {}).map(([cutId, each]) => ({ cutId, ...each, short: 0, incomePence: 0 })),
    trade: (by.trade ?? []).map(({ line, cutGrams = 0 }): PlannedTrade => ({
      ...{ lineId: line.id, name: line.name, units: [], cutGrams, short: 0, incomePence: 0 },
    })),
  };
}

/** The plan as a published allocation keeps it, for what reads only where the beef goes. */
export function asAnswer(plan: PlannedGoods): AllocationAnswer {
  const kept = plan as AllocationAnswer['plan'];
  return { plan: kept, weighedCarcaseIds: [], promise: null, explanation: null };
}

/** Only what the rail reads: what goes into the mincer. */
function balancesOf(by: HandPlan): CutBalance[] {
  return Object.entries(by.minced ?? {}).map(([cutId, mincedGrams]) => ({
    ...{ cutId, madeGrams: mincedGrams, stockGrams: 0, boxGrams: 0, looseGrams: 0, tradeGrams: 0 },
    ...{ mincedGrams, leftGrams: 0 },
  }));
}
