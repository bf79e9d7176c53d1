import { and, asc, desc, eq, exists, inArray, ne, sql } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { carcase } from '#db/schema/carcases.ts';
import { animal } from '#db/schema/herd.ts';
import { customerOrder, orderLine } from '#db/schema/orders.ts';
import { pack, packAssignment, stockMovement } from '#db/schema/packs.ts';
import { cut } from '#db/schema/products.ts';
import { reservation, reservationLine, tradeAccount } from '#db/schema/trade.ts';
import type { Place } from '#server/carcases/ledger-queries.ts';
import type { Db, Tx } from '#server/deps.ts';
import type { OrderState } from '#shared/domain/order-state.ts';

export type PackRow = typeof pack.$inferSelect & { cut: string; earTag: string };
export type AssignmentRow = typeof packAssignment.$inferSelect;
export type NewPack = typeof pack.$inferInsert;

function selectPacks(db: Db | Tx) {
  return db
    .select({ pack, cut: cut.name, earTag: animal.earTag })
    .from(pack)
    .innerJoin(cut, eq(cut.id, pack.cutId))
    .innerJoin(carcase, eq(carcase.id, pack.carcaseId))
    .innerJoin(animal, eq(animal.id, carcase.animalId));
}

/** The newest first: the pack that was just weighed is the one to look at. */
export async function listPacks(db: Db | Tx, dayId: string): Promise<PackRow[]> {
  const rows = await selectPacks(db).where(eq(pack.cuttingDayId, dayId)).orderBy(desc(pack.createdAt), asc(pack.code));
  return rows.map(({ pack: row, ...names }) => ({ ...row, ...names }));
}

/** Packs of other days that were ever put into the freezer. */
export async function listFrozenPacks(db: Db | Tx, dayId: string): Promise<PackRow[]> {
  const rows = await selectPacks(db)
    .where(
      and(
        ne(pack.cuttingDayId, dayId),
        exists(
          db
            .select({ one: sql`1` })
            .from(stockMovement)
            .where(and(eq(stockMovement.packId, pack.id), eq(stockMovement.toPlace, 'freezer'))),
        ),
      ),
    )
    .orderBy(asc(pack.packedOn), asc(pack.code));
  return rows.map(({ pack: row, ...names }) => ({ ...row, ...names }));
}

/** Which of the packs were ever put into the freezer. */
export async function readFrozen(db: Db | Tx, packIds: readonly string[]): Promise<Set<string>> {
  const rows = await db
    .selectDistinct({ packId: stockMovement.packId })
    .from(stockMovement)
    .where(and(inArray(stockMovement.packId, [...packIds]), eq(stockMovement.toPlace, 'freezer')));
  return new Set(rows.flatMap(({ packId }) => packId ?? []));
}

/** The day whose order or reservation a pack lies in; null when it lies in none. */
export async function findDayOfUse(db: Db | Tx, packId: string): Promise<string | null> {
  const rows = await db
    .select({ ofOrder: customerOrder.cuttingDayId, ofReservation: reservation.cuttingDayId })
    .from(packAssignment)
    .leftJoin(orderLine, eq(orderLine.id, packAssignment.orderLineId))
    .leftJoin(customerOrder, eq(customerOrder.id, orderLine.orderId))
    .leftJoin(reservationLine, eq(reservationLine.id, packAssignment.reservationLineId))
    .leftJoin(reservation, eq(reservation.id, reservationLine.reservationId))
    .where(and(eq(packAssignment.packId, packId), eq(packAssignment.isLive, true)));
  return rows[0]?.ofOrder ?? rows[0]?.ofReservation ?? null;
}

export async function findPack(db: Db | Tx, packId: string): Promise<PackRow | null> {
  const rows = await selectPacks(db).where(eq(pack.id, packId));
  return rows[0] ? { ...rows[0].pack, cut: rows[0].cut, earTag: rows[0].earTag } : null;
}

export async function insertPacks(tx: Tx, rows: NewPack[]): Promise<{ id: string; grams: number }[]> {
  return tx.insert(pack).values(rows).returning({ id: pack.id, grams: pack.grams });
}

export async function setPackGrams(tx: Tx, packId: string, grams: number): Promise<void> {
  await tx.update(pack).set({ grams }).where(eq(pack.id, packId));
}

type Whereabouts = { id: string; packId: string; place: Place };

/**
 * Where each pack lies: the place that has got more of its grams than it gave away, and the movement that brought it
 * there. By sums, since movements of one transaction bear one time; a pack that was undone is back in the carcase.
 */
export async function readPlaces(db: Db | Tx, packIds: readonly string[]): Promise<Map<string, Whereabouts>> {
  const rows = await db
    .select()
    .from(stockMovement)
    .where(inArray(stockMovement.packId, [...packIds]))
    .orderBy(desc(stockMovement.createdAt), desc(stockMovement.id));
  const undone = new Set(rows.map((row) => row.reversalOf));
  const sums = new Map<string, number>();
  for (const { packId, fromPlace, toPlace, grams } of rows) {
    sums.set(`${packId} ${toPlace}`, (sums.get(`${packId} ${toPlace}`) ?? 0) + grams);
    if (fromPlace) sums.set(`${packId} ${fromPlace}`, (sums.get(`${packId} ${fromPlace}`) ?? 0) - grams);
  }
  const places = new Map<string, Whereabouts>();
  for (const packId of packIds) {
    const own = rows.filter((row) => row.packId === packId);
    const place = own.find((row) => (sums.get(`${packId} ${row.toPlace}`) ?? 0) > 0)?.toPlace ?? 'carcase';
    const last = own.find((row) => row.toPlace === place && !undone.has(row.id));
    if (last) places.set(packId, { id: last.id, packId, place });
  }
  return places;
}

export function listAssignments(db: Db | Tx, packIds: readonly string[]): Promise<AssignmentRow[]> {
  return db
    .select()
    .from(packAssignment)
    .where(and(eq(packAssignment.isLive, true), inArray(packAssignment.packId, [...packIds])));
}

export async function insertAssignments(tx: Tx, rows: (typeof packAssignment.$inferInsert)[]): Promise<void> {
  if (rows.length > 0) await tx.insert(packAssignment).values(rows);
}

export async function endAssignments(tx: Tx, packIds: readonly string[]): Promise<void> {
  await tx
    .update(packAssignment)
    .set({ isLive: false })
    .where(and(eq(packAssignment.isLive, true), inArray(packAssignment.packId, [...packIds])));
}

/** Everything of the day that packs must fill: boxes and loose packs of paid orders, in the order in which they came. */
export function listOrderWork(db: Db | Tx, dayId: string) {
  return db
    .select({
      lineId: orderLine.id,
      orderId: customerOrder.id,
      orderNo: customerOrder.orderNo,
      orderName: customerOrder.name,
      state: customerOrder.state,
      version: customerOrder.version,
      item: orderLine.name,
      quantity: orderLine.quantity,
      unitPricePence: orderLine.unitPricePence,
      unitGrams: orderLine.unitGrams,
      discountPence: orderLine.discountPence,
      kind: offer.kind,
      boxKindId: offer.boxKindId,
      cutId: offer.cutId,
    })
    .from(orderLine)
    .innerJoin(customerOrder, eq(customerOrder.id, orderLine.orderId))
    .innerJoin(offer, eq(offer.id, orderLine.offerId))
    .where(
      and(
        eq(customerOrder.cuttingDayId, dayId),
        inArray(customerOrder.state, ['confirmed', 'packed', 'ready', 'collected', 'delivered', 'missed']),
      ),
    )
    .orderBy(asc(customerOrder.orderNo), asc(orderLine.name));
}
export type OrderWork = Awaited<ReturnType<typeof listOrderWork>>[number];

/** Cuts that butchers have confirmed, in grams. What leaves whole needs no pack. */
export async function listTradeWork(db: Db | Tx, dayId: string) {
  const rows = await db
    .select({
      lineId: reservationLine.id,
      orderNo: reservation.reservationNo,
      orderName: tradeAccount.businessName,
      item: cut.name,
      cutId: cut.id,
      grams: reservationLine.grams,
      state: reservation.state,
    })
    .from(reservationLine)
    .innerJoin(reservation, eq(reservation.id, reservationLine.reservationId))
    .innerJoin(tradeAccount, eq(tradeAccount.id, reservation.accountId))
    .innerJoin(cut, eq(cut.id, reservationLine.cutId))
    .where(and(eq(reservation.cuttingDayId, dayId), inArray(reservation.state, ['confirmed', 'dispatched'])))
    .orderBy(asc(reservation.reservationNo), asc(cut.name));
  return rows.map((row) => ({ ...row, grams: row.grams ?? 0, isDispatched: row.state === 'dispatched' }));
}
export type TradeWork = Awaited<ReturnType<typeof listTradeWork>>[number];

type Move = { from: OrderState; to: 'packed' | 'confirmed' };

/** False when the order has moved on meanwhile, such as cancelled. */
export async function moveOrder(tx: Tx, orderId: string, { from, to }: Move): Promise<boolean> {
  const rows = await tx
    .update(customerOrder)
    .set({ state: to, version: sql`${customerOrder.version} + 1` })
    .where(and(eq(customerOrder.id, orderId), eq(customerOrder.state, from)))
    .returning({ id: customerOrder.id });
  return rows.length === 1;
}

export async function markCut(tx: Tx, carcaseId: string): Promise<void> {
  await tx
    .update(carcase)
    .set({ state: 'cut' })
    .where(and(eq(carcase.id, carcaseId), inArray(carcase.state, ['killed', 'hanging'])));
}

export async function readCut(db: Db | Tx, cutId: string) {
  const rows = await db.select().from(cut).where(eq(cut.id, cutId));
  return rows[0] ?? null;
}
