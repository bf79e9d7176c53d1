import type { Rail } from '#shared/contracts/fields-schema.ts';
import { boxTakes } from '#shared/domain/box-takes.ts';
import { railOfPrimals } from '#shared/domain/rail-of-primals.ts';
import { railBasis, spokenFor, sumSides, type Counts, type RailBasis } from '#shared/domain/spoken-for.ts';
import { Specification } from '#shared/engine/figures/specification.ts';
import type { Db } from '#server/deps.ts';
import { getPlannedFigures, type ShopDayRow, type ShopOfferRow } from './shop-queries.ts';

type Names = Pick<Specification, 'quarters' | 'narrowPrimals'>;
type BoxRail = { boxes: number; rail: Rail };
type Figures = {
  basis: RailBasis;
  names: Names;
  /** The rail as it was last drawn, and for which counts: between two sales every visitor sees the same. */
  drawn: { counts: string; rail: DayRail } | null;
  boxRails: Map<string, BoxRail | null>;
};

/** The plan of an allocation never changes once it is kept, so what it means for the rail is worked out once. */
const known = new Map<string, Promise<Figures>>();
const MOST_KNOWN = 30;

function figuresOf(db: Db, ids: { allocationId: string; specificationId: string }): Promise<Figures> {
  const key = `${ids.allocationId} ${ids.specificationId}`;
  const found = known.get(key);
  if (found) return found;
  const figures = readFigures(db, ids);
  known.set(key, figures);
  // A failed read must be tried again by the next visitor.
  figures.catch(() => known.delete(key));
  const oldest = known.keys().next().value;
  if (known.size > MOST_KNOWN && oldest !== undefined) known.delete(oldest);
  return figures;
}

async function readFigures(db: Db, ids: { allocationId: string; specificationId: string }): Promise<Figures> {
  const { input, plan, specification } = await getPlannedFigures(db, ids);
  const { quarters, narrowPrimals } = Specification.parse(specification);
  return {
    basis: railBasis(input.input, plan.plan),
    names: { quarters, narrowPrimals },
    drawn: null,
    boxRails: new Map(),
  };
}

export type DayRail = { rail: Rail; productGrams: number; soldGrams: number };

const BARE: DayRail = { rail: { primals: [], narrowPrimals: [] }, productGrams: 0, soldGrams: 0 };

/** How much of a day is spoken for, by primal. A day without an allocation has nothing hanging yet. */
export async function railOfDay(db: Db, day: ShopDayRow, offers: readonly ShopOfferRow[]): Promise<DayRail> {
  const { allocationId, specificationId } = day;
  if (!allocationId) return BARE;
  const figures = await figuresOf(db, { allocationId, specificationId });
  const counts = countsOf(offers.filter((each) => each.dayId === day.id));
  const key = JSON.stringify(counts);
  if (figures.drawn?.counts === key) return figures.drawn.rail;
  const rail = drawDay(figures, counts);
  figures.drawn = { counts: key, rail };
  return rail;
}

function drawDay({ basis, names }: Figures, counts: Counts): DayRail {
  const rail = railOfPrimals(names, sumSides(spokenFor(basis, counts)));
  const sum = (key: 'grams' | 'soldGrams') => rail.primals.reduce((total, primal) => total + primal[key], 0);
  return { rail, productGrams: sum('grams'), soldGrams: sum('soldGrams') };
}

function countsOf(offers: readonly ShopOfferRow[]): Counts {
  return {
    boxes: offers.flatMap(({ boxKindId, sold, held }) => (boxKindId ? [{ kindId: boxKindId, sold, held }] : [])),
    loose: offers.flatMap(({ cutId, sold, held }) => (cutId ? [{ cutId, sold, held }] : [])),
  };
}

/** What a box takes of one side, by the first day whose plan makes it. */
export async function railOfBox(db: Db, days: readonly ShopDayRow[], boxKindId: string): Promise<BoxRail> {
  for (const { allocationId, specificationId } of days) {
    if (!allocationId) continue;
    const figures = await figuresOf(db, { allocationId, specificationId });
    const known = figures.boxRails.get(boxKindId);
    const rail = known === undefined ? drawBox(figures, boxKindId) : known;
    figures.boxRails.set(boxKindId, rail);
    if (rail) return rail;
  }
  return { boxes: 0, rail: BARE.rail };
}

function drawBox({ basis, names }: Figures, boxKindId: string): BoxRail | null {
  const takes = boxTakes(basis, boxKindId);
  return takes && { boxes: takes.boxes, rail: railOfPrimals(names, takes.fills) };
}
