import { sql } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { orderAddition, orderAdditionLine } from '#db/schema/order-additions.ts';
import { collectionSlot, customerOrder, orderLine } from '#db/schema/orders.ts';
import { waitingEntry } from '#db/schema/waiting-list.ts';
import type { Db } from '#server/deps.ts';

/** A counter and the sum of the rows that it counts, where the two disagree. */
export type CounterFault = { what: 'held' | 'sold' | 'taken'; id: string; counted: number; summed: number };

const isSold = sql`${customerOrder.state} not in ('awaiting payment', 'cancelled')`;

/** Compares every counter with the holds and order lines that it stands for, in one look at the database. */
export async function listCounterFaults(db: Db): Promise<CounterFault[]> {
  const result = await db.execute<CounterFault>(sql`
    with summed as (
      select ${offer.id} as id, ${offer.held} as held, ${offer.sold} as sold,
        coalesce(sum(${orderLine.quantity}) filter (where ${customerOrder.isHeld}), 0)::int
          + (select coalesce(sum(${orderAdditionLine.quantity}), 0)::int from ${orderAdditionLine}
            join ${orderAddition} on ${orderAddition.id} = ${orderAdditionLine.additionId}
            where ${orderAddition.state} = 'open' and ${orderAdditionLine.offerId} = ${offer.id})
          + (select count(*)::int from ${waitingEntry}
            where ${waitingEntry.state} = 'offered' and ${waitingEntry.offerId} = ${offer.id}) as held_lines,
        coalesce(sum(${orderLine.quantity}) filter (where ${isSold}), 0)::int as sold_lines
      from ${offer}
      left join ${orderLine} on ${orderLine.offerId} = ${offer.id}
      left join ${customerOrder} on ${customerOrder.id} = ${orderLine.orderId}
      where ${offer.kind} in ('box', 'loose')
      group by ${offer.id}
    ), slots as (
      select ${collectionSlot.id} as id, ${collectionSlot.taken} as taken,
        count(${customerOrder.id}) filter (where ${customerOrder.isHeld} or ${isSold})::int as orders
      from ${collectionSlot}
      left join ${customerOrder} on ${customerOrder.slotId} = ${collectionSlot.id}
      group by ${collectionSlot.id}
    )
    select 'held' as what, id, held as counted, held_lines as summed from summed where held <> held_lines
    union all select 'sold', id, sold, sold_lines from summed where sold <> sold_lines
    union all select 'taken', id, taken, orders from slots where taken <> orders
    order by what, id`);
  return result.rows;
}
