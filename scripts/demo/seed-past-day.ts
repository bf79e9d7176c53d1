import { eq, inArray } from 'drizzle-orm';
import type { Chance } from '#db/seed/chance.ts';
import type { DemoPeople } from '#db/seed/demo-people.ts';
import { mailMessage } from '#db/schema/mail.ts';
import { customerOrder } from '#db/schema/orders.ts';
import { pack } from '#db/schema/packs.ts';
import { findPublishedAllocation } from '#server/allocation/allocation-queries.ts';
import { getCarcase } from '#server/carcases/carcase-service.ts';
import { closeCuttingDay } from '#server/carcases/close-day-service.ts';
import { recordMovements } from '#server/carcases/ledger-queries.ts';
import { confirmCollectionMails } from '#server/collections/collection-mails.ts';
import { markOrder } from '#server/collections/run-sheet.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { fillOrders } from '#server/packs/fill-service.ts';
import { markCut } from '#server/packs/pack-queries.ts';
import { readPackingDay } from '#server/packs/packing-day.ts';
import { dispatchReservation } from '#server/trade/dispatch-service.ts';
import { listReservations } from '#server/trade/reservation-service.ts';
import { addDays, londonInstant } from '#shared/domain/day.ts';
import { weighPacks } from './weigh-packs.ts';
import { onDay } from './demo-deps.ts';
import type { SeededDay } from './seed-days.ts';

type Past = { day: SeededDay; people: DemoPeople };

/** The day that is over: cut, packed, filled, collected and closed. */
export async function seedPastDay(deps: Deps, chance: Chance, { day, people }: Past): Promise<void> {
  const { ownerId, packerId } = people;
  const onTheDay = onDay(deps, day.day, '15:00');
  await packEverything(onTheDay, chance, { dayId: day.id, packerId });
  await fillOrders(onTheDay, packerId, day.id);
  await handOver(onDay(deps, addDays(day.day, 1), '09:00'), { day, ownerId, packerId });
  await sendTrade(onDay(deps, addDays(day.day, 1), '07:30'), { day, ownerId });
  const after = onDay(deps, addDays(day.day, 4));
  await closeCuttingDay(after, ownerId, { dayId: day.id, version: 1 });
}

/** As the cold room weighs packs in, but all of the day in one go. */
async function packEverything(
  deps: Deps,
  chance: Chance,
  { dayId, packerId }: { dayId: string; packerId: string },
): Promise<void> {
  const { cuttingList, carcases } = await readPackingDay(deps.db, dayId);
  const published = await findPublishedAllocation(deps.db, dayId);
  const mince = published?.input.input.mince?.productCutId ?? '';
  const plan = published?.plan.plan.cuts ?? [];
  const useBy = new Map(published?.input.input.cuts.map((cut) => [cut.id, cut.useByDays]));
  const packedOn = deps.clock.today();
  const rows = weighPacks(chance, { cuttingList, plan, mince }).flatMap(({ carcaseId, cutId, grams }) =>
    grams.map((each) => ({
      cuttingDayId: dayId,
      carcaseId,
      cutId,
      grams: each,
      code: makeCode(chance),
      packedOn,
      useBy: addDays(packedOn, useBy.get(cutId) ?? 5),
    })),
  );
  await deps.db.transaction(async (tx) => {
    for (const { id } of carcases) await enterLedger(tx, { carcaseId: id, packerId });
    const packs = await tx.insert(pack).values(rows).returning();
    await recordMovements(
      tx,
      packs.map(({ id, carcaseId, grams }) => ({
        carcaseId,
        packId: id,
        fromPlace: 'carcase' as const,
        toPlace: 'chiller' as const,
        grams,
        reason: 'packed',
        byUserId: packerId,
      })),
    );
    for (const { id } of carcases) await markCut(tx, id);
  });
}

async function enterLedger(tx: Tx, { carcaseId, packerId }: { carcaseId: string; packerId: string }): Promise<void> {
  const { coldGrams } = await getCarcase(tx, carcaseId);
  const movement = { carcaseId, fromPlace: null, toPlace: 'carcase' as const, byUserId: packerId };
  await recordMovements(tx, [{ ...movement, grams: coldGrams, reason: 'cold weight' }]);
}

function makeCode(chance: Chance): string {
  const alphabet = [...'23456789ABCDEFGHJKLMNPQRSTUVWXYZ'];
  return Array.from({ length: 10 }, () => chance.pick(alphabet)).join('');
}

/** Everybody is told and comes for their box, but for one who forgot. What could not be filled was settled before. */
async function handOver(
  deps: Deps,
  { day, ownerId, packerId }: { day: SeededDay; ownerId: string; packerId: string },
): Promise<void> {
  const orders = await deps.db.select().from(customerOrder).where(eq(customerOrder.cuttingDayId, day.id));
  const open = orders.filter((order) => order.state !== 'packed').map((order) => order.orderNo);
  if (open.length > 0) throw new Error(`Orders ${open.join(', ')} of the past day could not be filled.`);
  const orderIds = orders.map((order) => order.id);
  await confirmCollectionMails(deps, { dayId: day.id, orderIds, byUserId: ownerId });
  // They went out three weeks ago.
  const sentAt = londonInstant(addDays(day.day, 1), '09:01');
  await deps.db
    .update(mailMessage)
    .set({ state: 'sent', attempts: 1, sentAt, createdAt: sentAt })
    .where(inArray(mailMessage.orderId, orderIds));
  for (const [index, order] of orders.entries()) {
    const state = index === orders.length - 1 ? 'missed' : 'collected';
    await markOrder(deps, { orderId: order.id, version: order.version + 1, state, byUserId: packerId });
  }
}

/** The butchers' pieces at their scale weight, and the packs that were filled for them. */
async function sendTrade(deps: Deps, { day, ownerId }: { day: SeededDay; ownerId: string }): Promise<void> {
  const reservations = await listReservations(deps, null);
  for (const { id, version, dayId, lines } of reservations) {
    if (dayId !== day.id) continue;
    const pieces = lines.filter((line) => line.kind === 'unit');
    const weights = pieces.map((line) => ({ lineId: line.id, grams: line.grams }));
    await dispatchReservation(deps, ownerId, { reservationId: id, version, weights, isShortAccepted: true });
  }
}
