import { bigint, boolean, index, integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id, instant } from './columns.ts';

export const user = pgTable('user', {
  id: id(),
  name: text().notNull(),
  email: text().notNull().unique(),
  emailVerified: boolean().notNull().default(false),
  image: text(),
  role: text({ enum: ['customer', 'butcher', 'packer', 'owner'] })
    .notNull()
    .default('customer'),
  banned: boolean().default(false),
  banReason: text(),
  banExpires: instant(),
  createdAt: createdAt(),
  updatedAt: createdAt(),
});

export const session = pgTable(
  'session',
  {
    id: id(),
    token: text().notNull().unique(),
    userId: uuid()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    expiresAt: instant().notNull(),
    ipAddress: text(),
    userAgent: text(),
    impersonatedBy: uuid(),
    createdAt: createdAt(),
    updatedAt: createdAt(),
  },
  (table) => [index().on(table.userId)],
);

export const account = pgTable(
  'account',
  {
    id: id(),
    accountId: text().notNull(),
    providerId: text().notNull(),
    userId: uuid()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    accessToken: text(),
    refreshToken: text(),
    idToken: text(),
    accessTokenExpiresAt: instant(),
    refreshTokenExpiresAt: instant(),
    scope: text(),
    password: text(),
    createdAt: createdAt(),
    updatedAt: createdAt(),
  },
  (table) => [index().on(table.userId)],
);

export const verification = pgTable(
  'verification',
  {
    id: id(),
    identifier: text().notNull(),
    value: text().notNull(),
    expiresAt: instant().notNull(),
    createdAt: createdAt(),
    updatedAt: createdAt(),
  },
  (table) => [index().on(table.identifier)],
);

export const rateLimit = pgTable('rate_limit', {
  id: id(),
  key: text().notNull().unique(),
  count: integer().notNull(),
  lastRequest: bigint({ mode: 'number' }).notNull(),
});
