import { sql } from 'drizzle-orm';
import { boolean, check, index, integer, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { user } from './auth.ts';
import { createdAt, day, id, instant } from './columns.ts';
import { customerOrder } from './orders.ts';

/** A code that takes a share or an amount off an order. It is closed rather than edited, so that a promise stands. */
export const promoCode = pgTable(
  'promo_code',
  {
    id: id(),
    /** In capitals and digits, as people type it. */
    code: text().notNull().unique(),
    percent: integer(),
    amountPence: integer(),
    /** The goods must come to this much. */
    minimumPence: integer().notNull().default(0),
    /** The last day on which it counts. */
    lastDay: day(),
    usageLimit: integer(),
    isOncePerCustomer: boolean().notNull().default(true),
    closedAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [
    check('promo_code_letters', sql`${table.code} ~ '^[A-Z0-9]{3,20}$'`),
    check('promo_code_one_kind', sql`num_nonnulls(${table.percent}, ${table.amountPence}) = 1`),
    check('promo_code_percent', sql`${table.percent} between 1 and 90`),
    check('promo_code_amounts', sql`${table.amountPence} > 0 and ${table.minimumPence} >= 0`),
    check('promo_code_limit', sql`${table.usageLimit} > 0`),
  ],
);

/** One order that has a code, from the hold on; given back with the order. */
export const promoUse = pgTable(
  'promo_use',
  {
    orderId: uuid()
      .primaryKey()
      .references(() => customerOrder.id),
    promoId: uuid()
      .notNull()
      .references(() => promoCode.id),
    /** The address in small letters: one person, one use. */
    email: text().notNull(),
    userId: uuid().references(() => user.id, { onDelete: 'set null' }),
    isOnce: boolean().notNull(),
    createdAt: createdAt(),
  },
  (table) => [
    index().on(table.promoId),
    uniqueIndex('promo_use_once_by_email')
      .on(table.promoId, table.email)
      .where(sql`${table.isOnce}`),
    uniqueIndex('promo_use_once_by_account')
      .on(table.promoId, table.userId)
      .where(sql`${table.isOnce}`),
  ],
);
