import { index, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { user } from './auth.ts';
import { createdAt, id } from './columns.ts';

/** Who changed what, and from what to what. Written in the transaction of the change. */
export const auditEntry = pgTable(
  'audit_entry',
  {
    id: id(),
    byUserId: uuid().references(() => user.id),
    action: text().notNull(),
    subject: text().notNull(),
    subjectId: text().notNull(),
    detail: jsonb().notNull().default({}),
    createdAt: createdAt(),
  },
  (table) => [index().on(table.subject, table.subjectId), index().on(table.createdAt)],
);
