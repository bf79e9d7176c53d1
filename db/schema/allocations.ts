import { sql } from 'drizzle-orm';
import { boolean, check, index, integer, jsonb, pgTable, text, unique, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import type { AllocationAnswer, AllocationQuestion } from '#shared/domain/allocation-record.ts';
import type { WayLock } from '#shared/engine/allocation/allocation-input.ts';
import { carcase, cuttingDay } from './carcases.ts';
import { createdAt, id, instant } from './columns.ts';
import { boxKind, cut } from './products.ts';

/** Each answer of the allocation, kept with its inputs. At most one of a day is in force. */
export const allocation = pgTable(
  'allocation',
  {
    id: id(),
    cuttingDayId: uuid()
      .notNull()
      .references(() => cuttingDay.id),
    figuresVersion: integer().notNull(),
    /** Names of ways chosen by the owner, by side and choice. */
    locks: jsonb().$type<WayLock[]>().notNull(),
    input: jsonb().$type<AllocationQuestion>().notNull(),
    plan: jsonb().$type<AllocationAnswer>().notNull(),
    contributionPence: integer().notNull(),
    isProven: boolean().notNull(),
    state: text({ enum: ['draft', 'published', 'replaced'] })
      .notNull()
      .default('draft'),
    publishedAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [
    index().on(table.cuttingDayId, table.createdAt),
    uniqueIndex('allocation_one_published')
      .on(table.cuttingDayId)
      .where(sql`${table.state} = 'published'`),
  ],
);

/** What can be bought of a cutting day. Free = offered - held - sold, never stored. */
export const offer = pgTable(
  'offer',
  {
    id: id(),
    cuttingDayId: uuid()
      .notNull()
      .references(() => cuttingDay.id),
    kind: text({ enum: ['box', 'loose', 'unit', 'cut'] }).notNull(),
    /** `box:<kind id>`, `loose:<cut id>`, `cut:<cut id>`, `unit:<carcase id>:<unit>`. */
    productKey: text().notNull(),
    boxKindId: uuid().references(() => boxKind.id),
    cutId: text().references(() => cut.id),
    carcaseId: uuid().references(() => carcase.id),
    unit: text(),
    /** Boxes and loose packs count packs, units count 1, trade cuts count grams. */
    offered: integer().notNull(),
    held: integer().notNull().default(0),
    sold: integer().notNull().default(0),
    /** Pence of one box or of one loose pack at its upper weight; null where trade prices rule. */
    pricePence: integer(),
    upperGrams: integer(),
    isClosed: boolean().notNull().default(false),
    createdAt: createdAt(),
  },
  (table) => [
    unique().on(table.cuttingDayId, table.productKey),
    check(
      'offer_never_twice',
      sql`${table.held} >= 0 and ${table.sold} >= 0 and ${table.held} + ${table.sold} <= ${table.offered}`,
    ),
    check('offer_unit_once', sql`${table.kind} <> 'unit' or ${table.offered} <= 1`),
    check(
      'offer_product',
      sql`(${table.kind} = 'box') = (${table.boxKindId} is not null)
        and (${table.kind} in ('loose', 'cut')) = (${table.cutId} is not null)
        and (${table.kind} = 'unit') = (${table.carcaseId} is not null and ${table.unit} is not null)`,
    ),
    check('offer_price', sql`${table.kind} not in ('box', 'loose') or ${table.pricePence} > 0`),
  ],
);
