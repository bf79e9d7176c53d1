import { sql } from 'drizzle-orm';
import { check, index, integer, pgTable, text, unique, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { offer } from './allocations.ts';
import { createdAt, id, instant } from './columns.ts';
import { customerOrder } from './orders.ts';

/** More for a paid order, on its way to payment: open while its stock is held, then paid or ended. */
export const orderAddition = pgTable(
  'order_addition',
  {
    id: id(),
    orderId: uuid()
      .notNull()
      .references(() => customerOrder.id),
    state: text({ enum: ['open', 'paid', 'ended'] })
      .notNull()
      .default('open'),
    amountPence: integer().notNull(),
    reachedPaymentAt: instant().notNull(),
    sessionId: text().unique(),
    sessionUrl: text(),
    sessionExpiresAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [
    index().on(table.orderId),
    uniqueIndex('order_addition_one_open')
      .on(table.orderId)
      .where(sql`${table.state} = 'open'`),
    check('order_addition_amount', sql`${table.amountPence} > 0`),
  ],
);

export const orderAdditionLine = pgTable(
  'order_addition_line',
  {
    id: id(),
    additionId: uuid()
      .notNull()
      .references(() => orderAddition.id),
    offerId: uuid()
      .notNull()
      .references(() => offer.id),
    quantity: integer().notNull(),
    unitPricePence: integer().notNull(),
    unitGrams: integer().notNull(),
    name: text().notNull(),
  },
  (table) => [
    unique().on(table.additionId, table.offerId),
    index().on(table.offerId),
    check('order_addition_line_quantity', sql`${table.quantity} > 0`),
    check('order_addition_line_price', sql`${table.unitPricePence} > 0 and ${table.unitGrams} > 0`),
  ],
);
