import { readCustomerSettings } from '#server/account/customer-settings.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { getFarm } from '#server/farm/farm-queries.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { takeFree } from '#server/orders/stock-queries.ts';
import { boxKeptMail } from './waiting-mails.ts';
import { listOverdue, listServable, lockPlace, readPlace, updatePlace } from './waiting-queries.ts';
import { giveUp, placeUrl } from './waiting-service.ts';

const HOUR_MS = 3_600_000;
/** A place that its address never confirmed is forgotten after two days. */
const CONFIRM_WITHIN_MS = 48 * HOUR_MS;

type Servable = Awaited<ReturnType<typeof listServable>>[number];

/**
 * The worker's task: takes back what was kept too long, then keeps what is free for the next in line. Each place is one
 * transaction that looks again, so that two runs at once, or a visitor who is quicker, never give one box twice.
 */
export async function serveWaitingList(deps: Deps): Promise<void> {
  const now = deps.clock.now();
  const askedBefore = new Date(now.getTime() - CONFIRM_WITHIN_MS);
  for (const id of await listOverdue(deps.db, { now, askedBefore })) {
    await deps.db.transaction(async (tx) => {
      const place = await lockPlace(tx, { id });
      const isOver = place?.state === 'unconfirmed' || (place?.heldUntil && place.heldUntil <= now);
      if (place && isOver) await giveUp(tx, place, 'lapsed');
    });
  }
  const { waitingHoldHours } = await readCustomerSettings(deps.db, deps.clock.today());
  const latest = new Date(now.getTime() + waitingHoldHours * HOUR_MS);
  for (const servable of await listServable(deps.db, now)) {
    const until = latest < servable.cutOffAt ? latest : servable.cutOffAt;
    await deps.db.transaction((tx) => keepFor(tx, deps, { servable, until }));
  }
}

async function keepFor(tx: Tx, deps: Deps, { servable, until }: { servable: Servable; until: Date }): Promise<void> {
  const { placeId, offerId, dayId, day } = servable;
  const place = await lockPlace(tx, { id: placeId });
  // Served by the day before, or by another run.
  if (place?.state !== 'waiting') return;
  if (!(await takeFree(tx, { offerId, quantity: 1 }, { dayId, into: 'held' }))) return;
  await updatePlace(tx, placeId, { state: 'offered', offerId, heldUntil: until });
  const box = (await readPlace(tx, place.token))?.box ?? '';
  await queueMail(tx, {
    eventKey: `waiting list kept ${placeId}`,
    kind: 'waiting list, box kept',
    to: place.email,
    ...boxKeptMail({ farm: await getFarm(tx), box, url: placeUrl(deps, place.token), day, until }),
  });
}
