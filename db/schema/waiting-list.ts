import { sql } from 'drizzle-orm';
import { bigint, check, index, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { WAITING_STATES } from '#shared/domain/waiting-state.ts';
import { offer } from './allocations.ts';
import { cuttingDay } from './carcases.ts';
import { createdAt, id, instant } from './columns.ts';
import { customerOrder } from './orders.ts';
import { boxKind } from './products.ts';

/** Somebody who waits for a sold-out box. While `offered`, one box of the offer is counted as held for them. */
export const waitingEntry = pgTable(
  'waiting_entry',
  {
    id: id(),
    /** The place in the line: who came first is served first. */
    place: bigint({ mode: 'number' }).notNull().generatedAlwaysAsIdentity().unique(),
    boxKindId: uuid()
      .notNull()
      .references(() => boxKind.id),
    /** Null: any day will do. */
    cuttingDayId: uuid().references(() => cuttingDay.id),
    email: text().notNull(),
    /** Unguessable; confirms, takes or leaves exactly this place. */
    token: text().notNull().unique(),
    state: text({ enum: WAITING_STATES }).notNull().default('unconfirmed'),
    offerId: uuid().references(() => offer.id),
    heldUntil: instant(),
    orderId: uuid().references(() => customerOrder.id),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('waiting_entry_once')
      .on(table.email, table.boxKindId, sql`coalesce(${table.cuttingDayId}, '00000000-0000-0000-0000-000000000000')`)
      .where(sql`${table.state} in ('unconfirmed', 'waiting', 'offered')`),
    index().on(table.state, table.place),
    index().on(table.offerId),
    check(
      'waiting_entry_share',
      sql`(${table.state} = 'offered') = (${table.heldUntil} is not null)
        and (${table.state} not in ('offered', 'taken') or ${table.offerId} is not null)`,
    ),
    check('waiting_entry_taken', sql`(${table.state} = 'taken') = (${table.orderId} is not null)`),
  ],
);
