import { sql } from 'drizzle-orm';
import { boolean, check, integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id, version } from './columns.ts';
import { collectionPoint } from './orders.ts';

/** Where the van goes, on which day of the week after the cutting, and for how much. */
export const deliveryArea = pgTable(
  'delivery_area',
  {
    id: id(),
    /** Its rounds are times of this point, so that room, run sheet and mails work as for any other. */
    pointId: uuid()
      .notNull()
      .unique()
      .references(() => collectionPoint.id),
    name: text().notNull(),
    /** Beginnings of postcodes in capitals without a space, such as ZZ1 or ZZ12. The longest that fits counts. */
    prefixes: text().array().notNull(),
    pricePence: integer().notNull(),
    /** Goods of this much are brought for nothing; empty: never. */
    freeFromPence: integer(),
    /** 1 is Monday, 7 is Sunday; the first such day after the cutting day. */
    weekday: integer().notNull(),
    /** Wall-clock times of the farm, as 09:00. */
    startsAt: text().notNull(),
    endsAt: text().notNull(),
    /** Stops that one round has room for. */
    capacity: integer().notNull(),
    isActive: boolean().notNull().default(true),
    createdAt: createdAt(),
    version: version(),
  },
  (table) => [
    check('delivery_area_money', sql`${table.pricePence} >= 0 and coalesce(${table.freeFromPence} > 0, true)`),
    check('delivery_area_weekday', sql`${table.weekday} between 1 and 7`),
    check('delivery_area_times', sql`${table.startsAt} < ${table.endsAt}`),
    check('delivery_area_capacity', sql`${table.capacity} > 0`),
    check('delivery_area_prefixes', sql`cardinality(${table.prefixes}) > 0`),
  ],
);
