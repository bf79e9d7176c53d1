import type { OrderSummary } from '#shared/contracts/orders.ts';
import { calendarFile } from '#shared/domain/calendar-file.ts';
import { AppError } from '#shared/errors.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { getFarm } from '#server/farm/farm-queries.ts';
import type { OrderFacts } from '#server/mail/order-facts.ts';
import {
  findOrder,
  getCollection,
  listLines,
  listOrderRows,
  type LineRow,
  type OrderFilter,
  type OrderRow,
} from './order-queries.ts';
import { findDay } from './stock-queries.ts';

export function noSuchOrder(): AppError {
  return new AppError('NOT_FOUND', 'There is no such order. Please open the link from your mail once more.');
}

export async function getOrderByToken(db: Db, token: string): Promise<OrderRow> {
  const order = await findOrder(db, { token });
  if (!order) throw noSuchOrder();
  return order;
}

/** A line as people read it. */
export function viewLine(line: LineRow): OrderFacts['lines'][number] {
  return {
    name: line.name,
    kind: line.kind === 'box' ? 'box' : 'loose',
    quantity: line.quantity,
    unitPricePence: line.unitPricePence,
    linePence: line.quantity * line.unitPricePence,
    unitGrams: line.unitGrams,
  };
}

export async function getDay(db: Db | Tx, dayId: string) {
  const day = await findDay(db, dayId);
  if (!day) throw new Error(`The cutting day ${dayId} has gone.`);
  return day;
}

export async function readSummaries(db: Db | Tx, filter: OrderFilter): Promise<OrderSummary[]> {
  const rows = await listOrderRows(db, filter);
  return rows.map((row) => ({ ...row, startsAt: row.startsAt.toISOString() }));
}

/** Where and when an order is handed over: at its collection point, or at the buyer's own door. */
export async function getPlace(db: Db | Tx, order: OrderRow): Promise<OrderFacts['collection']> {
  const slot = await getCollection(db, order.slotId);
  if (!order.deliveryAddress) return slot;
  return { ...slot, name: 'Your address', addressLines: [...order.deliveryAddress, order.deliveryPostcode ?? ''] };
}

/** What the mails and the calendar tell of an order. */
export async function readOrderFacts(deps: Deps, db: Db | Tx, order: OrderRow): Promise<OrderFacts> {
  const farm = await getFarm(db);
  const day = await getDay(db, order.cuttingDayId);
  const lines = await listLines(db, order.id);
  const { name, businessName, email, phone } = farm;
  return {
    farm: { name, businessName, email, phone },
    orderId: order.id,
    orderNo: order.orderNo,
    name: order.name,
    url: `${deps.origin}/orders/${order.token}`,
    day: day.day,
    cutOffAt: day.cutOffAt,
    lines: lines.map(viewLine),
    discountPence: order.discountPence,
    deliveryPence: order.deliveryPence,
    totalPence: order.totalPence,
    isDelivered: order.deliveryAddress !== null,
    collection: await getPlace(db, order),
  };
}

export function orderCalendar(facts: OrderFacts, order: OrderRow, madeAt: Date): string {
  const { collection } = facts;
  return calendarFile({
    uid: `order-${order.id}@wholeside.example`,
    sequence: order.version,
    madeAt,
    startsAt: collection.startsAt,
    endsAt: collection.endsAt,
    title: facts.isDelivered ? `Beef comes from ${facts.farm.name}` : `Collect your beef from ${facts.farm.name}`,
    place: [collection.name, ...collection.addressLines].join(', '),
    description: `Order ${order.orderNo}. ${collection.directions}\n${collection.bring}`,
    url: facts.url,
    isCancelled: order.state === 'cancelled',
  });
}
