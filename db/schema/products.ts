import { sql } from 'drizzle-orm';
import {
  type AnyPgColumn,
  boolean,
  check,
  integer,
  pgTable,
  primaryKey,
  text,
  uuid,
  unique,
} from 'drizzle-orm/pg-core';
import { createdAt, id, version } from './columns.ts';

/** A cut that a specification can give. The id is the specification's own. */
export const cut = pgTable(
  'cut',
  {
    id: text().primaryKey(),
    name: text().notNull(),
    description: text().notNull(),
    cooking: text({ enum: ['grill', 'roast', 'pot-roast', 'braise', 'mince'] }).notNull(),
    tenthPencePerKg: integer().notNull(),
    clearanceTenthPencePerKg: integer().notNull(),
    minPackGrams: integer().notNull(),
    maxPackGrams: integer().notNull(),
    looseDemandPacks: integer().notNull(),
    isSoldLoose: boolean().notNull(),
    isFarmMinced: boolean().notNull(),
    useByDays: integer().notNull(),
    version: version(),
  },
  (table) => [
    check('cut_prices', sql`${table.tenthPencePerKg} >= 0 and ${table.clearanceTenthPencePerKg} >= 0`),
    check('cut_pack', sql`${table.minPackGrams} > 0 and ${table.maxPackGrams} >= ${table.minPackGrams}`),
    check('cut_demand', sql`${table.looseDemandPacks} >= 0 and ${table.useByDays} > 0`),
  ],
);

export const boxKind = pgTable(
  'box_kind',
  {
    id: id(),
    slug: text().notNull().unique(),
    name: text().notNull(),
    summary: text().notNull(),
    guaranteedGrams: integer().notNull(),
    pricePence: integer().notNull(),
    packagingPence: integer().notNull(),
    demandBoxes: integer().notNull(),
    isActive: boolean().notNull().default(true),
    position: integer().notNull(),
    /** A swap: the same box at the same price with another recipe. It has offers of its own and no page of its own. */
    variantOfId: uuid().references((): AnyPgColumn => boxKind.id),
    createdAt: createdAt(),
    version: version(),
  },
  (table) => [
    check('box_kind_grams', sql`${table.guaranteedGrams} > 0`),
    check('box_kind_money', sql`${table.pricePence} > 0 and ${table.packagingPence} >= 0`),
    check('box_kind_variant', sql`${table.variantOfId} <> ${table.id}`),
    check('box_kind_demand', sql`${table.demandBoxes} >= 0`),
  ],
);

export const boxLine = pgTable(
  'box_line',
  {
    id: id(),
    boxKindId: uuid()
      .notNull()
      .references(() => boxKind.id, { onDelete: 'cascade' }),
    position: integer().notNull(),
    name: text().notNull(),
    minGrams: integer().notNull(),
    maxGrams: integer().notNull(),
    minPacks: integer().notNull(),
    maxPacks: integer(),
  },
  (table) => [
    unique().on(table.boxKindId, table.position),
    check('box_line_grams', sql`${table.minGrams} >= 0 and ${table.maxGrams} >= ${table.minGrams}`),
    check('box_line_packs', sql`${table.minPacks} >= 0 and coalesce(${table.maxPacks} >= ${table.minPacks}, true)`),
  ],
);

export const boxLineCut = pgTable(
  'box_line_cut',
  {
    boxLineId: uuid()
      .notNull()
      .references(() => boxLine.id, { onDelete: 'cascade' }),
    cutId: text()
      .notNull()
      .references(() => cut.id),
  },
  (table) => [primaryKey({ columns: [table.boxLineId, table.cutId] })],
);
