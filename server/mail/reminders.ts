import { unsubscribeUrl } from '#server/account/consent.ts';
import { findContact } from '#server/account/consent-queries.ts';
import { readCustomerSettings } from '#server/account/customer-settings.ts';
import type { Deps } from '#server/deps.ts';
import { lockOrder } from '#server/orders/order-queries.ts';
import { readOrderFacts } from '#server/orders/read-order.ts';
import { addDays, londonDay } from '#shared/domain/day.ts';
import { cutOffTomorrowMail } from './cut-off-tomorrow.ts';
import { orderAgainMail } from './order-again.ts';
import { queueMail } from './outbox.ts';
import { findNextDayOnSale, listClosing, listNewestOrders } from './reminder-queries.ts';

const DAY_MS = 86_400_000;
/** Who was not invited within this many weeks of being due (nothing was on sale) is left in peace. */
const INVITE_WITHIN_WEEKS = 4;

/**
 * The worker's daily task: reminds once, the day before orders close, of every order that can still be changed. Who
 * ordered today has just read until when.
 */
export async function tellCutOffs(deps: Deps): Promise<void> {
  const now = deps.clock.now();
  const today = deps.clock.today();
  const rows = await listClosing(deps.db, { after: now, until: new Date(now.getTime() + 2 * DAY_MS) });
  for (const { orderId, cutOffAt, reachedPaymentAt } of rows) {
    if (londonDay(cutOffAt) !== addDays(today, 1) || londonDay(reachedPaymentAt) === today) continue;
    await deps.db.transaction(async (tx) => {
      const order = await lockOrder(tx, { id: orderId });
      if (order?.state !== 'confirmed') return;
      await queueMail(tx, {
        eventKey: `cut-off tomorrow ${order.id}`,
        kind: 'cut-off tomorrow',
        orderId: order.id,
        to: order.email,
        ...cutOffTomorrowMail(await readOrderFacts(deps, tx, order)),
      });
    });
  }
}

/** The worker's daily task: one invitation after each last order, for those who agreed, while there is something to buy. */
export async function inviteAgain(deps: Deps): Promise<void> {
  const today = deps.clock.today();
  const next = await findNextDayOnSale(deps.db, deps.clock.now());
  if (!next) return;
  const { inviteAfterWeeks } = await readCustomerSettings(deps.db, today);
  const latest = addDays(today, -7 * inviteAfterWeeks);
  const earliest = addDays(latest, -7 * INVITE_WITHIN_WEEKS);
  for (const { order, day, token } of await listNewestOrders(deps.db)) {
    const isDone = order.state === 'collected' || order.state === 'delivered';
    if (!isDone || day > latest || day < earliest) continue;
    await deps.db.transaction(async (tx) => {
      const contact = await findContact(tx, { token });
      if (!contact?.isSubscribed) return;
      const url = unsubscribeUrl(deps, token);
      await queueMail(tx, {
        eventKey: `invited again after ${order.id}`,
        kind: 'invitation to order again',
        orderId: order.id,
        to: order.email,
        unsubscribeUrl: url,
        ...orderAgainMail(await readOrderFacts(deps, tx, order), { next, unsubscribeUrl: url }),
      });
    });
  }
}
