import { sql } from 'drizzle-orm';
import {
  type AnyPgColumn,
  boolean,
  check,
  index,
  integer,
  jsonb,
  pgTable,
  text,
  unique,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { ORDER_STATES, PAYMENT_STATES } from '#shared/domain/order-state.ts';
import { offer } from './allocations.ts';
import { user } from './auth.ts';
import { cuttingDay } from './carcases.ts';
import { createdAt, id, instant, version } from './columns.ts';

export const collectionPoint = pgTable('collection_point', {
  id: id(),
  name: text().notNull(),
  addressLines: text().array().notNull(),
  directions: text().notNull(),
  bring: text().notNull(),
  isActive: boolean().notNull().default(true),
  /** A van's rounds are times of a point too, with room for so many stops. */
  kind: text({ enum: ['collection', 'van'] })
    .notNull()
    .default('collection'),
});

export const collectionSlot = pgTable(
  'collection_slot',
  {
    id: id(),
    pointId: uuid()
      .notNull()
      .references(() => collectionPoint.id),
    cuttingDayId: uuid()
      .notNull()
      .references(() => cuttingDay.id),
    startsAt: instant().notNull(),
    endsAt: instant().notNull(),
    capacity: integer().notNull(),
    taken: integer().notNull().default(0),
  },
  (table) => [
    unique().on(table.pointId, table.startsAt),
    index().on(table.cuttingDayId),
    check('slot_never_over', sql`${table.taken} >= 0 and ${table.taken} <= ${table.capacity}`),
    check('slot_times', sql`${table.endsAt} > ${table.startsAt}`),
  ],
);

/** A consumer's order. The basket lives in the browser; a row is made on the way to payment. */
export const customerOrder = pgTable(
  'customer_order',
  {
    id: id(),
    orderNo: integer().notNull().generatedAlwaysAsIdentity({ startWith: 1001 }).unique(),
    /** Unguessable; opens exactly this order. */
    token: text().notNull().unique(),
    /** Made by the browser for one basket: a second press of the button finds the first order. */
    basketKey: uuid().notNull().unique(),
    userId: uuid().references(() => user.id),
    cuttingDayId: uuid()
      .notNull()
      .references(() => cuttingDay.id),
    slotId: uuid()
      .notNull()
      .references(() => collectionSlot.id),
    name: text().notNull(),
    email: text().notNull(),
    phone: text().notNull(),
    note: text().notNull().default(''),
    state: text({ enum: ORDER_STATES }).notNull().default('awaiting payment'),
    paymentState: text({ enum: PAYMENT_STATES }).notNull().default('unpaid'),
    /** What is to be paid: the lines, less the discount, and the delivery. */
    totalPence: integer().notNull(),
    discountPence: integer().notNull().default(0),
    deliveryPence: integer().notNull().default(0),
    /** Where the van brings it; both empty where it is collected. */
    deliveryAddress: text().array(),
    deliveryPostcode: text(),
    /** Paid now, where the rest is taken from the saved card once the order is packed. */
    depositPence: integer(),
    /** What was left to pay of a deposit order once it was weighed; empty until then. */
    balancePence: integer(),
    /** The card kept with the payment company for the rest. */
    providerCustomerId: text(),
    providerMethodId: text(),
    /** A standing order begins with this one: the card is kept for the boxes to come. */
    keepsCard: boolean().notNull().default(false),
    reachedPaymentAt: instant().notNull(),
    /** True while this order's lines and slot are counted as held. */
    isHeld: boolean().notNull().default(true),
    sessionId: text().unique(),
    sessionUrl: text(),
    sessionExpiresAt: instant(),
    createdAt: createdAt(),
    version: version(),
  },
  (table) => [
    index().on(table.cuttingDayId, table.state),
    index().on(table.userId),
    check('order_total', sql`${table.totalPence} > 0`),
    check('order_sums', sql`${table.discountPence} >= 0 and ${table.deliveryPence} >= 0`),
    check('order_deposit', sql`${table.depositPence} > 0 and ${table.depositPence} < ${table.totalPence}`),
    check(
      'order_balance',
      sql`${table.balancePence} is null or (${table.balancePence} >= 0 and ${table.depositPence} is not null)`,
    ),
    check('order_delivery_address', sql`(${table.deliveryAddress} is null) = (${table.deliveryPostcode} is null)`),
    check('order_held_only_before_payment', sql`not ${table.isHeld} or ${table.state} = 'awaiting payment'`),
  ],
);

export const orderLine = pgTable(
  'order_line',
  {
    id: id(),
    orderId: uuid()
      .notNull()
      .references(() => customerOrder.id),
    offerId: uuid()
      .notNull()
      .references(() => offer.id),
    quantity: integer().notNull(),
    unitPricePence: integer().notNull(),
    /** This line's share of a promotional code, over all of its quantity. */
    discountPence: integer().notNull().default(0),
    /** What one of it was sold as: a box's guaranteed weight, a loose pack's upper weight. */
    unitGrams: integer().notNull(),
    name: text().notNull(),
  },
  (table) => [
    // Added later, the same thing may cost something else.
    unique().on(table.orderId, table.offerId, table.unitPricePence),
    index().on(table.offerId),
    check('order_line_discount', sql`${table.discountPence} between 0 and ${table.quantity} * ${table.unitPricePence}`),
    check('order_line_quantity', sql`${table.quantity} > 0`),
    check('order_line_price', sql`${table.unitPricePence} > 0`),
    check('order_line_grams', sql`${table.unitGrams} > 0`),
  ],
);

/** Money in and out. A fact of its own: the order's payment state is what these rows add up to. */
export const payment = pgTable(
  'payment',
  {
    id: id(),
    orderId: uuid()
      .notNull()
      .references(() => customerOrder.id),
    kind: text({ enum: ['charge', 'refund'] }).notNull(),
    providerId: text().unique(),
    /** What this money is for; one refund per reason. */
    reason: text().notNull(),
    amountPence: integer().notNull(),
    state: text({ enum: ['asked', 'done', 'failed'] }).notNull(),
    error: text(),
    /** The charge that a refund is taken from. */
    chargeId: uuid().references((): AnyPgColumn => payment.id),
    /** Raised when a person has it tried again, under a key of its own. */
    attempt: integer().notNull().default(1),
    createdAt: createdAt(),
  },
  (table) => [
    index().on(table.orderId),
    uniqueIndex('payment_one_balance')
      .on(table.orderId)
      .where(sql`${table.kind} = 'charge' and ${table.reason} = 'balance'`),
    check('payment_refund_has_charge', sql`(${table.kind} = 'refund') = (${table.chargeId} is not null)`),
    uniqueIndex('payment_one_refund_per_reason')
      .on(table.orderId, table.reason, table.chargeId)
      .where(sql`${table.kind} = 'refund'`),
    check('payment_amount', sql`${table.amountPence} > 0`),
  ],
);

/** Every event that the payment company sent; its id makes a repeat a no-op. */
export const webhookEvent = pgTable('webhook_event', {
  eventId: text().primaryKey(),
  type: text().notNull(),
  payload: jsonb().notNull(),
  receivedAt: createdAt(),
});
