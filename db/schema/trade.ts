import { sql } from 'drizzle-orm';
import { check, index, integer, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { user } from './auth.ts';
import { carcase, cuttingDay } from './carcases.ts';
import { createdAt, id, version } from './columns.ts';
import { cut } from './products.ts';

export const tradeAccount = pgTable('trade_account', {
  id: id(),
  userId: uuid()
    .notNull()
    .unique()
    .references(() => user.id),
  businessName: text().notNull(),
  addressLines: text().array().notNull(),
  phone: text().notNull(),
  state: text({ enum: ['applied', 'approved', 'refused'] })
    .notNull()
    .default('applied'),
  createdAt: createdAt(),
  version: version(),
});

/** A butcher's own price list. `product` is `side`, `fore`, `hind`, `primal:<id>` or `cut:<id>`. */
export const tradePrice = pgTable(
  'trade_price',
  {
    id: id(),
    accountId: uuid()
      .notNull()
      .references(() => tradeAccount.id),
    product: text().notNull(),
    tenthPencePerKg: integer().notNull(),
    basis: text({ enum: ['scale weight', 'cold weight'] })
      .notNull()
      .default('scale weight'),
  },
  (table) => [
    unique().on(table.accountId, table.product),
    check('trade_price_rate', sql`${table.tenthPencePerKg} > 0`),
  ],
);

export const reservation = pgTable(
  'reservation',
  {
    id: id(),
    reservationNo: integer().notNull().generatedAlwaysAsIdentity({ startWith: 501 }).unique(),
    accountId: uuid()
      .notNull()
      .references(() => tradeAccount.id),
    cuttingDayId: uuid()
      .notNull()
      .references(() => cuttingDay.id),
    /** Made by the browser: a second press of the button finds the first reservation. */
    requestKey: uuid().notNull().unique(),
    state: text({ enum: ['asked', 'confirmed', 'refused', 'cancelled', 'dispatched'] }).notNull(),
    cuttingNote: text().notNull().default(''),
    answer: text().notNull().default(''),
    createdAt: createdAt(),
    version: version(),
  },
  (table) => [index().on(table.cuttingDayId, table.state), index().on(table.accountId)],
);

export const reservationLine = pgTable(
  'reservation_line',
  {
    id: id(),
    reservationId: uuid()
      .notNull()
      .references(() => reservation.id, { onDelete: 'cascade' }),
    kind: text({ enum: ['unit', 'cut'] }).notNull(),
    /** For a unit: `side`, `fore`, `hind` or `primal:<id>`; the carcase and side once they are settled. */
    unitKind: text(),
    carcaseId: uuid().references(() => carcase.id),
    side: text({ enum: ['left', 'right'] }),
    cutId: text().references(() => cut.id),
    grams: integer(),
    tenthPencePerKg: integer().notNull(),
    /** Agreed when it was reserved: a later price list does not change it. Cuts are always charged by the scale. */
    basis: text({ enum: ['scale weight', 'cold weight'] })
      .notNull()
      .default('scale weight'),
    /** What left for the butcher, by the scale; null while it is here. */
    dispatchedGrams: integer(),
  },
  (table) => [
    index().on(table.reservationId),
    check(
      'reservation_line_kind',
      sql`case when ${table.kind} = 'unit'
        then ${table.unitKind} is not null and ${table.cutId} is null and ${table.grams} is null
        else ${table.cutId} is not null and ${table.grams} > 0 and ${table.unitKind} is null end`,
    ),
    check('reservation_line_rate', sql`${table.tenthPencePerKg} > 0`),
    check('reservation_line_basis', sql`${table.kind} = 'unit' or ${table.basis} = 'scale weight'`),
    check('reservation_line_dispatched', sql`${table.dispatchedGrams} >= 0`),
  ],
);
