import { sql } from 'drizzle-orm';
import { boolean, check, index, integer, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { user } from './auth.ts';
import { carcase, cuttingDay } from './carcases.ts';
import { createdAt, day, id } from './columns.ts';
import { orderLine } from './orders.ts';
import { cut } from './products.ts';
import { reservationLine } from './trade.ts';

export const pack = pgTable(
  'pack',
  {
    id: id(),
    /** Unguessable; printed on the label and in its QR code. */
    code: text().notNull().unique(),
    cuttingDayId: uuid()
      .notNull()
      .references(() => cuttingDay.id),
    carcaseId: uuid()
      .notNull()
      .references(() => carcase.id),
    cutId: text()
      .notNull()
      .references(() => cut.id),
    grams: integer().notNull(),
    packedOn: day().notNull(),
    useBy: day().notNull(),
    createdAt: createdAt(),
  },
  (table) => [
    index().on(table.cuttingDayId),
    index().on(table.carcaseId),
    check('pack_grams', sql`${table.grams} between 1 and 60000`),
    check('pack_dates', sql`${table.useBy} >= ${table.packedOn}`),
  ],
);

export const packAssignment = pgTable(
  'pack_assignment',
  {
    id: id(),
    packId: uuid()
      .notNull()
      .references(() => pack.id),
    orderLineId: uuid().references(() => orderLine.id),
    reservationLineId: uuid().references(() => reservationLine.id),
    /** Which of the line's boxes or packs this fills, counted from 1. */
    copy: integer().notNull().default(1),
    /** The recipe line that the pack meets; empty for a loose pack. */
    boxLine: text().notNull().default(''),
    isLive: boolean().notNull().default(true),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('pack_one_live_assignment')
      .on(table.packId)
      .where(sql`${table.isLive}`),
    index().on(table.orderLineId),
    index().on(table.reservationLineId),
    check('pack_assignment_one_line', sql`num_nonnulls(${table.orderLineId}, ${table.reservationLineId}) = 1`),
    check('pack_assignment_copy', sql`${table.copy} > 0`),
  ],
);

export const PLACES = ['carcase', 'chiller', 'freezer', 'order', 'trade', 'own use', 'waste'] as const;

/** Append-only ledger of grams and packs. A mistake is put right by a movement that reverses it. */
export const stockMovement = pgTable(
  'stock_movement',
  {
    id: id(),
    carcaseId: uuid()
      .notNull()
      .references(() => carcase.id),
    packId: uuid().references(() => pack.id),
    /** Null where grams first enter the ledger: the cold weight of the carcase. */
    fromPlace: text({ enum: PLACES }),
    toPlace: text({ enum: PLACES }).notNull(),
    grams: integer().notNull(),
    reason: text().notNull(),
    byUserId: uuid().references(() => user.id),
    reversalOf: uuid().unique(),
    createdAt: createdAt(),
  },
  (table) => [
    index().on(table.carcaseId),
    index().on(table.packId),
    check('stock_movement_grams', sql`${table.grams} > 0`),
    check('stock_movement_places', sql`${table.fromPlace} is distinct from ${table.toPlace}`),
  ],
);
