import type { TradeCarcase, TradeDay } from '#shared/contracts/trade.ts';
import { listUnits } from '#shared/domain/trade-unit.ts';
import type { SideSupply } from '#shared/engine/cutout/cutout-types.ts';
import {
  findPublishedAllocation,
  listConfirmedLines,
  type AllocationRow,
} from '#server/allocation/allocation-queries.ts';
import { loadDayCutouts, type CarcaseFigures, type DayCutouts } from '#server/carcases/day-figures.ts';
import { summariseCarcase } from '#server/carcases/describe-carcase.ts';
import { readRails } from '#server/carcases/published-plan.ts';
import type { Deps } from '#server/deps.ts';
import { readProductNames, type ProductNames } from './product-names.ts';
import { listComingDays, type AccountRow, type PriceRow } from './trade-queries.ts';

/** The days to come as one butcher sees them: own prices, what of each side has left whole already. */
export async function listTradeDays(deps: Deps, account: AccountRow): Promise<TradeDay[]> {
  const names = await readProductNames(deps.db);
  const days: TradeDay[] = [];
  for (const { id, day, cutOffAt } of await listComingDays(deps.db, deps.clock.today())) {
    const figures = await loadDayCutouts(deps.db, id);
    const published = await findPublishedAllocation(deps.db, id);
    const taken = await readTaken(deps, published);
    const carcases: TradeCarcase[] = [];
    for (const carcase of figures.carcases) {
      const rails = await readRails(deps.db, carcase, figures.specification);
      const sides = rails.map(({ side, sideGrams, rail }) => ({
        side,
        sideGrams,
        rail,
        units: describeUnits(sideOf(carcase, side), { taken, prices: account.prices }),
      }));
      carcases.push({ ...summariseCarcase(carcase), sides });
    }
    const isInTime = deps.clock.now() < cutOffAt;
    const cuts = describeCuts(figures, { published, names, prices: account.prices });
    days.push({ id, day, cutOffAt: cutOffAt.toISOString(), isInTime, carcases, cuts });
  }
  return days;
}

function sideOf(carcase: CarcaseFigures, side: 'left' | 'right'): SideSupply {
  const found = carcase.cutout.sides.find((candidate) => candidate.side === side);
  if (!found) throw new Error(`carcase ${carcase.row.id} has no ${side} side`);
  return found;
}

/** Primals that leave whole to a confirmed reservation, as `<side id>/<primal id>`. */
async function readTaken(deps: Deps, published: AllocationRow | null): Promise<Set<string>> {
  if (!published) return new Set();
  const reserved = new Set((await listConfirmedLines(deps.db, published.cuttingDayId)).map((line) => line.id));
  return new Set(
    published.plan.plan.fates.flatMap((fate) =>
      fate.soldPrimals
        .filter((sold) => reserved.has(sold.tradeLineId))
        .map((sold) => `${fate.sideId}/${sold.primalId}`),
    ),
  );
}

type UnitFacts = { taken: ReadonlySet<string>; prices: readonly PriceRow[] };

function describeUnits(side: SideSupply, { taken, prices }: UnitFacts): TradeCarcase['sides'][number]['units'] {
  return listUnits(side).map(({ unitKind, name, grams, primalIds, hasVertebrae }) => ({
    unitKind,
    name,
    grams,
    isTaken: primalIds.some((primalId) => taken.has(`${side.id}/${primalId}`)),
    closedReason: hasVertebrae ? side.closedUnitReason : null,
    tenthPencePerKg: prices.find((price) => price.product === unitKind)?.tenthPencePerKg ?? null,
  }));
}

type CutFacts = { published: AllocationRow | null; names: ProductNames; prices: readonly PriceRow[] };

/**
 * Cuts on the butcher's own list, with what the day makes of them. Where the plan has found a better use, what it could
 * make: a reservation has the day worked out again.
 */
function describeCuts(figures: DayCutouts, { published, names, prices }: CutFacts): TradeDay['cuts'] {
  return prices.flatMap(({ product, tenthPencePerKg }) => {
    if (!product.startsWith('cut:')) return [];
    const cutId = product.slice('cut:'.length);
    const planned = published?.plan.plan.cuts.find((cut) => cut.cutId === cutId);
    const madeGrams = planned && planned.madeGrams > 0 ? planned.madeGrams : possibleGrams(figures, cutId);
    return madeGrams > 0 ? [{ cutId, name: names.get(product) ?? cutId, tenthPencePerKg, madeGrams }] : [];
  });
}

/** Of each choice of each side the open way that gives most of this cut. */
function possibleGrams(figures: DayCutouts, cutId: string): number {
  const choices = figures.sides.flatMap((side) => side.choices);
  return choices.reduce((total, choice) => {
    const open = choice.ways.filter((way) => way.closedReason === null);
    return total + Math.max(0, ...open.map((way) => gramsOf(way.yields, cutId)));
  }, 0);
}

function gramsOf(yields: readonly { cutId: string; grams: number }[], cutId: string): number {
  return yields.filter((each) => each.cutId === cutId).reduce((sum, each) => sum + each.grams, 0);
}
