import { sql } from 'drizzle-orm';
import { check, integer, jsonb, pgTable, text, unique } from 'drizzle-orm/pg-core';
import { createdAt, day, id, version } from './columns.ts';

/** One deployment serves one farm: this table holds exactly one row. */
export const farm = pgTable(
  'farm',
  {
    id: integer().primaryKey().default(1),
    name: text().notNull(),
    businessName: text().notNull(),
    addressLines: text().array().notNull(),
    email: text().notNull(),
    phone: text().notNull(),
    story: text().notNull(),
    abattoirName: text().notNull(),
    abattoirApprovalNo: text().notNull(),
    cutterName: text().notNull(),
    cutterApprovalNo: text().notNull(),
    servingGrams: integer().notNull(),
    freezerGramsPerLitre: integer().notNull(),
    version: version(),
  },
  (table) => [
    check('farm_single_row', sql`${table.id} = 1`),
    check('farm_portions', sql`${table.servingGrams} > 0 and ${table.freezerGramsPerLitre} > 0`),
  ],
);

/** Rules and prices that change on a date: the value in force on a day is the latest one not after it. */
export const datedSetting = pgTable(
  'dated_setting',
  {
    id: id(),
    key: text().notNull(),
    validFrom: day().notNull(),
    value: jsonb().notNull(),
    createdAt: createdAt(),
  },
  (table) => [unique().on(table.key, table.validFrom)],
);
