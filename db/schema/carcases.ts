import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { createdAt, day, id, instant, version } from './columns.ts';
import { animal } from './herd.ts';

export const EDITION_ORIGINS = ['written', 'copied', 'restored', 'learned'] as const;

/** Versions are rows: a later edit makes a new row, so that what a cutting day used never changes. */
export const cuttingSpecification = pgTable(
  'cutting_specification',
  {
    id: id(),
    name: text().notNull(),
    edition: integer().notNull(),
    body: jsonb().notNull(),
    /** How this edition came about: written in the editor, copied, brought back to the shipped figures, or learned. */
    origin: text({ enum: EDITION_ORIGINS }).notNull().default('written'),
    /** Set on every edition of a name that is no longer offered for new cutting days. */
    retiredAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [
    unique().on(table.name, table.edition),
    check('cutting_specification_edition', sql`${table.edition} > 0`),
  ],
);

export const cuttingDay = pgTable(
  'cutting_day',
  {
    id: id(),
    day: day().notNull().unique(),
    cutOffAt: instant().notNull(),
    state: text({ enum: ['planned', 'open', 'closed'] })
      .notNull()
      .default('planned'),
    specificationId: uuid()
      .notNull()
      .references(() => cuttingSpecification.id),
    /** Raised by every kill sheet and weighing; an allocation names the figures it used. */
    figuresVersion: integer().notNull().default(1),
    createdAt: createdAt(),
    version: version(),
  },
  (table) => [check('cutting_day_figures_version', sql`${table.figuresVersion} > 0`)],
);

export const carcase = pgTable(
  'carcase',
  {
    id: id(),
    animalId: uuid()
      .notNull()
      .unique()
      .references(() => animal.id),
    cuttingDayId: uuid()
      .notNull()
      .references(() => cuttingDay.id),
    killDay: day().notNull(),
    state: text({ enum: ['booked', 'killed', 'hanging', 'cut', 'sold through'] })
      .notNull()
      .default('booked'),
    liveGrams: integer().notNull(),
    hotGrams: integer(),
    coldGrams: integer(),
    /** Each side as the sheet has it, hot or cold like the whole; both or neither. */
    leftGrams: integer(),
    rightGrams: integer(),
    conformation: text(),
    fatClass: text(),
    dressingSpec: text(),
    hanging: text({ enum: ['whole side', 'in the bag'] })
      .notNull()
      .default('whole side'),
    createdAt: createdAt(),
    version: version(),
  },
  (table) => [
    index().on(table.cuttingDayId),
    check('carcase_live_grams', sql`${table.liveGrams} between 100000 and 1500000`),
    check('carcase_hot_grams', sql`${table.hotGrams} is null or ${table.hotGrams} between 50000 and 715000`),
    check('carcase_cold_grams', sql`${table.coldGrams} is null or ${table.coldGrams} between 50000 and 700000`),
    check(
      'carcase_side_grams',
      sql`num_nonnulls(${table.leftGrams}, ${table.rightGrams}) <> 1 and coalesce(${table.leftGrams}, 20000) between 20000 and 360000 and coalesce(${table.rightGrams}, 20000) between 20000 and 360000`,
    ),
  ],
);

/** Measured weights. `node` is the engine's path of what was weighed: the hung carcase, a side, quarter, primal or line. */
export const weighing = pgTable(
  'weighing',
  {
    id: id(),
    carcaseId: uuid()
      .notNull()
      .references(() => carcase.id),
    node: text().notNull(),
    grams: integer().notNull(),
    createdAt: createdAt(),
  },
  (table) => [
    unique().on(table.carcaseId, table.node),
    check(
      'weighing_grams',
      sql`${table.grams} between 0 and case when ${table.node} = 'hung' then 700000 else 360000 end`,
    ),
  ],
);
