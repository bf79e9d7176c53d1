import { sql } from 'drizzle-orm';
import { check, index, integer, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { STANDING_STATES, TURN_STATES } from '#shared/domain/standing-order.ts';
import { user } from './auth.ts';
import { cuttingDay } from './carcases.ts';
import { createdAt, day, id, instant } from './columns.ts';
import { collectionPoint, customerOrder } from './orders.ts';
import { boxKind } from './products.ts';

/** The same box again every so many weeks, paid from a kept card. Begun by an order that is paid on the company's page. */
export const standingOrder = pgTable(
  'standing_order',
  {
    id: id(),
    userId: uuid()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    /** The basket key of its first order. */
    basketKey: uuid().notNull().unique(),
    boxKindId: uuid()
      .notNull()
      .references(() => boxKind.id),
    quantity: integer().notNull(),
    everyWeeks: integer().notNull(),
    pointId: uuid()
      .notNull()
      .references(() => collectionPoint.id),
    /** Wall-clock time of the first collection, `10:00`: the next ones are as near to it as there is room. */
    time: text().notNull(),
    phone: text().notNull(),
    state: text({ enum: STANDING_STATES }).notNull().default('pending'),
    /** No cutting day before this one is taken. */
    nextFrom: day().notNull(),
    providerCustomerId: text(),
    providerMethodId: text(),
    /** The words that were agreed to, as they stood then. */
    terms: text().notNull(),
    createdAt: createdAt(),
  },
  (table) => [
    index().on(table.userId),
    index().on(table.state),
    check('standing_order_weeks', sql`${table.everyWeeks} in (4, 6, 8, 12)`),
    check('standing_order_quantity', sql`${table.quantity} between 1 and 9`),
    check(
      'standing_order_card',
      sql`${table.state} not in ('active', 'paused')
        or (${table.providerCustomerId} is not null and ${table.providerMethodId} is not null)`,
    ),
  ],
);

/** One box of a standing order on one cutting day, with the order that holds its stock and its time. */
export const standingTurn = pgTable(
  'standing_turn',
  {
    id: id(),
    standingOrderId: uuid()
      .notNull()
      .references(() => standingOrder.id, { onDelete: 'cascade' }),
    cuttingDayId: uuid()
      .notNull()
      .references(() => cuttingDay.id),
    orderId: uuid()
      .notNull()
      .unique()
      .references(() => customerOrder.id),
    /** Unguessable; its holder skips this box without signing in. */
    token: text().notNull().unique(),
    state: text({ enum: TURN_STATES }).notNull().default('planned'),
    /** When the card is charged. */
    chargeAt: instant().notNull(),
    createdAt: createdAt(),
  },
  (table) => [unique().on(table.standingOrderId, table.cuttingDayId), index().on(table.state, table.chargeAt)],
);
