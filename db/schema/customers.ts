import { sql } from 'drizzle-orm';
import { boolean, check, index, integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { CONSENT_SOURCES } from '#shared/domain/consent.ts';
import { user } from './auth.ts';
import { createdAt, id } from './columns.ts';
import { customerOrder } from './orders.ts';

/** What an account holder lets us remember for the next checkout. Name and e-mail are the account's own. */
export const customerProfile = pgTable('customer_profile', {
  userId: uuid()
    .primaryKey()
    .references(() => user.id, { onDelete: 'cascade' }),
  phone: text().notNull(),
});

/** An address that was ever asked about marketing mail. Order mail never looks here. */
export const marketingContact = pgTable(
  'marketing_contact',
  {
    id: id(),
    email: text().notNull().unique(),
    /** Unguessable; its holder can end the mails without signing in. */
    token: text().notNull().unique(),
    isSubscribed: boolean().notNull(),
    createdAt: createdAt(),
  },
  (table) => [check('marketing_contact_lower_case', sql`${table.email} = lower(${table.email})`)],
);

/** Each yes and each no, kept as proof: when, to which words, and where it was said. Never changed. */
export const consentEntry = pgTable(
  'consent_entry',
  {
    id: id(),
    contactId: uuid()
      .notNull()
      .references(() => marketingContact.id, { onDelete: 'cascade' }),
    isGiven: boolean().notNull(),
    /** Edition of the words that were agreed to. */
    wordingVersion: integer().notNull(),
    source: text({ enum: CONSENT_SOURCES }).notNull(),
    createdAt: createdAt(),
  },
  (table) => [index().on(table.contactId, table.createdAt)],
);

/** What a customer thought of an order that they have; theirs to change. */
export const orderFeedback = pgTable(
  'order_feedback',
  {
    orderId: uuid()
      .primaryKey()
      .references(() => customerOrder.id),
    stars: integer().notNull(),
    words: text().notNull(),
    createdAt: createdAt(),
    changedAt: createdAt(),
  },
  (table) => [check('order_feedback_stars', sql`${table.stars} between 1 and 5`)],
);
