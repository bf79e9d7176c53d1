import { sql } from 'drizzle-orm';
import { check, index, integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { createdAt, day, id, version } from './columns.ts';

export const animal = pgTable(
  'animal',
  {
    id: id(),
    earTag: text().notNull().unique(),
    breed: text().notNull(),
    sex: text({ enum: ['steer', 'heifer', 'young bull', 'cow'] }).notNull(),
    born: day().notNull(),
    damEarTag: text(),
    liveGrams: integer(),
    createdAt: createdAt(),
    version: version(),
  },
  (table) => [
    check('animal_ear_tag_form', sql`${table.earTag} ~ '^UK[0-9]{12}$'`),
    check('animal_dam_form', sql`${table.damEarTag} is null or ${table.damEarTag} ~ '^UK[0-9]{12}$'`),
    check('animal_live_grams', sql`${table.liveGrams} is null or ${table.liveGrams} between 100000 and 1500000`),
  ],
);

/** The medicine book: no kill may be booked before the withdrawal period ends. */
export const medicineRecord = pgTable(
  'medicine_record',
  {
    id: id(),
    animalId: uuid()
      .notNull()
      .references(() => animal.id),
    product: text().notNull(),
    givenOn: day().notNull(),
    withdrawalDays: integer().notNull(),
    createdAt: createdAt(),
  },
  (table) => [
    index().on(table.animalId),
    check('medicine_withdrawal_days', sql`${table.withdrawalDays} between 0 and 365`),
  ],
);
