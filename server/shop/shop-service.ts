import type {
  Box,
  BoxCard,
  CollectionPoint,
  CuttingDaySummary,
  DayOffer,
  LooseCut,
  ShopHome,
  Trace,
} from '#shared/contracts/shop.ts';
import { ageInMonths, daysBetween } from '#shared/domain/day.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { priceForWeight, ratePerKg } from '#shared/domain/money.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { getFarm } from '#server/farm/farm-queries.ts';
import { railOfBox, railOfDay } from './day-rails.ts';
import { findPackByCode, shopQueries, type ShopDayRow, type ShopOfferRow } from './shop-queries.ts';

type BoxKindRow = {
  id: string;
  slug: string;
  name: string;
  summary: string;
  guaranteedGrams: number;
  pricePence: number;
  /** A swap is shown with the box that it is a variant of. */
  variantOfId: string | null;
};
type Sale = { days: ShopDayRow[]; offers: ShopOfferRow[]; now: Date };

async function readSale(deps: Deps): Promise<Sale> {
  const queries = shopQueries(deps.db);
  const today = { today: deps.clock.today() };
  const [days, offers] = await Promise.all([queries.days.execute(today), queries.offers.execute(today)]);
  // A day is shown once something of it is on sale.
  const onSale = new Set(offers.map((offer) => offer.dayId));
  return { days: days.filter((day) => onSale.has(day.id)), offers, now: deps.clock.now() };
}

function summariseDays(deps: Deps, { days, offers, now }: Sale): Promise<CuttingDaySummary[]> {
  return Promise.all(
    days.map(async (day) => ({
      id: day.id,
      day: day.day,
      cutOffAt: day.cutOffAt.toISOString(),
      isInTime: now < day.cutOffAt,
      carcaseCount: day.carcaseCount,
      hungDays: day.lastKillDay ? Math.max(0, daysBetween(day.lastKillDay, day.day)) : 0,
      collectionDays: day.collectionDays,
      ...(await railOfDay(deps.db, day, offers)),
    })),
  );
}

/** The days' offers of one product, the next day first. */
function offersOf({ days, offers, now }: Sale, isProduct: (offer: ShopOfferRow) => boolean): DayOffer[] {
  return days.flatMap((day) =>
    offers
      .filter((offer) => offer.dayId === day.id && isProduct(offer))
      .map((offer) => ({
        offerId: offer.id,
        dayId: day.id,
        day: day.day,
        free: offer.isClosed || now >= day.cutOffAt ? 0 : offer.offered - offer.held - offer.sold,
        held: offer.held,
      })),
  );
}

function findNext(sale: Sale, isProduct: (offer: ShopOfferRow) => boolean): ShopOfferRow | undefined {
  const first = offersOf(sale, isProduct)[0];
  return sale.offers.find((offer) => offer.id === first?.offerId);
}

/** The price shown is the one that the next day's offer charges. */
function boxCard(sale: Sale, box: BoxKindRow, kinds: readonly BoxKindRow[]): BoxCard {
  const isThis = (offer: ShopOfferRow) => offer.boxKindId === box.id;
  const pricePence = findNext(sale, isThis)?.pricePence ?? box.pricePence;
  return {
    slug: box.slug,
    name: box.name,
    summary: box.summary,
    guaranteedGrams: box.guaranteedGrams,
    pricePence,
    tenthPencePerKg: ratePerKg(pricePence, box.guaranteedGrams),
    offers: offersOf(sale, isThis),
    swaps: kinds
      .filter((kind) => kind.variantOfId === box.id)
      .map(({ id, slug, name, summary }) => ({
        ...{ slug, name, summary },
        offers: offersOf(sale, (offer) => offer.boxKindId === id),
      }))
      .filter((swap) => swap.offers.length > 0),
  };
}

export async function readShopHome(deps: Deps): Promise<ShopHome> {
  const queries = shopQueries(deps.db);
  const [farms, sale, boxes, butchers] = await Promise.all([
    queries.farm.execute(),
    readSale(deps),
    queries.boxKinds.execute(),
    queries.butchers.execute(),
  ]);
  const farm = farms[0] ?? (await getFarm(deps.db));
  const { name, businessName, addressLines, email, phone, story } = farm;
  return {
    farm: { name, businessName, addressLines, email, phone, story },
    days: await summariseDays(deps, sale),
    boxes: boxes.filter((box) => box.variantOfId === null).map((box) => boxCard(sale, box, boxes)),
    butchers: butchers.map((butcher) => ({
      businessName: butcher.businessName,
      town: townOf(butcher.addressLines),
    })),
  };
}

/** Address lines end with the post town and the postcode; a shorter address names no town of its own. */
function townOf(addressLines: readonly string[]): string {
  return addressLines.length >= 3 ? (addressLines.at(-2) ?? '') : '';
}

export async function readBox(deps: Deps, slug: string): Promise<Box> {
  const queries = shopQueries(deps.db);
  const [boxes, farm, sale] = await Promise.all([queries.boxKinds.execute(), getFarm(deps.db), readSale(deps)]);
  const box = boxes.find((each) => each.slug === slug && each.variantOfId === null);
  if (!box) throw new AppError('NOT_FOUND', 'There is no such box. All boxes are on the first page of the shop.');
  const rows = await queries.boxLines.execute({ boxKindId: box.id });
  const lines = [...new Set(rows.map((row) => row.lineId))].map((lineId) =>
    rows.filter((row) => row.lineId === lineId),
  );
  return {
    ...boxCard(sale, box, boxes),
    lines: lines.flatMap((of) => {
      const first = of[0];
      if (!first) return [];
      const { name, minGrams, maxGrams } = first;
      const cooking = [...new Set(of.map((row) => row.cooking))].join(' or ');
      return [{ name, minGrams, maxGrams, cuts: of.map((row) => row.cut), cooking }];
    }),
    servings: Math.floor(box.guaranteedGrams / farm.servingGrams),
    freezerLitres: Math.ceil(box.guaranteedGrams / farm.freezerGramsPerLitre),
    rail: await railOfBox(deps.db, sale.days, box.id),
    days: await summariseDays(deps, sale),
  };
}

export async function readCuts(deps: Deps): Promise<{ days: CuttingDaySummary[]; cuts: LooseCut[] }> {
  const [cuts, sale] = await Promise.all([shopQueries(deps.db).cuts.execute(), readSale(deps)]);
  return {
    days: await summariseDays(deps, sale),
    cuts: cuts.map((cut) => {
      const isThis = (offer: ShopOfferRow) => offer.kind === 'loose' && offer.cutId === cut.id;
      const next = findNext(sale, isThis);
      const upperGrams = next?.upperGrams ?? cut.maxPackGrams;
      const listPence = priceForWeight(upperGrams, cut.tenthPencePerKg);
      const pricePence = next?.pricePence ?? listPence;
      return {
        id: cut.id,
        name: cut.name,
        description: cut.description,
        cooking: cut.cooking,
        tenthPencePerKg: pricePence === listPence ? cut.tenthPencePerKg : ratePerKg(pricePence, upperGrams),
        upperGrams,
        pricePence,
        offers: offersOf(sale, isThis),
      };
    }),
  };
}

/** Collection points of a day with the times that are still to come. */
export async function readCollections(
  deps: Deps,
  dayId: string,
): Promise<{ points: CollectionPoint[]; hasVan: boolean }> {
  const now = deps.clock.now();
  const queries = shopQueries(deps.db);
  const [slots, vans] = await Promise.all([queries.slots.execute({ dayId }), queries.vans.execute()]);
  const points = new Map<string, CollectionPoint>();
  for (const slot of slots) {
    if (slot.startsAt <= now) continue;
    const { pointId, name, addressLines, directions } = slot;
    const point = points.get(pointId) ?? { id: pointId, name, addressLines, directions, slots: [] };
    point.slots.push({
      id: slot.id,
      startsAt: slot.startsAt.toISOString(),
      endsAt: slot.endsAt.toISOString(),
      free: slot.capacity - slot.taken,
    });
    points.set(pointId, point);
  }
  return { points: [...points.values()], hasVan: vans.length > 0 };
}

/** A British tag is given at birth, and the farm sells only its own animals: born and reared in one country. */
const COUNTRY = 'United Kingdom';

export async function readTrace(deps: Deps, code: string): Promise<Trace> {
  const [pack, farm] = await Promise.all([findPackByCode(deps.db, code.trim()), getFarm(deps.db)]);
  if (!pack) throw new AppError('NOT_FOUND', 'There is no pack with this code. Please read the label again.');
  const { cut, grams, packedOn, useBy, breed, killDay } = pack;
  return {
    ...{ code: pack.code, cut, grams, packedOn, useBy, breed, killDay },
    earTag: formatEarTag(pack.earTag),
    ageMonths: ageInMonths(pack.born, killDay),
    hungDays: daysBetween(killDay, pack.day),
    bornIn: COUNTRY,
    rearedIn: COUNTRY,
    slaughteredIn: `${COUNTRY}, ${farm.abattoirName}, ${farm.abattoirApprovalNo}`,
    cutIn: `${COUNTRY}, ${farm.cutterName}, ${farm.cutterApprovalNo}`,
  };
}
