import { date, integer, timestamp, uuid } from 'drizzle-orm/pg-core';

export const id = () => uuid().primaryKey().defaultRandom();
export const createdAt = () => timestamp({ withTimezone: true }).notNull().defaultNow();
export const instant = () => timestamp({ withTimezone: true });

/** A calendar date in Europe/London, as `YYYY-MM-DD` text. */
export const day = () => date({ mode: 'string' });

/** Raised by each edit; an edit names the version it read, so that the second of two editors is told. */
export const version = () => integer().notNull().default(1);
