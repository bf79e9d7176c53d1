import { sql } from 'drizzle-orm';
import { check, integer, jsonb, pgTable, uuid } from 'drizzle-orm/pg-core';
import type { PriceGrid } from '#shared/engine/margin/margin-types.ts';
import { user } from './auth.ts';
import { createdAt, day, id } from './columns.ts';

/**
 * What the same carcases would bring sold deadweight. Editions are rows: a later edit makes a new one. In force on a day is
 * the latest not dated after it.
 */
export const priceGrid = pgTable(
  'price_grid',
  {
    id: id(),
    edition: integer().notNull().unique(),
    validFrom: day().notNull(),
    /** Price of the headline class, before the grid's adjustments. */
    baseTenthPencePerKg: integer().notNull(),
    grid: jsonb().$type<PriceGrid>().notNull(),
    /** Taken off per head. */
    levyPence: integer().notNull(),
    haulagePence: integer().notNull(),
    deductionsPence: integer().notNull(),
    byUserId: uuid().references(() => user.id),
    createdAt: createdAt(),
  },
  (table) => [
    check('price_grid_edition', sql`${table.edition} > 0`),
    check('price_grid_base', sql`${table.baseTenthPencePerKg} > 0`),
    check(
      'price_grid_deductions',
      sql`${table.levyPence} >= 0 and ${table.haulagePence} >= 0 and ${table.deductionsPence} >= 0`,
    ),
  ],
);
