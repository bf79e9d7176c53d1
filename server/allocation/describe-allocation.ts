import type { Allocation, PlannedChoice, PlannedSide } from '#shared/contracts/allocation.ts';
import { railOfPrimals } from '#shared/domain/rail-of-primals.ts';
import { railBasis, spokenFor, type PrimalFill } from '#shared/domain/spoken-for.ts';
import { formatCount, formatWeight } from '#shared/domain/words.ts';
import type { Shortfall } from '#shared/engine/allocation/allocation-plan.ts';
import type { SideSupply } from '#shared/engine/cutout/cutout-types.ts';
import { marginOf, sumEntries } from '#shared/engine/margin/margin.ts';
import type { DayCutouts } from '#server/carcases/day-figures.ts';
import type { DayMoney } from '#server/margin/carcase-accounts.ts';
import { planEntries } from '#server/margin/plan-margin.ts';
import { groupBy } from '#server/farm/group-by.ts';
import type { AllocationRow, OfferRow, ReservedLine } from './allocation-queries.ts';

export type AllocationFacts = {
  figures: DayCutouts;
  offers: readonly OfferRow[];
  reserved: readonly ReservedLine[];
  money: DayMoney;
  minceCaution: string | null;
};

/** An allocation as the workbench shows it, with what is sold and held at this moment. */
export function describeAllocation(row: AllocationRow, facts: AllocationFacts): Allocation {
  const { input } = row.input;
  const { plan, promise, explanation } = row.plan;
  const { day, carcases } = facts.figures;
  const fills = spokenFor(railBasis(input, plan), countsOf(facts.offers));
  const sides = input.sides.map((side) => describeSide(row, side, { facts, fill: fills.get(side.id) ?? new Map() }));
  const coldGrams = carcases.reduce((sum, carcase) => sum + carcase.cutout.cold.grams, 0);
  const margin = marginOf(sumEntries(planEntries(row, facts.money)));
  const cutName = (cutId: string) => input.cuts.find((cut) => cut.id === cutId)?.name ?? cutId;
  return {
    id: row.id,
    dayId: day.id,
    day: day.day,
    state: row.state,
    createdAt: row.createdAt.toISOString(),
    figuresVersion: row.figuresVersion,
    isOutOfDate: row.figuresVersion !== day.figuresVersion,
    isProven: row.isProven,
    gapBasisPoints: Math.ceil(plan.gap * 10_000),
    solveMs: Math.round(plan.milliseconds),
    contributionPence: margin.contributionPence,
    deadweightPence: margin.deadweightPence,
    gainPence: margin.gainPence,
    cautions: [input.mince?.closedReason ?? [], facts.minceCaution ?? []].flat(),
    unpriced: facts.money.carcases.flatMap(({ problem }) => problem ?? []),
    coldGrams,
    productGrams: plan.cuts.reduce((sum, cut) => sum + cut.madeGrams, 0),
    locks: row.locks.map(({ carcaseId, side, choiceId, wayId }) => ({ carcaseId, side, choiceId, wayId })),
    sides,
    ...describeGoods(row, facts.offers),
    trade: describeTrade(row, facts.reserved),
    cuts: plan.cuts.filter(hasWeight).map(({ leftStockGrams = 0, ...cut }) => ({
      ...cut,
      stockUsedGrams: cut.stockGrams - leftStockGrams,
      // What stays in the freezer is no leftover of this day.
      leftGrams: cut.leftGrams - leftStockGrams,
      name: cutName(cut.cutId),
      worthPencePerKg: explanation?.worths.find((worth) => worth.cutId === cut.cutId)?.pencePerKg ?? null,
    })),
    isExplained: promise !== null && explanation !== null,
    promise: promise && {
      confidencePercent: Math.round(promise.jointConfidence * 100),
      isFloorAtRisk: promise.isFloorAtRisk,
      worstShortGrams: promise.floorShortfall?.worstShortGrams ?? 0,
    },
    shortfalls: plan.shortfalls.map((shortfall) => ({ name: shortfall.name, missing: missingWords(shortfall) })),
  };
}

function missingWords({ short, unit }: Shortfall): string {
  return unit === 'grams' ? formatWeight(short) : formatCount(short, unit.slice(0, -1), unit);
}

/** `Hearth: 2 boxes missing`. */
export function nameShortfall(shortfall: Shortfall): string {
  return `${shortfall.name}: ${missingWords(shortfall)} missing`;
}

/** A cut that no chosen way makes has nothing to show. */
function hasWeight({ madeGrams, stockGrams }: AllocationRow['plan']['plan']['cuts'][number]): boolean {
  return madeGrams + stockGrams > 0;
}

/** Boxes and loose packs: planned, safe to promise, sold and held, and what limits each box. */
function describeGoods(row: AllocationRow, offers: readonly OfferRow[]): Pick<Allocation, 'boxes' | 'loose'> {
  const { plan, promise, explanation } = row.plan;
  const taken = (productKey: string) => {
    const found = offers.find((offer) => offer.productKey === productKey);
    return { sold: found?.sold ?? 0, held: found?.held ?? 0 };
  };
  const boxes = plan.boxes.map((box) => ({
    boxKindId: box.kindId,
    name: box.name,
    count: box.boxes,
    promised: promise?.boxes.find((each) => each.variantId === box.variantId)?.promised ?? null,
    ...taken(`box:${box.kindId}`),
    limitedBy: (explanation?.limits.find((limit) => limit.variantId === box.variantId)?.lines ?? []).map(
      (line) => `${line.name}: ${formatWeight(line.shortGrams)} short for one more`,
    ),
  }));
  const loose = plan.loose
    .filter((item) => item.packs > 0)
    .map((item) => ({
      cutId: item.cutId,
      name: row.input.input.cuts.find((cut) => cut.id === item.cutId)?.name ?? item.cutId,
      packs: item.packs,
      promised: promise?.loose.find((each) => each.cutId === item.cutId)?.promised ?? null,
      grams: item.grams,
      ...taken(`loose:${item.cutId}`),
    }));
  return { boxes, loose };
}

export function countsOf(offers: readonly OfferRow[]) {
  return {
    boxes: offers.flatMap(({ boxKindId, sold, held }) => (boxKindId ? [{ kindId: boxKindId, sold, held }] : [])),
    loose: offers.flatMap(({ kind, cutId, sold, held }) => (kind === 'loose' && cutId ? [{ cutId, sold, held }] : [])),
  };
}

type SideFacts = { facts: AllocationFacts; fill: ReadonlyMap<string, PrimalFill> };

function describeSide(row: AllocationRow, side: SideSupply, { facts, fill }: SideFacts): PlannedSide {
  const { figures, reserved } = facts;
  const carcase = figures.carcases.find((candidate) => candidate.row.id === side.carcaseId);
  return {
    carcaseId: side.carcaseId,
    side: side.side,
    earTag: carcase?.row.animal.earTag ?? '',
    title: carcase ? `${carcase.row.animal.breed} ${carcase.row.animal.sex}` : '',
    sideGrams: side.grams,
    source: row.plan.weighedCarcaseIds.includes(side.carcaseId) ? 'weighed' : 'estimated',
    rail: railOfPrimals(figures.specification, fill),
    choices: side.choices.map((choice) => describeChoice(row, { side, choice, reserved })),
  };
}

type ChoiceFacts = { side: SideSupply; choice: SideSupply['choices'][number]; reserved: readonly ReservedLine[] };

function describeChoice(row: AllocationRow, { side, choice, reserved }: ChoiceFacts): PlannedChoice {
  const isHere = (place: { carcaseId: string; side: string; choiceId: string }) =>
    place.carcaseId === side.carcaseId && place.side === side.side && place.choiceId === choice.choiceId;
  const fate = row.plan.plan.fates.find(isHere);
  const soldLine = fate?.soldPrimals[0]?.tradeLineId;
  return {
    choiceId: choice.choiceId,
    name: choice.name,
    primalIds: choice.primals.map((primal) => primal.primalId),
    wayId: fate?.wayId ?? null,
    soldTo: reserved.find((line) => line.id === soldLine)?.businessName ?? null,
    cuts: cutsOf(row, { choice, fate }),
    isLocked: row.locks.some(isHere),
    lockCostPence: row.plan.explanation?.locks.find(isHere)?.costPence ?? null,
    ways: choice.ways.map(({ wayId, name, closedReason }) => ({ wayId, name, closedReason })),
  };
}

type Fate = AllocationRow['plan']['plan']['fates'][number];

function cutsOf(row: AllocationRow, { choice, fate }: { choice: ChoiceFacts['choice']; fate: Fate | undefined }) {
  const gone = new Set(fate?.soldPrimals.map(({ primalId }) => primalId));
  const way = choice.ways.find(({ wayId }) => wayId === fate?.wayId);
  const kept = (way?.yields ?? []).filter(({ primalId }) => !gone.has(primalId));
  return [...groupBy(kept, ({ cutId }) => cutId)].map(([cutId, yields]) => ({
    cutId,
    name: row.input.input.cuts.find(({ id }) => id === cutId)?.name ?? cutId,
    grams: yields.reduce((sum, { grams }) => sum + grams, 0),
  }));
}

function describeTrade(row: AllocationRow, reserved: readonly ReservedLine[]): Allocation['trade'] {
  return row.plan.plan.trade.flatMap((planned) => {
    const line = reserved.find((candidate) => candidate.id === planned.lineId);
    if (!line) return [];
    const { reservationNo, businessName } = line;
    const grams = planned.cutGrams + planned.units.reduce((sum, unit) => sum + unit.grams, 0);
    return [{ reservationNo, businessName, name: planned.name, grams }];
  });
}
