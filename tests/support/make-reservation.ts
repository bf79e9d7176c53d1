import { randomUUID } from 'node:crypto';
import { reservation, reservationLine } from '#db/schema/trade.ts';
import type { Db } from '#db/client.ts';

type Line = Omit<typeof reservationLine.$inferInsert, 'reservationId'>;
type Head = Omit<typeof reservation.$inferInsert, 'requestKey'>;

/** A reservation as the butcher left it: one hindquarter, unless told otherwise. Nothing is worked in. */
export async function makeReservation(db: Db, head: Head, lines?: Line[]) {
  const rows = await db
    .insert(reservation)
    .values({ ...head, requestKey: randomUUID() })
    .returning();
  const made = rows[0];
  if (!made) throw new Error('The reservation was not kept.');
  const wanted: Line[] = lines ?? [{ kind: 'unit', unitKind: 'hind', tenthPencePerKg: 7_200 }];
  const kept = await db
    .insert(reservationLine)
    .values(wanted.map((line) => ({ ...line, reservationId: made.id })))
    .returning();
  return { ...made, lines: kept };
}
