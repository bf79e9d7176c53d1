import { priceForWeight } from '#shared/domain/money.ts';
import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';
import { apportion } from '#shared/engine/apportion.ts';
import { scale } from '#shared/engine/rounding.ts';
import { cardFeeOf } from './break-even.ts';
import type { CardFee, DirectCosts } from './margin-types.ts';
import type { Sale } from './share-carcases.ts';
import { splitSale, type SalePart } from './split-sale.ts';

export type SoldPlan = Pick<AllocationPlan, 'fates' | 'boxes' | 'loose' | 'trade' | 'cuts' | 'money'>;

/** The channels of a plan, by the names under which their margins stand. */
export const CHANNELS = ['boxes', 'loose packs', 'butchers', 'left over'] as const;
export type Channel = (typeof CHANNELS)[number];

/** Stands for frozen stock, which belongs to no carcase of the day. */
const STOCK = '';

/** Grams of each cut by carcase. */
type Supply = ReadonlyMap<string, ReadonlyMap<string, number>>;

type Use = Omit<Sale, 'carcaseId'> & { channel: Channel; cutId: string };

/**
 * A plan as sales, before kill, butchery and deadweight value are shared. A box's income and packaging are split over its
 * cuts by what they would bring loose; a cut's over the carcases by what each gives of it, mince taken back to the cuts
 * that were minced. The card fee is reckoned on one box an order and on loose packs that ride along with a box; butchers
 * pay by transfer. To the penny: sales add up to the plan's income less
 * what frozen stock that stays would fetch, their costs to its packaging, packing and mincing.
 */
export function planSales(input: AllocationInput, plan: SoldPlan, fee: CardFee): Sale[] {
  const supply = supplyOf(input, plan);
  const uses = [...boxUses(input, plan, fee), ...packedUses(input, plan, fee), ...leftUses(input, plan)];
  return [...addMincing(input, plan, uses).flatMap((use) => splitOverCarcases(use, supply)), ...unitSales(plan, input)];
}

/** What each carcase costs at the block: the plan's butchery, shared by the ways that it takes. */
export function butcheryByCarcase(input: AllocationInput, plan: SoldPlan): Map<string, number> {
  const weights = new Map<string, number>();
  for (const side of input.sides) {
    for (const choice of side.choices) {
      const fate = plan.fates.find((one) => one.sideId === side.id && one.choiceId === choice.choiceId);
      const gone = new Set(fate?.soldPrimals.map(({ primalId }) => primalId));
      const way = choice.ways.find(({ wayId }) => wayId === fate?.wayId);
      const grams = (primals: typeof choice.primals) => primals.reduce((sum, primal) => sum + primal.grams, 0);
      const kept = grams(choice.primals.filter(({ primalId }) => !gone.has(primalId)));
      const cost = way ? scale(way.costPence, kept, Math.max(1, grams(choice.primals))) : 0;
      weights.set(side.carcaseId, (weights.get(side.carcaseId) ?? 0) + cost);
    }
  }
  const isFree = [...weights.values()].every((weight) => weight === 0);
  const shares = [...weights].map(([id, weight]) => ({ id, weight: isFree ? 1 : weight }));
  return shares.length > 0 ? apportion(plan.money.butcheryPence, shares) : new Map<string, number>();
}

function supplyOf(input: AllocationInput, plan: SoldPlan): Supply {
  const supply = new Map<string, Map<string, number>>();
  const add = (cutId: string, holder: string, grams: number) => {
    const ofCut = supply.get(cutId) ?? new Map<string, number>();
    ofCut.set(holder, (ofCut.get(holder) ?? 0) + grams);
    supply.set(cutId, ofCut);
  };
  const fates = new Map(plan.fates.map((fate) => [`${fate.sideId} ${fate.choiceId}`, fate]));
  for (const side of input.sides) {
    for (const choice of side.choices) {
      const fate = fates.get(`${side.id} ${choice.choiceId}`);
      const gone = new Set(fate?.soldPrimals.map(({ primalId }) => primalId));
      const way = choice.ways.find(({ wayId }) => wayId === fate?.wayId);
      for (const { primalId, cutId, grams } of way?.yields ?? []) {
        if (!gone.has(primalId)) add(cutId, side.carcaseId, grams);
      }
    }
  }
  const productCutId = input.mince?.productCutId;
  for (const { cutId, mincedGrams } of plan.cuts) {
    const from = supply.get(cutId);
    if (!productCutId || mincedGrams === 0 || !from) continue;
    for (const [holder, grams] of shareOver(mincedGrams, from)) add(productCutId, holder, grams);
  }
  for (const { cutId, stockGrams, leftStockGrams = 0 } of plan.cuts) {
    if (stockGrams > leftStockGrams) add(cutId, STOCK, stockGrams - leftStockGrams);
  }
  return supply;
}

function shareOver(total: number, weights: ReadonlyMap<string, number>): Map<string, number> {
  return apportion(
    total,
    [...weights].map(([id, weight]) => ({ id, weight })),
  );
}

function splitOverCarcases(use: Use, supply: Supply): Sale[] {
  const { cutId } = use;
  const holders = [...(supply.get(cutId) ?? [])].filter(([, weight]) => weight > 0);
  const grams = holders.length > 0 ? shareOver(use.grams, new Map(holders)) : new Map<string, number>();
  const parts = holders.map(([holder, weight]): SalePart => {
    const carcaseId = holder === STOCK ? null : holder;
    return { carcaseId, cutId, weight, grams: grams.get(holder) ?? 0 };
  });
  return splitSale({ ...use, carcaseId: null }, parts);
}

function rateOf(input: AllocationInput, cutId: string): number {
  return input.cuts.find(({ id }) => id === cutId)?.tenthPencePerKg ?? 0;
}

function boxUses(input: AllocationInput, plan: SoldPlan, fee: CardFee): Use[] {
  return plan.boxes.flatMap((box) => {
    const variant = input.boxes.find(({ id }) => id === box.variantId);
    const cuts = new Map<string, number>();
    for (const { cutId, grams } of box.contents) cuts.set(cutId, (cuts.get(cutId) ?? 0) + grams);
    const value = (cutId: string, grams: number) => priceForWeight(grams, rateOf(input, cutId));
    const hasValue = [...cuts].some(([cutId, grams]) => value(cutId, grams) > 0);
    const weights = new Map([...cuts].map(([cutId, grams]) => [cutId, hasValue ? value(cutId, grams) : grams]));
    if ([...weights.values()].every((weight) => weight === 0)) return [];
    const income = shareOver(box.incomePence, weights);
    const packaging = shareOver((variant?.packagingPence ?? 0) * box.boxes, weights);
    const fees = shareOver(scale(box.incomePence, fee.ratePpht, 100_000) + fee.fixedPence * box.boxes, weights);
    return [...cuts].map(([cutId, grams]): Use => ({
      channel: 'boxes',
      boxKindId: box.kindId,
      cutId,
      grams,
      incomePence: income.get(cutId) ?? 0,
      costs: { packingPence: packaging.get(cutId) ?? 0, cardFeesPence: fees.get(cutId) ?? 0 },
    }));
  });
}

/** Loose packs and cuts for butchers: both are packed by the kilogram. */
function packedUses(input: AllocationInput, plan: SoldPlan, { ratePpht }: CardFee): Use[] {
  const loose = plan.loose.map(({ cutId, grams, incomePence }): Use => {
    const costs: Partial<DirectCosts> = { cardFeesPence: cardFeeOf(incomePence, { ratePpht, fixedPence: 0 }) };
    return { channel: 'loose packs', boxKindId: null, cutId, grams, incomePence, costs };
  });
  const trade = plan.trade.flatMap(({ lineId, cutGrams, incomePence }): Use[] => {
    const line = input.trade.find(({ id }) => id === lineId);
    if (line?.kind !== 'cut') return [];
    const { cutId } = line;
    return [{ channel: 'butchers', boxKindId: null, cutId, grams: cutGrams, incomePence, costs: {} }];
  });
  const uses = [...loose, ...trade].filter(({ grams }) => grams > 0);
  if (uses.length === 0) return [];
  const packing = shareOver(plan.money.packingPence, new Map(uses.map(({ grams }, at) => [String(at), grams])));
  return uses.map((use, at) => ({ ...use, costs: { ...use.costs, packingPence: packing.get(String(at)) ?? 0 } }));
}

/** What nothing took, at its clearance price; what stays in the freezer is no sale of this day. */
function leftUses(input: AllocationInput, plan: SoldPlan): Use[] {
  return plan.cuts.flatMap(({ cutId, leftGrams, leftStockGrams = 0 }): Use[] => {
    const grams = leftGrams - leftStockGrams;
    if (grams <= 0) return [];
    const cut = input.cuts.find(({ id }) => id === cutId);
    const incomePence = priceForWeight(grams, cut?.clearanceTenthPencePerKg ?? 0);
    return [{ channel: 'left over', boxKindId: null, cutId, grams, incomePence, costs: {} }];
  });
}

/** Mincing falls on mince, wherever it goes; it stands with the packing. */
function addMincing(input: AllocationInput, plan: SoldPlan, uses: readonly Use[]): Use[] {
  const ofMince = uses.flatMap(({ cutId, grams }, at) =>
    cutId === input.mince?.productCutId && grams > 0 ? [[String(at), grams] as const] : [],
  );
  if (ofMince.length === 0) return [...uses];
  const shares = shareOver(plan.money.mincingPence, new Map(ofMince));
  return uses.map((use, at) => {
    const pence = shares.get(String(at));
    if (pence === undefined) return use;
    return { ...use, costs: { ...use.costs, packingPence: (use.costs.packingPence ?? 0) + pence } };
  });
}

/** Sides, quarters and primals that leave whole. */
function unitSales(plan: SoldPlan, input: AllocationInput): Sale[] {
  return plan.trade.flatMap(({ units }) =>
    units.map(({ sideId, grams, incomePence }) => ({
      carcaseId: input.sides.find(({ id }) => id === sideId)?.carcaseId ?? null,
      channel: 'butchers',
      boxKindId: null,
      cutId: null,
      grams,
      incomePence,
      costs: {},
    })),
  );
}
