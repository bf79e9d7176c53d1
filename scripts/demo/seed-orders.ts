import { randomBytes, randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import type { Chance } from '#db/seed/chance.ts';
import type { Person } from '#db/seed/demo-people.ts';
import { collectionSlot, customerOrder } from '#db/schema/orders.ts';
import { listOffers, type OfferRow } from '#server/allocation/allocation-queries.ts';
import { getRound } from '#server/delivery/delivery-service.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { orderConfirmedMail } from '#server/mail/order-confirmed.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { take } from '#server/orders/hold.ts';
import { insertOrder, replaceLines, updateOrder, type OrderRow } from '#server/orders/order-queries.ts';
import { readOrderFacts } from '#server/orders/read-order.ts';
import { insertCharge } from '#server/payments/payment-queries.ts';
import type { BasketLine } from '#shared/contracts/orders.ts';
import { addDays, londonInstant } from '#shared/domain/day.ts';
import { deliveryPenceOf } from '#shared/domain/delivery.ts';
import type { SeededDay } from './seed-days.ts';

type Sale = {
  day: SeededDay;
  people: readonly Person[];
  from: number;
  /** Some of them have it brought. */
  byVan?: boolean;
};

/** Every so many orders the van brings one. */
const VAN_EVERY = 6;
const DOORS = ['4 Hollin Cross', 'Thornwick Mill', '11 Chapel Row', 'Low Garth', '2 Smithy Fold'];

const NOTES = ['', '', '', '', 'Please pack the steaks on top.', 'I come by bicycle: two bags, please.'];

/** One paid order for each of the people, spread over the weeks before the cut-off. */
export async function seedOrders(deps: Deps, chance: Chance, sale: Sale): Promise<OrderRow[]> {
  const slots = await deps.db.select().from(collectionSlot).where(eq(collectionSlot.cuttingDayId, sale.day.id));
  const orders: OrderRow[] = [];
  for (const [index, person] of sale.people.entries()) {
    const lines = fillBasket(chance, await listOffers(deps.db, sale.day.id));
    const open = slots.filter((slot) => slot.taken < slot.capacity);
    if (lines.length === 0 || open.length === 0) continue;
    const isBrought = sale.byVan === true && index % VAN_EVERY === VAN_EVERY - 1;
    const slot = chance.pick(open);
    if (!isBrought) slot.taken += 1;
    const daysBefore = Math.round((sale.from * (sale.people.length - index)) / sale.people.length);
    const day = addDays(deps.clock.today(), -daysBefore);
    const at = londonInstant(day, `${chance.between(8, 11)}:${chance.between(10, 59)}`.padStart(5, '0'));
    const note = chance.pick(NOTES);
    const delivery = isBrought ? { door: chance.pick(DOORS), postcode: 'ZZ3 2AB' } : null;
    orders.push(await placePaidOrder(deps, { sale, person, lines, slotId: slot.id, at, note, delivery }));
  }
  return orders;
}

/** A box, sometimes two, and now and then some loose packs; never more than is free. */
function fillBasket(chance: Chance, offers: readonly OfferRow[]): BasketLine[] {
  const free = (offer: OfferRow) => offer.offered - offer.held - offer.sold;
  const lines = new Map<string, number>();
  const add = (offer: OfferRow, quantity: number) => {
    if (free(offer) >= quantity + 2) lines.set(offer.id, quantity);
  };
  const boxes = offers.filter((offer) => offer.kind === 'box' && free(offer) > 2).flatMap((offer) => repeat(offer));
  const loose = offers.filter((offer) => offer.kind === 'loose' && free(offer) > 2);
  if (boxes.length > 0) add(chance.pick(boxes), chance.between(0, 7) === 0 ? 2 : 1);
  const extras = loose.length > 0 ? chance.between(0, 2) : 0;
  for (let extra = 0; extra < extras; extra += 1) add(chance.pick(loose), chance.between(1, 2));
  return [...lines].map(([offerId, quantity]) => ({ offerId, quantity }));
}

/** What there is more of is bought more often. */
function repeat(offer: OfferRow): OfferRow[] {
  return Array.from({ length: offer.offered }, () => offer);
}

type Placement = {
  sale: Sale;
  person: Person;
  lines: BasketLine[];
  slotId: string;
  at: Date;
  note: string;
  delivery: { door: string; postcode: string } | null;
};

/** The end of a checkout without its page: stock sold, money taken by the payment company, the charge written down. */
async function placePaidOrder(deps: Deps, placement: Placement): Promise<OrderRow> {
  const order = await deps.db.transaction((tx) => insertSoldOrder(tx, placement));
  const intent = await deps.payments.stripe.paymentIntents.create({
    amount: order.totalPence,
    currency: 'gbp',
    payment_method: 'pm_card_visa',
    confirm: true,
    metadata: { orderId: order.id },
  });
  const charge = { orderId: order.id, providerId: intent.id, amountPence: order.totalPence };
  await deps.db.transaction((tx) => insertCharge(tx, charge));
  return order;
}

async function insertSoldOrder(tx: Tx, placement: Placement): Promise<OrderRow> {
  const { sale, person, at, note, delivery } = placement;
  const { id: dayId, day } = sale.day;
  const round = delivery && (await getRound(tx, { id: dayId, day }, delivery));
  const slotId = round?.slotId ?? placement.slotId;
  const order = await insertOrder(tx, {
    token: randomBytes(24).toString('base64url'),
    basketKey: randomUUID(),
    userId: person.id,
    cuttingDayId: dayId,
    slotId,
    name: person.name,
    email: person.email,
    phone: person.phone,
    note,
    deliveryAddress: delivery && [delivery.door],
    deliveryPostcode: delivery?.postcode ?? null,
    state: 'confirmed',
    paymentState: 'paid',
    isHeld: false,
    totalPence: 1,
    reachedPaymentAt: at,
    createdAt: at,
  });
  if (!order) throw new Error('An order was not kept.');
  const lines = await take(tx, { day: { id: dayId, day }, lines: placement.lines, slotId }, 'sold');
  await replaceLines(tx, order.id, lines);
  const goodsPence = lines.reduce((sum, line) => sum + line.quantity * line.unitPricePence, 0);
  const deliveryPence = round ? deliveryPenceOf(round.area, goodsPence) : 0;
  return updateOrder(tx, order.id, { totalPence: goodsPence + deliveryPence, deliveryPence });
}

/** The mail that goes out when an order is confirmed; it leaves as soon as the server runs. */
export async function sendConfirmation(deps: Deps, orderId: string): Promise<void> {
  await deps.db.transaction(async (tx) => {
    const [order] = await tx.select().from(customerOrder).where(eq(customerOrder.id, orderId));
    if (!order) return;
    await queueMail(tx, {
      eventKey: `order confirmed ${order.id} ${order.version}`,
      kind: 'order confirmed',
      orderId: order.id,
      to: order.email,
      ...orderConfirmedMail(await readOrderFacts(deps, tx, order)),
    });
  });
}
