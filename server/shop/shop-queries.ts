import { and, asc, eq, gte, inArray, sql } from 'drizzle-orm';
import { allocation, offer } from '#db/schema/allocations.ts';
import { carcase, cuttingDay, cuttingSpecification } from '#db/schema/carcases.ts';
import { deliveryArea } from '#db/schema/delivery.ts';
import { farm } from '#db/schema/farm.ts';
import type { AllocationAnswer, AllocationQuestion } from '#shared/domain/allocation-record.ts';
import { animal } from '#db/schema/herd.ts';
import { collectionPoint, collectionSlot } from '#db/schema/orders.ts';
import { pack } from '#db/schema/packs.ts';
import { boxKind, boxLine, boxLineCut, cut } from '#db/schema/products.ts';
import { reservation, tradeAccount } from '#db/schema/trade.ts';
import type { Db } from '#server/deps.ts';

const { placeholder } = sql;

/** Days that are open and not over, and what is on sale of them: read by every visitor, so prepared. */
function prepareSale(db: Db) {
  const today = placeholder('today');
  const isCurrent = and(eq(cuttingDay.state, 'open'), gte(cuttingDay.day, today));
  return {
    days: db
      .select({
        id: cuttingDay.id,
        day: cuttingDay.day,
        cutOffAt: cuttingDay.cutOffAt,
        allocationId: allocation.id,
        specificationId: cuttingDay.specificationId,
        carcaseCount: sql<number>`(select count(*)::int from ${carcase} where ${carcase.cuttingDayId} = ${cuttingDay.id})`,
        lastKillDay: sql<
          string | null
        >`(select max(${carcase.killDay})::text from ${carcase} where ${carcase.cuttingDayId} = ${cuttingDay.id})`,
        collectionDays: sql<
          string[]
        >`array(select distinct (${collectionSlot.startsAt} at time zone 'Europe/London')::date::text
          from ${collectionSlot} join ${collectionPoint} on ${collectionPoint.id} = ${collectionSlot.pointId}
          where ${collectionSlot.cuttingDayId} = ${cuttingDay.id} and ${collectionPoint.kind} = 'collection' order by 1)`,
      })
      .from(cuttingDay)
      .leftJoin(allocation, and(eq(allocation.cuttingDayId, cuttingDay.id), eq(allocation.state, 'published')))
      .where(isCurrent)
      .orderBy(asc(cuttingDay.day))
      .prepare('shop_days'),
    offers: db
      .select({
        id: offer.id,
        dayId: offer.cuttingDayId,
        kind: offer.kind,
        boxKindId: offer.boxKindId,
        cutId: offer.cutId,
        offered: offer.offered,
        held: offer.held,
        sold: offer.sold,
        pricePence: offer.pricePence,
        upperGrams: offer.upperGrams,
        isClosed: offer.isClosed,
      })
      .from(offer)
      .innerJoin(cuttingDay, eq(cuttingDay.id, offer.cuttingDayId))
      .where(and(isCurrent, inArray(offer.kind, ['box', 'loose'])))
      .orderBy(asc(offer.id))
      .prepare('shop_offers'),
  };
}

/** What changes only when the owner edits it. */
function prepareCatalogue(db: Db) {
  return {
    farm: db.select().from(farm).prepare('shop_farm'),
    boxKinds: db
      .select()
      .from(boxKind)
      .where(eq(boxKind.isActive, true))
      .orderBy(asc(boxKind.position))
      .prepare('shop_boxes'),
    cuts: db.select().from(cut).where(eq(cut.isSoldLoose, true)).orderBy(asc(cut.name)).prepare('shop_cuts'),
    boxLines: db
      .select({
        lineId: boxLine.id,
        name: boxLine.name,
        minGrams: boxLine.minGrams,
        maxGrams: boxLine.maxGrams,
        cut: cut.name,
        cooking: cut.cooking,
      })
      .from(boxLine)
      .innerJoin(boxLineCut, eq(boxLineCut.boxLineId, boxLine.id))
      .innerJoin(cut, eq(cut.id, boxLineCut.cutId))
      .where(eq(boxLine.boxKindId, placeholder('boxKindId')))
      .orderBy(asc(boxLine.position), asc(cut.name))
      .prepare('shop_box_lines'),
    butchers: db
      .selectDistinct({ businessName: tradeAccount.businessName, addressLines: tradeAccount.addressLines })
      .from(tradeAccount)
      .innerJoin(reservation, eq(reservation.accountId, tradeAccount.id))
      .where(and(eq(tradeAccount.state, 'approved'), inArray(reservation.state, ['confirmed', 'dispatched'])))
      .orderBy(asc(tradeAccount.businessName))
      .prepare('shop_butchers'),
  };
}

/** Where and when orders are handed over. */
function preparePlaces(db: Db) {
  return {
    slots: db
      .select({
        id: collectionSlot.id,
        startsAt: collectionSlot.startsAt,
        endsAt: collectionSlot.endsAt,
        capacity: collectionSlot.capacity,
        taken: collectionSlot.taken,
        pointId: collectionPoint.id,
        name: collectionPoint.name,
        addressLines: collectionPoint.addressLines,
        directions: collectionPoint.directions,
      })
      .from(collectionSlot)
      .innerJoin(collectionPoint, eq(collectionPoint.id, collectionSlot.pointId))
      .where(
        and(
          eq(collectionSlot.cuttingDayId, placeholder('dayId')),
          eq(collectionPoint.isActive, true),
          eq(collectionPoint.kind, 'collection'),
        ),
      )
      .orderBy(asc(collectionPoint.name), asc(collectionSlot.startsAt))
      .prepare('shop_slots'),
    vans: db
      .select({ id: deliveryArea.id })
      .from(deliveryArea)
      .where(eq(deliveryArea.isActive, true))
      .limit(1)
      .prepare('shop_vans'),
  };
}

function prepareAll(db: Db) {
  return { ...prepareSale(db), ...prepareCatalogue(db), ...preparePlaces(db) };
}

export type ShopQueries = ReturnType<typeof prepareAll>;
export type ShopDayRow = Awaited<ReturnType<ShopQueries['days']['execute']>>[number];
export type ShopOfferRow = Awaited<ReturnType<ShopQueries['offers']['execute']>>[number];

const prepared = new WeakMap<Db, ShopQueries>();

export function shopQueries(db: Db): ShopQueries {
  const known = prepared.get(db);
  if (known) return known;
  const queries = prepareAll(db);
  prepared.set(db, queries);
  return queries;
}

/** The answer in force and the specification that names its primals. */
export async function getPlannedFigures(
  db: Db,
  ids: { allocationId: string; specificationId: string },
): Promise<{ input: AllocationQuestion; plan: AllocationAnswer; specification: unknown }> {
  const rows = await db
    .select({ input: allocation.input, plan: allocation.plan, specification: cuttingSpecification.body })
    .from(allocation)
    .innerJoin(cuttingSpecification, eq(cuttingSpecification.id, ids.specificationId))
    .where(eq(allocation.id, ids.allocationId));
  const row = rows[0];
  if (!row) throw new Error(`The allocation ${ids.allocationId} has gone.`);
  return row;
}

export async function findPackByCode(db: Db, code: string) {
  const rows = await db
    .select({
      code: pack.code,
      cut: cut.name,
      grams: pack.grams,
      packedOn: pack.packedOn,
      useBy: pack.useBy,
      earTag: animal.earTag,
      breed: animal.breed,
      born: animal.born,
      killDay: carcase.killDay,
      day: cuttingDay.day,
    })
    .from(pack)
    .innerJoin(cut, eq(cut.id, pack.cutId))
    .innerJoin(carcase, eq(carcase.id, pack.carcaseId))
    .innerJoin(animal, eq(animal.id, carcase.animalId))
    .innerJoin(cuttingDay, eq(cuttingDay.id, pack.cuttingDayId))
    .where(eq(pack.code, code));
  return rows[0] ?? null;
}
