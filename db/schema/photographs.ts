import { sql } from 'drizzle-orm';
import { check, customType, index, integer, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { PHOTOGRAPH_TYPES } from '#shared/domain/photograph.ts';
import { createdAt, id } from './columns.ts';
import { boxKind } from './products.ts';

const bytea = customType<{ data: Buffer }>({ dataType: () => 'bytea' });

/** Pictures of a kind of box, in the database so that its backups hold them. */
export const boxPhotograph = pgTable(
  'box_photograph',
  {
    id: id(),
    boxKindId: uuid()
      .notNull()
      .references(() => boxKind.id, { onDelete: 'cascade' }),
    /** SHA-256 of the bytes, hexadecimal: the address that it is served at never shows anything else. */
    hash: text().notNull(),
    contentType: text({ enum: PHOTOGRAPH_TYPES }).notNull(),
    bytes: bytea().notNull(),
    width: integer().notNull(),
    height: integer().notNull(),
    /** What is to be seen, in words. */
    alt: text().notNull(),
    createdAt: createdAt(),
  },
  (table) => [
    unique().on(table.boxKindId, table.hash),
    index().on(table.hash),
    check('box_photograph_size', sql`octet_length(${table.bytes}) between 1 and 2000000`),
    check('box_photograph_pixels', sql`${table.width} between 1 and 4000 and ${table.height} between 1 and 4000`),
    check('box_photograph_hash', sql`${table.hash} ~ '^[0-9a-f]{64}$'`),
  ],
);
