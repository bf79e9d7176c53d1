import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { collectionSlot, customerOrder, orderLine, payment } from '#db/schema/orders.ts';
import { pack, packAssignment, stockMovement } from '#db/schema/packs.ts';
import { addDays } from '#shared/domain/day.ts';
import type { World } from './harness.ts';
import { cards, payByCard, type PaymentResult } from './pay.ts';
import {
  makeCarcase,
  makeBoxKind,
  makeBoxOffer,
  makeCut,
  makeCuttingDay,
  makeFarm,
  makeLooseOffer,
  makeSlot,
} from './make-farm.ts';

export type Stall = Awaited<ReturnType<typeof makeStall>>;
/** What an order needs of a day. */
export type Counter = { day: { id: string }; boxOffer: { id: string }; slot: { id: string } };

/** A day with a box and a loose cut on sale, and one collection time. */
export async function makeStall(world: World, more: { boxes?: number; packs?: number; slots?: number } = {}) {
  const { db, clock } = world;
  const today = clock.today();
  const farm = await makeFarm(db);
  const day = await makeCuttingDay(db, today);
  const cut = await makeCut(db, 'rump-steak', { name: 'Rump steak' });
  const box = await makeBoxKind(db, 'hearth', { name: 'Hearth', cutIds: [cut.id] });
  const boxOffer = await makeBoxOffer(db, day.id, box, more.boxes ?? 20);
  const looseOffer = await makeLooseOffer(db, day.id, cut.id, {
    offered: more.packs ?? 20,
    pricePence: 1_300,
    upperGrams: 650,
  });
  const slot = await makeSlot(db, day.id, today, { capacity: more.slots ?? 300 });
  return { farm, day, cut, box, boxOffer, looseOffer, slot };
}

/** What the browser sends to go to payment: one box, unless told otherwise. */
export function basketFor(stall: Counter, more: Record<string, unknown> = {}) {
  return {
    basketKey: randomUUID(),
    dayId: stall.day.id,
    lines: [{ offerId: stall.boxOffer.id, quantity: 1 }],
    slotId: stall.slot.id,
    name: 'Ada Fell',
    email: 'ada@example.com',
    phone: '07700 900123',
    note: '',
    ...more,
  };
}

export type Placed = { orderNo: number; token: string; state: string; paymentUrl: string | null };

export async function place(world: World, basket: ReturnType<typeof basketFor>, cookie?: string): Promise<Placed> {
  const answer = await world.request(cookie).post('/api/orders').send(basket);
  if (answer.status !== 200) throw new Error(`Placing answered ${answer.status}: ${answer.text}`);
  return answer.body as Placed;
}

/** Fills in the payment company's own page, as a person does. */
export function payOn(url: string | null, card = cards.good): Promise<PaymentResult> {
  return payByCard(url ?? '', card, { name: 'Ada Fell', email: 'ada@example.com' });
}

/** Pays, and hands over every message of the payment company that waits. */
export async function payFor(world: World, placed: Placed, card = cards.good): Promise<void> {
  await payOn(placed.paymentUrl, card);
  await world.payments.flush();
}

/** An order that is paid and confirmed. */
export async function makeConfirmedOrder(
  world: World,
  stall: Counter,
  more: Record<string, unknown> = {},
  cookie?: string,
) {
  const placed = await place(world, basketFor(stall, more), cookie);
  await payFor(world, placed);
  return getOrderRow(world, placed.token);
}

export async function getOrderRow({ db }: World, token: string) {
  const [row] = await db.select().from(customerOrder).where(eq(customerOrder.token, token));
  if (!row) throw new Error('There is no such order.');
  return row;
}

export async function countersOf({ db }: World, offerId: string) {
  const [row] = await db.select().from(offer).where(eq(offer.id, offerId));
  return { offered: row?.offered, held: row?.held, sold: row?.sold };
}

export async function takenOf({ db }: World, slotId: string): Promise<number | undefined> {
  const [row] = await db.select().from(collectionSlot).where(eq(collectionSlot.id, slotId));
  return row?.taken;
}

export function paymentsOf({ db }: World, orderId: string) {
  return db.select().from(payment).where(eq(payment.orderId, orderId)).orderBy(payment.createdAt, payment.kind);
}

let packs = 0;

/** A weighed pack, nowhere in the ledger yet. */
export async function makePackOf(
  { db, clock }: World,
  of: { dayId: string; carcaseId: string; cutId: string; grams?: number },
) {
  packs += 1;
  const [row] = await db
    .insert(pack)
    .values({
      code: `test-pack-code-${packs}`,
      cuttingDayId: of.dayId,
      carcaseId: of.carcaseId,
      cutId: of.cutId,
      grams: of.grams ?? 612,
      packedOn: clock.today(),
      useBy: addDays(clock.today(), 10),
    })
    .returning();
  if (!row) throw new Error('The pack was not kept.');
  return row;
}

/** A pack of the stall's cut that lies in an order. */
async function makePackIn(world: World, stall: Stall, orderLineId: string) {
  const beast = await makeCarcase(world.db, stall.day.id, { killDay: addDays(stall.day.day, -21) });
  const row = await makePackOf(world, { dayId: stall.day.id, carcaseId: beast.id, cutId: stall.cut.id });
  await world.db.insert(packAssignment).values({ packId: row.id, orderLineId });
  await world.db.insert(stockMovement).values({
    ...{ carcaseId: beast.id, packId: row.id, fromPlace: 'chiller', toPlace: 'order' },
    ...{ grams: row.grams, reason: 'filled' },
  });
  return row;
}

/** Paid, with one pack in it, and packed. */
export async function makePackedOrder(world: World, stall: Stall, more: Record<string, unknown> = {}) {
  const order = await makeConfirmedOrder(world, stall, more);
  const [line] = await world.db.select().from(orderLine).where(eq(orderLine.orderId, order.id));
  if (!line) throw new Error('The order has no line.');
  const inside = await makePackIn(world, stall, line.id);
  await world.db.update(customerOrder).set({ state: 'packed' }).where(eq(customerOrder.id, order.id));
  return { order: await getOrderRow(world, order.token), pack: inside };
}
