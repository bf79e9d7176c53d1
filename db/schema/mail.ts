import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id, instant } from './columns.ts';
import { customerOrder } from './orders.ts';

/** The outbox. One row per event, with one Message-ID however often it is tried. */
export const mailMessage = pgTable(
  'mail_message',
  {
    id: id(),
    /** Names the event (`order confirmed <id>`): the same event never writes a second mail. */
    eventKey: text().notNull().unique(),
    kind: text().notNull(),
    orderId: uuid().references(() => customerOrder.id),
    toAddress: text().notNull(),
    subject: text().notNull(),
    text: text().notNull(),
    html: text().notNull(),
    /** [{ filename, contentType, content }] with text content. */
    attachments: jsonb().notNull().default([]),
    messageId: text().notNull().unique(),
    /** Set on marketing mail alone: where one request ends such mail for this address. */
    unsubscribeUrl: text(),
    state: text({ enum: ['queued', 'sent', 'failed', 'bounced'] })
      .notNull()
      .default('queued'),
    attempts: integer().notNull().default(0),
    lastError: text(),
    sentAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [
    index().on(table.orderId),
    index().on(table.state),
    check('mail_single_line_headers', sql`${table.toAddress} !~ '[\r\n]' and ${table.subject} !~ '[\r\n]'`),
  ],
);
