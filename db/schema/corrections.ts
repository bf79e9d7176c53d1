import { sql } from 'drizzle-orm';
import { check, index, jsonb, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { user } from './auth.ts';
import { carcase, cuttingSpecification } from './carcases.ts';
import { createdAt, id } from './columns.ts';
import type { CorrectionRow } from '#shared/engine/cutout/propose-correction.ts';

/** What the owner decided on percentages that the farm's own scales proposed. */
export const specificationCorrection = pgTable(
  'specification_correction',
  {
    id: id(),
    /** The edition that the proposal was worked out from. */
    specificationId: uuid()
      .notNull()
      .references(() => cuttingSpecification.id),
    /** Names the edition, the sides and their weights: the same proposal is decided once. */
    key: text().notNull().unique(),
    decision: text({ enum: ['accepted', 'rejected'] }).notNull(),
    /** The edition that accepting it wrote. */
    resultId: uuid().references(() => cuttingSpecification.id),
    rows: jsonb().$type<CorrectionRow[]>().notNull(),
    byUserId: uuid()
      .notNull()
      .references(() => user.id),
    createdAt: createdAt(),
  },
  (table) => [
    index().on(table.specificationId),
    check('specification_correction_result', sql`(${table.decision} = 'accepted') = (${table.resultId} is not null)`),
  ],
);

/** A side teaches once, whatever was decided. */
export const specificationCorrectionSide = pgTable(
  'specification_correction_side',
  {
    id: id(),
    correctionId: uuid()
      .notNull()
      .references(() => specificationCorrection.id),
    carcaseId: uuid()
      .notNull()
      .references(() => carcase.id),
    side: text({ enum: ['left', 'right'] }).notNull(),
  },
  (table) => [index().on(table.correctionId), unique('side_teaches_once').on(table.carcaseId, table.side)],
);
